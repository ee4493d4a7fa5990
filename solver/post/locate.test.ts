import { describe, expect, it } from 'vitest';
import { buildMesh } from '../mesh/build-mesh';
import type { Mesh } from '../mesh/mesh';
import { gradientAt } from './gradients';
import { createLocator, interpolate, parentCoordinates } from './locate';

function meshWithWall(order: 1 | 2): Mesh {
  const outcome = buildMesh(
    {
      kind: 'plane',
      regions: [
        {
          outline: [
            [-4, -5],
            [7, -5],
            [7, 0],
            [-4, 0],
          ],
          holes: [],
          material: 0,
        },
      ],
      barriers: [
        {
          path: [
            [0, 0],
            [0, -3],
          ],
          conductance: 0,
        },
      ],
      drains: [],
      edges: [],
      bases: [],
    },
    { order, sizeFactor: 1.5, maxElements: 20_000 },
  );
  if (outcome.status !== 'meshed') throw new TypeError('the section must mesh');
  return outcome.mesh;
}

function sample(mesh: Mesh, f: (x: number, y: number) => number): Float64Array {
  return Float64Array.from({ length: mesh.nodeCount }, (_, n) =>
    f(mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]),
  );
}

describe('createLocator', () => {
  const mesh = meshWithWall(2);
  const locator = createLocator(mesh);

  it('finds points all over the ground, with a quadratic field and its gradient exact there', () => {
    const nodal = sample(mesh, (x, y) => 2 + x - 3 * y + 0.5 * x * x - x * y + 0.25 * y * y);
    for (let i = 0; i <= 60; i++) {
      for (let j = 0; j <= 30; j++) {
        const [x, y] = [-4 + (11 * i) / 60, -5 + (5 * j) / 30];
        const place = locator.find(x, y)!;
        expect(place).not.toBeNull();
        expect(interpolate(mesh, nodal, place)).toBeCloseTo(
          2 + x - 3 * y + 0.5 * x * x - x * y + 0.25 * y * y,
          10,
        );
        const [gx, gy] = gradientAt(mesh, nodal, place);
        expect(gx).toBeCloseTo(1 + x - y, 8);
        expect(gy).toBeCloseTo(-3 - x + 0.5 * y, 8);
      }
    }
  });

  it('counts points within 1e-6 of the size as on the outline, and no others', () => {
    const size = 11;
    expect(locator.find(7 + 0.5e-6 * size, -2.2)).not.toBeNull();
    expect(locator.find(1.3, 0.5e-6 * size)).not.toBeNull();
    expect(locator.find(7 + 1e-3, -2.2)).toBeNull();
    expect(locator.find(100, 100)).toBeNull();
    expect(locator.find(Number.NaN, 0)).toBeNull();
  });

  it('keeps the two sides of a wall apart however near to it, and gives the wall itself to one face always', () => {
    const side = (x: number): number => {
      const { element } = locator.find(x, -1.234)!;
      const centre =
        [0, 1, 2].reduce((sum, c) => sum + mesh.coordinates[2 * mesh.elements[6 * element + c]], 0) / 3;
      return Math.sign(centre);
    };
    expect(side(1e-8)).toBe(1);
    expect(side(-1e-8)).toBe(-1);
    expect(locator.find(0, -1.234)).toEqual(createLocator(meshWithWall(2)).find(0, -1.234));
  });

  it('works on linear elements', () => {
    const linear = meshWithWall(1);
    const nodal = sample(linear, (x, y) => 4 * x - y);
    const place = createLocator(linear).find(2.17, -3.9)!;
    expect(interpolate(linear, nodal, place)).toBeCloseTo(4 * 2.17 + 3.9, 12);
    expect(parentCoordinates(linear, place.element, 2.17, -3.9)).toEqual(place);
  });
});
