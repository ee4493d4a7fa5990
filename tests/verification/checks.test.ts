// Checks through the whole path, on sections whose answer is known in closed form.
import { describe, expect, it } from 'vitest';
import { averagePrismHead } from '@/lib/hand-methods/single-wall';
import type { SectionInput } from '@/lib/domain/section';
import { buildBox, buildPit, buildWeir, mirrorSection, soilOf } from '../fixtures/builders';
import { findCheck, solveSection } from '../fixtures/solve-section';

const wallOnly = (soil: object = {}): SectionInput =>
  buildWeir({ thickness: 1, walls: [{ x: 0, depth: 0.5 }], extent: 6, soil });
const twoCutoffs = buildWeir({
  thickness: 20,
  floor: [0, 16],
  walls: [
    { x: 0, depth: 4 },
    { x: 16, depth: 5 },
  ],
  head: 2.5,
  extent: 76,
});
const pit = buildPit({
  geometry: 'plane',
  thickness: 12,
  embedment: 6,
  dredge: 2,
  halfWidth: 4,
  head: 6,
  extent: 40,
});

function lineOf(check: ReturnType<typeof findCheck>, symbol: string): number {
  return check.working.find((line) => line.symbol === symbol)!.value;
}

describe('heave of the prism (Terzaghi 1943, art. 94)', () => {
  it('D = 6, T = 18, H = 10 m, γsat = 17.7: F = 1.383 by the exact average head; 1.34 from a published flow net (Das, inputs from memory)', () => {
    const section = buildWeir({
      thickness: 18,
      walls: [{ x: 0, depth: 6 }],
      head: 10,
      extent: 100,
      soil: { saturatedUnitWeight: 17.7 },
    });
    const check = findCheck(solveSection(section), 'heave-prism-effective', 'wall-1');
    expect(lineOf(check, 'h_a') / (10 * averagePrismHead(6, 18))).toBeCloseTo(1, 2);
    expect(Math.abs(check.value! / 1.383 - 1)).toBeLessThan(0.005);
    expect(Math.abs(check.value! / 1.34 - 1)).toBeLessThan(0.04);
    expect(check.verdict).toBe('falls-short');
  });

  it('long pit: average head 2.66 m, F = 1.56 in γsat = 20 (independent finite elements)', () => {
    const check = findCheck(solveSection(pit), 'heave-prism-effective', 'wall');
    expect(Math.abs(lineOf(check, 'h_a') - 2.66)).toBeLessThan(0.04);
    expect(Math.abs(check.value! - 1.56)).toBeLessThan(0.03);
    expect(check.verdict).toBe('meets');
    expect(check.source).toContain('Example criterion, not yet adopted');
  });

  it('total and effective form are one equilibrium: F = 1 in one is F = 1 in the other', () => {
    const result = solveSection(pit);
    const effective = findCheck(result, 'heave-prism-effective');
    const total = findCheck(result, 'heave-prism-total');
    const [W, w, u] = ['W', 'w', 'u'].map((symbol) => lineOf(total, symbol)) as [number, number, number];
    expect(W + w - u).toBeCloseTo(lineOf(effective, 'W′') - 9.81 * lineOf(effective, 'h_a'), 6);
    expect(total.value! - 1).toBeLessThan(effective.value! - 1);
  });

  it('layers weigh what they weigh: 1 m of 22 over 17.7', () => {
    const section = buildWeir({ thickness: 18, walls: [{ x: 0, depth: 6 }], head: 10, extent: 100 });
    const layered: SectionInput = {
      ...section,
      materials: [
        { ...soilOf({ saturatedUnitWeight: 17.7 }) },
        { ...soilOf({ saturatedUnitWeight: 22 }), id: 'crust', name: 'Crust' },
      ],
      zones: [
        ...section.zones,
        {
          id: 'top',
          material: 'crust',
          outline: [
            [0, 0],
            [0, -1],
            [100, -1],
            [100, 0],
          ],
        },
      ],
    };
    const check = findCheck(solveSection(layered, 'live'), 'heave-prism-effective');
    expect(lineOf(check, 'W')).toBeCloseTo(22 + 5 * 17.7, 9);
  });

  it('asks for the unit weight by name and states no value', () => {
    const section = wallOnly();
    const { id, name, kMajor, kMinor } = section.materials[0]!;
    const bare = { id, name, kMajor, kMinor };
    const result = solveSection({ ...section, materials: [bare] }, 'live');
    for (const kind of ['heave-prism-effective', 'heave-prism-total', 'exit-gradient']) {
      expect(findCheck(result, kind)).toMatchObject({ value: null, verdict: 'attention' });
      expect(findCheck(result, kind).remark).toMatch(/saturated unit weight of “Sand”/);
    }
  });
});

