# Sourced by the start, dev and test scripts.
#
# database_up    a PostgreSQL cluster of this checkout's own, on loopback; exports NUXT_DATABASE_URL (role app),
#                NUXT_DATABASE_OWNER_URL (role owner), NUXT_SESSION_PASSWORD and TENTERFRAME_LOCAL_DATABASE=1.
#                Does nothing when NUXT_DATABASE_URL is given.
# database_down  stops that cluster.
#
# PostgreSQL refuses root, so root works as the user `postgres`. Where that user cannot reach the checkout, the cluster
# lies under the system's temporary folder.

database_root="$(cd "$(dirname "${BASH_SOURCE[0]}")/../.." && pwd)"
database_data="$database_root/.data"

database_as() {
  if [ "$(id -u)" = 0 ]; then
    (cd / && runuser -u postgres -- "$@")
  else
    "$@"
  fi
}

database_bin() {
  local found
  found="$(ls -d /usr/lib/postgresql/*/bin 2>/dev/null | sort -V | tail -n 1)"
  if [ -z "$found" ] && command -v initdb >/dev/null 2>&1; then found="$(dirname "$(readlink -f "$(command -v initdb)")")"; fi
  [ -n "$found" ] && [ -x "$found/initdb" ] && printf '%s' "$found"
}

database_install() {
  local command='apt-get update && apt-get install -y postgresql'
  if [ "$(id -u)" = 0 ]; then
    echo 'Installing PostgreSQL from Debian.' >&2
    (apt-get update -qq && DEBIAN_FRONTEND=noninteractive apt-get install -y -qq postgresql) >&2
  elif command -v sudo >/dev/null 2>&1 && sudo -n true 2>/dev/null; then
    echo 'Installing PostgreSQL from Debian.' >&2
    (sudo apt-get update -qq && sudo DEBIAN_FRONTEND=noninteractive apt-get install -y -qq postgresql) >&2
  else
    echo "PostgreSQL is missing. Install it with this command, then start again: sudo sh -c '$command'" >&2
    return 1
  fi
}

database_random() { head -c "$1" /dev/urandom | od -An -v -tx1 | tr -d ' \n'; }

database_answers() { (exec 3<>"/dev/tcp/127.0.0.1/$1") 2>/dev/null; }

database_free_port() {
  node -e "const s=require('node:net').createServer();s.listen(0,'127.0.0.1',()=>{console.log(s.address().port);s.close()})"
}

database_secrets() {
  if [ ! -s "$database_data/secrets" ]; then
    (
      umask 077
      {
        echo "super=$(database_random 24)"
        echo "owner=$(database_random 24)"
        echo "app=$(database_random 24)"
        echo "session=$(database_random 32)"
      } >"$database_data/secrets.new"
      mv "$database_data/secrets.new" "$database_data/secrets"
    )
  fi
  chmod 600 "$database_data/secrets"
}

database_secret() { sed -n "s/^$1=//p" "$database_data/secrets"; }

# Where the cluster lies: .data/pg, or the temporary folder when the user postgres cannot get there.
database_place() {
  if [ "$(id -u)" != 0 ] || database_as test -x "$database_data"; then
    printf '%s' "$database_data/pg"
  else
    printf '%s' "${TMPDIR:-/tmp}/tenterframe-$(printf '%s' "$database_root" | cksum | cut -d ' ' -f 1)/pg"
  fi
}

database_create_cluster() {
  local bin="$1" place="$2" password_file
  mkdir -p "$place"
  if [ "$(id -u)" = 0 ]; then
    chmod 755 "$(dirname "$place")"
    chown postgres "$place"
  fi
  chmod 700 "$place"
  password_file="$(mktemp)"
  database_secret super >"$password_file"
  if [ "$(id -u)" = 0 ]; then chown postgres "$password_file"; fi
  database_as "$bin/initdb" -D "$place" -U postgres -A scram-sha-256 --pwfile="$password_file" --locale=C.UTF-8 --encoding=UTF8 >/dev/null || {
    rm -f "$password_file"
    return 1
  }
  rm -f "$password_file"
}

