import { EigenvalueDecomposition, inverse, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import type { Conductivity } from '../problem';
import { cornerExponent, listExponents, type WedgeSector, type WedgeSides } from './corner-exponent';

const isotropic = (k: number): Conductivity => ({ kMajor: k, kMinor: k, angle: 0 });
const ray = (degrees: number): [number, number] => [
  Math.cos((degrees * Math.PI) / 180),
  Math.sin((degrees * Math.PI) / 180),
];

/** A wedge cut into sectors of at most 30°, as a mesh would. */
function makeWedge(
  parts: readonly { from: number; to: number; conductivity: Conductivity }[],
): WedgeSector[] {
  return parts.flatMap(({ from, to, conductivity }) => {
    const pieces = Math.ceil((to - from) / 30);
    return Array.from({ length: pieces }, (_, i) => ({
      conductivity,
      from: ray(from + ((to - from) * i) / pieces),
      to: ray(from + ((to - from) * (i + 1)) / pieces),
    }));
  });
}

const one = (from: number, to: number, conductivity = isotropic(1)): WedgeSector[] =>
  makeWedge([{ from, to, conductivity }]);

/** Smallest λ by linear finite elements in θ: ∫ k f′g′ = λ² ∫ k f g, eigenvalues by ml-matrix. */
function exponentByElements(
  parts: readonly { from: number; to: number; k: number }[],
  [first, last]: WedgeSides,
  perPart: number,
): number {
  const nodes = parts.length * perPart + 1;
  const stiffness = Matrix.zeros(nodes, nodes);
  const mass = Matrix.zeros(nodes, nodes);
  parts.forEach(({ from, to, k }, p) => {
    const h = ((to - from) * Math.PI) / 180 / perPart;
    for (let i = 0; i < perPart; i++) {
      const a = p * perPart + i;
      for (const [r, c, s, m] of [
        [a, a, 1, 2],
        [a, a + 1, -1, 1],
        [a + 1, a, -1, 1],
        [a + 1, a + 1, 1, 2],
      ] as const) {
        stiffness.set(r, c, stiffness.get(r, c) + (k * s) / h);
        mass.set(r, c, mass.get(r, c) + (k * h * m) / 6);
      }
    }
  });
  const free = Array.from({ length: nodes }, (_, i) => i).filter(
    (i) => !(i === 0 && first === 'head') && !(i === nodes - 1 && last === 'head'),
  );
  const operator = inverse(mass.selection(free, free)).mmul(stiffness.selection(free, free));
  const values = new EigenvalueDecomposition(operator).realEigenvalues.filter((v) => v > 1e-6);
  return Math.sqrt(Math.min(...values));
}

describe('exponents of one isotropic material (Strang & Fix 1973, ch. 8: π/ω between like sides, π/2ω between unlike ones)', () => {
  it.each([
    ['end of a flat base', 180, 'impervious', 0.5],
    ['wall at level ground', 90, 'impervious', 1],
    ['end of a base on a slope of 135°', 135, 'impervious', 2 / 3],
    ['wall tip with a head on one face', 360, 'impervious', 0.25],
    ['slope meeting a floor from below, 135°', 135, 'head', 1],
    ['crest of a cut, 225°', 225, 'head', 0.8],
    ['edge of a trench, 270°', 270, 'head', 2 / 3],
    ['level ground', 180, 'head', 1],
    ['acute foot, 60°', 60, 'impervious', 1],
  ] as const)('%s', (_name, angle, other, expected) => {
    expect(cornerExponent(one(0, angle), ['head', other])).toBeCloseTo(expected, 9);
    expect(cornerExponent(one(17, 17 + angle), [other, 'head'])).toBeCloseTo(expected, 9);
  });

  it('lists the higher ones in order', () => {
    const close = (values: number[], expected: number[]): void =>
      values.forEach((value, i) => expect(value).toBeCloseTo(expected[i], 9));
    close(listExponents(one(0, 90), ['head', 'impervious'], 3), [1, 3, 5]);
    close(listExponents(one(0, 180), ['impervious', 'head'], 3), [0.5, 1.5, 2.5]);
    close(listExponents(one(0, 135), ['head', 'head'], 3), [4 / 3, 8 / 3, 4]);
    close(listExponents(one(0, 270), ['impervious', 'impervious'], 2), [2 / 3, 4 / 3]);
  });

  it('calls an angle bounded that misses 90° or 180° by the rounding of its coordinates only', () => {
    expect(cornerExponent(one(0, 90 + 1e-5), ['head', 'impervious'])).toBe(1);
    expect(cornerExponent(one(0, 180 + 1e-5), ['head', 'head'])).toBe(1);
    expect(cornerExponent(one(0, 90.1), ['head', 'impervious'])).toBeLessThan(1);
  });
});

describe('exponents of anisotropic ground', () => {
  it('takes the angle in the transformed section: a slanted wall under level ground', () => {
    // Stretching x by √(ky/kx) = 1/2 turns a wall at 45° from the surface into one at atan 2 = 63.43°.
    const sides: WedgeSides = ['impervious', 'head'];
    const flat = { kMajor: 4, kMinor: 1, angle: 0 };
    const within = Math.PI - Math.atan(2);
    expect(cornerExponent(one(225, 360, flat), sides)).toBeCloseTo(Math.PI / 2 / within, 9);
    expect(cornerExponent(one(225, 360), sides)).toBeCloseTo(2 / 3, 9);
    expect(cornerExponent(one(315, 360, flat), sides)).toBe(1);
  });

  it('makes a vertical wall at level ground singular where the layering is inclined', () => {
    // Turned by 30°: the right angle between surface and wall becomes obtuse on one side and acute on the other.
    const inclined = { kMajor: 9, kMinor: 1, angle: Math.PI / 6 };
    const down = cornerExponent(one(270, 360, inclined), ['impervious', 'head']);
    const up = cornerExponent(one(180, 270, inclined), ['head', 'impervious']);
    expect(Math.min(down, up)).toBeLessThan(0.9);
    expect(Math.max(down, up)).toBe(1);
    // In principal axes the two rays, compressed by 3 along the major axis, include this angle.
    const place = (degrees: number): number => {
      const t = ((degrees - 30) * Math.PI) / 180;
      return Math.atan2(3 * Math.sin(t), Math.cos(t));
    };
    const turn = (from: number, to: number): number =>
      (place(to) - place(from) + 2 * Math.PI) % (2 * Math.PI);
    const obtuse = Math.max(turn(180, 270), turn(270, 360));
    expect(Math.min(down, up)).toBeCloseTo(Math.PI / 2 / obtuse, 9);
  });
});

describe('exponents of two and three materials', () => {
  const cases = [
    {
      parts: [
        { from: 0, to: 90, k: 1 },
        { from: 90, to: 180, k: 10 },
      ],
      sides: ['head', 'impervious'],
    },
    {
      parts: [
        { from: 0, to: 90, k: 10 },
        { from: 90, to: 180, k: 1 },
      ],
      sides: ['head', 'impervious'],
    },
    {
      parts: [
        { from: 0, to: 60, k: 1 },
        { from: 60, to: 135, k: 30 },
      ],
      sides: ['head', 'head'],
    },
    {
      parts: [
        { from: 0, to: 120, k: 1 },
        { from: 120, to: 180, k: 50 },
      ],
      sides: ['head', 'head'],
    },
    {
      parts: [
        { from: 0, to: 50, k: 2 },
        { from: 50, to: 90, k: 0.05 },
        { from: 90, to: 200, k: 1 },
      ],
      sides: ['head', 'impervious'],
    },
    {
      parts: [
        { from: 0, to: 150, k: 1 },
        { from: 150, to: 300, k: 7 },
      ],
      sides: ['impervious', 'impervious'],
    },
  ] as const;

  it.each(cases)('agree with finite elements in the angle, case %#', ({ parts, sides }) => {
    const wedge = makeWedge(parts.map(({ from, to, k }) => ({ from, to, conductivity: isotropic(k) })));
    const [least] = listExponents(wedge, [...sides], 1);
    // Two meshes, extrapolated: linear elements converge as h².
    const [coarse, fine] = [20, 40].map((n) => exponentByElements(parts, [...sides], n));
    expect(least).toBeCloseTo(fine + (fine - coarse) / 3, 5);
  });

  it('go to those of the limits as one material becomes watertight', () => {
    const wedge = makeWedge([
      { from: 0, to: 100, conductivity: isotropic(1) },
      { from: 100, to: 200, conductivity: isotropic(1e-9) },
    ]);
    expect(cornerExponent(wedge, ['head', 'head'])).toBeCloseTo(0.9, 5);
  });
});
