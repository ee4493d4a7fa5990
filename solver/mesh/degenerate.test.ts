import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Path, Region, SectionGeometry } from '../problem';
import { buildMesh } from './build-mesh';
import { validateMesh } from './validate-mesh';

const section = (parts: Partial<SectionGeometry>): SectionGeometry => ({
  kind: 'plane',
  regions: [],
  barriers: [],
  drains: [],
  edges: [],
  bases: [],
  ...parts,
});
const region = (outline: Path, material = 0): Region => ({ outline, holes: [], material });
const box = (left: number, bottom: number, right: number, top: number): Path => [
  [left, bottom],
  [right, bottom],
  [right, top],
  [left, top],
];
const build = (parts: Partial<SectionGeometry>) =>
  buildMesh(section(parts), { order: 2, sizeFactor: 2, maxElements: 20_000 });
const codesOf = (parts: Partial<SectionGeometry>): string[] => build(parts).findings.map(({ code }) => code);

describe('refusals', () => {
  const ground = [region(box(0, 0, 10, 5))];
  it.each<[string, Partial<SectionGeometry>]>([
    [
      'region-crosses-itself',
      {
        regions: [
          region([
            [0, 0],
            [10, 5],
            [10, 0],
            [0, 5],
          ]),
        ],
      },
    ],
    ['region-empty', { regions: [] }],
    [
      'region-empty',
      {
        regions: [
          region([
            [0, 0],
            [10, 0],
            [5, 0],
          ]),
        ],
      },
    ],
    ['region-empty', { regions: [region([[1, 1]])] }],
    [
      'too-fine',
      {
        regions: [
          region([
            [0, 0],
            [10, Number.NaN],
            [5, 5],
          ]),
        ],
      },
    ],
    [
      'too-fine',
      {
        regions: [
          region([
            [0, 0],
            [Infinity, 0],
            [5, 5],
          ]),
        ],
      },
    ],
    [
      'edge-off-outline',
      {
        regions: ground,
        edges: [
          [
            [0, 5.1],
            [10, 5.1],
          ],
        ],
      },
    ],
    [
      'edge-off-outline',
      {
        regions: ground,
        edges: [
          [
            [0, 2],
            [10, 2],
          ],
        ],
      },
    ],
    [
      'edge-off-outline',
      {
        regions: ground,
        edges: [
          [
            [8, 5],
            [12, 5],
          ],
        ],
      },
    ],
    [
      'barrier-outside',
      {
        regions: ground,
        barriers: [
          {
            path: [
              [5, 6],
              [5, 3],
            ],
            conductance: 0,
          },
        ],
      },
    ],
    [
      'drain-outside',
      {
        regions: ground,
        drains: [
          [
            [9, 2],
            [11, 2],
          ],
        ],
      },
    ],
    [
      'base-off-outline',
      {
        regions: ground,
        bases: [
          [
            [2, 6],
            [4, 6],
          ],
        ],
      },
    ],
  ])('says %s', (code, parts) => {
    const outcome = build(parts);
    expect(outcome.status).toBe('refused');
    expect(outcome.findings.map((finding) => finding.code)).toContain(code);
  });
});

