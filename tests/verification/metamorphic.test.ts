// What must hold between answers whatever the answers are: properties of steady, saturated flow between fixed heads (Bear 1972, ch. 5–6;
// Rayleigh's monotonicity, Pólya & Szegő 1951). Random sections, fixed seed.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyzeSection } from '@/lib/analysis/analyze';
import type { SituationResult } from '@/lib/domain/result';
import type { SectionInput } from '@/lib/domain/section';

/** Relative difference left between two meshes of one section: the bracket of a full solve is far narrower. */
const meshNoise = 2e-3;

interface Shape {
  readonly thickness: number;
  readonly contact: number;
  readonly wall: number;
  readonly kTop: number;
  readonly kBottom: number;
  readonly ratio: number;
  readonly head: number;
}

/** Two layers under level ground, a wall, two levels. */
function build({ thickness: T, contact, wall, kTop, kBottom, ratio, head }: Shape): SectionInput {
  const yc = -contact * T;
  const X = 3 * T;
  const material = (id: string, k: number) => ({
    id,
    name: id,
    kMajor: k * ratio,
    kMinor: k,
    angle: 0,
    saturatedUnitWeight: 20,
  });
  return {
    format: 'underfall-section/1',
    title: 'Random section',
    geometry: 'plane',
    materials: [material('top', kTop), material('bottom', kBottom)],
    zones: [
      {
        id: 'lower',
        material: 'bottom',
        outline: [
          [-X, -T],
          [X, -T],
          [X, yc],
          [-X, yc],
        ],
      },
      {
        id: 'upper',
        material: 'top',
        outline: [
          [-X, yc],
          [X, yc],
          [X, 0],
          [-X, 0],
        ],
      },
    ],
    barriers: [
      {
        id: 'wall',
        path: [
          [0, 0],
          [0, -wall * T],
        ],
        conductance: 0,
      },
    ],
    edges: [
      {
        id: 'up',
        path: [
          [-X, 0],
          [0, 0],
        ],
        condition: { type: 'water', level: 'high' },
      },
      {
        id: 'down',
        path: [
          [0, 0],
          [X, 0],
        ],
        condition: { type: 'water', level: 'low' },
      },
    ],
    situations: [{ id: 's', levels: { high: 1 + head, low: 1 } }],
    piezometers: [
      { id: 'P', at: [0.4 * T, -0.31 * T] },
      { id: 'Q', at: [-0.7 * T, -0.83 * T] },
    ],
  };
}

function solve(section: SectionInput): SituationResult {
  const outcome = analyzeSection(section, { criteria: [], effort: 'full', withFields: false, now: () => 0 });
  if (outcome.status !== 'solved') throw new RangeError(JSON.stringify(outcome));
  return outcome.result.situations[0]!;
}

function edit(section: SectionInput, change: (draft: SectionInput) => void): SectionInput {
  const copy = structuredClone(section);
  change(copy);
  return copy;
}

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const shapes = fc.record({
  thickness: between(4, 30),
  contact: between(0.25, 0.75),
  wall: between(0.15, 0.85),
  kTop: between(1e-6, 1e-3),
  kBottom: between(1e-6, 1e-3),
  ratio: between(1, 8),
  head: between(0.5, 8),
});

/** The wall's tip exactly on the contact makes other meshes, not other truths; kept a little away it stays quick. */
const usual = shapes.filter(({ contact, wall }) => Math.abs(contact - wall) > 0.05);

function forAll(
  check: (section: SectionInput, answer: SituationResult, shape: Shape) => void,
  numRuns = 6,
): void {
  fc.assert(
    fc.property(usual, (shape) => {
      const section = build(shape);
      check(section, solve(section), shape);
    }),
    { seed: 20_261_201, numRuns },
  );
}

function expectClose(actual: number, expected: number, tolerance: number): void {
  expect(Math.abs(actual / expected - 1)).toBeLessThan(tolerance);
}

