// Straight walks through the mesh, element by element.
import type { Mesh } from '../mesh/mesh';

/** Where a ray ended. */
export interface RayEnd {
  /** Element that holds the end. */
  readonly element: number;
  /** Distance walked, metres. */
  readonly length: number;
}

/**
 * Walks straight through the mesh from a point on an element's side until a length is covered or something is met.
 *
 * @param mesh - The mesh, straight-sided elements.
 * @param element - Element in or on which the start lies.
 * @param start - Metres.
 * @param direction - Unit vector into the ground.
 * @param length - Metres to walk.
 * @param stopSides - Sides, 3 · element + side, at which the ray ends besides the outline and barriers.
 * @returns The end.
 */
export function walkRay(
  mesh: Mesh,
  element: number,
  start: readonly [number, number],
  direction: readonly [number, number],
  length: number,
  stopSides: ReadonlySet<number>,
): RayEnd {
  const stride = mesh.order === 1 ? 3 : 6;
  let at = element;
  let cameFrom = -1;
  let walked = 0;
  for (let step = 0; step <= mesh.elementCount; step++) {
    let best = Infinity;
    let through = -1;
    for (let side = 0; side < 3; side++) {
      if (side === cameFrom) continue;
      const a = 2 * mesh.elements[stride * at + side];
      const b = 2 * mesh.elements[stride * at + ((side + 1) % 3)];
      const ex = mesh.coordinates[b] - mesh.coordinates[a];
      const ey = mesh.coordinates[b + 1] - mesh.coordinates[a + 1];
      // the ray leaves through a side whose outward normal (ey, −ex) it follows
      const along = direction[0] * ey - direction[1] * ex;
      if (!(along > 0)) continue;
      const t = ((mesh.coordinates[a] - start[0]) * ey - (mesh.coordinates[a + 1] - start[1]) * ex) / along;
      if (t < best) {
        best = t;
        through = side;
      }
    }
    if (through < 0) return { element: at, length: walked };
    if (best >= length) return { element: at, length };
    walked = Math.max(walked, best);
    const key = 3 * at + through;
    const next = mesh.neighbours[key];
    if (next < 0 || stopSides.has(key)) return { element: at, length: walked };
    cameFrom = [0, 1, 2].find((side) => mesh.neighbours[3 * next + side] === at)!;
    at = next;
  }
  return { element: at, length: walked };
}
