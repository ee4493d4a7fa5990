// How often something may be tried. Counted in PostgreSQL, so that several web processes share the counts.
import 'server-only';
import { createHash } from 'node:crypto';
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { pool } from '@/db/client';
import { AppError } from '@/lib/errors';
import { env } from './env';

/** Tries in a span of seconds; RATE_LIMIT_FACTOR multiplies the tries. */
export const tryLimits = {
  /** Sign-ins for one account, right or wrong. */
  'sign-in-account': { tries: 10, seconds: 15 * 60 },
  /** Sign-ins from one address; larger, since a whole office may share one. */
  'sign-in-address': { tries: 60, seconds: 15 * 60 },
  /** Password resets asked for one address. */
  reset: { tries: 4, seconds: 60 * 60 },
  /** New practices from one address. */
  'sign-up': { tries: 10, seconds: 60 * 60 },
  /** Invitations sent by one practice. */
  invite: { tries: 60, seconds: 60 * 60 },
  /** Requests of one API token. */
  api: { tries: 120, seconds: 60 },
  /** Solves asked for with one API token. */
  solve: { tries: 30, seconds: 60 },
} as const;

export type TryKind = keyof typeof tryLimits;

const limiters = new Map<TryKind, RateLimiterPostgres>();

function limiterOf(kind: TryKind): RateLimiterPostgres {
  let limiter = limiters.get(kind);
  if (!limiter) {
    const { tries, seconds } = tryLimits[kind];
    limiter = new RateLimiterPostgres({
      storeClient: pool(),
      storeType: 'pool', // said out loud: the package otherwise reads the constructor's name, which a bundler may change
      tableName: 'rate_limits',
      tableCreated: true,
      keyPrefix: kind,
      points: Math.max(1, Math.round(tries * env().RATE_LIMIT_FACTOR)),
      duration: seconds,
    });
    limiters.set(kind, limiter);
  }
  return limiter;
}

/**
 * Counts one try and refuses it once there were too many.
 *
 * @param kind - What is tried.
 * @param key - Who or what the tries are counted for; kept as a hash.
 * @throws AppError `too-many`, with the seconds to wait.
 */
export async function limitTries(kind: TryKind, key: string): Promise<void> {
  const hashed = createHash('sha256').update(key.toLowerCase()).digest('hex');
  try {
    await limiterOf(kind).consume(hashed);
  } catch (error) {
    if (!(error instanceof RateLimiterRes)) throw error;
    throw new AppError('too-many', undefined, {
      retryAfter: Math.max(1, Math.ceil(error.msBeforeNext / 1000)),
    });
  }
}
