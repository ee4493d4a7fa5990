import { describe, expect, it } from 'vitest';
import { buildMesh } from './build-mesh';
import type { Mesh } from './mesh';
import { validateMesh } from './validate-mesh';

function soundMesh(): Mesh {
  const outcome = buildMesh(
    {
      kind: 'plane',
      regions: [
        {
          outline: [
            [0, -4],
            [10, -4],
            [10, 0],
            [0, 0],
          ],
          holes: [],
          material: 0,
        },
      ],
      barriers: [
        {
          path: [
            [5, 0],
            [5, -2],
          ],
          conductance: 0,
        },
      ],
      drains: [],
      edges: [
        [
          [0, 0],
          [5, 0],
        ],
      ],
      bases: [],
    },
    { order: 2, sizeFactor: 3, maxElements: 2000 },
  );
  if (outcome.status === 'refused') expect.fail('refused');
  return structuredClone(outcome.mesh);
}

describe('validateMesh', () => {
  it('passes a sound mesh', () => {
    expect(validateMesh(soundMesh())).toEqual([]);
  });

  it.each<[string, (mesh: Mesh) => void]>([
    ['inverted-element', (mesh) => mesh.elements.set([mesh.elements[1], mesh.elements[0]], 0)],
    ['asymmetric-neighbours', (mesh) => (mesh.neighbours[mesh.neighbours.findIndex((n) => n >= 0)] = 7)],
    ['midside-off-middle', (mesh) => (mesh.coordinates[2 * mesh.elements[3]] += 1e-9)],
    ['broken-line', (mesh) => mesh.edges[0].directions.fill(1)],
    ['unpaired-faces', (mesh) => mesh.barriers[0].left.directions.fill(-1)],
    ['open-outline', (mesh) => (mesh.outline.sides[0] = (mesh.outline.sides[0] + 1) % 3)],
  ])('finds %s', (fault, spoil) => {
    const mesh = soundMesh();
    spoil(mesh);
    expect(validateMesh(mesh)).toContain(fault);
  });

  it('finds unused nodes', () => {
    const mesh = soundMesh();
    const more = {
      ...mesh,
      nodeCount: mesh.nodeCount + 1,
      coordinates: Float64Array.of(...mesh.coordinates, 0, 0),
    };
    expect(validateMesh(more)).toEqual(['unused-node']);
  });
});
