-- Isolation of practices: row-level security forced on every table of a practice, for a role that owns nothing.
-- app.practice, app.user and app.token are set per transaction (db/client.ts); unset, nothing is visible.

create function app_practice() returns uuid language sql stable as
$$ select nullif(current_setting('app.practice', true), '')::uuid $$;
--> statement-breakpoint
create function app_user() returns text language sql stable as
$$ select nullif(current_setting('app.user', true), '') $$;
--> statement-breakpoint
create function app_token() returns text language sql stable as
$$ select nullif(current_setting('app.token', true), '') $$;
--> statement-breakpoint
do $$
declare
  tenant text;
begin
  foreach tenant in array array['memberships', 'invitations', 'api_tokens', 'projects', 'appointments', 'sections', 'section_versions',
    'results', 'materials', 'criteria', 'audit_events', 'outbox_mails']
  loop
    execute format('alter table %I enable row level security', tenant);
    execute format('alter table %I force row level security', tenant);
    execute format('create policy %I on %I using (practice_id = app_practice()) with check (practice_id = app_practice())', tenant || '_of_practice', tenant);
  end loop;
end $$;
--> statement-breakpoint
alter table practices enable row level security;
--> statement-breakpoint
alter table practices force row level security;
--> statement-breakpoint
create policy practices_own on practices using (id = app_practice()) with check (id = app_practice());
--> statement-breakpoint
-- a person who signs in may see which practices are theirs, before one is chosen
create policy memberships_own on memberships for select using (user_id = app_user());
--> statement-breakpoint
create policy practices_of_user on practices for select
  using (exists (select 1 from memberships where memberships.practice_id = practices.id and memberships.user_id = app_user()));
--> statement-breakpoint
-- whoever holds the token may see what it opens
create policy invitations_by_token on invitations for select using (token_hash = app_token());
--> statement-breakpoint
create policy api_tokens_by_token on api_tokens for select using (token_hash = app_token());
--> statement-breakpoint
create function refuse_change() returns trigger language plpgsql as
$$ begin raise exception 'audit events are append-only' using errcode = 'insufficient_privilege'; end $$;
--> statement-breakpoint
create trigger audit_events_append_only before update or delete on audit_events for each row execute function refuse_change();
--> statement-breakpoint
create trigger audit_events_no_truncate before truncate on audit_events for each statement execute function refuse_change();
--> statement-breakpoint
-- the queue's own schema belongs to the owner; the application may add jobs and nothing else
create function enqueue_job(task text, payload json) returns void language plpgsql security definer set search_path = pg_catalog as
$$ begin perform graphile_worker.add_job(task, payload, max_attempts := 12); end $$;
--> statement-breakpoint
revoke all on function enqueue_job(text, json) from public;
--> statement-breakpoint
grant usage on schema public to underfall_app;
--> statement-breakpoint
grant execute on function enqueue_job(text, json) to underfall_app;
--> statement-breakpoint
grant select, insert, update, delete on practices, users, memberships, invitations, sessions, password_resets, api_tokens, projects,
  appointments, sections, section_versions, results, materials, criteria, outbox_mails, rate_limits to underfall_app;
--> statement-breakpoint
grant select, insert on audit_events to underfall_app;
