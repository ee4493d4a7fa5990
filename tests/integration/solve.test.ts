import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import * as solveRoute from '@/app/api/v1/solve/route';
import { sectionHash } from '@/lib/domain/canonical';
import { sectionLimits } from '@/lib/domain/limits';
import type { ResultDocument } from '@/lib/domain/result';
import { resultSchema } from '@/lib/domain/result-schema';
import { startingPoints } from '@/lib/domain/starting-points';
import { closeSolverPool, solveInPool } from '@/lib/server/solver-pool';
import { type Asked, ask as askAs, expectProblem, type Route, tokenOf } from './support/ask';
import { makePractice, sampleSection } from './support/practice';

let token: string;

beforeAll(async () => {
  token = await tokenOf((await makePractice()).administrator);
});

afterAll(closeSolverPool);

/** Asks with the token of an administrator who is author too, unless another is given. */
function ask(route: Route, asked: Asked = {}): Promise<Response> {
  return askAs(route, { token, ...asked });
}

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
