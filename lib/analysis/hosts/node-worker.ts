// The analysis in a thread of the server's pool (piscina). Bundled by scripts/build-worker.ts; nothing else imports it.
import { analyzeSection, type AnalysisOutcome } from '../analyze';
import type { AnalysisRequest } from './messages';

/** Solves one section; the pool stops the thread where the time limit or the caller ends it. */
export function analyzeInThread(request: Omit<AnalysisRequest, 'ticket'>): AnalysisOutcome {
  return analyzeSection(request.document, {
    ...(request.situations ? { situations: request.situations } : {}),
    criteria: request.criteria,
    effort: request.effort,
    withFields: false,
    now: () => performance.now(),
  });
}