database_start() {
  local bin="$1" place="$2" port="$3"
  database_as "$bin/pg_ctl" start -w -t 60 -s -D "$place" -l "$place/server.log" \
    -o "-p $port -c listen_addresses=127.0.0.1 -c unix_socket_directories='' -c max_connections=120 -c password_encryption=scram-sha-256" 9>&-
}

database_query() {
  local port="$1" base="$2"
  shift 2
  PGPASSWORD="$(database_secret super)" psql -X -q -t -A -v ON_ERROR_STOP=1 -h 127.0.0.1 -p "$port" -U postgres -d "$base" "$@"
}

# Roles and the database. The owner may create databases, which the tests need for their throwaway ones.
database_create_roles() {
  local port="$1"
  database_query "$port" postgres >/dev/null <<SQL || return 1
set client_min_messages = warning;
do \$\$ begin
  if not exists (select from pg_roles where rolname = 'tenterframe_owner') then create role tenterframe_owner; end if;
  if not exists (select from pg_roles where rolname = 'tenterframe_app') then create role tenterframe_app; end if;
end \$\$;
alter role tenterframe_owner with login createdb nosuperuser nobypassrls nocreaterole password '$(database_secret owner)';
alter role tenterframe_app with login nocreatedb nosuperuser nobypassrls nocreaterole password '$(database_secret app)';
SQL
  if [ "$(database_query "$port" postgres -c "select count(*) from pg_database where datname = 'tenterframe'")" = 0 ]; then
    database_query "$port" postgres -c 'create database tenterframe owner tenterframe_owner' || return 1
    database_query "$port" tenterframe -c 'revoke all on schema public from public; alter schema public owner to tenterframe_owner' || return 1
  fi
}

database_up() {
  if [ -n "${NUXT_DATABASE_URL:-}" ]; then return 0; fi
  mkdir -p "$database_data"
  chmod 755 "$database_data"
  exec 9>"$database_data/lock"
  flock 9
  local result=0
  database_up_locked || result=$?
  exec 9>&-
  return "$result"
}

database_up_locked() {
  local bin place port
  bin="$(database_bin)" || {
    database_install || return 1
    bin="$(database_bin)" || {
      echo 'PostgreSQL was installed but its programs were not found.' >&2
      return 1
    }
  }
  database_secrets
  place="$(database_place)"
  port="$(cat "$database_data/port" 2>/dev/null || true)"

  if [ -z "$port" ] || [ ! -s "$place/postmaster.pid" ] || ! kill -0 "$(head -n 1 "$place/postmaster.pid")" 2>/dev/null || ! database_answers "$port"; then
    if [ ! -s "$place/PG_VERSION" ]; then
      rm -f "$database_data/ready"
      database_create_cluster "$bin" "$place" || return 1
    fi
    if [ -z "$port" ] || database_answers "$port"; then
      port="$(database_free_port)"
      printf '%s' "$port" >"$database_data/port"
    fi
    database_start "$bin" "$place" "$port" || {
      echo "PostgreSQL did not start; its log: $place/server.log" >&2
      return 1
    }
  fi
  if [ ! -e "$database_data/ready" ]; then
    database_create_roles "$port" || return 1
    touch "$database_data/ready"
  fi

  export NUXT_DATABASE_URL="postgres://tenterframe_app:$(database_secret app)@127.0.0.1:$port/tenterframe"
  export NUXT_DATABASE_OWNER_URL="postgres://tenterframe_owner:$(database_secret owner)@127.0.0.1:$port/tenterframe"
  export NUXT_SESSION_PASSWORD="${NUXT_SESSION_PASSWORD:-$(database_secret session)}"
  export TENTERFRAME_LOCAL_DATABASE=1
}

database_down() {
  local bin place
  [ -d "$database_data" ] || return 0
  bin="$(database_bin)" || return 0
  place="$(database_place)"
  [ -s "$place/postmaster.pid" ] || return 0
  database_as "$bin/pg_ctl" stop -s -m fast -D "$place"
}
