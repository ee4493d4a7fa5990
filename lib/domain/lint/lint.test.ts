import { describe, expect, it } from 'vitest';
import type { SectionInput } from '../section';
import { readSection } from '../validate';
import { findDecayLength } from './decay-length';

type XY = [number, number];

/** A wall in one layer of depth 10, its sides at ±half. */
function wallBetween(half: number, change: (draft: SectionInput) => void = () => undefined): SectionInput {
  const section: SectionInput = {
    format: 'underfall-section/1',
    title: 'Wall',
    geometry: 'plane',
    materials: [{ id: 'sand', name: 'Sand', kMajor: 1e-4, kMinor: 1e-4 }],
    zones: [
      {
        id: 'layer',
        material: 'sand',
        outline: [
          [-half, -10],
          [half, -10],
          [half, 0],
          [-half, 0],
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
          [-half, 0],
          [0, 0],
        ],
        condition: { type: 'water', level: 3 },
      },
      {
        id: 'down',
        path: [
          [0, 0],
          [half, 0],
        ],
        condition: { type: 'water', level: 1 },
      },
    ],
    situations: [{ id: 's' }],
  };
  change(section);
  return section;
}

const lint = (section: SectionInput) => {
  const { document, issues } = readSection(section);
  expect(document).not.toBeNull();
  return issues.map(({ code, pointer, severity, message }) => ({ code, pointer, severity, message }));
};
const codes = (section: SectionInput): string[] => lint(section).map(({ code }) => code);

describe('the length over which heads level out', () => {
  it('in one layer is 2T/π·√(kh/kv)', () => {
    expect(findDecayLength([{ thickness: 12, vertical: 1e-5, horizontal: 4e-5 }])).toBeCloseTo(
      48 / Math.PI,
      6,
    );
  });

  it('does not change when a layer is cut in three', () => {
    const layer = (thickness: number) => ({ thickness, vertical: 1e-5, horizontal: 4e-5 });
    expect(findDecayLength([layer(5), layer(3), layer(4)])).toBeCloseTo(48 / Math.PI, 6);
  });

  it('under a thin tight cover is the leakage length √(k·D·d/k′) (Bennett 1946)', () => {
    const aquifer = { thickness: 14, vertical: 1e-3, horizontal: 1e-3 };
    const cover = { thickness: 1, vertical: 1e-8, horizontal: 1e-8 };
    expect(findDecayLength([aquifer, cover]) / Math.sqrt((1e-3 * 14 * 1) / 1e-8)).toBeCloseTo(1, 3);
  });

  it('over much tighter ground stays that of the pervious layer', () => {
    const tight = { thickness: 5, vertical: 1e-11, horizontal: 1e-11 };
    const pervious = { thickness: 12, vertical: 1e-4, horizontal: 1e-4 };
    expect(findDecayLength([tight, pervious])).toBeCloseTo(24 / Math.PI, 3);
  });
});

describe('sides of the section', () => {
  it('are far enough at twice the thickness in isotropic ground', () => {
    expect(lint(wallBetween(20))).toEqual([]);
  });

  it('are asked about when nearer, each with its error and its reach', () => {
    const found = lint(wallBetween(15));
    expect(found.map(({ code, severity, pointer }) => [code, severity, pointer])).toEqual([
      ['side-too-close', 'check', '/zones'],
      ['side-too-close', 'check', '/zones'],
    ]);
    // 1.8·exp(−1.5π) = 1.6 %
    expect(found[0]!.message).toContain('1.6 %');
    expect(found[0]!.message).toContain('x = −20 m');
    expect(found[1]!.message).toContain('x = 20 m');
  });

  it('count from the nearest wall, drain or structure, not from the change of level alone', () => {
    const near = wallBetween(20, (d) =>
      d.barriers!.push({
        id: 'second',
        path: [
          [-8, 0],
          [-8, -3],
        ],
      }),
    );
    expect(lint(near).map(({ message }) => message)).toEqual([expect.stringContaining('left side')]);
  });

  it('must lie farther in ground that is more permeable along its bedding', () => {
    const bedded = (half: number) => wallBetween(half, (d) => (d.materials[0]!.kMajor = 4e-4));
    expect(codes(bedded(39))).toEqual(['side-too-close', 'side-too-close']);
    expect(codes(bedded(40))).toEqual([]);
  });

  it('held at a level err to the other side', () => {
    const held = wallBetween(12, (d) => {
      (d.edges![0]!.path as XY[]).unshift([-12, -10]);
    });
    expect(lint(held)[0]!.message).toContain('too high');
    expect(lint(held)[1]!.message).toContain('too low');
  });

  it('the axis of a round section is no cut', () => {
    // a round wall of radius 8: its middle is nearer than any side may be
    const half = wallBetween(28, (d) => {
      d.geometry = 'axisymmetric';
      const place = (x: number): number => (x === -28 ? 0 : x === 0 ? 8 : x);
      const move = (points: XY[]): void => points.forEach((p) => (p[0] = place(p[0])));
      const lines = [...d.zones.map(({ outline }) => outline), ...d.barriers!.map(({ path }) => path)];
      [...lines, ...d.edges!.map(({ path }) => path)].forEach((points) => move(points as XY[]));
    });
    expect(codes(half)).toEqual([]);
    expect(codes({ ...half, geometry: 'plane' })).toEqual(['side-too-close']);
  });
});

describe('materials', () => {
  const withMaterial = (values: Partial<SectionInput['materials'][number]>) =>
    wallBetween(220, (d) => Object.assign(d.materials[0]!, values));

  it.each([
    [{ kMajor: 2e-4, kMinor: 1e-4, saturatedUnitWeight: 20 }, []],
    [{ kMajor: 0.5, kMinor: 0.5 }, ['permeability-unusual', 'permeability-unusual']],
    [{ kMajor: 1e-13, kMinor: 1e-13 }, ['permeability-unusual', 'permeability-unusual']],
    [{ kMajor: 1e-4, kMinor: 1e-6 }, []],
    [{ kMajor: 1.1e-4, kMinor: 1e-6 }, ['anisotropy-unusual']],
    [{ kMajor: 1e-5, kMinor: 2e-5 }, ['axes-swapped']],
    [{ kMajor: 4e-5, kMinor: 1e-5, angle: 90 }, ['upright-more-permeable']],
    [{ kMajor: 4e-5, kMinor: 1e-5, angle: 30 }, []],
    [{ saturatedUnitWeight: 10 }, ['unit-weight-unusual']],
    [{ saturatedUnitWeight: 26 }, ['unit-weight-unusual']],
    [{ saturatedUnitWeight: 15 }, []],
  ])('%j', (values, expected) => {
    expect(codes(withMaterial(values))).toEqual(expected);
  });

  it('names a buoyant unit weight as what it looks like', () => {
    expect(lint(withMaterial({ saturatedUnitWeight: 10 }))[0]!.message).toContain('19.8');
  });
});
