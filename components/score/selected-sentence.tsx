'use client';
import type { ReactNode } from 'react';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import type { Selection } from '@/components/editor/state/score-store';
import { describeObject } from '@/lib/domain/describe';
import type { SectionDocument } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { NumberField } from './table/number-field';

/** What is selected describes itself in one sentence under the drawing, so that it never hides it; its numbers are editable in place. */
export function SelectedSentence() {
  const store = useScoreStore();
  const document = useScore((state) => state.document);
  const selection = useScore((state) => state.selection);
  const mayChange = useScore((state) => state.detail.mayChange);
  const object = selection ? document[selection.kind][selection.index] : undefined;
  if (!selection || !object) {
    return (
      <p className="text-[0.9375rem] text-secondary">
        {mayChange
          ? 'Drag the tip of a wall, or choose a line, a zone or a piezometer to see its numbers.'
          : 'Choose a line, a zone or a piezometer to see its numbers.'}
      </p>
    );
  }
  const name = describeObject(selection.kind, selection.index, object).replace(/^\w+ “(.*)”$/, '$1');
  return (
    <div className="flex flex-wrap items-center gap-x-2 gap-y-1 text-[0.9375rem]">
      <strong className="font-semibold">{name}</strong>
      <Sentence document={document} selection={selection} />
      <button
        type="button"
        className="ml-1 min-h-6 text-sm text-secondary underline"
        onClick={() => store.getState().select(null)}
      >
        close
      </button>
    </div>
  );
}

function Sentence({ document, selection }: { document: SectionDocument; selection: Selection }): ReactNode {
  const { kind, index } = selection;
  if (kind === 'barriers') return <BarrierSentence index={index} />;
  if (kind === 'zones') return <ZoneSentence index={index} />;
  if (kind === 'edges' || kind === 'drains') return <LineSentence kind={kind} index={index} />;
  if (kind === 'structures') return <StructureSentence index={index} />;
  const [x, y] = document.piezometers[index]!.at;
  return <PiezometerSentence index={index} x={x} y={y} />;
}

const dot = ' · ';

function BarrierSentence({ index }: { index: number }) {
  const store = useScoreStore();
  const barrier = useScore(({ document }) => document.barriers[index]!);
  const low = barrier.path[0]![1] < barrier.path.at(-1)![1] ? 0 : barrier.path.length - 1;
  const top = barrier.path[low === 0 ? barrier.path.length - 1 : 0]!;
  const tip = barrier.path[low]!;
  const name = barrier.name ?? barrier.id;
  const setTip = (y: number): void => {
    store.getState().edit(`Tip of ${name}`, (draft) => {
      draft.barriers[index]!.path[low] = [tip[0], y];
    });
  };
  return (
    <>
      <span aria-hidden>{dot}</span>
      <NumberField
        label={`Length of ${name}`}
        quantity="length"
        value={top[1] - tip[1]}
        onCommit={(value) => value !== undefined && setTip(top[1] - value)}
      />
      <span>long{dot}tip</span>
      <NumberField
        label={`Tip of ${name}`}
        quantity="length"
        value={tip[1]}
        onCommit={(value) => value !== undefined && setTip(value)}
      />
      <span>
        {dot}
        {barrier.conductance > 0 ? 'leaks' : 'watertight,'} conductance
      </span>
      <NumberField
        label={`Conductance of ${name}`}
        quantity="conductance"
        value={barrier.conductance}
        onCommit={(value) =>
          value !== undefined &&
          store.getState().edit(`Conductance of ${name}`, (draft) => {
            draft.barriers[index]!.conductance = Math.max(0, value);
          })
        }
      />
      <span>1/s</span>
    </>
  );
}

