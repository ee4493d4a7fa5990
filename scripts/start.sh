#!/usr/bin/env bash
# npm start: from a bare machine to the demo in the browser. Installs what is missing, starts PostgreSQL on loopback, migrates,
# seeds the demo once, builds, and serves the web process, the worker and the local mail inbox until Ctrl-C.
set -euo pipefail
# shellcheck source=scripts/common.sh
source "$(dirname "$0")/common.sh"

running="$data/running.pid"
if [ -f "$running" ] && kill -0 "$(cat "$running")" 2>/dev/null && tr '\0' ' ' <"/proc/$(cat "$running")/cmdline" | grep -q start.sh; then
  fail "already running (process $(cat "$running")), at $(cat "$data/address" 2>/dev/null)."
fi

ensure_packages
ensure_postgres

cluster="$(cluster_folder postgres)"
cleanup() {
  trap - EXIT INT TERM
  printf '\n'
  say "stopping"
  stop_services
  bash scripts/pg.sh stop "$cluster" 2>/dev/null || true
  rm -f "$running"
}
trap 'cleanup; exit 0' INT TERM HUP
trap cleanup EXIT
echo $$ >"$running"

bash scripts/pg.sh stop "$cluster" 2>/dev/null || true # left over from a killed run
pg_port="$(free_port "${UNDERFALL_PG_PORT:-55432}")"
say "starting PostgreSQL on 127.0.0.1:$pg_port"
bash scripts/pg.sh start "$cluster" "$pg_port"
database_urls "$pg_port"

WEB_PORT="$(free_port "${PORT:-3000}")"
MAIL_SMTP_PORT="$(free_port 1025)"
MAIL_WEB_PORT="$(free_port 1080)"
export WEB_PORT MAIL_SMTP_PORT MAIL_WEB_PORT NEXT_TELEMETRY_DISABLED=1
export SMTP_URL="${SMTP_URL:-smtp://127.0.0.1:$MAIL_SMTP_PORT}"
export UNDERFALL_URL="${UNDERFALL_URL:-http://127.0.0.1:$WEB_PORT}"
export COOKIE_SECURE="${COOKIE_SECURE:-0}"
export NODE_ENV=production

build_product
say "migrating and seeding"
npm run --silent db:migrate
npm run --silent db:seed
start_product_services
printf '%s' "$UNDERFALL_URL" >"$data/address"

cat <<EOT

  Underfall      $UNDERFALL_URL
  mail inbox     http://127.0.0.1:$MAIL_WEB_PORT
  logs           .data/web.log, .data/worker.log, .data/inbox.log

  Demo sign-ins (an invented practice; e-mail · password · part)
$(npm run --silent demo-people)

  Ctrl-C stops everything and loses nothing.

EOT

set +e
wait -n "${service_pids[@]}"
for i in "${!service_pids[@]}"; do
  kill -0 "${service_pids[$i]}" 2>/dev/null || printf 'underfall: the %s process ended; see .data/%s.log\n' "${service_names[$i]}" "${service_names[$i]}" >&2
done
exit 1
