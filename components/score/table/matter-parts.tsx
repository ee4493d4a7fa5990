'use client';
import { boundsOf, freshId, surfaceAt } from '@/components/editor/kernels/table-edits';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import { Button } from '@/components/ui/button';
import { unitName } from '@/lib/domain/units';
import { Cell, ChoiceCell, Part, RemoveCell, TextCell } from './cells';
import { NumberField } from './number-field';
import { PointsCell } from './points-cell';

/** Title, geometry, datum, averaging length. */
export function SectionPart() {
  const store = useScoreStore();
  const units = useScore((state) => state.units);
  const { title, geometry, datum, assessment } = useScore(({ document }) => document);
  return (
    <Part
      title="Section"
      columns={[
        'Title',
        'Geometry',
        'Level datum',
        `Averaging length at the exit, ${unitName('length', units)}`,
      ]}
    >
      <tr>
        <Cell>
          <TextCell
            label="Title"
            className="w-72"
            value={title}
            isRequired
            onCommit={(v) => store.getState().edit('Title', (draft) => void (draft.title = v))}
          />
        </Cell>
        <Cell>
          <ChoiceCell
            label="Geometry"
            value={geometry}
            options={[
              ['plane', 'plane, per metre run'],
              ['axisymmetric', 'about an axis, chainage is the radius'],
            ]}
            onCommit={(v) =>
              store.getState().edit('Geometry', (draft) => void (draft.geometry = v as typeof geometry))
            }
          />
        </Cell>
        <Cell>
          <TextCell
            label="Level datum"
            value={datum ?? ''}
            onCommit={(v) =>
              store.getState().edit('Datum', (draft) => {
                if (v === '') delete draft.datum;
                else draft.datum = v;
              })
            }
          />
        </Cell>
        <Cell>
          <NumberField
            label="Averaging length at the exit"
            quantity="length"
            value={assessment?.averagingLength ?? 0.5}
            onCommit={(v) =>
              v !== undefined &&
              store
                .getState()
                .edit(
                  'Averaging length',
                  (draft) => void (draft.assessment = { ...draft.assessment, averagingLength: v }),
                )
            }
          />
        </Cell>
      </tr>
    </Part>
  );
}

/** Structures, their bases and weights. */
export function StructuresPart() {
  const store = useScoreStore();
  const units = useScore((state) => state.units);
  const structures = useScore(({ document }) => document.structures);
  const add = (): void => {
    const { document } = store.getState();
    const { xMin, xMax } = boundsOf(document);
    const [a, b] = [Math.round(xMin + 0.45 * (xMax - xMin)), Math.round(xMin + 0.55 * (xMax - xMin))];
    store.getState().edit('Structure added', (draft) => {
      const base: [number, number][] = [
        [a, surfaceAt(document, a)],
        [b, surfaceAt(document, b)],
      ];
      draft.structures.push({ id: freshId(draft.structures, 'structure'), name: 'New structure', base });
    });
  };
  return (
    <Part
      title="Structures"
      columns={['Name', `Weight, ${unitName('force', units)}`, 'Where the weight comes from', 'Base', 'Row']}
      onAdd={add}
      addWords="Add a structure"
    >
      {structures.map((structure, index) => {
        const name = structure.name ?? structure.id;
        return (
          <tr key={structure.id}>
            <Cell>
              <TextCell
                label={`Name of structure ${index + 1}`}
                value={name}
                isRequired
                onCommit={(v) =>
                  store
                    .getState()
                    .edit(`Name of ${name}`, (draft) => void (draft.structures[index]!.name = v))
                }
              />
            </Cell>
            <Cell>
              <NumberField
                label={`Weight of ${name}`}
                quantity="force"
                value={structure.weight}
                isOptional
                onCommit={(v) =>
                  store.getState().edit(`Weight of ${name}`, (draft) => {
                    if (v === undefined) delete draft.structures[index]!.weight;
                    else draft.structures[index]!.weight = v;
                  })
                }
              />
            </Cell>
            <Cell>
              <TextCell
                label={`Source of the weight of ${name}`}
                className="w-72"
                value={structure.weightSource ?? ''}
                onCommit={(v) =>
                  store
                    .getState()
                    .edit(
                      `Source of the weight of ${name}`,
                      (draft) => void (draft.structures[index]!.weightSource = v),
                    )
                }
              />
            </Cell>
            <Cell>
              <PointsCell
                label={`Base of ${name}`}
                points={structure.base}
                least={2}
                onCommit={(points) =>
                  store
                    .getState()
                    .edit(`Base of ${name}`, (draft) => void (draft.structures[index]!.base = points))
                }
              />
            </Cell>
            <RemoveCell
              label={name}
              onRemove={() =>
                store.getState().edit(`${name} removed`, (draft) => void draft.structures.splice(index, 1))
              }
            />
          </tr>
        );
      })}
    </Part>
  );
}

