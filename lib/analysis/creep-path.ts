import { distanceToSegment } from '@/lib/domain/ground';
import type { StructureResult } from '@/lib/domain/result';
import type { Barrier, Point, SectionDocument, Structure } from '@/lib/domain/section';

/**
 * Follows the line of creep: along the base and down and up both faces of its walls. Pieces steeper than 45° count as vertical, others
 * as horizontal. Lane (1935), Security from under-seepage, Trans. ASCE 100:1235–1272 (from memory).
 */
export function followCreep(
  document: SectionDocument,
  structure: Structure,
  snap: number,
): StructureResult['creepPath'] {
  const walls = document.barriers.filter((barrier) =>
    structure.barriers
      ? structure.barriers.includes(barrier.id)
      : attachment(structure.base, barrier, snap) !== null,
  );
  const points: Point[] = [];
  const push = (point: Point): void => {
    const last = points.at(-1);
    if (!last || Math.hypot(last[0] - point[0], last[1] - point[1]) > snap) points.push(point);
  };
  const stops = walls
    .map((wall) => ({ wall, at: attachment(structure.base, wall, snap) }))
    .filter((stop): stop is { wall: Barrier; at: Attachment } => stop.at !== null)
    .sort((a, b) => a.at.segment - b.at.segment || a.at.distance - b.at.distance);
  structure.base.forEach((point, segment) => {
    push(point);
    for (const { wall, at } of stops.filter((stop) => stop.at.segment === segment)) {
      const down = at.isReversed ? [...wall.path].reverse() : wall.path;
      push(down[0]!);
      for (const p of down) push(p);
      for (const p of [...down].reverse()) push(p);
    }
  });
  let vertical = 0;
  let horizontal = 0;
  for (let i = 1; i < points.length; i++) {
    const dx = Math.abs(points[i]![0] - points[i - 1]![0]);
    const dy = Math.abs(points[i]![1] - points[i - 1]![1]);
    if (dy > dx) vertical += Math.hypot(dx, dy);
    else horizontal += Math.hypot(dx, dy);
  }
  return {
    vertical,
    horizontal,
    weighted: vertical + horizontal / 3,
    points: points.map(([x, y]) => [x, y]),
  };
}

interface Attachment {
  /** Segment of the base that begins at or before the wall. */
  readonly segment: number;
  readonly distance: number;
  /** The wall's last point is the one on the base. */
  readonly isReversed: boolean;
}

function attachment(base: readonly Point[], wall: Barrier, snap: number): Attachment | null {
  for (const isReversed of [false, true]) {
    const top = isReversed ? wall.path.at(-1)! : wall.path[0]!;
    for (let segment = 0; segment < base.length; segment++) {
      const a = base[segment]!;
      const b = base[segment + 1] ?? a;
      if (distanceToSegment(top[0], top[1], a, b) <= 2 * snap) {
        return { segment, distance: Math.hypot(top[0] - a[0], top[1] - a[1]), isReversed };
      }
    }
  }
  return null;
}
