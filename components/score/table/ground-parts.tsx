'use client';
import { freshId, proposeLens } from '@/components/editor/kernels/table-edits';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import { Button } from '@/components/ui/button';
import { sourceWords } from '@/lib/format/words';
import type { Material } from '@/lib/domain/section';
import { unitName } from '@/lib/domain/units';
import { Cell, ChoiceCell, Part, RemoveCell, TextCell } from './cells';
import { NumberField } from './number-field';
import { PointsCell } from './points-cell';

const textures = ['sand', 'gravel', 'silt', 'clay', 'rock'].map((name) => [name, name] as const);
const sources = [['', 'not stated'] as const, ...Object.entries(sourceWords)];

/** Materials and their numbers. */
export function MaterialsPart() {
  const store = useScoreStore();
  const units = useScore((state) => state.units);
  const materials = useScore(({ document }) => document.materials);
  const zones = useScore(({ document }) => document.zones);
  const add = (): void =>
    store.getState().edit('Material added', (draft) => {
      const id = freshId(draft.materials, 'material');
      draft.materials.push({
        id,
        name: 'New material',
        kMajor: 1e-5,
        kMinor: 1e-5,
        angle: 0,
        saturatedUnitWeight: 20,
        hatch: 'sand',
      });
    });
  return (
    <Part
      title="Materials"
      columns={[
        'Name',
        `k along, ${unitName('permeability', units)}`,
        `k across, ${unitName('permeability', units)}`,
        'Angle, °',
        `γsat, ${unitName('unit-weight', units)}`,
        'Porosity',
        'd50, mm',
        'k range, ×',
        'k from',
        'Texture',
        'Row',
      ]}
      onAdd={add}
      addWords="Add a material"
    >
      {materials.map((material, index) => {
        const set = (label: string, change: (draft: Material) => void): void =>
          store
            .getState()
            .edit(`${label} of ${material.name}`, (draft) => change(draft.materials[index]! as Material));
        const isUsed = zones.some((zone) => zone.material === material.id);
        return (
          <tr key={material.id}>
            <Cell>
              <TextCell
                label={`Name of ${material.name}`}
                value={material.name}
                isRequired
                onCommit={(v) => set('Name', (m) => (m.name = v))}
              />
            </Cell>
            {(['kMajor', 'kMinor'] as const).map((field) => (
              <Cell key={field}>
                <NumberField
                  label={`Permeability ${field === 'kMajor' ? 'along' : 'across'} of ${material.name}`}
                  quantity="permeability"
                  value={material[field]}
                  onCommit={(v) => v !== undefined && set('Permeability', (m) => (m[field] = v))}
                />
              </Cell>
            ))}
            <Cell>
              <NumberField
                label={`Angle of ${material.name}`}
                quantity="angle"
                value={material.angle}
                onCommit={(v) => v !== undefined && set('Angle', (m) => (m.angle = v))}
              />
            </Cell>
            <Cell>
              <NumberField
                label={`Saturated unit weight of ${material.name}`}
                quantity="unit-weight"
                value={material.saturatedUnitWeight}
                isOptional
                onCommit={(v) =>
                  set('Unit weight', (m) => {
                    if (v === undefined) delete m.saturatedUnitWeight;
                    else m.saturatedUnitWeight = v;
                  })
                }
              />
            </Cell>
            <Cell>
              <NumberField
                label={`Porosity of ${material.name}`}
                quantity="number"
                value={material.porosity}
                isOptional
                onCommit={(v) =>
                  set('Porosity', (m) => {
                    if (v === undefined) delete m.porosity;
                    else m.porosity = v;
                  })
                }
              />
            </Cell>
            <Cell>
              <NumberField
                label={`Median size of ${material.name}`}
                quantity="number"
                value={material.grading?.d50}
                isOptional
                onCommit={(v) =>
                  set('Grading', (m) => {
                    const grading = { ...m.grading };
                    if (v === undefined) delete grading.d50;
                    else grading.d50 = v;
                    m.grading = grading;
                  })
                }
              />
            </Cell>
            <Cell>
              <span className="flex gap-1">
                {(['low', 'high'] as const).map((end) => (
                  <NumberField
                    key={end}
                    label={`${end === 'low' ? 'Lower' : 'Upper'} multiplier of k of ${material.name}`}
                    quantity="number"
                    value={material.kRange?.[end]}
                    isOptional
                    onCommit={(v) =>
                      set('Range', (m) => {
                        if (v === undefined) delete m.kRange;
                        else
                          m.kRange = {
                            low: m.kRange?.low ?? Math.min(1, v),
                            high: m.kRange?.high ?? Math.max(1, v),
                            [end]: v,
                          };
                      })
                    }
                  />
                ))}
              </span>
            </Cell>
            <Cell>
              <ChoiceCell
                label={`Where k of ${material.name} comes from`}
                value={material.kSource ?? ''}
                options={sources}
                onCommit={(v) =>
                  set('Source', (m) => {
                    if (v === '') delete m.kSource;
                    else m.kSource = v as NonNullable<Material['kSource']>;
                  })
                }
              />
            </Cell>
            <Cell>
              <ChoiceCell
                label={`Texture of ${material.name}`}
                value={material.hatch ?? 'sand'}
                options={textures}
                onCommit={(v) => set('Texture', (m) => (m.hatch = v))}
              />
            </Cell>
            {isUsed ? (
              <Cell>
                <span className="text-secondary">in use</span>
              </Cell>
            ) : (
              <RemoveCell
                label={material.name}
                onRemove={() =>
                  store
                    .getState()
                    .edit(`${material.name} removed`, (draft) => void draft.materials.splice(index, 1))
                }
              />
            )}
          </tr>
        );
      })}
    </Part>
  );
}

