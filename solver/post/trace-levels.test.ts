import { describe, expect, it } from 'vitest';
import { buildMesh } from '../mesh/build-mesh';
import type { Mesh } from '../mesh/mesh';
import { flowNet } from './flow-net';
import type { LevelLines } from './trace-levels';
import { traceLevels } from './trace-levels';

function build(order: 1 | 2, sizeFactor = 1, wall = false): Mesh {
  const outcome = buildMesh(
    {
      kind: 'plane',
      regions: [
        {
          outline: [
            [-3, -2],
            [3, -2],
            [3, 2],
            [-3, 2],
          ],
          holes: [],
          material: 0,
        },
      ],
      barriers: wall
        ? [
            {
              path: [
                [0, 2],
                [0, -0.5],
              ],
              conductance: 0,
            },
          ]
        : [],
      drains: [],
      edges: [],
      bases: [],
    },
    { order, sizeFactor, maxElements: 40_000 },
  );
  if (outcome.status !== 'meshed') throw new TypeError('the section must mesh');
  return outcome.mesh;
}

function sample(mesh: Mesh, f: (x: number, y: number) => number): Float64Array {
  return Float64Array.from({ length: mesh.nodeCount }, (_, n) =>
    f(mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]),
  );
}

function pointsOf({ points, offsets }: LevelLines, line: number): [number, number][] {
  return Array.from({ length: offsets[line + 1] - offsets[line] }, (_, i) => [
    points[2 * (offsets[line] + i)],
    points[2 * (offsets[line] + i) + 1],
  ]);
}

function lengthOf(points: [number, number][]): number {
  return points.slice(1).reduce((sum, [x, y], i) => sum + Math.hypot(x - points[i][0], y - points[i][1]), 0);
}

describe('traceLevels', () => {
  it.each([1, 2] as const)(
    'traces straight lines of a linear field from outline to outline, order %i',
    (order) => {
      const mesh = build(order);
      const lines = traceLevels(
        mesh,
        sample(mesh, (x, y) => x + 2 * y),
        [-1, 0.5, 99],
      );
      expect([...lines.values]).toEqual([-1, 0.5]);
      for (const line of [0, 1]) {
        const points = pointsOf(lines, line);
        for (const [x, y] of points) expect(x + 2 * y).toBeCloseTo(lines.values[line], 12);
        // From y = −2 to y = 2 or the sides: x runs with half the slope.
        expect(lengthOf(points)).toBeCloseTo(
          Math.hypot(points.at(-1)![0] - points[0][0], points.at(-1)![1] - points[0][1]),
          9,
        );
        // Higher values lie to the left.
        const [dx, dy] = [points.at(-1)![0] - points[0][0], points.at(-1)![1] - points[0][1]];
        expect(-dy * 1 + dx * 2).toBeGreaterThan(0);
      }
    },
  );

  it('meets a quadratic field exactly on its points: circles close on themselves and have their circumference', () => {
    const mesh = build(2);
    const lines = traceLevels(
      mesh,
      sample(mesh, (x, y) => x * x + y * y),
      [1, 2.25],
    );
    expect(lines.values.length).toBe(2);
    [1, 1.5].forEach((radius, line) => {
      const points = pointsOf(lines, line);
      expect(points[0]).toEqual(points.at(-1));
      expect(lengthOf(points) / (2 * Math.PI * radius)).toBeGreaterThan(0.97);
      expect(lengthOf(points) / (2 * Math.PI * radius)).toBeLessThan(1.001);
    });
    for (let i = 0; i < lines.offsets[1]; i++) {
      expect(Math.hypot(lines.points[2 * i], lines.points[2 * i + 1])).toBeCloseTo(1, 10);
    }
  });

  it('gives a saddle two open lines and never a branch, even where nodes carry the very level', () => {
    const mesh = build(2, 0.7);
    const { values, offsets } = traceLevels(
      mesh,
      sample(mesh, (x, y) => x * y),
      [0.5],
    );
    expect([...values]).toEqual([0.5, 0.5]);
    expect(offsets.at(-1)).toBeGreaterThan(20);
    const flat = traceLevels(
      mesh,
      sample(mesh, (x) => Math.max(0, x)),
      [0],
    );
    expect(flat.points.every(Number.isFinite)).toBe(true);
  });

  it('never crosses a wall: lines end on its faces', () => {
    const mesh = build(2, 1, true);
    // The angle about the tip, cut along the wall: from −π/2 on one face to 3π/2 on the other.
    const nodal = new Float64Array(mesh.nodeCount);
    for (let e = 0; e < mesh.elementCount; e++) {
      const centre =
        [0, 1, 2].reduce((sum, c) => sum + mesh.coordinates[2 * mesh.elements[6 * e + c]], 0) / 3;
      for (let a = 0; a < 6; a++) {
        const n = mesh.elements[6 * e + a];
        const [x, y] = [mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1] + 0.5];
        nodal[n] = x === 0 && y > 0 ? (centre > 0 ? Math.PI : -Math.PI) : Math.atan2(x, -y);
      }
    }
    const lines = traceLevels(mesh, nodal, [-2.5, -1.5, -0.5, 0.5, 1.5, 2.5]);
    for (let line = 0; line < lines.values.length; line++) {
      const points = pointsOf(lines, line);
      for (let i = 1; i < points.length; i++) {
        const [[x0, y0], [x1, y1]] = [points[i - 1], points[i]];
        const crosses = x0 * x1 < 0 && Math.min(y0, y1) > -0.49;
        expect(crosses).toBe(false);
      }
      // Rays from the tip at the level's angle.
      expect(Math.sign(points[Math.floor(points.length / 2)][0])).toBe(Math.sign(lines.values[line]));
    }
  });

  it('is the same every time', () => {
    const mesh = build(2);
    const nodal = sample(mesh, (x, y) => Math.sin(2 * x) * Math.cos(3 * y));
    expect(traceLevels(mesh, nodal, [-0.5, 0.2])).toEqual(traceLevels(build(2), nodal, [-0.5, 0.2]));
  });
});

