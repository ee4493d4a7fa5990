import type { Client } from 'pg';
import { beforeAll, describe, expect, test } from 'vitest';
import { pool, withPractice } from '@/db/client';
import { selectSections } from '@/db/queries/work';
import { invite } from '@/lib/server/people';
import { saveCriterion } from '@/lib/server/criteria';
import { saveMaterial } from '@/lib/server/materials';
import { createToken } from '@/lib/server/tokens';
import { asApplication, asOwner, asSuperuser } from './support/connect';
import { makePractice, type TestPractice, unique } from './support/practice';

let ours: TestPractice;
let theirs: TestPractice;

const tables = [
  'memberships',
  'invitations',
  'api_tokens',
  'projects',
  'appointments',
  'sections',
  'section_versions',
  'materials',
  'criteria',
  'audit_events',
  'outbox_mails',
];

async function fill(practice: TestPractice): Promise<void> {
  const { administrator } = practice;
  await invite(administrator, { email: `${unique('guest')}@else.example`, role: 'member' });
  await createToken(administrator, { name: 'script', scopes: ['solve'], days: 1 });
  const criterion = {
    id: '',
    quantity: 'flotation' as const,
    required: 1.2,
    title: 'Own',
    source: 'Own',
    soil: '',
  };
  await saveCriterion(administrator, criterion);
  await saveMaterial(administrator, {
    id: '',
    name: 'Sand',
    kMajor: 1e-4,
    kMinor: 1e-4,
    kSource: 'judgement',
    note: '',
  });
}

beforeAll(async () => {
  ours = await makePractice();
  theirs = await makePractice();
  await fill(ours);
  await fill(theirs);
});

async function enter(client: Client, practiceId: string): Promise<void> {
  await client.query('begin');
  await client.query(`select set_config('app.practice', $1, true)`, [practiceId]);
}

describe('row-level security, past every where clause', () => {
  test.each(tables)('%s: only rows of the practice set, and there are some', async (table) => {
    await asApplication(async (client) => {
      await enter(client, ours.id);
      const { rows } = await client.query<{ practice_id: string }>(
        `select distinct practice_id from ${table}`,
      );
      expect(rows).toEqual([{ practice_id: ours.id }]);
    });
  });

  test.each([...tables, 'practices', 'results'])('%s: nothing without a practice', async (table) => {
    await asApplication(async (client) => {
      expect((await client.query(`select 1 from ${table}`)).rowCount).toBe(0);
      await client.query(`select set_config('app.practice', '', false)`);
      expect((await client.query(`select 1 from ${table}`)).rowCount).toBe(0);
    });
  });

  test.each(tables.filter((table) => table !== 'audit_events'))(
    '%s: no foreign row changes or goes',
    async (table) => {
      await asApplication(async (client) => {
        await enter(client, ours.id);
        const update = `update ${table} set practice_id = practice_id where practice_id = $1`;
        expect((await client.query(update, [theirs.id])).rowCount).toBe(0);
        expect(
          (await client.query(`delete from ${table} where practice_id = $1`, [theirs.id])).rowCount,
        ).toBe(0);
        await client.query('rollback');
      });
    },
  );

  test('no row goes into another practice', async () => {
    await asApplication(async (client) => {
      await enter(client, ours.id);
      const insert = `insert into projects (practice_id, number, name) values ($1, 'x', 'x')`;
      await expect(client.query(insert, [theirs.id])).rejects.toMatchObject({ code: '42501' });
      await client.query('rollback');
      await enter(client, ours.id);
      const move = `update projects set practice_id = $1`;
      await expect(client.query(move, [theirs.id])).rejects.toMatchObject({ code: '42501' });
    });
  });

  test('no row points into another practice', async () => {
    await asApplication(async (client) => {
      await enter(client, ours.id);
      const insert = `insert into appointments (practice_id, project_id, user_id, role) values ($1, $2, $3, 'author')`;
      const row = [ours.id, theirs.projectId, ours.author.userId];
      await expect(client.query(insert, row)).rejects.toMatchObject({ code: '23503' });
      await client.query('rollback');
      await enter(client, ours.id);
      const foreigner = [ours.id, ours.projectId, theirs.author.userId];
      await expect(client.query(insert, foreigner)).rejects.toMatchObject({ code: '23503' });
    });
  });

  test.each([
    'alter table sections disable row level security',
    'alter table sections no force row level security',
    'drop policy sections_of_practice on sections',
    'set role underfall_owner',
    'alter role underfall_app bypassrls',
    'drop trigger audit_events_append_only on audit_events',
    'create table own (id int)',
    'select * from graphile_worker._private_jobs',
  ])('the application may not: %s', async (statement) => {
    await asApplication((client) => expect(client.query(statement)).rejects.toMatchObject({ code: '42501' }));
  });

  test('the owner is held by the policies too', async () => {
    await asOwner(async (client) => {
      expect((await client.query('select 1 from sections')).rowCount).toBe(0);
    });
  });

  test('the setting ends with its transaction, also after an error in it', async () => {
    await expect(
      withPractice(ours.id, async () => {
        throw new RangeError('on purpose');
      }),
    ).rejects.toThrow('on purpose');
    const clients = await Promise.all(Array.from({ length: 12 }, () => pool().connect()));
    try {
      for (const client of clients) expect((await client.query('select 1 from sections')).rowCount).toBe(0);
    } finally {
      for (const client of clients) client.release();
    }
  });

  test('a query that asks for another practice by name gets nothing', async () => {
    const rows = await withPractice(ours.id, (tx) => selectSections(tx, { practiceId: theirs.id }));
    expect(rows).toEqual([]);
  });
});

describe('the audit log', () => {
  test.each([
    ['the application', asApplication],
    ['the owner', asOwner],
    ['a superuser', asSuperuser],
  ])('%s can neither change nor remove an event', async (_who, connect) => {
    for (const statement of [
      `update audit_events set action = 'nothing'`,
      'delete from audit_events',
      'truncate audit_events',
    ]) {
      await connect(async (client) => {
        await enter(client, ours.id);
        await expect(client.query(statement)).rejects.toMatchObject({ code: '42501' });
      });
    }
  });
});
