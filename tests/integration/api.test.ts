import { beforeAll, afterAll, describe, expect, test } from 'vitest';
import * as unknownRoute from '@/app/api/[[...path]]/route';
import * as health from '@/app/api/health/route';
import * as openapi from '@/app/api/openapi.json/route';
import * as projectsRoute from '@/app/api/v1/projects/route';
import * as schemasRoute from '@/app/api/v1/schemas/[name]/route';
import * as sectionRoute from '@/app/api/v1/sections/[id]/route';
import * as sectionsRoute from '@/app/api/v1/sections/route';
import * as solveRoute from '@/app/api/v1/solve/route';
import type { Actor, TokenScope } from '@/lib/domain/dto';
import { sectionLimits } from '@/lib/domain/limits';
import type { Problem } from '@/lib/domain/problem';
import type { ResultDocument } from '@/lib/domain/result';
import { resultSchema } from '@/lib/domain/result-schema';
import { sectionHash } from '@/lib/domain/canonical';
import { startingPoints } from '@/lib/domain/starting-points';
import { changeRole, removeMember } from '@/lib/server/people';
import { appoint } from '@/lib/server/projects';
import { getSection, saveSection } from '@/lib/server/sections';
import { closeSolverPool, solveInPool } from '@/lib/server/solver-pool';
import { tryLimits } from '@/lib/server/throttle';
import { createToken, listTokens, revokeToken } from '@/lib/server/tokens';
import { asSuperuser } from './support/connect';
import { addMember, makePractice, sampleSection, type TestPractice, unique } from './support/practice';

type Handler = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;
type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
type Route = Record<Method, Handler>;

const allScopes: TokenScope[] = ['sections:read', 'sections:write', 'solve'];
let ours: TestPractice;
let theirs: TestPractice;
/** Of an administrator who is author too. */
let token: string;
let theirToken: string;

beforeAll(async () => {
  ours = await makePractice();
  theirs = await makePractice();
  token = await tokenOf(ours.administrator);
  theirToken = await tokenOf(theirs.administrator);
});

afterAll(closeSolverPool);

async function tokenOf(actor: Actor, scopes = allScopes): Promise<string> {
  return (await createToken(actor, { name: unique('token'), scopes, days: 1 })).token;
}

interface Asked {
  readonly method?: Method;
  readonly path?: string;
  readonly params?: Record<string, string>;
  readonly token?: string | null;
  readonly body?: unknown;
  readonly text?: string;
  readonly headers?: Record<string, string>;
  readonly signal?: AbortSignal;
}

function ask(route: Route, asked: Asked = {}): Promise<Response> {
  const {
    method = 'GET',
    path = '/',
    params = {},
    body,
    text = body === undefined ? undefined : JSON.stringify(body),
  } = asked;
  const bearer = asked.token === undefined ? token : asked.token;
  const request = new Request(`http://underfall.example${path}`, {
    method,
    headers: {
      ...(bearer === null ? {} : { authorization: `Bearer ${bearer}` }),
      ...(text === undefined ? {} : { 'content-type': 'application/json' }),
      ...asked.headers,
    },
    ...(text === undefined ? {} : { body: text }),
    ...(asked.signal ? { signal: asked.signal } : {}),
  });
  return route[method](request, { params: Promise.resolve(params) });
}

