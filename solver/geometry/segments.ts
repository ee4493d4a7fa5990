// Points and straight segments.

/**
 * Measures the distance from a point to a segment.
 *
 * @param px - x of the point.
 * @param py - y of the point.
 * @param ax - x of the segment's start.
 * @param ay - y of the segment's start.
 * @param bx - x of the segment's end.
 * @param by - y of the segment's end.
 * @returns The distance to the nearest point of the closed segment.
 */
export function distanceToSegment(
  px: number,
  py: number,
  ax: number,
  ay: number,
  bx: number,
  by: number,
): number {
  const t = projectOntoSegment(px, py, ax, ay, bx, by);
  return Math.hypot(ax + t * (bx - ax) - px, ay + t * (by - ay) - py);
}

/**
 * Finds the point of a segment nearest to a point.
 *
 * @param px - x of the point.
 * @param py - y of the point.
 * @param ax - x of the segment's start.
 * @param ay - y of the segment's start.
 * @param bx - x of the segment's end.
 * @param by - y of the segment's end.
 * @returns Its place along the segment, 0 at the start to 1 at the end.
 */
export function projectOntoSegment(
  px: number,
  py: number,
  ax: number,
  ay: number,
  bx: number,
  by: number,
): number {
  const dx = bx - ax;
  const dy = by - ay;
  const squared = dx * dx + dy * dy;
  if (!(squared > 0)) return 0;
  const t = ((px - ax) * dx + (py - ay) * dy) / squared;
  return t < 0 ? 0 : t > 1 ? 1 : t;
}

/**
 * Intersects two lines that are known to cross, each given by two points.
 *
 * @param a - x, y, x, y of the first line's points.
 * @param b - x, y, x, y of the second line's points.
 * @returns Place of the crossing along the first, 0 at its first point and 1 at its second; NaN where parallel.
 */
export function crossLines(
  a: readonly [number, number, number, number],
  b: readonly [number, number, number, number],
): number {
  const ux = a[2] - a[0];
  const uy = a[3] - a[1];
  const vx = b[2] - b[0];
  const vy = b[3] - b[1];
  const det = ux * vy - uy * vx;
  return ((b[0] - a[0]) * vy - (b[1] - a[1]) * vx) / det;
}
