'use client';
import { freshId, proposeWall, surfaceAt, boundsOf } from '@/components/editor/kernels/table-edits';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import type { Condition, Point } from '@/lib/domain/section';
import { unitName } from '@/lib/domain/units';
import { Cell, ChoiceCell, Part, RemoveCell, TextCell } from './cells';
import { NumberField } from './number-field';
import { PointsCell } from './points-cell';

/** Cutoff walls. */
export function BarriersPart() {
  const store = useScoreStore();
  const barriers = useScore(({ document }) => document.barriers);
  const add = (): void => {
    const path = proposeWall(store.getState().document);
    store.getState().edit('Wall added', (draft) => {
      draft.barriers.push({ id: freshId(draft.barriers, 'wall'), name: 'New wall', path, conductance: 0 });
    });
  };
  return (
    <Part
      title="Walls"
      columns={['Name', 'Conductance, 1/s (0: watertight)', 'Path', 'Row']}
      onAdd={add}
      addWords="Add a wall"
    >
      {barriers.map((barrier, index) => {
        const name = barrier.name ?? barrier.id;
        return (
          <tr key={barrier.id}>
            <Cell>
              <TextCell
                label={`Name of wall ${index + 1}`}
                value={name}
                isRequired
                onCommit={(v) =>
                  store.getState().edit(`Name of ${name}`, (draft) => void (draft.barriers[index]!.name = v))
                }
              />
            </Cell>
            <Cell>
              <NumberField
                label={`Conductance of ${name}`}
                quantity="conductance"
                value={barrier.conductance}
                onCommit={(v) =>
                  v !== undefined &&
                  store
                    .getState()
                    .edit(`Conductance of ${name}`, (draft) => void (draft.barriers[index]!.conductance = v))
                }
              />
            </Cell>
            <Cell>
              <PointsCell
                label={`Path of ${name}`}
                points={barrier.path}
                least={2}
                onCommit={(points) =>
                  store
                    .getState()
                    .edit(`Path of ${name}`, (draft) => void (draft.barriers[index]!.path = points))
                }
              />
            </Cell>
            <RemoveCell
              label={name}
              onRemove={() =>
                store.getState().edit(`${name} removed`, (draft) => {
                  draft.barriers.splice(index, 1);
                  // a structure must not go on naming a wall that is gone
                  for (const structure of draft.structures) {
                    if (structure.barriers)
                      structure.barriers = structure.barriers.filter((id) => id !== barrier.id);
                  }
                })
              }
            />
          </tr>
        );
      })}
    </Part>
  );
}

const conditionWords = [
  ['water', 'water stands at'],
  ['head', 'head of'],
  ['seepage', 'seepage face'],
  ['flux', 'inflow of'],
  ['impervious', 'impervious'],
] as const;

/** Edges of the outline, or drains inside the ground: both carry a condition along a path. */
export function LinesPart({ kind }: { kind: 'edges' | 'drains' }) {
  const store = useScoreStore();
  const units = useScore((state) => state.units);
  const lines = useScore(({ document }) => document[kind]);
  const noun = kind === 'edges' ? 'edge' : 'drain';
  const add = (): void => {
    const { document } = store.getState();
    const { xMin, xMax, yMin } = boundsOf(document);
    const step = (xMax - xMin) / 20;
    const x = Math.round((xMin + xMax) / 2);
    const path: Point[] =
      kind === 'edges'
        ? [
            [x, surfaceAt(document, x)],
            [x + step, surfaceAt(document, x + step)],
          ]
        : [
            [x, (surfaceAt(document, x) + yMin) / 2],
            [x + step, (surfaceAt(document, x) + yMin) / 2],
          ];
    const condition: Condition =
      kind === 'edges' ? { type: 'impervious' } : { type: 'head', level: surfaceAt(document, x) };
    store.getState().edit(`New ${noun}`, (draft) => {
      draft[kind].push({ id: freshId(draft[kind], noun), name: `New ${noun}`, path, condition });
    });
  };
  return (
    <Part
      title={kind === 'edges' ? 'Edges' : 'Drains'}
      columns={['Name', 'Condition', `Level, ${unitName('length', units)} or name`, 'Path', 'Row']}
      onAdd={add}
      addWords={`Add ${kind === 'edges' ? 'an edge' : 'a drain'}`}
    >
      {lines.map((line, index) => {
        const name = line.name ?? line.id;
        const set = (condition: Condition): void =>
          store
            .getState()
            .edit(`Condition of ${name}`, (draft) => void (draft[kind][index]!.condition = condition));
        return (
          <tr key={line.id}>
            <Cell>
              <TextCell
                label={`Name of ${noun} ${index + 1}`}
                value={name}
                isRequired
                onCommit={(v) =>
                  store.getState().edit(`Name of ${name}`, (draft) => void (draft[kind][index]!.name = v))
                }
              />
            </Cell>
            <Cell>
              <ChoiceCell
                label={`Condition of ${name}`}
                value={line.condition.type}
                options={conditionWords}
                onCommit={(type) => set(changeType(line.condition, type as Condition['type']))}
              />
            </Cell>
            <Cell>
              <ConditionValue name={name} condition={line.condition} onChange={set} />
            </Cell>
            <Cell>
              <PointsCell
                label={`Path of ${name}`}
                points={line.path}
                least={2}
                onCommit={(points) =>
                  store
                    .getState()
                    .edit(`Path of ${name}`, (draft) => void (draft[kind][index]!.path = points))
                }
              />
            </Cell>
            <RemoveCell
              label={name}
              onRemove={() =>
                store.getState().edit(`${name} removed`, (draft) => void draft[kind].splice(index, 1))
              }
            />
          </tr>
        );
      })}
    </Part>
  );
}

/** Another kind of condition; a level stays where both have one. */
function changeType(before: Condition, type: Condition['type']): Condition {
  const level = 'level' in before ? before.level : 0;
  if (type === 'water' || type === 'head') return { type, level };
  return type === 'flux' ? { type, rate: 0 } : { type };
}

interface ConditionValueProps {
  readonly name: string;
  readonly condition: Condition;
  readonly onChange: (condition: Condition) => void;
}

function ConditionValue({ name, condition, onChange }: ConditionValueProps) {
  const situations = useScore(({ document }) => document.situations);
  if (condition.type === 'flux') {
    return (
      <NumberField
        label={`Inflow along ${name}`}
        quantity="permeability"
        value={condition.rate}
        onCommit={(v) => v !== undefined && onChange({ type: 'flux', rate: v })}
      />
    );
  }
  if (!('level' in condition)) return <span className="text-secondary">none</span>;
  const names = [...new Set(situations.flatMap(({ levels }) => Object.keys(levels)))];
  const { type, level } = condition;
  return (
    <span className="flex flex-wrap items-start gap-2">
      <ChoiceCell
        label={`Level of ${name}`}
        value={typeof level === 'string' ? level : ''}
        options={[...names.map((n) => [n, n] as const), ['', 'a number'] as const]}
        onCommit={(v) =>
          onChange({ type, level: v === '' ? (situations[0]?.levels[String(level)] ?? 0) : v })
        }
      />
      {typeof level === 'number' && (
        <NumberField
          label={`Level of ${name} as a number`}
          quantity="length"
          value={level}
          onCommit={(v) => v !== undefined && onChange({ type, level: v })}
        />
      )}
    </span>
  );
}