/** Zones in the order they are painted. */
export function ZonesPart() {
  const store = useScoreStore();
  const zones = useScore(({ document }) => document.zones);
  const materials = useScore(({ document }) => document.materials);
  const mayChange = useScore(({ detail }) => detail.mayChange);
  const add = (): void => {
    const outline = proposeLens(store.getState().document);
    store.getState().edit('Zone added', (draft) => {
      draft.zones.push({
        id: freshId(draft.zones, 'zone'),
        name: 'New lens',
        material: draft.materials[0]!.id,
        outline,
      });
    });
  };
  return (
    <Part
      title="Zones, a later one over an earlier"
      columns={['Name', 'Material', 'Outline', 'Order', 'Row']}
      onAdd={add}
      addWords="Add a zone"
    >
      {zones.map((zone, index) => {
        const name = zone.name ?? zone.id;
        return (
          <tr key={zone.id}>
            <Cell>
              <TextCell
                label={`Name of zone ${index + 1}`}
                value={name}
                isRequired
                onCommit={(v) =>
                  store.getState().edit(`Name of ${name}`, (draft) => void (draft.zones[index]!.name = v))
                }
              />
            </Cell>
            <Cell>
              <ChoiceCell
                label={`Material of ${name}`}
                value={zone.material}
                options={materials.map((m) => [m.id, m.name] as const)}
                onCommit={(v) =>
                  store
                    .getState()
                    .edit(`Material of ${name}`, (draft) => void (draft.zones[index]!.material = v))
                }
              />
            </Cell>
            <Cell>
              <PointsCell
                label={`Outline of ${name}`}
                points={zone.outline}
                least={3}
                onCommit={(points) =>
                  store
                    .getState()
                    .edit(`Outline of ${name}`, (draft) => void (draft.zones[index]!.outline = points))
                }
              />
            </Cell>
            <Cell>
              {mayChange && index > 0 ? (
                <Button
                  look="quiet"
                  aria-label={`Paint ${name} earlier`}
                  onClick={() =>
                    store.getState().edit(`Order of ${name}`, (draft) => {
                      const [moved] = draft.zones.splice(index, 1);
                      draft.zones.splice(index - 1, 0, moved!);
                    })
                  }
                >
                  Earlier
                </Button>
              ) : (
                index + 1
              )}
            </Cell>
            {zones.length > 1 ? (
              <RemoveCell
                label={name}
                onRemove={() =>
                  store.getState().edit(`${name} removed`, (draft) => void draft.zones.splice(index, 1))
                }
              />
            ) : (
              <Cell>—</Cell>
            )}
          </tr>
        );
      })}
    </Part>
  );
}
