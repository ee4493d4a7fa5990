// The ground of a section as the union of its zones: sizes, inside, along the outline. Floating point with the format's snap
// distance; what decides for the mesh is the solver's exact arrangement.
import type { Point, SectionDocument, Zone } from './section';

/** Questions about the union of the zones. */
export interface Ground {
  /** Larger extent of the section, metres. */
  readonly size: number;
  /** Two points closer than this are one, metres (1e-6 of the size). */
  readonly snap: number;
  readonly bounds: {
    readonly xMin: number;
    readonly xMax: number;
    readonly yMin: number;
    readonly yMax: number;
  };
  /** Whether a point lies in the ground or within the snap distance of it. */
  isInside(x: number, y: number): boolean;
  /**
   * Cuts a segment wherever a zone's outline touches it and says for each piece whether ground lies to its left and right.
   */
  along(from: Point, to: Point): GroundPiece[];
}

/** A piece of a segment. */
export interface GroundPiece {
  readonly middle: readonly [number, number];
  readonly length: number;
  readonly left: boolean;
  readonly right: boolean;
}

/**
 * Prepares questions about the ground.
 *
 * @param document - A section document whose outlines are closed rings of at least three points.
 * @returns The ground.
 */
export function createGround(document: Pick<SectionDocument, 'zones'>): Ground {
  const bounds = { xMin: Infinity, xMax: -Infinity, yMin: Infinity, yMax: -Infinity };
  for (const zone of document.zones) {
    for (const [x, y] of zone.outline) {
      bounds.xMin = Math.min(bounds.xMin, x);
      bounds.xMax = Math.max(bounds.xMax, x);
      bounds.yMin = Math.min(bounds.yMin, y);
      bounds.yMax = Math.max(bounds.yMax, y);
    }
  }
  const size = Math.max(bounds.xMax - bounds.xMin, bounds.yMax - bounds.yMin);
  const snap = 1e-6 * size;
  const segments = document.zones.flatMap((zone) =>
    [zone.outline, ...(zone.holes ?? [])].flatMap(ringSegments),
  );
  const boxes = segments.map(([a, b]) => boxOf(a, b));
  const isIn = (x: number, y: number): boolean => document.zones.some((zone) => isInZone(zone, x, y));
  return {
    size,
    snap,
    bounds,
    isInside: (x, y) => isIn(x, y) || segments.some(([a, b]) => distanceToSegment(x, y, a, b) <= snap),
    along: (from, to) => {
      const reach = boxOf(from, to);
      const near = segments.filter((_, i) => doBoxesMeet(reach, boxes[i]!, 2 * snap));
      return cutAlong(from, to, near, snap, isIn);
    },
  };
}

/**
 * Lists the segments of a ring, the closing one included.
 *
 * @param ring - Points; the last joins the first.
 * @returns Pairs of points.
 */
export function ringSegments(ring: readonly Point[]): [Point, Point][] {
  return ring.map((point, i) => [point, ring[(i + 1) % ring.length]!]);
}

/**
 * Lists the segments of an open path.
 *
 * @param path - Points in order.
 * @returns Pairs of points.
 */
export function pathSegments(path: readonly Point[]): [Point, Point][] {
  return path.slice(1).map((point, i) => [path[i]!, point]);
}

/**
 * Measures the distance of a point from a segment.
 *
 * @param x - Metres.
 * @param y - Metres.
 * @param a - First end.
 * @param b - Second end.
 * @returns Metres.
 */
export function distanceToSegment(x: number, y: number, a: Point, b: Point): number {
  const dx = b[0] - a[0];
  const dy = b[1] - a[1];
  const square = dx * dx + dy * dy;
  const t = square > 0 ? Math.min(1, Math.max(0, ((x - a[0]) * dx + (y - a[1]) * dy) / square)) : 0;
  return Math.hypot(x - a[0] - t * dx, y - a[1] - t * dy);
}

/**
 * Measures the distance of a point from a path.
 *
 * @param x - Metres.
 * @param y - Metres.
 * @param path - Points in order.
 * @returns Metres.
 */
