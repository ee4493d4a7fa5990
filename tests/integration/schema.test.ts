import { execFileSync } from 'node:child_process';
import { cpSync, mkdtempSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { asApplication, asOwner, asSuperuser } from './support/connect';

/** Tables with a practice column that are read before a practice is known, by a secret only their holder has. */
const readBeforePractice = ['sessions'];

describe('the schema', () => {
  test('migrations apply to an empty database and leave nothing to generate', () => {
    const folder = mkdtempSync('db/.generate-');
    try {
      cpSync('db/migrations', folder, { recursive: true });
      const said = execFileSync(
        process.execPath,
        [
          'node_modules/drizzle-kit/bin.cjs',
          'generate',
          '--dialect=postgresql',
          '--schema=./db/schema/index.ts',
          `--out=./${join(folder)}`,
        ],
        { encoding: 'utf8' },
      );
      expect(said).toContain('No schema changes');
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  test('every table of a practice has row-level security enabled, forced, and a policy', async () => {
    const rows = await asOwner(async (client) => {
      const { rows } = await client.query<{
        name: string;
        enabled: boolean;
        forced: boolean;
        policies: number;
      }>(`
        select c.relname as name, c.relrowsecurity as enabled, c.relforcerowsecurity as forced,
          (select count(*)::int from pg_policy p where p.polrelid = c.oid) as policies
        from pg_class c join pg_attribute a on a.attrelid = c.oid and a.attname = 'practice_id'
        where c.relkind = 'r' and c.relnamespace = 'public'::regnamespace order by c.relname`);
      return rows;
    });
    expect(rows.length).toBeGreaterThanOrEqual(12);
    const open = rows.filter(({ enabled, forced, policies }) => !enabled || !forced || policies === 0);
    expect(open.map(({ name }) => name)).toEqual(readBeforePractice);
  });

  test('the application role is no superuser, bypasses nothing, owns nothing', async () => {
    const [role] = await asSuperuser(
      async (client) =>
        (
          await client.query(
            `select rolsuper, rolbypassrls, rolcreaterole, rolcreatedb from pg_roles where rolname = 'underfall_app'`,
          )
        ).rows,
    );
    expect(role).toEqual({ rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false });
    const owned = await asApplication(
      async (client) =>
        (await client.query(`select relname from pg_class where pg_get_userbyid(relowner) = 'underfall_app'`))
          .rows,
    );
    expect(owned).toEqual([]);
  });

  test('security definer functions are those that are meant', async () => {
    const names = await asOwner(
      async (client) =>
        (
          await client.query<{ name: string }>(
            `select proname as name from pg_proc where prosecdef and pronamespace = 'public'::regnamespace`,
          )
        ).rows,
    );
    expect(names.map(({ name }) => name)).toEqual(['enqueue_job']);
  });
});
