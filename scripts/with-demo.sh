#!/usr/bin/env bash
# Serves the build with the demo on a throwaway database, and runs a script against it: with-demo.sh script.ts [arguments].
set -euo pipefail
source "$(dirname "$0")/lib/common.sh"
source "$(dirname "$0")/lib/database.sh"

packages_up
tools_up chromium=chromium
database_up
build_up
port="${DEMO_PORT:-4180}"
node_modules/.bin/jiti tests/e2e/server.ts "$port" >&2 &
server=$!
trap 'kill "$server" 2>/dev/null || true' EXIT
for _ in $(seq 1 120); do
  if (exec 3<>"/dev/tcp/127.0.0.1/$port") 2>/dev/null; then break; fi
  sleep 0.5
done
script="$1"
shift
npx --no-install jiti "$script" "http://127.0.0.1:$port" "$@"
