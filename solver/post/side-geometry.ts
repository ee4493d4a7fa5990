// Sides of elements as straight segments. Every element of the mesh is straight-sided.
import type { Mesh } from '../mesh/mesh';

/** A side seen from its element, walked counter-clockwise. */
export interface Side {
  /** Nodes at the start and the end. */
  readonly from: number;
  readonly to: number;
  /** Midside node, −1 in an order 1 mesh. */
  readonly middle: number;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  /** Metres. */
  readonly length: number;
  /** Unit normal that points out of the element. */
  readonly nx: number;
  readonly ny: number;
}

/**
 * Reads one side of an element.
 *
 * @param mesh - The mesh.
 * @param element - Element index.
 * @param side - Local side 0, 1, 2.
 * @returns Its nodes, ends, length and outward normal.
 */
export function readSide(mesh: Mesh, element: number, side: number): Side {
  const stride = mesh.order === 1 ? 3 : 6;
  const from = mesh.elements[stride * element + side];
  const to = mesh.elements[stride * element + ((side + 1) % 3)];
  const middle = mesh.order === 1 ? -1 : mesh.elements[stride * element + 3 + side];
  const x0 = mesh.coordinates[2 * from];
  const y0 = mesh.coordinates[2 * from + 1];
  const x1 = mesh.coordinates[2 * to];
  const y1 = mesh.coordinates[2 * to + 1];
  const length = Math.hypot(x1 - x0, y1 - y0);
  return { from, to, middle, x0, y0, x1, y1, length, nx: (y1 - y0) / length, ny: (x0 - x1) / length };
}

/**
 * Evaluates a nodal field on a side.
 *
 * @param side - The side.
 * @param nodal - One value a node.
 * @param t - Place, 0 at the side's start to 1 at its end.
 * @returns The field's value.
 */
export function valueOnSide({ from, to, middle }: Side, nodal: Float64Array, t: number): number {
  if (middle < 0) return (1 - t) * nodal[from] + t * nodal[to];
  return (1 - t) * (1 - 2 * t) * nodal[from] + t * (2 * t - 1) * nodal[to] + 4 * t * (1 - t) * nodal[middle];
}

/**
 * Finds the size of a mesh.
 *
 * @param mesh - The mesh.
 * @returns Diagonal of its bounding box, metres.
 */
export function measureMesh({ coordinates, nodeCount }: Mesh): number {
  let [left, right, bottom, top] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let n = 0; n < nodeCount; n++) {
    left = Math.min(left, coordinates[2 * n]);
    right = Math.max(right, coordinates[2 * n]);
    bottom = Math.min(bottom, coordinates[2 * n + 1]);
    top = Math.max(top, coordinates[2 * n + 1]);
  }
  return Math.hypot(right - left, top - bottom);
}
