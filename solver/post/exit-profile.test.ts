import { describe, expect, it } from 'vitest';
import { prepareSteady, solveSteady } from '../analysis/steady';
import { buildMesh } from '../mesh/build-mesh';
import type { Conductivity, Path, SectionGeometry } from '../problem';
import type { ExitProfile, ExitProfilePoint } from './exit-profile';
import { exitProfile } from './exit-profile';

const sand: Conductivity = { kMajor: 1e-5, kMinor: 1e-5, angle: 0 };

interface Case {
  readonly outline: Path;
  readonly edges: readonly Path[];
  /** Head of each edge. */
  readonly heads: readonly number[];
  readonly wall?: Path;
  readonly drains?: readonly Path[];
  readonly conductivities?: readonly Conductivity[];
  readonly regions?: SectionGeometry['regions'];
  readonly kind?: SectionGeometry['kind'];
  readonly sizeFactor?: number;
}

function solveFace(given: Case, edge = 1, length = 0.5): ExitProfile {
  const { outline, edges, heads, wall, drains = [], conductivities = [sand], kind = 'plane' } = given;
  const meshed = buildMesh(
    {
      kind,
      regions: given.regions ?? [{ outline, holes: [], material: 0 }],
      barriers: wall ? [{ path: wall, conductance: 0 }] : [],
      drains,
      edges,
      bases: [],
    },
    { order: 2, sizeFactor: given.sizeFactor ?? 1, maxElements: 40_000 },
  );
  if (meshed.status !== 'meshed') throw new TypeError('the section must mesh');
  const conditions = {
    edges: heads.map((head) => ({ type: 'head', head }) as const),
    drains: drains.map(() => ({ type: 'head', head: 0 }) as const),
  };
  const model = prepareSteady(meshed.mesh, kind);
  const outcome = solveSteady(model, { conductivities, conductances: wall ? [0] : [] }, conditions);
  if (outcome.status !== 'solved') throw new TypeError('the section must solve');
  const { heads: nodal, reactions } = outcome.solution;
  return exitProfile(
    { mesh: meshed.mesh, kind, conductivities, conditions, heads: nodal, reactions },
    edge,
    length,
  );
}

/** Reads the profile's gradient by straight lines between points. */
function readAt(profile: readonly ExitProfilePoint[], x: number): number {
  const i = profile.findIndex(({ at }) => at[0] >= x);
  const [a, b] = [profile[Math.max(0, i - 1)], profile[i]];
  const t = b.at[0] === a.at[0] ? 1 : (x - a.at[0]) / (b.at[0] - a.at[0]);
  return a.gradient! + t * (b.gradient! - a.gradient!);
}

function ellipticK(modulus: number): number {
  let [a, b] = [1, Math.sqrt(1 - modulus * modulus)];
  while (Math.abs(a - b) > 1e-15 * a) [a, b] = [(a + b) / 2, Math.sqrt(a * b)];
  return Math.PI / (2 * a);
}

const level = (depth: number, half: number, gap = 0): Pick<Case, 'outline' | 'edges'> => ({
  outline: [
    [-half, -depth],
    [half, -depth],
    [half, 0],
    [-half, 0],
  ],
  edges: [
    [
      [-half, 0],
      [-gap, 0],
    ],
    [
      [gap, 0],
      [half, 0],
    ],
  ],
});

describe('exit gradient beside a wall in a layer (Muskat 1937; Harr 1962, ch. 5)', () => {
  const T = 10;
  const pile: Case = {
    ...level(T, 4 * T),
    heads: [1, 0],
    wall: [
      [0, 0],
      [0, -T / 2],
    ],
  };
  const face = solveFace(pile);

  it('is i T/H = 0.599070 at the wall of a half-depth pile, within 0.1 %', () => {
    expect(face.max.unbounded).toBe(false);
    expect(face.max.at).toEqual([0, 0]);
    expect(face.max.gradient! * T).toBeGreaterThan(0.59907 * 0.999);
    expect(face.max.gradient! * T).toBeLessThan(0.59907 * 1.001);
  });

  it.each([
    [0.25, 0.520516],
    [0.5, 0.378192],
    [1, 0.175954],
  ])('is right at x/T = %d, read by a straight line between points, within 1 %', (x, expected) => {
    const value = readAt(face.profile, x * T) * T;
    expect(Math.abs(value / expected - 1)).toBeLessThan(0.01);
  });

  it('has at least 40 points in order, denser towards the wall, and flux = k i', () => {
    expect(face.profile.length).toBeGreaterThanOrEqual(40);
    face.profile.slice(1).forEach(({ at }, i) => expect(at[0]).toBeGreaterThan(face.profile[i].at[0]));
    expect(face.profile[1].at[0]).toBeLessThan(0.3);
    for (const { gradient, flux } of face.profile) expect(flux).toBeCloseTo(1e-5 * gradient!, 15);
  });

  it('averages along the wall: the head at depth 0.5 on its face over 0.5, h = (H/2) F(φ, m)/K(m)', () => {
    // sin φ = sin(πy/2T)/sin(πs/2T); F by the midpoint rule, good to ten digits at this smooth integrand.
    const m = Math.sin(Math.PI / 4);
    const phi = Math.asin(Math.sin((Math.PI * 0.5) / (2 * T)) / m);
    const n = 2000;
    let F = 0;
    for (let i = 0; i < n; i++) F += phi / n / Math.sqrt(1 - (m * Math.sin(((i + 0.5) * phi) / n)) ** 2);
    const exact = F / (2 * ellipticK(m)) / 0.5;
    expect(Math.abs(face.profile[0].averaged / exact - 1)).toBeLessThan(0.002);
    expect(face.profile[0].averagingLength).toBeUndefined();
    expect(face.max.averagingLength).toBe(0.5);
  });

  it('gives no face where water only enters', () => {
    expect(solveFace(pile, 0).profile).toEqual([]);
  });

  it('does not depend on horizontal against vertical permeability at the wall (transformed section)', () => {
    // The ground's ends, half as far in the transformed section, must still be out of reach.
    const flat = solveFace({
      ...pile,
      ...level(T, 8 * T),
      conductivities: [{ kMajor: 4e-5, kMinor: 1e-5, angle: 0 }],
    });
    expect(Math.abs((flat.max.gradient! * T) / 0.59907 - 1)).toBeLessThan(0.002);
  });
});