describe('exit gradient (Harza 1935; Harr 1962)', () => {
  it('half-depth wall in γsat = 20: F = 1.0387/0.59907', () => {
    const check = findCheck(solveSection(wallOnly()), 'exit-gradient', 'downstream');
    expect(Math.abs(check.value! / ((20 - 9.81) / 9.81 / 0.59907) - 1)).toBeLessThan(0.01);
    expect(check).toMatchObject({ required: 4, verdict: 'falls-short' });
  });

  it('bare end of a floor: the average only, against its own criterion, and never “meets”', () => {
    const section = buildWeir({ thickness: 10, floor: [-20, 20], head: 0.1, extent: 60 });
    const check = findCheck(solveSection(section), 'exit-gradient', 'downstream');
    expect(check.verdict).toBe('attention');
    expect(check.quantity).toContain('averaged over 0.5 m');
    expect(check.remark).toContain('infinite');
    expect(check.working.map(({ symbol }) => symbol)).not.toContain('i');
  });

  it('an upright outflow face is no ground surface', () => {
    const result = solveSection(buildBox({ length: 10, thickness: 2, head: 1 }), 'live');
    expect(findCheck(result, 'exit-gradient', 'right')).toMatchObject({
      value: null,
      verdict: 'not-applicable',
    });
  });
});

describe('flotation and creep', () => {
  it('flat floor, tailwater at its level: uplift is γw B H/2 by antisymmetry', () => {
    const section = buildWeir({ thickness: 10, floor: [-5, 5], head: 4, extent: 60 });
    const check = findCheck(solveSection(section), 'flotation', 'floor');
    expect(check.value! / (500 / ((9.81 * 10 * 4) / 2))).toBeCloseTo(1, 3);
  });

  it('floor of 16 m, walls of 4 and 5 m, H = 2.5 m: L_w = 23.333, ratio 9.333 (Lane 1935)', () => {
    const [material] = twoCutoffs.materials;
    const graded = { ...twoCutoffs, materials: [{ ...material!, grading: { d50: 0.05 } }] };
    const check = findCheck(solveSection(graded, 'live'), 'creep-lane', 'floor');
    expect(lineOf(check, 'L_w')).toBeCloseTo(23.3333, 4);
    expect(check.value).toBeCloseTo(9.3333, 4);
    expect(check).toMatchObject({ required: 8.5, verdict: 'meets' });
  });

  it.each([
    ['Silty fine sand', 7],
    ['Very fine sand', 8.5],
    ['Medium sand, dense', 6],
    ['Sandy silt', 8.5],
  ])('“%s” is classed by its name: %f (Lane 1935)', (name, required) => {
    const named = { ...twoCutoffs, materials: [{ ...twoCutoffs.materials[0]!, name }] };
    expect(findCheck(solveSection(named, 'live'), 'creep-lane').required).toBe(required);
  });

  it('without a soil class the ratio stands for judgement', () =>
    expect(
      findCheck(
        solveSection(
          { ...twoCutoffs, materials: [{ ...twoCutoffs.materials[0]!, name: 'Alluvium' }] },
          'live',
        ),
        'creep-lane',
      ),
    ).toMatchObject({
      required: null,
      verdict: 'attention',
    }));
});

