import { describe, expect, it } from 'vitest';
import { prepareSteady, solveSteady } from '../analysis/steady';
import { buildMesh } from '../mesh/build-mesh';
import type { Mesh } from '../mesh/mesh';
import type { Path, SectionGeometry } from '../problem';
import { baseForces } from './base-forces';

/** kN/m³ */
const water = 9.81;

function build(geometry: Partial<SectionGeometry> & { outline: Path }): Mesh {
  const { outline, ...part } = geometry;
  const outcome = buildMesh(
    {
      kind: 'plane',
      regions: [{ outline, holes: [], material: 0 }],
      barriers: [],
      drains: [],
      edges: [],
      bases: [],
      ...part,
    },
    { order: 2, sizeFactor: 1, maxElements: 20_000 },
  );
  if (outcome.status !== 'meshed') throw new TypeError('the section must mesh');
  return outcome.mesh;
}

function sample(mesh: Mesh, f: (x: number, y: number) => number): Float64Array {
  return Float64Array.from({ length: mesh.nodeCount }, (_, n) =>
    f(mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]),
  );
}

// Ground under a structure with a key: level base at −1, a sloping end down to −3, a step.
const outline: Path = [
  [-10, -12],
  [14, -12],
  [14, 0],
  [6, 0],
  [6, -1],
  [2, -1],
  [0, -3],
  [-4, -3],
  [-4, 0],
  [-10, 0],
];
const base: Path = [
  [-4, 0],
  [-4, -3],
  [0, -3],
  [2, -1],
  [6, -1],
  [6, 0],
];

describe('baseForces', () => {
  it('lifts with the weight of the water displaced where the water rests (Archimedes)', () => {
    const mesh = build({ outline, bases: [base] });
    const heads = sample(mesh, () => 0);
    const forces = baseForces(mesh, 'plane', mesh.bases[0], heads);
    // Area of the structure below the water: 4 by 3, then the wedge, then 4 by 1.
    const area = 12 + (2 * (3 + 1)) / 2 + 4;
    expect(forces.upliftForce).toBeCloseTo(water * area, 8);
    expect(forces.horizontalForce).toBeCloseTo(0, 8);
    // Through the centroid of that area, about (−4, 0): 12 at 2, the wedge as a 2 by 1 block at 5 and a triangle of 2 at 4 + 2/3, 4 at 8.
    expect(forces.upliftMoment).toBeCloseTo(water * (12 * 2 + 2 * 5 + 2 * (4 + 2 / 3) + 4 * 8), 7);
    expect(forces.profile.length).toBeGreaterThanOrEqual(40);
    expect(forces.profile[0].at).toEqual([-4, 0]);
    for (const { at, pressure } of forces.profile) expect(pressure).toBeCloseTo(-water * at[1], 9);
  });

  it('counts suction as zero: water standing at −2 presses on the lowest part only', () => {
    const mesh = build({ outline, bases: [base] });
    const forces = baseForces(
      mesh,
      'plane',
      mesh.bases[0],
      sample(mesh, () => -2),
    );
    expect(forces.upliftForce).toBeCloseTo(water * (4 + 0.5), 8);
    expect(forces.horizontalForce).toBeCloseTo(0, 8);
    expect(Math.min(...forces.profile.map(({ pressure }) => pressure))).toBe(0);
  });

  it('pushes a structure away from the higher water: a difference of 2 m across it', () => {
    const mesh = build({
      outline,
      bases: [
        [
          [-4, 0],
          [-4, -3],
        ],
      ],
    });
    const left = baseForces(
      mesh,
      'plane',
      mesh.bases[0],
      sample(mesh, () => 2),
    );
    // Trapezium of pressure from 2 to 5 m of water on the upstream face of 3 m, toward +x.
    expect(left.horizontalForce).toBeCloseTo((water * (5 + 2) * 3) / 2, 8);
    expect(left.upliftForce).toBeCloseTo(0, 8);
  });

  it('does not depend on the direction of the base save for the moment, which moves with its first point', () => {
    const mesh = build({ outline, bases: [base, [...base].reverse()] });
    const heads = sample(mesh, (x) => 1 - x / 20);
    const [one, other] = mesh.bases.map((line) => baseForces(mesh, 'plane', line, heads));
    expect(other.upliftForce).toBeCloseTo(one.upliftForce, 9);
    expect(other.horizontalForce).toBeCloseTo(one.horizontalForce, 9);
    expect(other.upliftMoment).toBeCloseTo(one.upliftMoment - 10 * one.upliftForce, 7);
  });

  it('integrates a linear uplift pressure with its moment exactly: trapezium of 6 and 2 m over 8 m', () => {
    const mesh = build({
      outline: [
        [0, -5],
        [8, -5],
        [8, 0],
        [0, 0],
      ],
      bases: [
        [
          [0, 0],
          [8, 0],
        ],
      ],
    });
    const forces = baseForces(
      mesh,
      'plane',
      mesh.bases[0],
      sample(mesh, (x) => 6 - x / 2),
    );
    expect(forces.upliftForce).toBeCloseTo(water * 32, 9);
    expect(forces.upliftMoment).toBeCloseTo(water * (2 * 8 * 4 + (4 * 8 * (8 / 3)) / 2), 8);
  });

  it('adds up over the full circle in an axisymmetric section: a cone of pressure on a disc, π R² h / 3', () => {
    const mesh = build({
      kind: 'axisymmetric',
      outline: [
        [0, -5],
        [9, -5],
        [9, 0],
        [0, 0],
      ],
      bases: [
        [
          [0, 0],
          [6, 0],
        ],
        [
          [6, 0],
          [0, 0],
        ],
      ],
    });
    const heads = sample(mesh, (x) => 3 - x / 2);
    const forces = baseForces(mesh, 'axisymmetric', mesh.bases[0], heads);
    expect(forces.upliftForce).toBeCloseTo((water * Math.PI * 36 * 3) / 3, 8);
    expect(forces.horizontalForce).toBe(0);
    expect(forces.upliftMoment).toBeCloseTo(0, 9);
    const fromRim = baseForces(mesh, 'axisymmetric', mesh.bases[1], heads);
    expect(fromRim.upliftMoment).toBeCloseTo(-6 * forces.upliftForce, 8);
  });
});

