#!/usr/bin/env bash
# npm test: everything, from a bare machine: types, lint, format, unit, verification, integration against a real PostgreSQL, and a
# browser driving the built product. Ends with the line "N passed, N failed" over all of them.
set -uo pipefail
# shellcheck source=scripts/common.sh
source "$(dirname "$0")/common.sh"

ensure_packages
ensure_postgres
ensure_chromium

reports="$data/reports"
rm -rf "$reports"
mkdir -p "$reports"
cluster="$(cluster_folder test-postgres)"
cleanup() {
  trap - EXIT INT TERM
  stop_services
  bash scripts/pg.sh destroy "$cluster"
}
trap 'cleanup; exit 130' INT TERM
trap cleanup EXIT

passed=0
failed=0

# count_step NAME COMMAND...: one pass or one failure.
count_step() {
  local name="$1" began=$SECONDS
  shift
  say "$name"
  if "$@"; then
    passed=$((passed + 1))
    printf '  %s: passed (%ss)\n' "$name" $((SECONDS - began))
  else
    failed=$((failed + 1))
    printf '  %s: FAILED (%ss)\n' "$name" $((SECONDS - began))
  fi
}

# count_suite NAME REPORT COMMAND...: adds the counts of a JSON report; a run that fails without a failed test counts as one.
count_suite() {
  local name="$1" report="$2" began=$SECONDS status=0 counts
  shift 2
  say "$name"
  "$@" || status=$?
  counts="$(node scripts/count-report.mjs "$report" "$status")"
  passed=$((passed + ${counts% *}))
  failed=$((failed + ${counts#* }))
  printf '  %s: %s passed, %s failed (%ss)\n' "$name" "${counts% *}" "${counts#* }" $((SECONDS - began))
}

vitest_suite() {
  count_suite "$1" "$reports/$1.json" node node_modules/vitest/vitest.mjs run --project "$1" --reporter=default \
    --reporter=json --outputFile.json="$reports/$1.json"
}

count_step types npm run --silent typecheck
count_step lint npm run --silent lint
count_step format npm run --silent format:check
count_step "unused code" npm run --silent unused

bash scripts/pg.sh destroy "$cluster"
mkdir -p "$cluster"
pg_port="$(free_port 55470)"
bash scripts/pg.sh start "$cluster" "$pg_port" fast || fail "the test cluster did not start."
database_urls "$pg_port"
WEB_PORT="$(free_port 3111)"
MAIL_SMTP_PORT="$(free_port 2025)"
MAIL_WEB_PORT="$(free_port 2080)"
export WEB_PORT MAIL_SMTP_PORT MAIL_WEB_PORT NEXT_TELEMETRY_DISABLED=1 COOKIE_SECURE=0
export SMTP_URL="smtp://127.0.0.1:$MAIL_SMTP_PORT" UNDERFALL_URL="http://127.0.0.1:$WEB_PORT"
export UNDERFALL_TEST_CLUSTER="$cluster" UNDERFALL_TEST_PG_PORT="$pg_port"
export UNDERFALL_E2E_URL="$UNDERFALL_URL" UNDERFALL_MAIL_WEB="http://127.0.0.1:$MAIL_WEB_PORT"

vitest_suite unit
vitest_suite verification
count_step build build_product
vitest_suite integration

say "starting the product for the browser"
if (npm run --silent db:migrate && npm run --silent db:seed) && export NODE_ENV=production RATE_LIMIT_FACTOR=100 && start_product_services; then
  passed=$((passed + 1))
  count_suite browser "$root/test-results/e2e.json" env -u NODE_ENV node node_modules/@playwright/test/cli.js test
else
  failed=$((failed + 1))
fi

printf '\n%s passed, %s failed\n' "$passed" "$failed"
[ "$failed" = 0 ]
