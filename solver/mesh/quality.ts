// How good a triangle is.

/**
 * Finds the smallest angle of any element.
 *
 * @param coordinates - x, y of each node, metres.
 * @param elements - Nodes of the elements.
 * @param stride - 3 or 6 nodes an element, corners first.
 * @returns Degrees; 60 at most, 0 without elements.
 */
export function findMinAngle(coordinates: Float64Array, elements: Int32Array, stride: number): number {
  let least = Infinity; // least of cot... as tangent pairs would need care: compare squared sines with sign of cosine
  for (let e = 0; e < elements.length; e += stride) {
    for (let c = 0; c < 3; c++) {
      const a = 2 * elements[e + c];
      const b = 2 * elements[e + ((c + 1) % 3)];
      const d = 2 * elements[e + ((c + 2) % 3)];
      const ux = coordinates[b] - coordinates[a];
      const uy = coordinates[b + 1] - coordinates[a + 1];
      const vx = coordinates[d] - coordinates[a];
      const vy = coordinates[d + 1] - coordinates[a + 1];
      const tangent = (ux * vy - uy * vx) / (ux * vx + uy * vy);
      if (tangent >= 0 && tangent < least) least = tangent;
    }
  }
  return least === Infinity ? 0 : (Math.atan(least) * 180) / Math.PI;
}
