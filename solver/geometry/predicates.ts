// Exact signs of the two determinants the mesh rests on, y upwards.
import { incircle, orient2d } from 'robust-predicates';

/**
 * Tells on which side of the directed line a→b the point c lies, exactly.
 *
 * @param ax - x of a.
 * @param ay - y of a.
 * @param bx - x of b.
 * @param by - y of b.
 * @param cx - x of c.
 * @param cy - y of c.
 * @returns Positive to the left (a, b, c counter-clockwise), negative to the right, 0 on the line; about twice the area.
 * @source J. R. Shewchuk (1997), Adaptive precision floating-point arithmetic and fast robust geometric predicates.
 */
export function orient(ax: number, ay: number, bx: number, by: number, cx: number, cy: number): number {
  return -orient2d(ax, ay, bx, by, cx, cy); // the library counts y downwards
}

// Bound of the rounding error of the plain determinant, relative to its permanent (Shewchuk 1997, fig. 21).
const circleErrorBound = (10 + 96 * 1.1102230246251565e-16) * 1.1102230246251565e-16;

/**
 * Tells whether d lies strictly inside the circle through a, b, c, exactly; coordinates as one flat array.
 *
 * @param x - x of all points.
 * @param y - y of all points.
 * @param a - Index of a; a, b, c counter-clockwise.
 * @param b - Index of b.
 * @param c - Index of c.
 * @param d - Index of d.
 * @returns Positive inside, negative outside, 0 on the circle.
 * @source J. R. Shewchuk (1997), Adaptive precision floating-point arithmetic and fast robust geometric predicates.
 */
export function inCircle(
  x: Float64Array,
  y: Float64Array,
  a: number,
  b: number,
  c: number,
  d: number,
): number {
  const dx = x[d];
  const dy = y[d];
  const adx = x[a] - dx;
  const ady = y[a] - dy;
  const bdx = x[b] - dx;
  const bdy = y[b] - dy;
  const cdx = x[c] - dx;
  const cdy = y[c] - dy;
  const alift = adx * adx + ady * ady;
  const blift = bdx * bdx + bdy * bdy;
  const clift = cdx * cdx + cdy * cdy;
  const bc = bdx * cdy;
  const cb = cdx * bdy;
  const ca = cdx * ady;
  const ac = adx * cdy;
  const ab = adx * bdy;
  const ba = bdx * ady;
  const det = alift * (bc - cb) + blift * (ca - ac) + clift * (ab - ba);
  const permanent =
    (Math.abs(bc) + Math.abs(cb)) * alift +
    (Math.abs(ca) + Math.abs(ac)) * blift +
    (Math.abs(ab) + Math.abs(ba)) * clift;
  const bound = circleErrorBound * permanent;
  if (det > bound || -det > bound) return det;
  return incircle(x[a], y[a], x[b], y[b], x[c], y[c], dx, dy);
}
