// Rings of points: area and inside.
import { orient } from './predicates';

/**
 * Computes the area of a ring, closed or not.
 *
 * @param ring - `[x, y]` pairs.
 * @returns Area, positive for counter-clockwise.
 */
export function signedArea(ring: readonly (readonly [number, number])[]): number {
  const count = ring.length;
  if (count < 3) return 0;
  const [ox, oy] = ring[0]; // far from the origin, products of full coordinates would cancel
  let sum = 0;
  for (let i = 1; i + 1 < count; i++) {
    sum += (ring[i][0] - ox) * (ring[i + 1][1] - oy) - (ring[i][1] - oy) * (ring[i + 1][0] - ox);
  }
  return sum / 2;
}

/**
 * Tells whether a point lies inside a ring by the even-odd rule, exactly.
 *
 * @param ring - `[x, y]` pairs, closed or not.
 * @param x - x of the point.
 * @param y - y of the point.
 * @returns True inside; a point on the ring may fall on either side.
 */
export function containsPoint(ring: readonly (readonly [number, number])[], x: number, y: number): boolean {
  let inside = false;
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const [ax, ay] = ring[j];
    const [bx, by] = ring[i];
    if (ay > y === by > y) continue;
    const side = orient(ax, ay, bx, by, x, y);
    if (by > ay ? side > 0 : side < 0) inside = !inside;
  }
  return inside;
}
