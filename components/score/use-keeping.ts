'use client';
import { useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import { keepLocally } from '@/components/editor/state/keep-locally';
import { useScoreStore } from '@/components/editor/state/score-context';
import type { ActionResult, SaveOutcome, SectionDetail } from '@/lib/domain/dto';
import type { SectionDocument } from '@/lib/domain/section';

export interface KeepingActions {
  save(input: {
    sectionId: string;
    document: SectionDocument;
    baseVersion: number;
  }): Promise<ActionResult<SaveOutcome>>;
  read(input: { sectionId: string }): Promise<ActionResult<SectionDetail>>;
}

/** Rest after the last change before it is sent, and the waits between tries while the server is away. */
const rest = 800;
const retries = [2000, 4000, 8000, 15_000, 30_000];

/** Keeps every change: at once in this browser, shortly after on the server; tries again until it is there. */
export function useKeeping({ save, read }: KeepingActions): void {
  const store = useScoreStore();

  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined;
    let tries = 0;
    let isSaving = false;

    const send = async (): Promise<void> => {
      const { document, version, detail, keeping, isDragging } = store.getState();
      if (isSaving || keeping.status === 'kept' || keeping.status === 'conflict') return;
      if (isDragging) return schedule(rest);
      isSaving = true;
      store.getState().setKeeping({ status: 'saving' });
      const result = await save({ sectionId: detail.id, document, baseVersion: version }).catch(() => null);
      isSaving = false;
      if (result?.ok && result.value.status === 'saved') {
        tries = 0;
        const isLatest = store.getState().document === document;
        store.getState().markKept(result.value.version, result.value.savedAt);
        if (!isLatest) {
          store.getState().setKeeping({ status: 'waiting' });
          schedule(rest);
        }
      } else if (result?.ok && result.value.status === 'conflict') {
        store.getState().setKeeping({ status: 'conflict', theirs: result.value.current });
      } else {
        const message = result && !result.ok ? result.message : 'The server cannot be reached.';
        store.getState().setKeeping({ status: 'failed', message });
        schedule(retries[Math.min(tries++, retries.length - 1)]!);
      }
    };
    const schedule = (delay: number): void => {
      clearTimeout(timer);
      timer = setTimeout(() => void send(), delay);
    };
    const unsubscribe = store.subscribe((state, before) => {
      if (state.document !== before.document && state.keeping.status === 'waiting') schedule(rest);
      if (
        state.document !== before.document ||
        state.version !== before.version ||
        state.keeping.status !== before.keeping.status
      ) {
        const { document, version, past, future, keeping, detail } = state;
        keepLocally(detail.id, { version, document, past, future, isChanged: keeping.status !== 'kept' });
      }
      if (state.keeping.status === 'waiting' && before.keeping.status === 'conflict') schedule(0);
    });
    const again = (): void => schedule(0);
    window.addEventListener('online', again);
    if (store.getState().keeping.status === 'waiting') schedule(rest);
    return () => {
      clearTimeout(timer);
      unsubscribe();
      window.removeEventListener('online', again);
    };
  }, [save, store]);

  // somebody else's version reaches those who have changed nothing
  const { data } = useQuery({
    queryKey: ['section', store.getState().detail.id],
    queryFn: async () => {
      const result = await read({ sectionId: store.getState().detail.id });
      return result.ok ? result.value : null;
    },
    refetchInterval: 10_000,
    retry: false,
  });
  useEffect(() => {
    const { version, keeping } = store.getState();
    if (!data || data.version <= version) return;
    if (keeping.status === 'kept') store.getState().adopt(data);
  }, [data, store]);
}