describe('method of fragments beside the numbers (Pavlovsky 1935; Harr 1962, ch. 6)', () => {
  const exact: readonly (readonly [string, SectionInput, number])[] = [
    ['one wall', wallOnly(), 1],
    ['one wall, kx = 4 kz', wallOnly({ kMajor: 4, kMinor: 1 }), 1],
    ['one wall, mirrored', mirrorSection(wallOnly()), 1],
    ['one wall, near ends', buildWeir({ thickness: 1, walls: [{ x: 0, depth: 0.6 }], extent: 0.7 }), 1],
    ['flat floor', buildWeir({ thickness: 1, floor: [-1, 1], extent: 7 }), 1],
    ['floor with a central cutoff', buildWeir({ thickness: 1, floor: [-1, 1], walls: [{ x: 0, depth: 0.5 }], extent: 7 }), 1], // prettier-ignore
    [
      'the same, kx = 4 kz',
      buildWeir({
        thickness: 1,
        floor: [-2, 2],
        walls: [{ x: 0, depth: 0.5 }],
        extent: 14,
        soil: { kMajor: 1, kMinor: 4, angle: 90 },
      }),
      1,
    ],
    ['floor with two cutoffs (0.4494 over 0.462768)', twoCutoffs, 0.9711],
    ['half a pit (0.4054 over 0.408687)', pit, 0.992],
  ];
  it.each(exact)('%s: the stated ratio', (_, section, ratio) => {
    const check = findCheck(solveSection(section), 'fragments');
    expect(check.verdict).toBe('meets');
    expect(Math.abs(check.value! / ratio - 1)).toBeLessThan(0.003);
    expect(check.working.at(-1)!.symbol).toMatch(/ratio|q_n\/q|i_n\/i_E/);
  });

  const [soil] = wallOnly().materials;
  const uncovered: readonly (readonly [string, SectionInput, RegExp])[] = [
    ['a round pit', { ...pit, geometry: 'axisymmetric' }, /plane sections/],
    ['a leaking wall', buildWeir({ thickness: 1, walls: [{ x: 0, depth: 0.5, conductance: 0.1 }], extent: 6 }), /leaks/],
    ['inclined axes of ratio 40', wallOnly({ kMajor: 40, kMinor: 1, angle: 20 }), /differ too much/],
    ['a box open at its ends', buildBox({ length: 10, thickness: 2, head: 1 }), /not level/],
    [
      'ground of two very different permeabilities',
      {
        ...wallOnly(),
        materials: [soil!, { ...soil!, id: 'clay', name: 'Clay', kMajor: 0.01, kMinor: 0.01 }],
        zones: [...wallOnly().zones, { id: 'lens', material: 'clay', outline: [[1, -0.2], [1, -0.4], [2, -0.4], [2, -0.2]] }],
      },
      /differ too much/,
    ],
    ['a flat floor with near ends', buildWeir({ thickness: 10, floor: [-5, 5], extent: 15 }), /its end is felt/],
  ]; // prettier-ignore
  it('a lens of a tenth: the discharge lies between the two uniform ones (Rayleigh’s monotonicity)', () => {
    const section: SectionInput = {
      ...wallOnly(),
      materials: [soil!, { ...soil!, id: 'silt', name: 'Silt', kMajor: 0.1, kMinor: 0.1 }],
      zones: [
        ...wallOnly().zones,
        {
          id: 'lens',
          material: 'silt',
          outline: [
            [-1, -0.6],
            [-1, -0.9],
            [2, -0.9],
            [2, -0.6],
          ],
        },
      ],
    };
    const check = findCheck(solveSection(section), 'fragments');
    expect(check.verdict).toBe('meets');
    expect(lineOf(check, 'q_min')).toBeCloseTo(0.05, 9);
    expect(lineOf(check, 'q_max')).toBeCloseTo(0.5, 9);
    expect(lineOf(check, 'q_n')).toBeGreaterThan(0.05);
    expect(lineOf(check, 'q_n')).toBeLessThan(0.5);
    expect(check.value).toBeCloseTo(lineOf(check, 'q_n') / 0.5, 9);
  });

  it('inclined axes of ratio 4: the same, between isotropic ground of either permeability', () => {
    const check = findCheck(solveSection(wallOnly({ kMajor: 4, kMinor: 1, angle: 20 }), 'live'), 'fragments');
    expect(check.verdict).toBe('meets');
    expect(lineOf(check, 'q_min')).toBeCloseTo(0.5, 9);
    expect(lineOf(check, 'q_max')).toBeCloseTo(2, 9);
  });

  it.each(uncovered)('%s is not covered, with the reason', (_, section, reason) => {
    const check = findCheck(solveSection(section, 'live'), 'fragments');
    expect(check).toMatchObject({ value: null, verdict: 'not-applicable' });
    expect(check.remark).toMatch(reason);
  });
});

describe('every check', () => {
  it('carries its source, finite numbers in its working, and a verdict only with a criterion', () => {
    for (const section of [wallOnly(), twoCutoffs, pit]) {
      for (const check of solveSection(section, 'live').checks) {
        expect(check.source.length).toBeGreaterThan(20);
        for (const line of check.working) expect(Number.isFinite(line.value), line.meaning).toBe(true);
        if (check.id !== 'fragments' && check.required === null) expect(check.verdict).not.toBe('meets');
      }
    }
  });
});
