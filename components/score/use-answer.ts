'use client';
import { useEffect } from 'react';
import { useScoreStore } from '@/components/editor/state/score-context';
import { createAnalysisWorker } from '@/lib/analysis/run-in-browser';

/** Rest after the last change before the full solve begins. */
const rest = 700;

/**
 * Keeps the answer in step with the document: a live one at every change, a full one at rest. Each has a worker of its own, so that an edit
 * never waits for a full solve that it has made pointless.
 */
export function useAnswer(): void {
  const store = useScoreStore();
  useEffect(() => {
    const workers = { live: createAnalysisWorker(), full: createAnalysisWorker() };
    let timer: ReturnType<typeof setTimeout> | undefined;
    const isBusy = { live: false, full: false };
    const isWanted = { live: false, full: false };

    const ask = async (effort: 'live' | 'full'): Promise<void> => {
      if (isBusy[effort]) {
        isWanted[effort] = true;
        return;
      }
      isBusy[effort] = true;
      isWanted[effort] = false;
      const { document, detail, situationId } = store.getState();
      const began = performance.now();
      const answer = await workers[effort].analyze(document, {
        criteria: detail.criteria,
        effort,
        ...(effort === 'live' ? { situations: [situationId] } : {}),
      });
      isBusy[effort] = false;
      // a full answer to an older document has nothing to say; a live one still shows where the hand went
      const isWelcome = effort === 'live' || store.getState().document === document;
      if (answer.status === 'answered' && isWelcome) {
        const { outcome } = answer;
        const known = store.getState().answer;
        const isBettered = effort === 'live' && known?.effort === 'full' && known.document === document;
        if (outcome.status === 'solved' && !isBettered) {
          const { result, fields } = outcome;
          store.getState().setAnswer({ document, result, fields, effort, at: Date.now() });
        } else if (outcome.status === 'refused') {
          store.getState().setRefusal({ document, problem: outcome.problem, issues: outcome.issues });
        }
        performance.measure(`underfall:${effort}-answer`, { start: began, end: performance.now() });
      } else if (answer.status === 'failed') {
        const problem = {
          type: '/problems/internal',
          title: 'No answer',
          detail: 'The solver in this browser stopped. Reload the page; everything typed is kept.',
        };
        store.getState().setRefusal({ document, problem, issues: [] });
      }
      if (isWanted[effort]) void ask(effort);
    };
    const settle = (): void => {
      clearTimeout(timer);
      timer = setTimeout(() => {
        if (store.getState().isDragging) settle();
        else void ask('full');
      }, rest);
    };
    const unsubscribe = store.subscribe((state, before) => {
      const hasChanged = state.document !== before.document;
      const isUnanswered =
        state.situationId !== before.situationId &&
        !state.answer?.result.situations.some(({ id }) => id === state.situationId);
      if (!hasChanged && !isUnanswered) return;
      void ask('live');
      settle();
    });
    void ask('live');
    settle();
    return () => {
      clearTimeout(timer);
      unsubscribe();
      workers.live.stop();
      workers.full.stop();
    };
  }, [store]);
}
