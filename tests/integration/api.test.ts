import { beforeAll, describe, expect, test } from 'vitest';
import * as projectsRoute from '@/app/api/v1/projects/route';
import * as sectionRoute from '@/app/api/v1/sections/[id]/route';
import * as sectionsRoute from '@/app/api/v1/sections/route';
import * as solveRoute from '@/app/api/v1/solve/route';
import type { TokenScope } from '@/lib/domain/dto';
import { changeRole, removeMember } from '@/lib/server/people';
import { appoint } from '@/lib/server/projects';
import { getSection, saveSection } from '@/lib/server/sections';
import { tryLimits } from '@/lib/server/throttle';
import { createToken, listTokens, revokeToken } from '@/lib/server/tokens';
import { allScopes, type Asked, ask as askAs, expectProblem, type Route, tokenOf } from './support/ask';
import { asSuperuser } from './support/connect';
import { addMember, makePractice, sampleSection, type TestPractice, unique } from './support/practice';

let ours: TestPractice;
let theirs: TestPractice;
let token: string;
let theirToken: string;

beforeAll(async () => {
  ours = await makePractice();
  theirs = await makePractice();
  token = await tokenOf(ours.administrator);
  theirToken = await tokenOf(theirs.administrator);
});

/** Asks with the token of an administrator who is author too, unless another is given. */
function ask(route: Route, asked: Asked = {}): Promise<Response> {
  return askAs(route, { token, ...asked });
}

/** Every operation, called rightly, with the scope it asks for. */
const operations: { name: string; scope: TokenScope; ask: (more: Asked) => Promise<Response> }[] = [
  { name: 'list projects', scope: 'sections:read', ask: (more) => ask(projectsRoute as Route, more) },
  { name: 'list sections', scope: 'sections:read', ask: (more) => ask(sectionsRoute as Route, more) },
  {
    name: 'keep a section',
    scope: 'sections:write',
    ask: (more) =>
      ask(sectionsRoute as Route, {
        method: 'POST',
        path: `/?project=${ours.projectId}`,
        body: sampleSection(),
        ...more,
      }),
  },
  {
    name: 'read a section',
    scope: 'sections:read',
    ask: (more) => ask(sectionRoute as Route, { params: { id: ours.sectionId }, ...more }),
  },
  {
    name: 'change a section',
    scope: 'sections:write',
    ask: (more) =>
      ask(sectionRoute as Route, {
        method: 'PUT',
        params: { id: ours.sectionId },
        body: sampleSection(),
        headers: { 'if-match': '*' },
        ...more,
      }),
  },
  {
    name: 'delete a section',
    scope: 'sections:write',
    ask: (more) =>
      ask(sectionRoute as Route, {
        method: 'DELETE',
        params: { id: ours.sectionId },
        headers: { 'if-match': '"999"' },
        ...more,
      }),
  },
  {
    name: 'solve',
    scope: 'solve',
    ask: (more) => ask(solveRoute as Route, { method: 'POST', body: sampleSection(), ...more }),
  },
];

describe.each(operations)('$name', ({ scope, ask: call }) => {
  test.each([
    ['no token', null],
    ['a made-up token', 'uf_0000000000000000000000000000000000000000000'],
    ['another kind of secret', 'Basic'],
    ['a long one', `uf_${'x'.repeat(5000)}`],
  ])('%s', async (_what, bearer) => {
    const response = await call({ token: bearer });
    expect(response.headers.get('www-authenticate')).toContain('Bearer');
    await expectProblem(response, 401);
  });

  test('a token of another scope', async () => {
    const others = allScopes.filter((one) => one !== scope);
    const problem = await expectProblem(
      await call({ token: await tokenOf(ours.administrator, others) }),
      403,
    );
    expect(problem.detail).toContain(scope);
  });

  test('a revoked token, and one that has run out', async () => {
    const name = unique('gone');
    const made = await createToken(ours.administrator, { name, scopes: allScopes, days: 1 });
    const [row] = (await listTokens(ours.administrator)).filter((one) => one.name === name);
    expect(JSON.stringify(row)).not.toContain(made.token);
    await revokeToken(ours.administrator, row!.id);
    await expectProblem(await call({ token: made.token }), 401);
    const late = await tokenOf(ours.administrator);
    await asSuperuser((client) =>
      client.query(`update api_tokens set expires_at = now() - interval '1 second' where prefix = $1`, [
        late.slice(0, 9),
      ]),
    );
    await expectProblem(await call({ token: late }), 401);
  });
});

