import { describe, expect, it } from 'vitest';
import { sectionHash } from './canonical';
import type { SectionInput } from './section';
import { startingPoints } from './starting-points';
import { parseSectionText, readSection } from './validate';

const good: SectionInput = {
  format: 'underfall-section/1',
  title: 'Wall',
  geometry: 'plane',
  materials: [{ id: 'sand', name: 'Sand', kMajor: 1e-4, kMinor: 1e-4, angle: 0 }],
  zones: [
    {
      id: 'z',
      material: 'sand',
      outline: [
        [-20, -10],
        [20, -10],
        [20, 0],
        [-20, 0],
      ],
    },
  ],
  barriers: [
    {
      id: 'pile',
      path: [
        [0, 0],
        [0, -5],
      ],
    },
  ],
  edges: [
    {
      id: 'up',
      path: [
        [-20, 0],
        [0, 0],
      ],
      condition: { type: 'water', level: 'high' },
    },
    {
      id: 'down',
      path: [
        [0, 0],
        [20, 0],
      ],
      condition: { type: 'water', level: 'low' },
    },
  ],
  situations: [{ id: 's', levels: { high: 3, low: 1 } }],
};

type Loose = Record<string, Record<string, unknown>[]>;

/** What is done to a good document, the code and the pointer that must come of it. */
const faults: [what: string, change: (d: Loose) => void, code: string, pointer: string][] = [
  ['a missing title', (d) => delete (d as Record<string, unknown>).title, 'missing-field', '/title'],
  ['another format', (d) => ((d as Record<string, unknown>).format = 'other/2'), 'invalid-field', '/format'],
  ['k = 0', (d) => (d.materials![0]!.kMinor = 0), 'invalid-field', '/materials/0/kMinor'],
  [
    'negative conductance',
    (d) => (d.barriers![0]!.conductance = -1),
    'invalid-field',
    '/barriers/0/conductance',
  ],
  [
    'a point of three numbers',
    (d) =>
      (d.zones![0]!.outline = [
        [0, 0, 0],
        [1, 0],
        [1, 1],
      ]),
    'invalid-field',
    '/zones/0/outline/0',
  ],
  ['an unknown material', (d) => (d.zones![0]!.material = 'peat'), 'unknown-material', '/zones/0/material'],
  [
    'an unknown level',
    (d) => (d.situations![0]!.levels = { high: 3 }),
    'unknown-level',
    '/edges/1/condition/level',
  ],
  ['two equal ids', (d) => (d.edges![1]!.id = 'up'), 'duplicate-id', '/edges/1/id'],
  [
    'a self-crossing outline',
    (d) =>
      (d.zones![0]!.outline = [
        [-20, -10],
        [20, 0],
        [20, -10],
        [-20, 0],
      ]),
    'outline-crosses-itself',
    '/zones/0/outline',
  ],
  [
    'an empty outline',
    (d) =>
      (d.zones![0]!.outline = [
        [0, 0],
        [1, 0],
        [2, 0],
      ]),
    'outline-empty',
    '/zones/0/outline',
  ],
  [
    'a wall out of the ground',
    (d) =>
      (d.barriers![0]!.path = [
        [0, 0],
        [0, -12],
      ]),
    'barrier-outside',
    '/barriers/0/path',
  ],
  [
    'a wall above the ground',
    (d) =>
      (d.barriers![0]!.path = [
        [0, 2],
        [0, -5],
      ]),
    'barrier-outside',
    '/barriers/0/path',
  ],
  [
    'an edge inside the ground',
    (d) =>
      (d.edges![1]!.path = [
        [0, -1],
        [20, -1],
      ]),
    'edge-off-outline',
    '/edges/1/path',
  ],
  [
    'edges that overlap',
    (d) =>
      (d.edges![1]!.path = [
        [-5, 0],
        [20, 0],
      ]),
    'edges-overlap',
    '/edges/1/path',
  ],
  ['two heads in one point', (d) => (d.barriers = []), 'heads-meet', '/edges/1/path'],
  ['no way out', (d) => d.edges!.pop(), 'no-way-in-or-out', '/edges'],
  [
    'a piezometer in the air',
    (d) => (d.piezometers = [{ id: 'P', at: [0, 4] }]),
    'piezometer-outside',
    '/piezometers/0/at',
  ],
  [
    'a negative radius',
    (d) => ((d as Record<string, unknown>).geometry = 'axisymmetric'),
    'negative-radius',
    '/zones/0/outline',
  ],
];

describe('reading a section document', () => {
  it('accepts a good one and every starting point', () => {
    expect(readSection(good).issues).toEqual([]);
    for (const { document } of startingPoints) {
      expect(readSection(document).issues.filter(({ severity }) => severity === 'stop')).toEqual([]);
    }
  });

  it.each(faults)('refuses %s', (_what, change, code, pointer) => {
    const broken = structuredClone(good) as unknown as Loose;
    change(broken);
    const { document, issues } = readSection(broken);
    expect(document).toBeNull();
    expect(issues).toContainEqual(expect.objectContaining({ code, pointer, severity: 'stop' }));
    for (const { message } of issues) expect(message).toMatch(/^[A-Z“].*\.$/s);
  });

  it('notes a field that the format does not know, and goes on', () => {
    const { document, issues } = readSection({ ...good, colour: 'blue' });
    expect(document).not.toBeNull();
    expect(issues).toEqual([
      expect.objectContaining({ code: 'unknown-field', severity: 'note', pointer: '/colour' }),
    ]);
  });

  it('refuses what is nested deeper than anything could walk', () => {
    let nested: unknown = 1;
    for (let i = 0; i < 100_000; i++) nested = [nested];
    const { document, issues } = readSection({ ...good, note: nested });
    expect(document).toBeNull();
    expect(issues.map(({ code }) => code)).toEqual(['too-deep']);
  });

  it('gives back what was sent beside what was read', () => {
    const sent = { ...good, colour: 'blue' };
    expect(readSection(sent).source).toBe(sent);
    expect(readSection(sent).document).toMatchObject({ drains: [], structures: [] });
  });

  it.each(['', 'null', '[]', '7', '{', '{"format":', '\uFEFF{}'])('never throws: %j', (text) => {
    expect(parseSectionText(text).document).toBeNull();
  });
});

describe('where JSON went wrong', () => {
  it.each([
    ['{\n  "format": nope\n}', 'line 2, column 13'],
    ['{"a": 1,}', 'line 1, column 9'],
    ['{"a": 1 "b": 2}', 'line 1, column 9'],
    ['[1, 2', 'ends too early'],
    ['{"a": 01}', 'line 1, column 8'],
    ['{} trailing', 'line 1, column 4'],
  ])('%j', (text, where) => {
    expect(parseSectionText(text).issues[0]!.message).toContain(where);
  });
});

describe('the hash of a document', () => {
  it('does not depend on the order of keys', () => {
    expect(sectionHash({ b: 1, a: [1, { d: 2, c: 3 }] })).toBe(sectionHash({ a: [1, { c: 3, d: 2 }], b: 1 }));
  });

  it('is SHA-256 of the canonical JSON (RFC 8785, §3.2.3: 333333333.33333329 is written 333333333.3333333)', () => {
    // sha256 of the four bytes `null`, from FIPS 180-4 implementations at large
    expect(sectionHash(null)).toBe('74234e98afe7498fb5daf1f36ac2d78acc339464f950703b8c019892f982b90b');
    expect(sectionHash([333333333.33333329])).toBe(sectionHash([333333333.3333333]));
  });
});