const heads = ({ piezometers }: SituationResult): number[] => piezometers.map(({ head }) => head!);

describe('whatever the section', () => {
  it('the discharge lies in its bracket and water in equals water out', () => {
    forAll((_section, { discharge }) => {
      expect(discharge.lower).toBeLessThanOrEqual(discharge.value);
      expect(discharge.upper).toBeGreaterThanOrEqual(discharge.value);
      expect(discharge.upper / discharge.lower).toBeLessThan(1.01);
      expect(discharge.balance).toBeLessThan(1e-9);
    });
  });

  it('all permeabilities times 7: discharge times 7, heads the same', () => {
    forAll((section, before) => {
      const after = solve(
        edit(section, (d) => d.materials.forEach((m) => ((m.kMajor *= 7), (m.kMinor *= 7)))),
      );
      expectClose(after.discharge.value, 7 * before.discharge.value, 1e-9);
      heads(after).forEach((head, i) => expect(head).toBeCloseTo(heads(before)[i]!, 8));
    });
  });

  it('twice the head difference: twice the discharge and the gradient', () => {
    forAll((section, before, { head }) => {
      const after = solve(edit(section, (d) => (d.situations[0]!.levels!.high = 1 + 2 * head)));
      expectClose(after.discharge.value, 2 * before.discharge.value, 1e-9);
      expectClose(after.exit[0]!.max.gradient!, 2 * before.exit[0]!.max.gradient!, 1e-8);
    });
  });

  it('all levels and elevations 250 m higher: pressures the same', () => {
    forAll((section, before) => {
      const raised = edit(section, (d) => {
        const lift = (points: [number, number][]): void => points.forEach((p) => (p[1] += 250));
        d.zones.forEach(({ outline }) => lift(outline));
        d.barriers!.forEach(({ path }) => lift(path));
        d.edges!.forEach(({ path }) => lift(path));
        d.piezometers!.forEach(({ at }) => (at[1] += 250));
        d.situations[0]!.levels = { high: d.situations[0]!.levels!.high! + 250, low: 251 };
      });
      const after = solve(raised);
      expectClose(after.discharge.value, before.discharge.value, meshNoise);
      after.piezometers.forEach(({ pressure }, i) =>
        expectClose(pressure!, before.piezometers[i]!.pressure!, meshNoise),
      );
    });
  });

  it('three times as large: the same discharge, a third of the gradient', () => {
    forAll((section, before) => {
      const grown = edit(section, (d) => {
        const scale = (points: [number, number][]): void => points.forEach((p) => ((p[0] *= 3), (p[1] *= 3)));
        d.zones.forEach(({ outline }) => scale(outline));
        d.barriers!.forEach(({ path }) => scale(path));
        d.edges!.forEach(({ path }) => scale(path));
        d.piezometers = [];
      });
      const after = solve(grown);
      expectClose(after.discharge.value, before.discharge.value, meshNoise);
      expectClose(after.exit[0]!.max.gradient!, before.exit[0]!.max.gradient! / 3, 0.01);
    });
  });

  it('mirrored: the same discharge and gradient; levels swapped: the same discharge', () => {
    forAll((section, before) => {
      const mirrored = edit(section, (d) => {
        const flip = (points: [number, number][]): void => points.forEach((p) => (p[0] = -p[0]));
        d.zones.forEach(({ outline }) => flip(outline));
        d.edges!.forEach(({ path }) => flip(path));
        d.piezometers!.forEach(({ at }) => (at[0] = -at[0]));
      });
      const after = solve(mirrored);
      expectClose(after.discharge.value, before.discharge.value, meshNoise);
      expectClose(after.exit[0]!.max.gradient!, before.exit[0]!.max.gradient!, 0.01);
      const { high, low } = section.situations[0]!.levels!;
      const swapped = solve(edit(section, (d) => (d.situations[0]!.levels = { high: low!, low: high! })));
      expectClose(swapped.discharge.value, before.discharge.value, 1e-9);
    });
  });

  it('a layer split into two of the same soil: nothing changes', () => {
    forAll((section, before) => {
      const split = edit(section, (d) => {
        const [[x0, bottom], , [x1, top]] = d.zones[0]!.outline as [
          [number, number],
          [number, number],
          [number, number],
        ];
        const middle = (bottom + top) / 2;
        d.zones[0]!.outline = [
          [x0, middle],
          [x1, middle],
          [x1, top],
          [x0, top],
        ];
        d.zones.unshift({
          id: 'half',
          material: 'bottom',
          outline: [
            [x0, bottom],
            [x1, bottom],
            [x1, middle],
            [x0, middle],
          ],
        });
      });
      expectClose(solve(split).discharge.value, before.discharge.value, meshNoise);
    });
  });

  it('any permeability raised: the discharge does not fall; the wall lengthened: it does not rise', () => {
    forAll((section, before, { thickness, wall }) => {
      for (const index of [0, 1]) {
        const looser = solve(edit(section, (d) => (d.materials[index]!.kMinor *= 1.5)));
        expect(looser.discharge.upper).toBeGreaterThanOrEqual(before.discharge.lower);
      }
      const deeper = solve(edit(section, (d) => (d.barriers![0]!.path[1] = [0, -(wall + 0.1) * thickness])));
      expect(deeper.discharge.lower).toBeLessThanOrEqual(before.discharge.upper);
    });
  });

  it('a sealed far end opened to the upstream level: the discharge does not fall', () => {
    forAll((section, before) => {
      const X = section.zones[0]!.outline[1]![0];
      const opened = edit(section, (d) => {
        const [, , , top] = d.zones[0]!.outline;
        d.edges!.push({
          id: 'end',
          path: [
            [-X, d.zones[0]!.outline[0]![1]],
            [-X, top![1]],
            [-X, 0],
          ],
          condition: { type: 'head', level: 'high' },
        });
      });
      expect(solve(opened).discharge.upper).toBeGreaterThanOrEqual(before.discharge.lower);
    });
  });

  it('stretched by √(kh/kv) with the isotropic mean: the same discharge (Samsioe 1931)', () => {
    forAll((section, before, { ratio }) => {
      const root = Math.sqrt(ratio);
      const isotropic = edit(section, (d) => {
        const squeeze = (points: [number, number][]): void => points.forEach((p) => (p[0] /= root));
        d.zones.forEach(({ outline }) => squeeze(outline));
        d.edges!.forEach(({ path }) => squeeze(path));
        d.piezometers = [];
        d.materials.forEach((m) => (m.kMajor = m.kMinor = Math.sqrt(m.kMajor * m.kMinor)));
      });
      expectClose(solve(isotropic).discharge.value, before.discharge.value, meshNoise);
    });
  });

  it('the two permeabilities swapped under a wall in one soil: the same discharge', () => {
    forAll((section, _before, { ratio }) => {
      // level ground without end: the sides lie three times the thickness away in either of the two
      const X = 3 * Math.sqrt(ratio) * -section.zones[0]!.outline[0]![1];
      const uniform = (isSwapped: boolean) =>
        edit(section, (d) => {
          const widen = (points: [number, number][]): void =>
            points.forEach((p) => (p[0] = Math.sign(p[0]) * X));
          d.zones.forEach(({ outline }) => widen(outline));
          d.edges!.forEach(({ path }) => widen(path));
          d.piezometers = [];
          const { kMajor, kMinor } = d.materials[0]!;
          d.materials.forEach((m) => Object.assign(m, { kMajor, kMinor, angle: isSwapped ? 90 : 0 }));
        });
      expectClose(solve(uniform(true)).discharge.value, solve(uniform(false)).discharge.value, meshNoise);
    });
  });
});