describe('what a token may see', () => {
  test.each(['GET', 'PUT', 'DELETE'] as const)(
    '%s of another practice’s section is not found',
    async (method) => {
      const response = await ask(sectionRoute as Route, {
        method,
        params: { id: ours.sectionId },
        token: theirToken,
        headers: { 'if-match': '"1"' },
        ...(method === 'PUT' ? { body: sampleSection() } : {}),
      });
      await expectProblem(response, 404);
    },
  );

  test('lists and new sections of another practice’s project are not found', async () => {
    const path = `/?project=${ours.projectId}`;
    await expectProblem(await ask(sectionsRoute as Route, { path, token: theirToken }), 404);
    const post = { method: 'POST', path, token: theirToken, body: sampleSection() } as const;
    await expectProblem(await ask(sectionsRoute as Route, post), 404);
    const all = (await (await ask(sectionsRoute as Route, { token: theirToken })).json()) as {
      sections: { id: string }[];
    };
    expect(all.sections.map(({ id }) => id)).toEqual([theirs.sectionId]);
  });

  test('a token has the rights its maker has now: a checker’s changes nothing, a leaver’s opens nothing', async () => {
    const maker = await addMember(ours.administrator, 'administrator');
    const own = await tokenOf(maker);
    const { projectId, sectionId } = ours;
    await appoint(ours.administrator, { projectId, userId: maker.userId, role: 'checker' });
    await changeRole(ours.administrator, { userId: maker.userId, role: 'member' });
    const put = {
      method: 'PUT',
      params: { id: sectionId },
      body: sampleSection(),
      headers: { 'if-match': '*' },
    } as const;
    await expectProblem(await ask(sectionRoute as Route, { ...put, token: own }), 403);
    expect((await ask(sectionRoute as Route, { params: { id: sectionId }, token: own })).status).toBe(200);
    await changeRole(ours.administrator, { userId: maker.userId, role: 'client' });
    await expectProblem(await ask(sectionRoute as Route, { params: { id: sectionId }, token: own }), 404);
    await removeMember(ours.administrator, { userId: maker.userId });
    await expectProblem(await ask(sectionRoute as Route, { params: { id: sectionId }, token: own }), 401);
  });

  test('requests of one token are counted', async () => {
    const busy = await tokenOf(ours.administrator);
    const { tries } = tryLimits.api;
    const answers = await Promise.all(
      Array.from({ length: tries + 5 }, () => ask(projectsRoute as Route, { token: busy })),
    );
    const refused = answers.filter(({ status }) => status === 429);
    expect(refused).toHaveLength(5);
    expect(Number(refused[0]!.headers.get('retry-after'))).toBeGreaterThan(0);
    await expectProblem(refused[0]!, 429);
    expect((await ask(projectsRoute as Route)).status).toBe(200);
  });
});

describe('a section over HTTP', () => {
  test('is kept, read, changed and deleted, each change naming the version it began from', async () => {
    const path = `/?project=${ours.projectId}`;
    const created = await ask(sectionsRoute as Route, { method: 'POST', path, body: sampleSection() });
    expect(created.status).toBe(201);
    expect(created.headers.get('etag')).toBe('"1"');
    const { id } = (await created.json()) as { id: string };
    expect(created.headers.get('location')).toBe(`/api/v1/sections/${id}`);
    const params = { id };

    const read = await ask(sectionRoute as Route, { params });
    expect(read.headers.get('etag')).toBe('"1"');
    expect(await read.json()).toEqual(sampleSection());
    const again = await ask(sectionRoute as Route, { params, headers: { 'if-none-match': '"1"' } });
    expect(again.status).toBe(304);
    expect(await again.text()).toBe('');

    const body = { ...sampleSection(), title: 'Changed' };
    await expectProblem(await ask(sectionRoute as Route, { method: 'PUT', params, body }), 428);
    const put = await ask(sectionRoute as Route, {
      method: 'PUT',
      params,
      body,
      headers: { 'if-match': '"1"' },
    });
    expect(put.status).toBe(200);
    expect(put.headers.get('etag')).toBe('"2"');
    for (const stale of ['"1"', '"7"', 'W/"2"', 'nonsense']) {
      const response = await ask(sectionRoute as Route, {
        method: 'PUT',
        params,
        body,
        headers: { 'if-match': stale },
      });
      await expectProblem(response, 412);
    }
    expect((await getSection(ours.administrator, id)).version).toBe(2);

    await expectProblem(await ask(sectionRoute as Route, { method: 'DELETE', params }), 428);
    const gone = { method: 'DELETE', params, headers: { 'if-match': '"1"' } } as const;
    await expectProblem(await ask(sectionRoute as Route, gone), 412);
    const deleted = await ask(sectionRoute as Route, { ...gone, headers: { 'if-match': '"2"' } });
    expect(deleted.status).toBe(204);
    await expectProblem(await ask(sectionRoute as Route, { params }), 404);
  });

  test('a change on the screen makes a script’s older version stale', async () => {
    const { sectionId, author } = ours;
    const etag = (await ask(sectionRoute as Route, { params: { id: sectionId } })).headers.get('etag')!;
    const baseVersion = Number(etag.slice(1, -1));
    await saveSection(author, { sectionId, document: sampleSection(), baseVersion });
    const put = {
      method: 'PUT',
      params: { id: sectionId },
      body: sampleSection(),
      headers: { 'if-match': etag },
    } as const;
    await expectProblem(await ask(sectionRoute as Route, put), 412);
  });

  test('POST without a project says how', async () => {
    const problem = await expectProblem(
      await ask(sectionsRoute as Route, { method: 'POST', body: sampleSection() }),
      400,
    );
    expect(problem.detail).toContain('project=');
  });
});
