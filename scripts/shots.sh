#!/usr/bin/env bash
# Screenshots of every screen in both themes and three widths, to shots/. Works on a throwaway database.
set -euo pipefail
source "$(dirname "$0")/lib/common.sh"
source "$(dirname "$0")/lib/database.sh"

packages_up
tools_up chromium=chromium
database_up
build_up
port="${SHOTS_PORT:-4180}"
node_modules/.bin/jiti tests/e2e/server.ts "$port" &
server=$!
trap 'kill "$server" 2>/dev/null || true' EXIT
for _ in $(seq 1 120); do
  if (exec 3<>"/dev/tcp/127.0.0.1/$port") 2>/dev/null; then break; fi
  sleep 0.5
done
npx --no-install jiti scripts/shots.ts "http://127.0.0.1:$port" "$@"
