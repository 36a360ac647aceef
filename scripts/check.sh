#!/usr/bin/env bash
# The inner loop: lint, types, unit and external tests. Under four minutes.
set -euo pipefail
source "$(dirname "$0")/lib/common.sh"

packages_up
say 'Lint'
npx --no-install eslint . --max-warnings 0
npx --no-install prettier --check . --log-level warn
say 'Types'
npx --no-install vue-tsc --build --noEmit
say 'Unit and external tests'
npx --no-install vitest run --project unit --project external