describe('flowNet', () => {
  const mesh = build(2);
  const input = { mesh, kind: 'plane' as const, headRange: [1.67, 5] as const };

  it('counts the channels of a published net: Nf = 2.38 with Nd = 6 gives 6.6e-5 m³/s per metre (Das, Principles of Geotechnical Engineering, seepage chapter; from memory)', () => {
    const k = 5e-5;
    const net = flowNet({
      ...input,
      conductivities: [{ kMajor: k, kMinor: k, angle: 0 }],
      discharge: 6.6045e-5,
      drops: 6,
    });
    expect(net.channels).toBeCloseTo(2.38, 3);
    expect(net.headLevels.map((h) => Math.round(1000 * h) / 1000)).toEqual([2.225, 2.78, 3.335, 3.89, 4.445]);
    // Two whole channels and a part: the lines between them stand a whole channel apart.
    expect(net.streamLevels).toHaveLength(2);
    expect(net.streamLevels[0]).toBeCloseTo(6.6045e-5 / 2.38, 8);
    expect(net.streamLevels[1]).toBeCloseTo((2 * 6.6045e-5) / 2.38, 8);
  });

  it('states anisotropic ground by √(kMajor kMinor): Nf = 3.8, Nd = 18, 18 m give 1.0e-7 (Craig, Soil Mechanics, dam example; from memory)', () => {
    const net = flowNet({
      ...input,
      headRange: [0, 18],
      conductivities: [{ kMajor: 4.5e-8, kMinor: 1.6e-8, angle: 0 }],
      discharge: 1.02e-7,
      drops: 18,
    });
    expect(net.referencePermeability).toBeCloseTo(2.683e-8, 11);
    expect(net.channels).toBeCloseTo(3.8, 2);
  });

  it('has no lines where nothing flows', () => {
    const still = flowNet({
      ...input,
      headRange: [2, 2],
      conductivities: [{ kMajor: 1, kMinor: 1, angle: 0 }],
      discharge: 0,
    });
    expect(still).toMatchObject({ channels: 0, shapeFactor: 0, headLevels: [], streamLevels: [] });
  });
});
