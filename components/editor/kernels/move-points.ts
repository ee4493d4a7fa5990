// Moving points of a section: what moves with what, and where a pointer's place comes to rest.
import type { Point, SectionDocument } from '@/lib/domain/section';

/** A point that can be dragged. */
export interface Handle {
  /** `tip`: a point of a barrier alone. `corner`: every point of the document at this place. */
  readonly kind: 'tip' | 'corner';
  readonly key: string;
  readonly at: Point;
  /** Barrier and its point, for a tip. */
  readonly barrier?: number;
  readonly point?: number;
}

/** Points closer than this part of the section's size are one corner. */
const sameCorner = 1e-6;

function sizeOf(document: SectionDocument): number {
  let most = 1;
  for (const { outline } of document.zones)
    for (const [x, y] of outline) most = Math.max(most, Math.abs(x), Math.abs(y));
  return most;
}

/**
 * Lists what can be dragged: the free ends of barriers, and every distinct corner of the zones.
 *
 * @param document - The section.
 * @returns Tips first, so that a tip on a corner is found before it.
 */
export function listHandles(document: SectionDocument): Handle[] {
  const near = sameCorner * sizeOf(document);
  const tips = document.barriers.flatMap(({ id, path }, barrier): Handle[] => {
    const low = path[0]![1] < path.at(-1)![1] ? 0 : path.length - 1;
    return [{ kind: 'tip', key: `tip-${id}`, at: path[low]!, barrier, point: low }];
  });
  const corners: Handle[] = [];
  for (const { outline } of document.zones) {
    for (const at of outline) {
      if (corners.some((known) => isSame(known.at, at, near))) continue;
      corners.push({ kind: 'corner', key: `corner-${corners.length}`, at });
    }
  }
  return [...tips, ...corners];
}

function isSame([ax, ay]: Point, [bx, by]: Point, near: number): boolean {
  return Math.abs(ax - bx) <= near && Math.abs(ay - by) <= near;
}

/** A document that may be written to; immer's drafts are. */
interface Writable {
  zones: { outline: Point[]; holes?: Point[][] | undefined }[];
  barriers: { path: Point[] }[];
  drains: { path: Point[] }[];
  edges: { path: Point[] }[];
  structures: { base: Point[] }[];
}

/**
 * Moves every point at a place: zones that share a corner keep sharing it, and edges, bases and walls on it go along.
 *
 * @param draft - Written to.
 * @param from - The place before, m.
 * @param to - The place after, m.
 */
export function moveCorner(draft: Writable, from: Point, to: Point): void {
  const near = sameCorner * sizeOf(draft as unknown as SectionDocument);
  const move = (path: Point[]): void => {
    path.forEach((point, i) => {
      if (isSame(point, from, near)) path[i] = [to[0], to[1]];
    });
  };
  for (const zone of draft.zones) {
    move(zone.outline);
    zone.holes?.forEach(move);
  }
  for (const list of [draft.barriers, draft.drains, draft.edges]) for (const { path } of list) move(path);
  for (const { base } of draft.structures) move(base);
}

/**
 * Where a dragged tip comes to rest: an upright wall stays upright, lengths round to a step, and the tip stays below the wall's top.
 *
 * @param path - The wall.
 * @param point - Index of the tip.
 * @param to - Place of the pointer, m.
 * @param step - Rounding, m.
 * @returns The place, m.
 */
export function restTip(path: readonly Point[], point: number, to: Point, step: number): Point {
  const neighbour = path[point === 0 ? 1 : point - 1]!;
  const tip = path[point]!;
  const isUpright = Math.abs(tip[0] - neighbour[0]) <= 1e-9 * Math.max(1, Math.abs(tip[0]));
  const y = Math.min(roundTo(to[1], step), neighbour[1] - step);
  return [isUpright ? tip[0] : roundTo(to[0], step), y];
}

/**
 * Where a dragged corner comes to rest: on another corner's chainage or elevation when close to it, else rounded.
 *
 * @param to - Place of the pointer, m.
 * @param others - Other corners, m.
 * @param reach - Distance within which it snaps, m.
 * @param step - Rounding, m.
 * @returns The place, m.
 */
export function restCorner(to: Point, others: readonly Point[], reach: number, step: number): Point {
  const nearest = (axis: 0 | 1): number | null => {
    let best: number | null = null;
    for (const other of others) {
      const distance = Math.abs(other[axis] - to[axis]);
      if (distance <= reach && (best === null || distance < Math.abs(best - to[axis]))) best = other[axis];
    }
    return best;
  };
  return [nearest(0) ?? roundTo(to[0], step), nearest(1) ?? roundTo(to[1], step)];
}

/**
 * Rounds to a step without leaving binary dust.
 *
 * @param value - Any number.
 * @param step - Positive, a power of ten times 1, 2 or 5.
 * @returns The nearest multiple.
 */
export function roundTo(value: number, step: number): number {
  return Number((Math.round(value / step) * step).toFixed(6));
}

/**
 * The step to round to at a scale: fine enough to aim with a pointer, round enough to read.
 *
 * @param scale - Pixels per metre.
 * @returns 1, 2 or 5 times a power of ten, m; about two pixels.
 */
export function stepAt(scale: number): number {
  const wanted = 2 / scale;
  const power = 10 ** Math.floor(Math.log10(wanted));
  const digit = wanted / power;
  return (digit > 5 ? 10 : digit > 2 ? 5 : digit > 1 ? 2 : 1) * power;
}
