// What went wrong, as an RFC 9457 problem document. Nothing internal ever leaves: an unknown failure gets a number that is
// also in the log.
import { DrizzleQueryError } from 'drizzle-orm';
import type { Problem } from '@/lib/domain/problem';
import { AppError, errorRow } from '@/lib/errors';
import { log } from './log';

/** Codes by which Node and PostgreSQL (appendix A of its manual) say that the database is not there. */
const awayCodes = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ENOTFOUND',
  'EHOSTUNREACH',
  'ETIMEDOUT',
  '57P01', // admin_shutdown
  '57P02', // crash_shutdown
  '57P03', // cannot_connect_now
  '53300', // too_many_connections
  '08000',
  '08001',
  '08003',
  '08004',
  '08006',
]);

/** True where an error, or what caused it, says that the database cannot be reached. */
export function isDatabaseAway(error: unknown): boolean {
  for (let at: unknown = error; at instanceof Error; at = at.cause) {
    const { code } = at as Error & { code?: unknown };
    if (typeof code === 'string' && awayCodes.has(code)) return true;
    if (/timeout exceeded when trying to connect|Connection terminated/i.test(at.message)) return true;
    if (at instanceof AggregateError && at.errors.some(isDatabaseAway)) return true;
  }
  return false;
}

/** Turns anything thrown into a coded error; what is not expected goes to the log with a number. */
export function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (isDatabaseAway(error)) {
    log.warn({ reason: describe(error) }, 'database out of reach');
    return new AppError('unavailable', undefined, { retryAfter: 5 });
  }
  const reference = crypto.randomUUID().slice(0, 8);
  log.error({ reference, ...describe(error) }, 'unexpected failure');
  const { sentence } = errorRow('internal');
  return new AppError('internal', undefined, { sentence: `${sentence} Its number is ${reference}.` });
}

/** An error for the log; the values of a failed query stay out, since they may be secrets. */
function describe(error: unknown): Record<string, unknown> {
  if (error instanceof DrizzleQueryError) return { query: error.query, cause: describe(error.cause) };
  if (!(error instanceof Error)) return { message: typeof error };
  const { code } = error as Error & { code?: unknown };
  return { name: error.name, code, message: error.message, stack: error.stack };
}

/** The problem document of a coded error. */
export function problemOfError({ code, details }: AppError): Problem {
  const { status, title, sentence } = errorRow(code);
  const errors = details.errors ?? fieldErrors(details.fields);
  return {
    type: `/problems/${code}`,
    title,
    status,
    detail: details.sentence ?? sentence,
    ...(errors ? { errors } : {}),
  };
}

function fieldErrors(fields: Record<string, string> | undefined): Problem['errors'] {
  return fields && Object.entries(fields).map(([field, detail]) => ({ pointer: `/${field}`, detail }));
}

/** An answer that carries a problem document. */
export function problemResponse(problem: Problem, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(problem), {
    status: problem.status ?? 500,
    headers: {
      'content-type': 'application/problem+json',
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
      ...headers,
    },
  });
}

/** The answer to anything thrown. */
export function errorResponse(thrown: unknown, headers: Record<string, string> = {}): Response {
  const error = toAppError(thrown);
  const { retryAfter } = error.details;
  return problemResponse(problemOfError(error), {
    ...(retryAfter === undefined ? {} : { 'retry-after': String(retryAfter) }),
    ...headers,
  });
}