describe('baseForces of solved sections', () => {
  it('finds the uplift under a flat floor: arccos between the levels in deep ground (Weaver 1932; Harr 1962, ch. 5)', () => {
    const [b, half] = [5, 300];
    const mesh = build({
      outline: [
        [-half, -half],
        [half, -half],
        [half, 0],
        [-half, 0],
      ],
      edges: [
        [
          [-half, 0],
          [-b, 0],
        ],
        [
          [b, 0],
          [half, 0],
        ],
      ],
      bases: [
        [
          [-b, 0],
          [b, 0],
        ],
      ],
    });
    const outcome = solveSteady(
      prepareSteady(mesh, 'plane'),
      { conductivities: [{ kMajor: 1e-5, kMinor: 1e-5, angle: 0 }], conductances: [] },
      {
        edges: [
          { type: 'head', head: 4 },
          { type: 'head', head: 0 },
        ],
        drains: [],
      },
    );
    if (outcome.status !== 'solved') throw new TypeError('the section must solve');
    const forces = baseForces(mesh, 'plane', mesh.bases[0], outcome.solution.heads);
    for (const { at, pressure } of forces.profile) {
      const exact = (4 / Math.PI) * Math.acos(Math.min(1, Math.max(-1, at[0] / b)));
      // The ground ends 60 half widths away; a thousandth of the difference remains of that.
      expect(Math.abs(pressure / water - exact)).toBeLessThan(0.004 * 4);
    }
    expect(forces.upliftForce / (water * 2 * b * 2)).toBeCloseTo(1, 3);
    // ∫ h (x + b) dx with h = (H/π) arccos(x/b): H b² (1 − 1/4).
    expect(forces.upliftMoment / (water * 4 * b * b * 0.75)).toBeCloseTo(1, 2);
  });

  it('shows both pressures at the top of a wall under the base, where the head jumps', () => {
    const mesh = build({
      outline: [
        [-20, -10],
        [20, -10],
        [20, 0],
        [-20, 0],
      ],
      edges: [
        [
          [-20, 0],
          [-5, 0],
        ],
        [
          [5, 0],
          [20, 0],
        ],
      ],
      barriers: [
        {
          path: [
            [0, 0],
            [0, -4],
          ],
          conductance: 0,
        },
      ],
      bases: [
        [
          [-5, 0],
          [5, 0],
        ],
      ],
    });
    const outcome = solveSteady(
      prepareSteady(mesh, 'plane'),
      { conductivities: [{ kMajor: 1e-5, kMinor: 1e-5, angle: 0 }], conductances: [0] },
      {
        edges: [
          { type: 'head', head: 4 },
          { type: 'head', head: 0 },
        ],
        drains: [],
      },
    );
    if (outcome.status !== 'solved') throw new TypeError('the section must solve');
    const { profile, upliftForce } = baseForces(mesh, 'plane', mesh.bases[0], outcome.solution.heads);
    const atWall = profile.filter(({ at }) => at[0] === 0).map(({ pressure }) => pressure);
    expect(atWall).toHaveLength(2);
    expect(atWall[0]).toBeGreaterThan(1.5 * atWall[1]);
    // By symmetry the two halves make up the full difference of level, whatever the wall.
    expect(atWall[0] + atWall[1]).toBeCloseTo(4 * water, 3);
    expect(upliftForce).toBeCloseTo(2 * 10 * water, 2);
  });
});
