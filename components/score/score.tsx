'use client';
import Link from 'next/link';
import { useEffect, useMemo, useRef, useState } from 'react';
import { toWorld } from '@/components/editor/kernels/camera';
import { restoreLocally } from '@/components/editor/state/keep-locally';
import { ScoreContext, useScore, useScoreStore } from '@/components/editor/state/score-context';
import { createScoreStore } from '@/components/editor/state/score-store';
import type { SectionDetail } from '@/lib/domain/dto';
import { paths } from '@/lib/paths';
import { AnswerStrip } from './answer-strip';
import { ChecksList } from './checks-list';
import { ConflictPanel, KeepingLine } from './keeping-line';
import { MarginNotes } from './margin-notes';
import { ResultStaves } from './result-staves';
import { SectionStave } from './section-stave';
import { SelectedSentence } from './selected-sentence';
import { TableView } from './table/table-view';
import { useAnswer } from './use-answer';
import { extentOf, focusOf, isSameExtent, useCamera } from './use-camera';
import { type KeepingActions, useKeeping } from './use-keeping';

interface ScoreProps extends KeepingActions {
  readonly detail: SectionDetail;
  readonly units: 'si' | 'us';
}

/** The working screen of one section. */
export function Score({ detail, units, save, read }: ScoreProps) {
  const [store] = useState(() => {
    const { restored, isBehind } = restoreLocally(detail);
    const made = createScoreStore(detail, units, detail.mayChange ? restored : null);
    if (isBehind && restored?.isChanged && detail.mayChange)
      made.setState({ keeping: { status: 'conflict', theirs: detail } });
    return made;
  });
  return (
    <ScoreContext value={store}>
      <ScoreScreen save={save} read={read} />
    </ScoreContext>
  );
}

function ScoreScreen(actions: KeepingActions) {
  useKeeping(actions);
  useAnswer();
  useHistoryKeys();
  const detail = useScore((state) => state.detail);
  const view = useScore((state) => state.view);
  return (
    <div className="mx-auto grid max-w-[120rem] gap-4 px-4 py-3 md:px-6">
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
        <p className="text-[0.9375rem] text-secondary">
          <Link className="text-link" href={paths.project(detail.projectId)}>
            {detail.projectNumber} {detail.projectName}
          </Link>
          {detail.untouched && ' · a starting point, every number yours to replace'}
        </p>
        <KeepingLine />
      </div>
      <ConflictPanel />
      <AnswerStrip />
      <div className="grid gap-x-8 gap-y-5 xl:grid-cols-[minmax(0,1fr)_21rem]">
        <div className="min-w-0">{view === 'drawing' ? <Staves /> : <TableView />}</div>
        <aside className="grid content-start gap-5">
          <MarginNotes />
          <ChecksList />
        </aside>
      </div>
    </div>
  );
}

/** The section and its results on one axis; a hairline follows the pointer through all of them. */
function Staves() {
  const document = useScore((state) => state.document);
  const situationId = useScore((state) => state.situationId);
  const isDragging = useScore((state) => state.isDragging);
  const container = useRef<HTMLDivElement>(null);
  const [hairline, setHairline] = useState<number | null>(null);
  const fresh = useMemo(
    () =>
      extentOf(
        document,
        document.situations.find(({ id }) => id === situationId),
      ),
    [document, situationId],
  );
  // the frame stands still under a hand that drags
  const [held, setHeld] = useState(fresh);
  if (!isDragging && !isSameExtent(held, fresh)) setHeld(fresh);
  const view = useCamera(container, held, focusOf(document));
  useWheelZoom(container, view.zoom);
  return (
    <div
      ref={container}
      onPointerMove={(event) => {
        if (event.pointerType !== 'mouse') return;
        const box = event.currentTarget.getBoundingClientRect();
        setHairline(toWorld(view.camera, event.clientX - box.left, 0)[0]);
      }}
      onPointerLeave={() => setHairline(null)}
    >
      <SectionStave view={view} hairline={hairline} />
      <div className="flex min-h-11 flex-wrap items-center justify-between gap-x-6 gap-y-1 py-1">
        <SelectedSentence />
        <div className="ml-auto flex gap-4 text-[0.875rem]">
          <button
            type="button"
            className="min-h-6 text-action underline decoration-action/40 underline-offset-4"
            onClick={() => view.zoom(1.5)}
          >
            closer
          </button>
          {!view.isWhole && (
            <>
              <button
                type="button"
                className="min-h-6 text-action underline decoration-action/40 underline-offset-4"
                onClick={() => view.zoom(1 / 1.5)}
              >
                further
              </button>
              <button
                type="button"
                className="min-h-6 text-action underline decoration-action/40 underline-offset-4"
                onClick={() => view.reset()}
              >
                whole section
              </button>
            </>
          )}
        </div>
      </div>
      <ResultStaves camera={view.camera} hairline={hairline} />
    </div>
  );
}

/** Pinching and the wheel with Ctrl move closer about the pointer; the plain wheel scrolls the page. */
function useWheelZoom(
  container: React.RefObject<HTMLElement | null>,
  zoom: (factor: number, px: number, py: number) => void,
): void {
  const latest = useRef(zoom);
  useEffect(() => {
    latest.current = zoom;
  }, [zoom]);
  useEffect(() => {
    const element = container.current;
    if (!element) return;
    const onWheel = (event: WheelEvent): void => {
      if (!event.ctrlKey) return;
      event.preventDefault();
      const box = element.getBoundingClientRect();
      latest.current(Math.exp(-event.deltaY / 300), event.clientX - box.left, event.clientY - box.top);
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    return () => element.removeEventListener('wheel', onWheel);
  }, [container]);
}

/** Ctrl+Z and Ctrl+Shift+Z or Ctrl+Y, outside text that has its own. */
function useHistoryKeys(): void {
  const store = useScoreStore();
  useEffect(() => {
    const onKey = (event: KeyboardEvent): void => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
      const target = event.target as HTMLElement;
      if (target.matches('input, textarea') && !target.matches('[type=radio]')) return;
      const key = event.key.toLowerCase();
      if (key === 'z' && !event.shiftKey) store.getState().undo();
      else if (key === 'y' || (key === 'z' && event.shiftKey)) store.getState().redo();
      else return;
      event.preventDefault();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [store]);
}
