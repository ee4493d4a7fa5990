// Sections solved in threads, so that a long solve never holds up another answer, and can be stopped.
import 'server-only';
import { join } from 'node:path';
import { Piscina } from 'piscina';
import type { AnalysisOutcome } from '@/lib/analysis/analyze';
import type { AnalysisRequest } from '@/lib/analysis/hosts/messages';
import type { Problem } from '@/lib/domain/problem';
import type { ResultDocument } from '@/lib/domain/result';
import { AppError } from '@/lib/errors';
import { env } from './env';

const threadCount = 2;
const longestQueue = 16;
const threadMegabytes = 1024;

// on globalThis: Next.js evaluates modules once per bundle, and one pool a process is the point
const shared = globalThis as unknown as { underfallThreads?: Piscina };

function threads(): Piscina {
  shared.underfallThreads ??= new Piscina({
    filename: join(process.cwd(), 'dist', 'analysis-worker.js'), // bundled by npm run build:worker
    name: 'analyzeInThread',
    minThreads: 1,
    maxThreads: threadCount,
    idleTimeout: 60_000,
    resourceLimits: { maxOldGenerationSizeMb: threadMegabytes },
  });
  return shared.underfallThreads;
}

export type SolveOutcome =
  | { readonly status: 'solved'; readonly result: ResultDocument }
  | { readonly status: 'refused'; readonly problem: Problem };

export interface SolveLimits {
  /** Ends the solve when its caller leaves. */
  readonly signal?: AbortSignal;
  readonly milliseconds?: number;
}

/**
 * Solves a section in a thread.
 *
 * @throws AppError `busy` where too many wait already, `timeout` where the limit or the caller ended it, `unsolvable` where
 * it would need more memory than a thread may have.
 */
export async function solveInPool(
  request: Omit<AnalysisRequest, 'ticket'>,
  { signal, milliseconds = env().SOLVE_TIME_LIMIT_MS }: SolveLimits = {},
): Promise<SolveOutcome> {
  // counted here: the pool's own limit leaves out the tasks that wait behind busy threads
  if (threads().queueSize >= longestQueue) throw new AppError('busy', undefined, { retryAfter: 5 });
  const clock = AbortSignal.timeout(milliseconds);
  const ends = signal ? AbortSignal.any([signal, clock]) : clock;
  try {
    const outcome = (await threads().run(request, { signal: ends })) as AnalysisOutcome;
    if (outcome.status === 'solved') return { status: 'solved', result: outcome.result };
    if (outcome.status === 'refused') return { status: 'refused', problem: outcome.problem };
    throw new AppError('timeout', 'cancelled inside');
  } catch (error) {
    throw nameFailure(error, milliseconds);
  }
}

function nameFailure(error: unknown, milliseconds: number): unknown {
  if (!(error instanceof Error)) return error;
  if (error.name === 'AbortError') {
    const sentence = `The solve took longer than the limit of ${milliseconds / 1000} s and was stopped. Coarsen the section or solve fewer situations at once.`;
    return new AppError('timeout', undefined, { sentence }, { cause: error });
  }
  if ((error as Error & { code?: string }).code === 'ERR_WORKER_OUT_OF_MEMORY') {
    const sentence =
      'The section needs more memory than a solve may take. Draw it with fewer, larger details.';
    return new AppError('unsolvable', undefined, { sentence }, { cause: error });
  }
  return error;
}

/** Ends the threads of this process. */
export async function closeSolverPool(): Promise<void> {
  await shared.underfallThreads?.destroy();
  delete shared.underfallThreads;
}