async function expectProblem(response: Response, status: number): Promise<Problem> {
  expect(response.status).toBe(status);
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  const problem = (await response.json()) as Problem;
  expect(problem).toMatchObject({
    status,
    type: expect.stringMatching(/^\/problems\/[a-z-]+$/),
    title: expect.any(String),
    detail: expect.any(String),
  });
  expect(JSON.stringify(problem)).not.toMatch(/at .*\.(ts|js):\d|node_modules|select |insert /);
  return problem;
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

describe('what is sent', () => {
  const solve = (asked: Asked) => ask(solveRoute as Route, { method: 'POST', ...asked });

  test.each([
    ['not JSON', '{ "format": ', 400],
    ['empty', '', 400],
    ['JSON of another kind', '[1, 2]', 422],
    ['null', 'null', 422],
    ['another format', '{"format":"other/1"}', 422],
  ])('%s', async (_what, text, status) => {
    await expectProblem(await solve({ text }), status);
  });

  test('every fault of a section comes with its place', async () => {
    const section = sampleSection();
    section.zones[0]!.material = 'none';
    section.materials[1]!.kMajor = 1e-9;
    section.situations = [];
    const problem = await expectProblem(await solve({ body: section }), 422);
    expect(problem.type).toBe('/problems/invalid-section');
    expect(problem.errors!.every(({ pointer, detail }) => pointer.startsWith('/') && detail.length > 5)).toBe(
      true,
    );
    expect(problem.errors!.map(({ pointer }) => pointer)).toContain('/situations');
  });

  test('a form or plain text is refused', async () => {
    const headers = { 'content-type': 'text/plain' };
    await expectProblem(await solve({ text: JSON.stringify(sampleSection()), headers }), 415);
  });

  test('bytes that are no UTF-8 are refused', async () => {
    const request = new Request('http://underfall.example/', {
      method: 'POST',
      headers: { authorization: `Bearer ${token}`, 'content-type': 'application/json' },
      body: new Uint8Array([0x7b, 0xff, 0xfe, 0x7d]),
    });
    await expectProblem(await solveRoute.POST(request, { params: Promise.resolve({}) }), 400);
  });

  test('a body over the limit is refused by its stated length, and while it is read where none is stated', async () => {
    const text = `"${'x'.repeat(sectionLimits.bytes)}"`;
    await expectProblem(await solve({ text, headers: { 'content-length': String(text.length) } }), 413);
    let taken = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        taken += 1;
        controller.enqueue(new Uint8Array(64 * 1024).fill(32));
      },
    });
    const request = new Request('http://underfall.example/', {
      method: 'POST',
      headers: { authorization: `Bearer ${token}`, 'content-type': 'application/json' },
      body: endless,
      duplex: 'half',
    } as RequestInit);
    await expectProblem(await solveRoute.POST(request, { params: Promise.resolve({}) }), 413);
    expect(taken).toBeLessThan(40);
  });
});

describe('solving', () => {
  test.each(startingPoints.map(({ id, document }) => [id, document] as const))(
    '%s',
    async (_id, document) => {
      const response = await ask(solveRoute as Route, { method: 'POST', body: document });
      expect(response.status).toBe(200);
      const result = (await response.json()) as ResultDocument;
      expect(() => resultSchema.parse(result)).not.toThrow();
      expect(resultSchema.parse(result)).toEqual(result);
      expect(result.section.sha256).toBe(sectionHash(document));
      expect(result.situations.map(({ id }) => id)).toEqual(document.situations.map(({ id }) => id));
      for (const { discharge } of result.situations) {
        expect(discharge.lower).toBeLessThanOrEqual(discharge.value);
        expect(discharge.value).toBeLessThanOrEqual(discharge.upper);
      }
    },
  );

  test('only the situations asked for; an unknown one is refused', async () => {
    const document = sampleSection();
    const [first] = document.situations;
    const path = `/?situation=${first!.id}`;
    const result = (await (
      await ask(solveRoute as Route, { method: 'POST', path, body: document })
    ).json()) as ResultDocument;
    expect(result.situations.map(({ id }) => id)).toEqual([first!.id]);
    await expectProblem(
      await ask(solveRoute as Route, { method: 'POST', path: '/?situation=none', body: document }),
      422,
    );
  });

  test('a solve over its time is stopped, and the next one runs', async () => {
    const request = { document: sampleSection(), criteria: [], effort: 'full' } as const;
    await expect(solveInPool(request, { milliseconds: 1 })).rejects.toMatchObject({ code: 'timeout' });
    expect((await solveInPool(request)).status).toBe('solved');
  });

  test('a caller who leaves ends the solve', async () => {
    const leaving = new AbortController();
    const began = performance.now();
    const asked = ask(solveRoute as Route, { method: 'POST', body: sampleSection(), signal: leaving.signal });
    leaving.abort();
    await expectProblem(await asked, 504);
    expect(performance.now() - began).toBeLessThan(3000);
  });

  test('more solves than may wait are told to come back', async () => {
    const request = { document: sampleSection(), criteria: [], effort: 'live' } as const;
    const outcomes = await Promise.allSettled(Array.from({ length: 40 }, () => solveInPool(request)));
    const refused = outcomes.filter(({ status }) => status === 'rejected') as PromiseRejectedResult[];
    expect(refused.length).toBeGreaterThanOrEqual(20);
    for (const { reason } of refused)
      expect(reason).toMatchObject({ code: 'busy', details: { retryAfter: 5 } });
    expect(outcomes.filter(({ status }) => status === 'fulfilled').length).toBeGreaterThanOrEqual(16);
  });
});

