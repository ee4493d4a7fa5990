'use client';
import { useEffect } from 'react';
import { useScoreStore } from '@/components/editor/state/score-context';
import { createAnalysisWorker } from '@/lib/analysis/run-in-browser';

/** Rest after the last change before the full solve begins. */
const rest = 250;

/** Keeps the answer in step with the document: a live one at every change, a full one at rest. */
export function useAnswer(): void {
  const store = useScoreStore();
  useEffect(() => {
    const worker = createAnalysisWorker();
    let timer: ReturnType<typeof setTimeout> | undefined;
    let isBusy = false;
    let next: 'live' | 'full' | null = null;

    const ask = async (effort: 'live' | 'full'): Promise<void> => {
      if (isBusy) {
        next = effort;
        return;
      }
      isBusy = true;
      next = null;
      const { document, detail, situationId } = store.getState();
      const began = performance.now();
      const answer = await worker.analyze(document, {
        criteria: detail.criteria,
        effort,
        ...(effort === 'live' ? { situations: [situationId] } : {}),
      });
      isBusy = false;
      if (answer.status === 'answered') {
        const { outcome } = answer;
        if (outcome.status === 'solved') {
          const { result, fields } = outcome;
          store.getState().setAnswer({ document, result, fields, effort, at: Date.now() });
        } else if (outcome.status === 'refused') {
          store.getState().setRefusal({ document, problem: outcome.problem, issues: outcome.issues });
        }
        performance.measure('underfall:answer', { start: began, end: performance.now(), detail: { effort } });
      } else if (answer.status === 'failed') {
        const problem = {
          type: '/problems/internal',
          title: 'No answer',
          detail: 'The solver in this browser stopped. Reload the page; everything typed is kept.',
        };
        store.getState().setRefusal({ document, problem, issues: [] });
      }
      if (next) void ask(next);
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
      worker.stop();
    };
  }, [store]);
}
