#!/usr/bin/env bash
# Everything from a clean clone to a running product. PORT and HOST choose the address.
set -euo pipefail
source "$(dirname "$0")/lib/common.sh"
source "$(dirname "$0")/lib/database.sh"

packages_up
database_up
if [ -n "${NUXT_DATABASE_OWNER_URL:-}" ]; then
  npx --no-install jiti scripts/migrate.ts
fi
if [ "${TENTERFRAME_LOCAL_DATABASE:-}" = 1 ]; then
  export NUXT_DEMO=1
  npx --no-install jiti scripts/seed-demo.ts
fi
build_up

export HOST="${HOST:-127.0.0.1}" PORT="${PORT:-3000}"
export NITRO_HOST="$HOST" NITRO_PORT="$PORT"
say "Tenterframe is at http://$HOST:$PORT"
if [ "${NUXT_DEMO:-}" = 1 ]; then npx --no-install jiti scripts/print-sign-ins.ts; fi
exec node .output/server/index.mjs
