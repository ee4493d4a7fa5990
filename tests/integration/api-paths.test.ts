import { describe, expect, test } from 'vitest';
import * as unknownRoute from '@/app/api/[[...path]]/route';
import * as health from '@/app/api/health/route';
import * as openapi from '@/app/api/openapi.json/route';
import * as projectsRoute from '@/app/api/v1/projects/route';
import * as schemasRoute from '@/app/api/v1/schemas/[name]/route';
import * as sectionRoute from '@/app/api/v1/sections/[id]/route';
import * as sectionsRoute from '@/app/api/v1/sections/route';
import * as solveRoute from '@/app/api/v1/solve/route';
import { ask, expectProblem, type Method, type Route } from './support/ask';

describe('paths and methods', () => {
  test.each([
    ['projects', projectsRoute, 'GET, HEAD, OPTIONS', ['POST', 'PUT', 'PATCH', 'DELETE']],
    ['sections', sectionsRoute, 'GET, POST, HEAD, OPTIONS', ['PUT', 'PATCH', 'DELETE']],
    ['a section', sectionRoute, 'GET, PUT, DELETE, HEAD, OPTIONS', ['POST', 'PATCH']],
    ['solve', solveRoute, 'POST, OPTIONS', ['GET', 'PUT', 'PATCH', 'DELETE']],
    ['health', health, 'GET, HEAD, OPTIONS', ['POST', 'DELETE']],
  ] as const)('%s names the methods it has', async (_name, route, allow, others) => {
    for (const method of others) {
      const response = await ask(route as unknown as Route, { method, params: { id: 'any' } });
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
    const response = await ask(health as Route);
    expect(await response.json()).toMatchObject({ status: 'ok' });
  });

  test('the description names every operation and no dangling schema', async () => {
    const response = await ask(openapi as Route);
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
    const response = await ask(schemasRoute as Route, { params: { name } });
    expect(response.headers.get('content-type')).toBe('application/schema+json');
    expect(await response.json()).toMatchObject({ $schema: 'https://json-schema.org/draft/2020-12/schema' });
  });

  test('no other schema', async () => {
    await expectProblem(await ask(schemasRoute as Route, { params: { name: 'other.json' } }), 404);
  });
});
