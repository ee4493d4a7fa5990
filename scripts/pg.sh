#!/usr/bin/env bash
# A PostgreSQL cluster of our own, on loopback, in a folder of ours. The server refuses to run as root, so every server
# command goes through the postgres account then; otherwise it runs as the caller.
#   scripts/pg.sh start DIR PORT [fast]   fast: no fsync, for throwaway clusters only
#   scripts/pg.sh stop DIR
#   scripts/pg.sh destroy DIR
set -euo pipefail

command="$1"
dir="$(realpath -m "$2")"
port="${3:-55440}"
mode="${4:-}"
bin="${PG_BIN:-$(ls -d /usr/lib/postgresql/*/bin 2>/dev/null | sort -V | tail -n 1)}"

as_server() { if [ "$(id -u)" = 0 ]; then runuser -u postgres -- "$@"; else "$@"; fi; }
psql_super() { PGPASSWORD=underfall "$bin/psql" -h 127.0.0.1 -p "$port" -U underfall_super -d "${1:-postgres}" -v ON_ERROR_STOP=1 -qtA; }

make_cluster() {
  local pw
  pw="$(mktemp "$dir/pw.XXXXXX")"
  printf 'underfall' >"$pw"
  [ "$(id -u)" = 0 ] && chown postgres "$pw"
  as_server "$bin/initdb" -D "$dir/data" -U underfall_super --pwfile="$pw" --auth=scram-sha-256 -E UTF8 --locale=C.UTF-8 \
    --no-instructions >"$dir/initdb.log" 2>&1
  rm -f "$pw"
}

# The owner runs migrations and owns every table; the application owns nothing and cannot pass row-level security.
make_roles() {
  psql_super <<'SQL'
do $$ begin
  if not exists (select from pg_roles where rolname = 'underfall_owner') then
    create role underfall_owner login password 'underfall' nosuperuser nobypassrls createdb;
  end if;
  if not exists (select from pg_roles where rolname = 'underfall_app') then
    create role underfall_app login password 'underfall' nosuperuser nobypassrls nocreatedb nocreaterole;
  end if;
end $$;
SQL
  if [ -z "$(echo "select 1 from pg_database where datname = 'underfall'" | psql_super)" ]; then
    echo "create database underfall owner underfall_owner" | psql_super
  fi
}

case "$command" in
  start)
    mkdir -p "$dir"
    [ "$(id -u)" = 0 ] && chown postgres "$dir"
    cd "$dir" # the server's account must be able to enter the working directory
    [ -f "$dir/data/PG_VERSION" ] || make_cluster
    options="-c listen_addresses=127.0.0.1 -c port=$port -c unix_socket_directories='' -c max_connections=80"
    [ "$mode" = fast ] && options="$options -c fsync=off -c synchronous_commit=off -c full_page_writes=off"
    as_server "$bin/pg_ctl" -D "$dir/data" -w -t 60 -l "$dir/server.log" -o "$options" start >/dev/null
    make_roles
    ;;
  stop)
    cd "$dir"
    as_server "$bin/pg_ctl" -D "$dir/data" -m fast -w -t 60 stop >/dev/null
    ;;
  destroy)
    cd "$dir" && { as_server "$bin/pg_ctl" -D "$dir/data" -m immediate -w stop >/dev/null 2>&1 || true; }
    cd / && rm -rf "$dir"
    ;;
  *)
    echo "usage: scripts/pg.sh start DIR PORT [fast] | stop DIR | destroy DIR" >&2
    exit 64
    ;;
esac
