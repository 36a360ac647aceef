#!/usr/bin/env bash
# The development server on the local database, with the demo workroom.
set -euo pipefail
source "$(dirname "$0")/lib/common.sh"
source "$(dirname "$0")/lib/database.sh"

packages_up
database_up
npx --no-install jiti scripts/migrate.ts
export NUXT_DEMO=1
npx --no-install jiti scripts/seed-demo.ts
exec npx --no-install nuxt dev --host "${HOST:-127.0.0.1}" --port "${PORT:-3000}"
