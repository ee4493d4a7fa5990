// Starts the analysis worker and hands out its newest answer.
import type { Criterion } from '@/lib/domain/criteria';
import type { AnalysisOutcome } from './analyze';
import type { AnalysisReply, AnalysisRequest } from './hosts/messages';

export interface AnalyzeInBrowserOptions {
  readonly criteria: readonly Criterion[];
  readonly effort: 'live' | 'full';
  readonly situations?: readonly string[];
}

/** An answer, or `superseded` where a newer question came before it was looked at. */
export type BrowserAnswer =
  | { readonly status: 'answered'; readonly outcome: AnalysisOutcome; readonly elapsed: number }
  | { readonly status: 'superseded' }
  | { readonly status: 'failed'; readonly message: string };

export interface AnalysisWorker {
  /** Asks; a question that waits behind this one is answered `superseded`. */
  analyze(document: unknown, options: AnalyzeInBrowserOptions): Promise<BrowserAnswer>;
  /** Ends the worker; open questions are answered `superseded`. */
  stop(): void;
}

/** Starts a worker of its own for one screen. */
export function createAnalysisWorker(): AnalysisWorker {
  const worker = new Worker(new URL('./hosts/browser-worker.ts', import.meta.url), {
    type: 'module',
    name: 'analysis',
  });
  const open = new Map<number, (answer: BrowserAnswer) => void>();
  let last = 0;
  const settle = (ticket: number, answer: BrowserAnswer): void => {
    for (const [earlier, resolve] of [...open]) {
      if (earlier > ticket) continue;
      open.delete(earlier);
      resolve(earlier === ticket ? answer : { status: 'superseded' });
    }
  };
  worker.onmessage = ({ data }: MessageEvent<AnalysisReply>) => {
    if ('failure' in data) settle(data.ticket, { status: 'failed', message: data.failure });
    else settle(data.ticket, { status: 'answered', outcome: data.outcome, elapsed: data.elapsed });
  };
  worker.onerror = (event) => {
    event.preventDefault();
    settle(last, { status: 'failed', message: event.message });
  };
  return {
    analyze(document, options) {
      const ticket = ++last;
      return new Promise((resolve) => {
        open.set(ticket, resolve);
        worker.postMessage({ ticket, document, ...options } satisfies AnalysisRequest);
      });
    },
    stop() {
      worker.terminate();
      settle(last, { status: 'superseded' });
    },
  };
}
