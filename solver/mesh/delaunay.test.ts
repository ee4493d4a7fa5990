import { Delaunay } from 'd3';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { inCircle, orient } from '../geometry/predicates';
import { findSide, triangulate } from './delaunay';
import type { Triangulation } from './triangulation';

const cell = fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 60 }));
const points = fc.uniqueArray(cell, { minLength: 3, maxLength: 60, selector: ([x, y]) => 100 * x + y });

const graphOf = (
  list: readonly (readonly [number, number])[],
  segments: readonly [number, number][] = [],
) => ({
  x: list.map(([x]) => x),
  y: list.map(([, y]) => y),
  starts: segments.map(([a]) => a),
  ends: segments.map(([, b]) => b),
});

/** Doubled area of the triangles that use given points alone. */
function doubledArea({ x, y, corners, triangleCount }: Triangulation, count: number): number {
  let sum = 0;
  for (let t = 0; t < triangleCount; t++) {
    const [a, b, c] = corners.slice(3 * t, 3 * t + 3);
    if (Math.max(a, b, c) < count) sum += orient(x[a], y[a], x[b], y[b], x[c], y[c]);
  }
  return sum;
}

function expectLocallyDelaunay(mesh: Triangulation): void {
  const { x, y, corners, neighbours, segments } = mesh;
  for (let side = 0; side < 3 * mesh.triangleCount; side++) {
    const n = neighbours[side];
    if (n < 0 || segments[side] >= 0) continue;
    const t = Math.floor(side / 3);
    const end = corners[3 * t + ((side + 1) % 3)];
    const apex = corners[3 * n + ((mesh.sideFrom(n, end) + 2) % 3)];
    expect(inCircle(x, y, corners[3 * t], corners[3 * t + 1], corners[3 * t + 2], apex)).toBeLessThanOrEqual(
      0,
    );
  }
}

describe('triangulate', () => {
  it('has the empty-circle property and, inside the hull, every edge an outside library finds without doubt', () => {
    fc.assert(
      fc.property(points, (list) => {
        const mesh = triangulate(graphOf(list))!;
        expectLocallyDelaunay(mesh);
        const { triangles } = Delaunay.from(list);
        const flat = list.flat();
        for (let t = 0; t < triangles.length; t += 3) {
          const [a, b, c] = triangles.slice(t, t + 3);
          const x = Float64Array.from(list, (p) => p[0]);
          const y = Float64Array.from(list, (p) => p[1]);
          const ccw = orient(x[a], y[a], x[b], y[b], x[c], y[c]) > 0 ? [a, b, c] : [a, c, b];
          const alone = list.every(
            (_, d) => d === a || d === b || d === c || inCircle(x, y, ccw[0], ccw[1], ccw[2], d) < 0,
          );
          if (!alone) continue; // four on a circle: two right answers
          for (const [p, q] of [
            [ccw[0], ccw[1]],
            [ccw[1], ccw[2]],
            [ccw[2], ccw[0]],
          ]) {
            const found = findSide(mesh, p, q) >= 0 || findSide(mesh, q, p) >= 0;
            // The frame's corners are near enough to take a flat triangle off the hull.
            if (!found)
              expect(
                Math.abs(
                  orient(
                    flat[2 * a],
                    flat[2 * a + 1],
                    flat[2 * b],
                    flat[2 * b + 1],
                    flat[2 * c],
                    flat[2 * c + 1],
                  ),
                ),
              ).toBeLessThan(200);
          }
        }
      }),
      { numRuns: 100 },
    );
  });

  it('covers the frame exactly', () => {
    fc.assert(
      fc.property(points, (list) => {
        const mesh = triangulate(graphOf(list))!;
        const n = list.length;
        const frame = orient(
          mesh.x[n],
          mesh.y[n],
          mesh.x[n + 1],
          mesh.y[n + 1],
          mesh.x[n + 2],
          mesh.y[n + 2],
        );
        expect(doubledArea(mesh, n + 3) / frame).toBeCloseTo(1, 12);
        expect(mesh.triangleCount).toBe(2 * (n + 3) - 2 - 3); // Euler: 2 V − 2 − hull
      }),
      { numRuns: 100 },
    );
  });

  it('recovers segments across many triangles and stays Delaunay elsewhere', () => {
    const list: [number, number][] = [
      [0, 0.1],
      [100, -0.2],
      [50, 40],
      [50, -40],
    ];
    for (let i = 1; i < 40; i++) list.push([2.5 * i, 3 + (i % 3)], [2.5 * i + 0.3, -3 - (i % 4)]);
    const mesh = triangulate(
      graphOf(list, [
        [0, 1],
        [0, 2],
        [1, 3],
      ]),
    )!;
    for (const [a, b] of [
      [0, 1],
      [0, 2],
      [1, 3],
    ]) {
      const side = findSide(mesh, a, b);
      expect(side).toBeGreaterThanOrEqual(0);
      expect(mesh.segments[side]).toBeGreaterThanOrEqual(0);
      expect(mesh.segments[findSide(mesh, b, a)]).toBe(mesh.segments[side]);
    }
    expectLocallyDelaunay(mesh);
  });
});