describe('exit gradient at the end of a flat floor without cutoff (Weaver 1932; Harr 1962, ch. 5)', () => {
  const [b, D] = [5, 30];
  const face = solveFace({ ...level(D, 4 * D, b), heads: [1, 0] });
  // The floor on a layer of depth D by t = tanh(πx/2D): i = t′ / (2K(m) √((t² − m²)(1 − t²))), m = tanh(πb/2D).
  const m = Math.tanh((Math.PI * b) / (2 * D));
  const exact = (x: number): number => {
    const t = Math.tanh((Math.PI * x) / (2 * D));
    return (Math.PI / (4 * D * ellipticK(m))) * Math.sqrt((1 - t * t) / (t * t - m * m));
  };

  it('is unbounded: no gradient there, none quoted as largest, an average over the length instead', () => {
    expect(face.max).toMatchObject({ gradient: null, unbounded: true, at: [5, 0], averagingLength: 0.5 });
    expect(face.profile[0]).toMatchObject({ at: [5, 0], gradient: null, flux: null });
    for (const { gradient } of face.profile.slice(1)) expect(Number.isFinite(gradient)).toBe(true);
    expect(face.max.averaged).toBeGreaterThan(0.15);
  });

  it('follows the closed form down to a few centimetres of the singular point, within 2 %', () => {
    const near = face.profile.filter(({ at }) => at[0] > b && at[0] < b + 10);
    expect(near.length).toBeGreaterThan(30);
    expect(near[0].at[0] - b).toBeLessThan(0.05);
    for (const { at, gradient } of near) expect(Math.abs(gradient! / exact(at[0]) - 1)).toBeLessThan(0.02);
  });

  it('may be read by straight lines between its points to 1 %', () => {
    const { profile } = face;
    for (let i = 2; i < profile.length && profile[i].at[0] < b + 10; i++) {
      const x = (profile[i - 1].at[0] + profile[i].at[0]) / 2;
      const line = (exact(profile[i - 1].at[0]) + exact(profile[i].at[0])) / 2;
      expect(Math.abs(line / exact(x) - 1)).toBeLessThan(0.01);
    }
  });
});

describe('unbounded or not', () => {
  const stepped: Case = {
    outline: [
      [-30, -12],
      [30, -12],
      [30, -2],
      [0, -2],
      [0, 0],
      [-30, 0],
    ],
    edges: [
      [
        [-30, 0],
        [0, 0],
      ],
      [
        [0, -2],
        [30, -2],
      ],
    ],
    heads: [3, 0],
    wall: [
      [0, 0],
      [0, -6],
    ],
  };

  it('bounded at a vertical wall with lower ground in front of it', () => {
    expect(solveFace(stepped).max).toMatchObject({ unbounded: false, at: [0, -2] });
  });

  it('unbounded at the edge of a pit whose slope rises from its floor, bounded where it meets level ground', () => {
    const face = solveFace({
      ...stepped,
      outline: [
        [-30, -12],
        [30, -12],
        [30, 0],
        [12, 0],
        [8, -3],
        [0, -3],
        [0, 0],
        [-30, 0],
      ],
      edges: [
        [
          [-30, 0],
          [0, 0],
        ],
        [
          [0, -3],
          [8, -3],
          [12, 0],
          [30, 0],
        ],
      ],
    });
    expect(face.max).toMatchObject({ unbounded: true, at: [8, -3], gradient: null });
    // r^(λ−1) with λ = 180/143.1 at the crest: the gradient goes to zero there.
    for (const { at, gradient } of face.profile)
      if (at[0] === 12) expect(Math.abs(gradient!)).toBeLessThan(1e-9);
    const holes = face.profile.filter(({ gradient }) => gradient === null);
    expect(holes.every(({ at }) => at[0] === 8)).toBe(true);
    expect(holes.length).toBeGreaterThan(0);
  });

  it('bounded at a wall that leans over the outflow side, unbounded at one that leans away from it', () => {
    const leaning = (x: number): ExitProfile =>
      solveFace({
        ...level(12, 30),
        heads: [3, 0],
        wall: [
          [0, 0],
          [x, -6],
        ],
      });
    expect(leaning(2).max.unbounded).toBe(false);
    const away = leaning(-2);
    expect(away.max).toMatchObject({ unbounded: true, at: [0, 0] });
    expect(away.max.averaged).toBeGreaterThan(0);
  });

  it('turns with the layering: a vertical wall is singular on the side where the transformed angle is obtuse', () => {
    const at = (degrees: number): ExitProfile =>
      solveFace({
        ...level(12, 60),
        heads: [3, 0],
        wall: [
          [0, 0],
          [0, -6],
        ],
        conductivities: [{ kMajor: 9e-5, kMinor: 1e-5, angle: (degrees * Math.PI) / 180 }],
      });
    const singular = [30, -30].map((degrees) => at(degrees).profile[0].gradient === null);
    expect(singular.sort()).toEqual([false, true]);
  });
});

