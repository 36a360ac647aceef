#!/usr/bin/env bash
# Every test. TEST_DEPTH=full goes deeper. Closes with one line: N passed, N failed, N skipped.
set -uo pipefail
source "$(dirname "$0")/lib/common.sh"
source "$(dirname "$0")/lib/database.sh"

packages_up || exit 1
tools_up chromium=chromium pdfinfo=poppler-utils qpdf=qpdf rsvg-convert=librsvg2-bin python3:shapely python3:pikepdf python3:ezdxf || exit 1
database_up || exit 1

reports="$root/.data/reports"
rm -rf "$reports"
mkdir -p "$reports"
broken=0

stage() {
  local name="$1"
  shift
  say "$name"
  local began=$SECONDS
  "$@" || {
    broken=1
    echo "FAILED: $name" >&2
  }
  echo "$name: $((SECONDS - began)) s" >&2
}

stage 'Lint' npx --no-install eslint . --max-warnings 0
stage 'Format' npx --no-install prettier --check . --log-level warn
stage 'Types' npx --no-install vue-tsc --build --noEmit
stage 'Unit and external' npx --no-install vitest run --project unit --project external --reporter=default --reporter=json --outputFile.json="$reports/unit.json"
stage 'Components' npx --no-install vitest run --project nuxt --reporter=default --reporter=json --outputFile.json="$reports/nuxt.json"
stage 'Build' build_up
stage 'Server' npx --no-install vitest run --project api --reporter=default --reporter=json --outputFile.json="$reports/api.json"
stage 'Browser' npx --no-install playwright test

node scripts/lib/tally.mjs "$reports" "$broken"
