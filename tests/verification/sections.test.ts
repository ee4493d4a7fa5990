// Whole sections against an independent program: bilinear quadrilaterals on grids graded to every tip and corner (own script in another
// language, scipy's sparse solver), three halvings of the grid up to 1.5 million nodes, discharge extrapolated (Richardson 1911). Its last two
// grids agree to 3e-4 in discharge and to 3e-4 of the head span.
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { ExitResult, SituationResult } from '@/lib/domain/result';
import type { SectionInput } from '@/lib/domain/section';
import { solveSection } from '../fixtures/solve-section';

function read(name: string): SectionInput {
  return JSON.parse(
    readFileSync(new URL(`../fixtures/sections/${name}.json`, import.meta.url), 'utf8'),
  ) as SectionInput;
}

interface Reference {
  readonly name: string;
  readonly discharge: number;
  readonly span: number;
  readonly heads: readonly number[];
  readonly edge: string;
  /** Chainage and outward gradient. */
  readonly gradients: readonly (readonly [number, number])[];
}

const references: readonly Reference[] = [
  {
    name: 'two-layers-and-wall',
    discharge: 4.06392e-4,
    span: 3,
    heads: [0.87033, 1.77475, 0.75895],
    edge: 'downstream',
    gradients: [
      [0, 0.21061],
      [1, 0.20936],
      [4, 0.19296],
    ],
  },
  {
    name: 'weir-with-two-cutoffs',
    discharge: 3.13815e-4,
    span: 5,
    heads: [2.83734, 3.05848, 1.25411],
    edge: 'downstream',
    gradients: [
      [22, 0.18458],
      [23, 0.18406],
      [26, 0.17667],
    ],
  },
  {
    name: 'rotated-strip',
    discharge: 4.9836e-5,
    span: 4,
    heads: [0.59518, 2.38787, 0.1538],
    edge: 'downstream',
    gradients: [
      [9, 0.22311],
      [10, 0.16277],
      [14, 0.07734],
    ],
  },
  {
    name: 'apron-without-end-cutoff',
    discharge: 1.50424e-4,
    span: 4,
    heads: [1.61362, 2.20743, 0.21662, 0.36466],
    edge: 'downstream',
    gradients: [
      [21, 0.20738],
      [24, 0.08762],
    ],
  },
  {
    name: 'circular-cofferdam',
    discharge: 4.31454e-3,
    span: 4,
    heads: [2.32407, 1.27234, 3.72649],
    edge: 'bed',
    gradients: [
      [2, 0.42237],
      [6, 0.43105],
    ],
  },
  {
    name: 'lens-under-floor',
    discharge: 1.304871e-4,
    span: 4,
    heads: [1.96478, 2.07582, 1.98678, 0.44661],
    edge: 'downstream',
    gradients: [
      [20, 0.13561],
      [22, 0.12175],
    ],
  },
];

/** The gradient of a profile at a chainage, between its points. */
function gradientAt({ profile }: ExitResult, x: number): number {
  const points = profile.filter(({ gradient }) => gradient !== null).sort((a, b) => a.at[0] - b.at[0]);
  const after = Math.max(
    1,
    points.findIndex(({ at }) => at[0] >= x - 1e-9),
  );
  const [a, b] = [points[after - 1]!, points[after]!];
  const t = (x - a.at[0]) / (b.at[0] - a.at[0]);
  return a.gradient! + t * (b.gradient! - a.gradient!);
}

const exitOf = (result: SituationResult, edge: string): ExitResult =>
  result.exit.find((face) => face.edge === edge)!;

describe('whole sections against an independent finite-element program', () => {
  it.each(references)(
    '$name: discharge to 0.3 %, heads to 1 % of the span, gradients to 2 %',
    (reference) => {
      const result = solveSection(read(reference.name));
      expect(Math.abs(result.discharge.value / reference.discharge - 1)).toBeLessThan(0.003);
      reference.heads.forEach((head, i) => {
        expect(Math.abs(result.piezometers[i]!.head! - head) / reference.span).toBeLessThan(0.01);
      });
      for (const [x, gradient] of reference.gradients)
        expect(Math.abs(gradientAt(exitOf(result, reference.edge), x) / gradient - 1)).toBeLessThan(0.02);
      expect(exitOf(result, reference.edge).profile.length).toBeGreaterThanOrEqual(40);
    },
  );

  it('brackets that are bounds hold the independent discharge', () => {
    for (const { name, discharge } of references) {
      const { kind, lower, upper } = solveSection(read(name)).discharge;
      if (kind !== 'bound') continue;
      // half a unit in the last digit of the reference
      expect(lower).toBeLessThanOrEqual(discharge * (1 + 2e-6));
      expect(upper).toBeGreaterThanOrEqual(discharge * (1 - 2e-6));
    }
  });

  it('the bare end of the apron is unbounded and only averaged; ends at cutoffs are not', () => {
    const bare = exitOf(solveSection(read('apron-without-end-cutoff')), 'downstream').max;
    expect(bare).toMatchObject({ unbounded: true, gradient: null, averagingLength: 0.5 });
    // head half a metre under the end over half a metre
    expect(Math.abs(bare.averaged / (0.21662 / 0.5) - 1)).toBeLessThan(0.02);
    for (const name of ['two-layers-and-wall', 'weir-with-two-cutoffs', 'lens-under-floor'])
      expect(exitOf(solveSection(read(name)), 'downstream').max.unbounded).toBe(false);
  });

  it('a leaky wall through an aquifer: q = k T ΔH / (L + k/c), the jump beside it (Darcy in series)', () => {
    const result = solveSection(read('leaky-wall'));
    const [k, c, L, T] = [2e-4, 2e-6, 30, 6];
    expect(result.discharge.value / ((k * T * 4) / (L + k / c))).toBeCloseTo(1, 8);
    expect(result.piezometers[0]!.head).toBeCloseTo(5 - (4 * 5) / (L + k / c), 6);
    expect(result.piezometers[1]!.head).toBeCloseTo(1 + (4 * 5) / (L + k / c), 6);
  });

  it('a wall down to rock: nothing passes, each side stands at its level', () => {
    const result = solveSection(read('wall-to-rock'));
    expect(Math.abs(result.discharge.value)).toBeLessThan(1e-15);
    expect(result.piezometers.map(({ head }) => head)).toEqual([expect.closeTo(4, 9), expect.closeTo(1, 9)]);
  });
});