describe('averages', () => {
  it('end at a drain and say so', () => {
    const face = solveFace({
      ...level(12, 30),
      heads: [3, 0],
      wall: [
        [0, 0],
        [0, -6],
      ],
      drains: [
        [
          [5, -0.3],
          [9, -0.3],
        ],
      ],
    });
    const above = face.profile.filter(({ at }) => at[0] > 5.1 && at[0] < 8.9);
    expect(above.length).toBeGreaterThan(3);
    for (const point of above) expect(point.averagingLength).toBeCloseTo(0.3, 6);
    const beside = face.profile.filter(({ at }) => at[0] > 10);
    for (const point of beside) expect(point.averagingLength).toBeUndefined();
  });

  it('end at the outline under thin ground', () => {
    const face = solveFace(
      {
        ...level(0.4, 6),
        heads: [1, 0],
        wall: [
          [0, 0],
          [0, -0.2],
        ],
      },
      1,
      2,
    );
    for (const point of face.profile) expect(point.averagingLength).toBeCloseTo(0.4, 6);
  });
});

describe('several materials and axes', () => {
  it('keeps the gradient and jumps in flux where two soils meet at right angles to the face', () => {
    const { outline, edges } = level(12, 30);
    const face = solveFace({
      outline,
      edges,
      heads: [3, 0],
      wall: [
        [0, 0],
        [0, -6],
      ],
      regions: [
        { outline, holes: [], material: 0 },
        {
          outline: [
            [5, -12],
            [30, -12],
            [30, 0],
            [5, 0],
          ],
          holes: [],
          material: 1,
        },
      ],
      conductivities: [sand, { kMajor: 1e-4, kMinor: 1e-4, angle: 0 }],
    });
    const meeting = face.profile.filter(({ at }) => at[0] === 5);
    expect(meeting).toHaveLength(2);
    expect(meeting[1].flux! / meeting[0].flux!).toBeCloseTo(10, 0);
    expect(Math.abs(meeting[1].gradient! / meeting[0].gradient! - 1)).toBeLessThan(0.02);
  });

  it('loses the whole difference in a tight blanket: i = H / d far from the wall', () => {
    const { outline, edges } = level(10, 30);
    const face = solveFace({
      outline,
      edges,
      heads: [2, 0],
      wall: [
        [0, 0],
        [0, -9.999],
      ],
      regions: [
        { outline, holes: [], material: 0 },
        {
          outline: [
            [-30, -1],
            [30, -1],
            [30, 0],
            [-30, 0],
          ],
          holes: [],
          material: 1,
        },
      ],
      conductivities: [
        { kMajor: 1e-2, kMinor: 1e-2, angle: 0 },
        { kMajor: 1e-8, kMinor: 1e-8, angle: 0 },
      ],
    });
    // Both blankets in series: half the difference is lost in each.
    expect(readAt(face.profile, 15)).toBeCloseTo(1, 2);
  });

  it('agrees with radial flow to a circular trench: i = H / (R ln(R₂/R₁)) at its wall (Thiem)', () => {
    const face = solveFace({
      kind: 'axisymmetric',
      outline: [
        [2, 0],
        [20, 0],
        [20, 5],
        [2, 5],
      ],
      edges: [
        [
          [20, 0],
          [20, 5],
        ],
        [
          [2, 0],
          [2, 5],
        ],
      ],
      heads: [3, 1],
    });
    expect(Math.abs((face.max.gradient! * 2 * Math.log(10)) / 2 - 1)).toBeLessThan(0.003);
    expect(face.max.unbounded).toBe(false);
  });
});