describe('gaps and slivers', () => {
  const halves = (gap: number): Partial<SectionGeometry> => ({
    regions: [region(box(0, 0, 5, 5)), region(box(5 + gap, 0, 10, 5), 1)],
  });

  it('closes a gap below the snap distance', () => {
    expect(codesOf(halves(1e-7))).toEqual([]);
  });

  it('keeps a wider gap open and reports it', () => {
    const { findings } = build(halves(1e-3));
    expect(findings.filter(({ code }) => code === 'near-gap')[0].value).toBeCloseTo(1e-3, 9);
    expect(findings.at(-1)).toMatchObject({ code: 'ground-in-pieces', value: 2 });
  });

  it('reports a wall that stops just short of the base', () => {
    const path: Path = [
      [5, 5],
      [5, 0.02],
    ];
    const outcome = build({ regions: [region(box(0, 0, 10, 5))], barriers: [{ path, conductance: 0 }] });
    expect(outcome.status).toBe('meshed');
    expect(outcome.findings).toMatchObject([{ code: 'near-gap', line: { kind: 'barrier', index: 0 } }]);
    expect(outcome.findings[0].value).toBeCloseTo(0.02, 9);
  });

  it('meshes sharp wedges and names their angle', () => {
    const outcome = build({
      regions: [
        region([
          [0, 0],
          [100, 0],
          [100, 5],
        ]),
      ],
    });
    expect(outcome.findings).toMatchObject([{ code: 'small-angle', at: [0, 0] }]);
    expect(outcome.findings[0].value).toBeCloseTo((Math.atan(0.05) * 180) / Math.PI, 9);
  });

  it('meshes features 1e5 times smaller than the section', () => {
    const outcome = build({
      regions: [region(box(0, 0, 1000, 50)), region(box(500, 49.99, 500.01, 50), 1)],
      barriers: [
        {
          path: [
            [200, 50],
            [200, 49.99],
          ],
          conductance: 0,
        },
      ],
    });
    if (outcome.status === 'refused') expect.fail('refused');
    expect(validateMesh(outcome.mesh)).toEqual([]);
    expect(outcome.mesh.elementMaterials.includes(1)).toBe(true);
    expect(outcome.mesh.barriers[0].left.elements.length).toBeGreaterThan(1);
  });

  it('gives the smallest barrier at least two sides, or its nodes would not part', () => {
    const path: Path = [
      [200, 30],
      [200, 29.9],
    ];
    const outcome = buildMesh(
      section({ regions: [region(box(0, 0, 1000, 50))], barriers: [{ path, conductance: 0 }] }),
      { order: 1, sizeFactor: 8, maxElements: 20_000 },
    );
    if (outcome.status === 'refused') expect.fail('refused');
    expect(outcome.mesh.barriers[0].left.elements.length).toBeGreaterThan(1);
  });

  it('meshes far from the origin', () => {
    const outcome = build({ regions: [region(box(1e6, 1e6, 1e6 + 10, 1e6 + 3))] });
    if (outcome.status === 'refused') expect.fail('refused');
    expect(validateMesh(outcome.mesh)).toEqual([]);
  });

  it('takes a ring that touches itself at a point', () => {
    const outline: Path = [
      [0, 0],
      [4, 0],
      [5, 5],
      [6, 0],
      [10, 0],
      [10, 10],
      [5, 5],
      [0, 10],
    ];
    expect(build({ regions: [region(outline)] }).status).toBe('meshed');
  });
});

describe('anything', () => {
  const place = fc.tuple(fc.integer({ min: 0, max: 8 }), fc.integer({ min: 0, max: 6 }));
  const jitter = fc.constantFrom(0, 1e-7, 1e-3, 0.5);
  const path = fc
    .tuple(fc.array(place, { minLength: 1, maxLength: 4 }), jitter)
    .map(([points, shift]): Path =>
      points.map(([x, y], i) => [x + shift * ((i * 7) % 3), y - shift * (i % 2)]),
    );
  const anything = fc.record({
    kind: fc.constant('plane' as const),
    regions: fc
      .array(fc.record({ outline: path, holes: fc.array(path, { maxLength: 1 }), material: fc.nat(2) }), {
        maxLength: 3,
      })
      .map((regions) => [region(box(-1, -1, 9, 7)), ...regions]),
    barriers: fc.array(fc.record({ path, conductance: fc.constantFrom(0, 1) }), { maxLength: 3 }),
    drains: fc.array(path, { maxLength: 2 }),
    edges: fc.array(path, { maxLength: 1 }),
    bases: fc.array(path, { maxLength: 1 }),
  });

  it('either meshes soundly or is refused with a reason', () => {
    fc.assert(
      fc.property(anything, (geometry) => {
        const outcome = buildMesh(geometry, { order: 1, sizeFactor: 4, maxElements: 5000 });
        if (outcome.status === 'refused') expect(outcome.findings.length).toBeGreaterThan(0);
        else expect(validateMesh(outcome.mesh)).toEqual([]);
      }),
      { numRuns: 150 },
    );
  }, 60_000);
});