export function distanceToPath(x: number, y: number, path: readonly Point[]): number {
  return Math.min(...pathSegments(path).map(([a, b]) => distanceToSegment(x, y, a, b)));
}

/**
 * Computes the signed area of a ring.
 *
 * @param ring - Points; the last joins the first.
 * @returns m², positive anticlockwise.
 */
export function ringArea(ring: readonly Point[]): number {
  let sum = 0;
  for (const [a, b] of ringSegments(ring))
    sum += (a[0] - ring[0]![0]) * (b[1] - ring[0]![1]) - (b[0] - ring[0]![0]) * (a[1] - ring[0]![1]);
  return sum / 2;
}

/**
 * Tells whether a point lies within a ring, by the even–odd rule.
 *
 * @param ring - Points; the last joins the first.
 * @param x - Metres.
 * @param y - Metres.
 * @returns True inside.
 */
export function isInRing(ring: readonly Point[], x: number, y: number): boolean {
  let inside = false;
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const a = ring[j]!;
    const b = ring[i]!;
    if (a[1] > y !== b[1] > y && x < a[0] + ((y - a[1]) / (b[1] - a[1])) * (b[0] - a[0])) inside = !inside;
  }
  return inside;
}

/** Left, bottom, right, top of a segment. */
type Box = readonly [number, number, number, number];

function boxOf([ax, ay]: Point, [bx, by]: Point): Box {
  return [Math.min(ax, bx), Math.min(ay, by), Math.max(ax, bx), Math.max(ay, by)];
}

function doBoxesMeet(a: Box, b: Box, slack: number): boolean {
  return a[0] <= b[2] + slack && b[0] <= a[2] + slack && a[1] <= b[3] + slack && b[1] <= a[3] + slack;
}

function isInZone(zone: Pick<Zone, 'outline' | 'holes'>, x: number, y: number): boolean {
  return isInRing(zone.outline, x, y) && !(zone.holes ?? []).some((hole) => isInRing(hole, x, y));
}

function cutAlong(
  from: Point,
  to: Point,
  segments: readonly [Point, Point][],
  snap: number,
  isIn: (x: number, y: number) => boolean,
): GroundPiece[] {
  const dx = to[0] - from[0];
  const dy = to[1] - from[1];
  const length = Math.hypot(dx, dy);
  if (length <= snap) return [];
  const cuts = [0, 1];
  for (const [a, b] of segments) {
    for (const [x, y] of [a, b]) {
      const t = ((x - from[0]) * dx + (y - from[1]) * dy) / (length * length);
      if (t > 0 && t < 1 && Math.abs((x - from[0]) * dy - (y - from[1]) * dx) <= 2 * snap * length)
        cuts.push(t);
    }
    const ex = b[0] - a[0];
    const ey = b[1] - a[1];
    const cross = dx * ey - dy * ex;
    if (Math.abs(cross) < 1e-14 * length * Math.hypot(ex, ey)) continue;
    const t = ((a[0] - from[0]) * ey - (a[1] - from[1]) * ex) / cross;
    const u = ((a[0] - from[0]) * dy - (a[1] - from[1]) * dx) / cross;
    if (t > 0 && t < 1 && u >= 0 && u <= 1) cuts.push(t);
  }
  cuts.sort((a, b) => a - b);
  // far enough off the line to be clear of points snapped onto it
  const offset = 10 * snap;
  const nx = (-dy / length) * offset;
  const ny = (dx / length) * offset;
  const pieces: GroundPiece[] = [];
  for (let i = 0; i + 1 < cuts.length; i++) {
    const part = (cuts[i + 1]! - cuts[i]!) * length;
    if (part <= 4 * snap) continue;
    const t = (cuts[i]! + cuts[i + 1]!) / 2;
    const x = from[0] + t * dx;
    const y = from[1] + t * dy;
    pieces.push({ middle: [x, y], length: part, left: isIn(x + nx, y + ny), right: isIn(x - nx, y - ny) });
  }
  return pieces;
}