describe('paths and methods', () => {
  test.each([
    ['projects', projectsRoute, 'GET, HEAD, OPTIONS', ['POST', 'PUT', 'PATCH', 'DELETE']],
    ['sections', sectionsRoute, 'GET, POST, HEAD, OPTIONS', ['PUT', 'PATCH', 'DELETE']],
    ['a section', sectionRoute, 'GET, PUT, DELETE, HEAD, OPTIONS', ['POST', 'PATCH']],
    ['solve', solveRoute, 'POST, OPTIONS', ['GET', 'PUT', 'PATCH', 'DELETE']],
    ['health', health, 'GET, HEAD, OPTIONS', ['POST', 'DELETE']],
  ] as const)('%s names the methods it has', async (_name, route, allow, others) => {
    for (const method of others) {
      const response = await ask(route as unknown as Route, { method, params: { id: ours.sectionId } });
      expect(response.headers.get('allow')).toBe(allow);
      await expectProblem(response, 405);
    }
  });

  test.each(['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const)(
    '%s of no path is a problem document',
    async (method) => {
      await expectProblem(await (unknownRoute as Record<Method, () => Response>)[method](), 404);
    },
  );

  test('health', async () => {
    const response = await ask(health as Route, { token: null });
    expect(await response.json()).toMatchObject({ status: 'ok' });
  });

  test('the description names every operation and no dangling schema', async () => {
    const response = await ask(openapi as Route, { token: null });
    const text = await response.text();
    const document = JSON.parse(text) as {
      openapi: string;
      paths: Record<string, Record<string, unknown>>;
      components: { schemas: Record<string, unknown> };
      servers: { url: string }[];
    };
    expect(document.openapi).toBe('3.1.0');
    expect(document.servers).toEqual([{ url: 'http://underfall.example' }]);
    const named = Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method} ${path}`),
    );
    expect(named.toSorted()).toEqual([
      'delete /api/v1/sections/{id}',
      'get /api/v1/projects',
      'get /api/v1/schemas/result.json',
      'get /api/v1/schemas/section.json',
      'get /api/v1/sections',
      'get /api/v1/sections/{id}',
      'post /api/v1/sections',
      'post /api/v1/solve',
      'put /api/v1/sections/{id}',
    ]);
    for (const [, name] of text.matchAll(/#\/components\/schemas\/(\w+)/g)) {
      expect(document.components.schemas).toHaveProperty(name!);
    }
  });

  test.each(['section.json', 'result.json'])('the schema %s', async (name) => {
    const response = await ask(schemasRoute as Route, { params: { name }, token: null });
    expect(response.headers.get('content-type')).toBe('application/schema+json');
    expect(await response.json()).toMatchObject({ $schema: 'https://json-schema.org/draft/2020-12/schema' });
  });

  test('no other schema', async () => {
    await expectProblem(
      await ask(schemasRoute as Route, { params: { name: 'other.json' }, token: null }),
      404,
    );
  });
});
