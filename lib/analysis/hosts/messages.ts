// What travels between a screen and its worker.
import type { Criterion } from '@/lib/domain/criteria';
import type { AnalysisOutcome } from '../analyze';

/** One question; `ticket` comes back with the answer. */
export interface AnalysisRequest {
  readonly ticket: number;
  readonly document: unknown;
  readonly criteria: readonly Criterion[];
  readonly effort: 'live' | 'full';
  readonly situations?: readonly string[];
}

export type AnalysisReply =
  | {
      readonly ticket: number;
      readonly outcome: AnalysisOutcome;
      /** Milliseconds in the worker. */ readonly elapsed: number;
    }
  | { readonly ticket: number; readonly failure: string };