function ZoneSentence({ index }: { index: number }) {
  const store = useScoreStore();
  const document = useScore((state) => state.document);
  const at = document.materials.findIndex(({ id }) => id === document.zones[index]!.material);
  const material = document.materials[at];
  if (!material) return null;
  const set =
    (label: string, field: 'kMajor' | 'kMinor' | 'saturatedUnitWeight') => (value: number | undefined) => {
      if (value === undefined || !(value > 0)) return;
      store.getState().edit(`${label} of ${material.name}`, (draft) => {
        draft.materials[at]![field] = value;
      });
    };
  return (
    <>
      <span>
        {dot}
        {material.name}
        {dot}k
      </span>
      <NumberField
        label={`Permeability along the layers of ${material.name}`}
        quantity="permeability"
        value={material.kMajor}
        onCommit={set('Permeability', 'kMajor')}
      />
      <span>along,</span>
      <NumberField
        label={`Permeability across the layers of ${material.name}`}
        quantity="permeability"
        value={material.kMinor}
        onCommit={set('Permeability', 'kMinor')}
      />
      <span>m/s across{dot}γsat</span>
      <NumberField
        label={`Saturated unit weight of ${material.name}`}
        quantity="unit-weight"
        value={material.saturatedUnitWeight}
        onCommit={set('Unit weight', 'saturatedUnitWeight')}
        isOptional
      />
    </>
  );
}

function LineSentence({ kind, index }: { kind: 'edges' | 'drains'; index: number }) {
  const store = useScoreStore();
  const { condition, name, id } = useScore(({ document }) => document[kind][index]!);
  const situation = useScore(({ document, situationId }) =>
    document.situations.find((s) => s.id === situationId),
  );
  if (!situation) return null;
  if (!('level' in condition)) {
    const words = { seepage: 'seepage face', impervious: 'impervious', flux: 'prescribed inflow' }[
      condition.type
    ];
    return (
      <span>
        {dot}
        {words}
      </span>
    );
  }
  const level = condition.level;
  return (
    <>
      <span>
        {dot}
        {condition.type === 'water' ? 'water at' : 'head of'}
      </span>
      <NumberField
        label={`Level at ${name ?? id}`}
        quantity="length"
        value={levelOf(condition, situation) ?? 0}
        onCommit={(value) =>
          value !== undefined &&
          store.getState().edit(`Level at ${name ?? id}`, (draft) => {
            if (typeof level === 'string')
              draft.situations.find((s) => s.id === situation.id)!.levels[level] = value;
            else draft[kind][index]!.condition = { type: condition.type, level: value };
          })
        }
      />
      {typeof level === 'string' && (
        <span className="text-secondary">
          {level} in “{situation.name ?? situation.id}”
        </span>
      )}
    </>
  );
}

function StructureSentence({ index }: { index: number }) {
  const store = useScoreStore();
  const structure = useScore(({ document }) => document.structures[index]!);
  const name = structure.name ?? structure.id;
  return (
    <>
      <span>{dot}weight</span>
      <NumberField
        label={`Weight of ${name}`}
        quantity="force"
        value={structure.weight}
        isOptional
        onCommit={(value) =>
          store.getState().edit(`Weight of ${name}`, (draft) => {
            if (value === undefined) delete draft.structures[index]!.weight;
            else draft.structures[index]!.weight = value;
          })
        }
      />
      <span>kN per metre</span>
    </>
  );
}

function PiezometerSentence({ index, x, y }: { index: number; x: number; y: number }) {
  const store = useScoreStore();
  const set = (axis: 0 | 1) => (value: number | undefined) => {
    if (value === undefined) return;
    store.getState().edit('Piezometer moved', (draft) => {
      draft.piezometers[index]!.at[axis] = value;
    });
  };
  return (
    <>
      <span>{dot}at chainage</span>
      <NumberField label="Chainage of the piezometer" quantity="length" value={x} onCommit={set(0)} />
      <span>elevation</span>
      <NumberField label="Elevation of the piezometer" quantity="length" value={y} onCommit={set(1)} />
    </>
  );
}
