// Asking the API's routes as a script would.
import { expect } from 'vitest';
import type { Actor, TokenScope } from '@/lib/domain/dto';
import type { Problem } from '@/lib/domain/problem';
import { createToken } from '@/lib/server/tokens';
import { unique } from './practice';

export type Handler = (
  request: Request,
  context: { params: Promise<Record<string, string>> },
) => Promise<Response>;
export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
export type Route = Record<Method, Handler>;

export const allScopes: TokenScope[] = ['sections:read', 'sections:write', 'solve'];

/** A token of somebody's, for a day. */
export async function tokenOf(actor: Actor, scopes = allScopes): Promise<string> {
  return (await createToken(actor, { name: unique('token'), scopes, days: 1 })).token;
}

export interface Asked {
  readonly method?: Method;
  readonly path?: string;
  readonly params?: Record<string, string>;
  readonly token?: string | null;
  readonly body?: unknown;
  readonly text?: string;
  readonly headers?: Record<string, string>;
  readonly signal?: AbortSignal;
}

/** Calls a method of a route. */
export function ask(route: Route, asked: Asked = {}): Promise<Response> {
  const {
    method = 'GET',
    path = '/',
    params = {},
    body,
    text = body === undefined ? undefined : JSON.stringify(body),
  } = asked;
  const { token = null } = asked;
  const request = new Request(`http://underfall.example${path}`, {
    method,
    headers: {
      ...(token === null ? {} : { authorization: `Bearer ${token}` }),
      ...(text === undefined ? {} : { 'content-type': 'application/json' }),
      ...asked.headers,
    },
    ...(text === undefined ? {} : { body: text }),
    ...(asked.signal ? { signal: asked.signal } : {}),
  });
  return route[method](request, { params: Promise.resolve(params) });
}

/** Expects a problem document, and nothing internal in it. */
export async function expectProblem(response: Response, status: number): Promise<Problem> {
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
