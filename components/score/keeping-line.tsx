'use client';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import type { Keeping } from '@/components/editor/state/score-store';
import type { SectionDetail } from '@/lib/domain/dto';
import type { SectionDocument } from '@/lib/domain/section';
import { Button } from '@/components/ui/button';

/** Whether everything is kept, in words; undo and redo beside it. */
export function KeepingLine() {
  const store = useScoreStore();
  const keeping = useScore((state) => state.keeping);
  const past = useScore((state) => state.past);
  const future = useScore((state) => state.future);
  const mayChange = useScore((state) => state.detail.mayChange);
  const view = useScore((state) => state.view);
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-1 text-[0.9375rem]">
      <div
        role="radiogroup"
        aria-label="View"
        className="inline-flex overflow-hidden rounded-control border border-field"
      >
        {(['drawing', 'table'] as const).map((name) => (
          <button
            key={name}
            type="button"
            role="radio"
            aria-checked={view === name}
            className={`min-h-8 px-3.5 ${view === name ? 'bg-ink text-paper' : 'hover:bg-paper'}`}
            onClick={() => store.getState().show(name)}
          >
            {name === 'drawing' ? 'Drawing' : 'Table'}
          </button>
        ))}
      </div>
      {mayChange && (
        <span className="flex gap-4">
          <Button
            look="quiet"
            disabled={past.length === 0}
            onClick={() => store.getState().undo()}
            title={past.at(-1)?.label}
          >
            Undo{past.length > 0 && <span className="sr-only">: {past.at(-1)!.label}</span>}
          </Button>
          <Button look="quiet" disabled={future.length === 0} onClick={() => store.getState().redo()}>
            Redo
          </Button>
        </span>
      )}
      <p role="status" aria-label="Keeping" className="figures text-secondary">
        {!mayChange ? 'You may read this section, not change it.' : describeKeeping(keeping)}
      </p>
    </div>
  );
}

function describeKeeping(keeping: Keeping): string {
  switch (keeping.status) {
    case 'kept':
      return `All changes kept ${new Date(keeping.at).toLocaleTimeString([], { hour: '2-digit', minute: '2-digit' })}`;
    case 'waiting':
    case 'saving':
      return 'Keeping …';
    case 'failed':
      return `Not on the server yet: ${keeping.message} Your changes wait in this browser and go out by themselves.`;
    case 'conflict':
      return 'Changed by somebody else meanwhile';
  }
}

/** Two people changed one section: both versions stand, and this person chooses. */
export function ConflictPanel() {
  const store = useScoreStore();
  const keeping = useScore((state) => state.keeping);
  const mine = useScore((state) => state.document);
  if (keeping.status !== 'conflict') return null;
  const { theirs } = keeping;
  return (
    <section
      role="alert"
      aria-label="Changed meanwhile"
      className="rounded-control border-2 border-attention bg-paper p-4"
    >
      <h2 className="font-semibold">Changed meanwhile by {theirs.updatedBy || 'somebody else'}</h2>
      <p className="mt-1">Both versions are kept. They differ in {listDifferences(mine, theirs)}.</p>
      <div className="mt-3 flex flex-wrap gap-3">
        <Button look="solid" onClick={() => keepMine(theirs)}>
          Keep mine, theirs stays in the history
        </Button>
        <Button onClick={() => store.getState().adopt(theirs)}>Take theirs, drop my changes</Button>
      </div>
    </section>
  );

  function keepMine(latest: SectionDetail): void {
    store.setState({ version: latest.version, keeping: { status: 'waiting' } });
  }
}

const parts = {
  title: 'the title',
  question: 'the question',
  materials: 'materials',
  zones: 'zones',
  barriers: 'barriers',
  drains: 'drains',
  edges: 'edges',
  structures: 'structures',
  situations: 'situations and levels',
  piezometers: 'piezometers',
  assessment: 'the averaging length',
} as const;

function listDifferences(mine: SectionDocument, { document: theirs }: SectionDetail): string {
  const keys = Object.keys(parts) as (keyof typeof parts)[];
  const different = keys
    .filter((key) => JSON.stringify(mine[key]) !== JSON.stringify(theirs[key]))
    .map((key) => parts[key]);
  return different.length > 0 ? different.join(', ') : 'nothing that is drawn';
}