/** Situations and their levels, one column a level. */
export function SituationsPart() {
  const store = useScoreStore();
  const units = useScore((state) => state.units);
  const situations = useScore(({ document }) => document.situations);
  const mayChange = useScore(({ detail }) => detail.mayChange);
  const names = [...new Set(situations.flatMap(({ levels }) => Object.keys(levels)))];
  const add = (): void =>
    store.getState().edit('Situation added', (draft) => {
      const last = draft.situations.at(-1)!;
      draft.situations.push({
        ...last,
        id: freshId(draft.situations, 'situation'),
        name: 'New situation',
        levels: { ...last.levels },
      });
    });
  const addLevel = (): void =>
    store.getState().edit('Level added', (draft) => {
      let n = names.length + 1;
      while (names.includes(`level-${n}`)) n++;
      for (const situation of draft.situations) situation.levels[`level-${n}`] = 0;
    });
  return (
    <>
      <Part
        title="Situations"
        columns={['Name', ...names.map((name) => `${name}, ${unitName('length', units)}`), 'Row']}
        onAdd={add}
        addWords="Add a situation"
      >
        {situations.map((situation, index) => {
          const title = situation.name ?? situation.id;
          return (
            <tr key={situation.id}>
              <Cell>
                <TextCell
                  label={`Name of situation ${index + 1}`}
                  value={title}
                  isRequired
                  onCommit={(v) =>
                    store
                      .getState()
                      .edit(`Name of ${title}`, (draft) => void (draft.situations[index]!.name = v))
                  }
                />
              </Cell>
              {names.map((name) => (
                <Cell key={name}>
                  <NumberField
                    label={`${name} in ${title}, table`}
                    quantity="length"
                    value={situation.levels[name]}
                    onCommit={(v) =>
                      v !== undefined &&
                      store
                        .getState()
                        .edit(
                          `${name} in ${title}`,
                          (draft) => void (draft.situations[index]!.levels[name] = v),
                        )
                    }
                  />
                </Cell>
              ))}
              {situations.length > 1 ? (
                <RemoveCell
                  label={title}
                  onRemove={() => {
                    if (store.getState().situationId === situation.id)
                      store.getState().chooseSituation(situations[index === 0 ? 1 : 0]!.id);
                    store.getState().edit(`${title} removed`, (draft) => {
                      draft.situations.splice(index, 1);
                      for (const { observed } of draft.piezometers)
                        if (observed) delete observed[situation.id];
                    });
                  }}
                />
              ) : (
                <Cell>—</Cell>
              )}
            </tr>
          );
        })}
      </Part>
      {mayChange && (
        <Button look="quiet" onClick={addLevel}>
          Add a level
        </Button>
      )}
    </>
  );
}

/** Piezometers with their readings. */
export function PiezometersPart() {
  const store = useScoreStore();
  const units = useScore((state) => state.units);
  const piezometers = useScore(({ document }) => document.piezometers);
  const situations = useScore(({ document }) => document.situations);
  const add = (): void => {
    const { document } = store.getState();
    const { xMin, xMax, yMin } = boundsOf(document);
    const x = Math.round((xMin + xMax) / 2) + 1;
    const y = Math.round(((surfaceAt(document, x) + yMin) / 2) * 10) / 10;
    store.getState().edit('Piezometer added', (draft) => {
      const id = freshId(draft.piezometers, 'P');
      draft.piezometers.push({ id, name: id, at: [x, y] });
    });
  };
  return (
    <Part
      title="Piezometers"
      columns={[
        'Name',
        `Chainage, ${unitName('length', units)}`,
        `Elevation of the tip, ${unitName('length', units)}`,
        ...situations.map(({ id, name }) => `Head in ${name ?? id}, ${unitName('length', units)}`),
        'Row',
      ]}
      onAdd={add}
      addWords="Add a piezometer"
    >
      {piezometers.map((piezometer, index) => {
        const name = piezometer.name ?? piezometer.id;
        return (
          <tr key={piezometer.id}>
            <Cell>
              <TextCell
                label={`Name of piezometer ${index + 1}`}
                className="w-24"
                value={name}
                isRequired
                onCommit={(v) =>
                  store
                    .getState()
                    .edit(`Name of ${name}`, (draft) => void (draft.piezometers[index]!.name = v))
                }
              />
            </Cell>
            {([0, 1] as const).map((axis) => (
              <Cell key={axis}>
                <NumberField
                  label={`${axis === 0 ? 'Chainage' : 'Elevation'} of ${name}`}
                  quantity="length"
                  value={piezometer.at[axis]}
                  onCommit={(v) =>
                    v !== undefined &&
                    store
                      .getState()
                      .edit(`${name} moved`, (draft) => void (draft.piezometers[index]!.at[axis] = v))
                  }
                />
              </Cell>
            ))}
            {situations.map((situation) => (
              <Cell key={situation.id}>
                <NumberField
                  label={`Head of ${name} in ${situation.name ?? situation.id}`}
                  quantity="length"
                  value={piezometer.observed?.[situation.id]}
                  isOptional
                  onCommit={(v) =>
                    store.getState().edit(`Reading of ${name}`, (draft) => {
                      const observed = { ...draft.piezometers[index]!.observed };
                      if (v === undefined) delete observed[situation.id];
                      else observed[situation.id] = v;
                      draft.piezometers[index]!.observed = observed;
                    })
                  }
                />
              </Cell>
            ))}
            <RemoveCell
              label={name}
              onRemove={() =>
                store.getState().edit(`${name} removed`, (draft) => void draft.piezometers.splice(index, 1))
              }
            />
          </tr>
        );
      })}
    </Part>
  );
}
