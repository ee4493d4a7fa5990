// Where a segment is split so that its pieces have the wanted sizes.
import type { Sizing } from './far-field';

/** What is special about the ends of a segment. */
export interface SegmentEnds {
  readonly sharpStart: boolean;
  readonly sharpEnd: boolean;
  /** Distance of the first split from a sharp end, metres. */
  readonly shellStart: number;
  readonly shellEnd: number;
  /** Splits beyond which the caller gives up; the list may then end early. */
  readonly most: number;
}

/**
 * Places the splits of one segment.
 *
 * @param field - Wanted sizes.
 * @param line - x, y, x, y of its ends.
 * @param ends - First splits that neighbours at a sharp corner share.
 * @returns Places between 0 and 1, ascending.
 */
export function placeAlong(
  field: Sizing,
  line: readonly [number, number, number, number],
  ends: SegmentEnds,
): number[] {
  const length = Math.hypot(line[2] - line[0], line[3] - line[1]);
  const from = ends.sharpStart && ends.shellStart < 0.45 * length ? ends.shellStart / length : 0;
  const to = ends.sharpEnd && ends.shellEnd < 0.45 * length ? 1 - ends.shellEnd / length : 1;
  const inner = spread(field, line, [from, to], ends.most);
  return [...(from > 0 ? [from] : []), ...inner, ...(to < 1 ? [to] : [])];
}

// Splits [from, to] into pieces that each hold the same integral of 1/size.
function spread(
  field: Sizing,
  [ax, ay, bx, by]: readonly [number, number, number, number],
  [from, to]: readonly [number, number],
  most: number,
): number[] {
  const length = Math.hypot(bx - ax, by - ay);
  const sizeAt = (t: number): number => field.sizeAt(ax + t * (bx - ax), ay + t * (by - ay)) / length;
  const places = [from];
  const sums = [0];
  for (let t = from, size = sizeAt(from); t < to && places.length <= 3 * most;) {
    const step = Math.min(size / 2, to - t);
    const next = t + step >= to ? to : t + step;
    const nextSize = sizeAt(next);
    sums.push(sums[sums.length - 1] + (next - t) * (0.5 / size + 0.5 / nextSize));
    places.push(next);
    t = next;
    size = nextSize;
  }
  const total = sums[sums.length - 1];
  const count = Math.max(1, Math.round(total));
  const result: number[] = [];
  for (let k = 1, i = 1; k < count; k++) {
    const wanted = (total * k) / count;
    while (sums[i] < wanted) i++;
    const share = (wanted - sums[i - 1]) / (sums[i] - sums[i - 1]);
    result.push(places[i - 1] + share * (places[i] - places[i - 1]));
  }
  return result;
}
