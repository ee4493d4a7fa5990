// The one wrapper of the API's routes: token, scope, throttle, call, and every failure as a problem document.
import 'server-only';
import type { TokenScope } from '@/lib/domain/dto';
import type { Actor } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { errorResponse } from './problem-response';
import { limitTries, type TryKind } from './throttle';
import { bearerOf } from './tokens';

type Params = Record<string, string>;

export interface RouteCall {
  readonly request: Request;
  readonly actor: Actor;
  /** Parts of the path, as named by the route's folder. */
  readonly params: Params;
  readonly query: URLSearchParams;
}

export type RouteHandler = (request: Request, context: { params: Promise<Params> }) => Promise<Response>;

interface RouteRules {
  /** What the token must be allowed to do. */
  readonly scope: TokenScope;
  /** A further limit besides the one on all requests of a token. */
  readonly limit?: TryKind;
}

/** A route for bearers of an API token. */
export function defineRoute(
  { scope, limit }: RouteRules,
  handler: (call: RouteCall) => Promise<Response>,
): RouteHandler {
  return async (request, context) => {
    try {
      const { actor, tokenId } = await requireBearer(request, scope);
      await limitTries('api', tokenId);
      if (limit) await limitTries(limit, tokenId);
      return await handler({
        request,
        actor,
        params: await context.params,
        query: new URL(request.url).searchParams,
      });
    } catch (error) {
      const isUnknown = error instanceof AppError && error.code === 'unauthenticated';
      return errorResponse(error, isUnknown ? { 'www-authenticate': 'Bearer realm="underfall"' } : {});
    }
  };
}

/** A route anyone may ask. */
export function definePublicRoute(handler: () => Response | Promise<Response>): RouteHandler {
  return async () => {
    try {
      return await handler();
    } catch (error) {
      return errorResponse(error);
    }
  };
}

async function requireBearer(request: Request, scope: TokenScope) {
  const [, token] = /^Bearer +(\S+)$/i.exec(request.headers.get('authorization') ?? '') ?? [];
  const bearer = token === undefined ? null : await bearerOf(token);
  if (!bearer) {
    const sentence = 'Send a valid token as “Authorization: Bearer …”. It may have run out or been revoked.';
    throw new AppError('unauthenticated', undefined, { sentence });
  }
  if (!bearer.scopes.includes(scope)) {
    throw new AppError('forbidden', undefined, { sentence: `This token lacks the scope “${scope}”.` });
  }
  return bearer;
}

const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
type Method = (typeof methods)[number];

/** All methods of a path: those given, and a 405 that names them for the rest. */
export function defineMethods(handlers: Partial<Record<Method, RouteHandler>>): Record<Method, RouteHandler> {
  const known = methods.filter((method) => handlers[method]);
  const allow = [...known, ...(handlers.GET ? ['HEAD'] : []), 'OPTIONS'].join(', ');
  const refuse: RouteHandler = async () => errorResponse(new AppError('method-not-allowed'), { allow });
  return Object.fromEntries(methods.map((method) => [method, handlers[method] ?? refuse])) as Record<
    Method,
    RouteHandler
  >;
}

/** A JSON answer. */
export function json(
  value: unknown,
  { status = 200, headers = {} }: { status?: number; headers?: Record<string, string> } = {},
): Response {
  return new Response(JSON.stringify(value), {
    status,
    headers: {
      'content-type': 'application/json',
      'cache-control': 'private, no-cache',
      'x-content-type-options': 'nosniff',
      ...headers,
    },
  });
}
