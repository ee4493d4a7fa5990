// The ground's surface along an edge: which way it faces, and what soil lies just under it.
import { materialAt } from '@/lib/domain/ground-column';
import { distanceToSegment, pathSegments } from '@/lib/domain/ground';
import type { Edge, Material, Point, SectionDocument } from '@/lib/domain/section';

/** A place on a face. */
export interface FacePlace {
  /** Vertical component of the outward normal, −1 … 1; 1 for a level bed. */
  readonly rise: number;
  /** Just under the surface; null where the ground was not found. */
  readonly soil: Material | null;
}

/**
 * Describes the face at a point of an edge; at a corner, the segment that faces up the most.
 *
 * @param document - The section.
 * @param edge - The edge.
 * @param at - A point on it, m.
 * @returns Which way it faces and the soil under it.
 */
export function describeFace(
  document: SectionDocument,
  edge: Edge,
  at: readonly [number, number],
): FacePlace {
  const segments = pathSegments(edge.path);
  const reach = Math.min(...segments.map(([a, b]) => distanceToSegment(at[0], at[1], a, b)));
  const size = Math.max(...segments.map(lengthOf));
  return segments
    .filter(([a, b]) => distanceToSegment(at[0], at[1], a, b) <= reach + 1e-6 * size)
    .map((segment) => describeSegment(document, segment, at))
    .reduce((best, place) => (place.rise > best.rise ? place : best));
}

function lengthOf([a, b]: [Point, Point]): number {
  return Math.hypot(b[0] - a[0], b[1] - a[1]);
}

// The ground lies on one side of an edge; which one is found by looking a little to either side, and a little along for corners.
function describeSegment(
  document: SectionDocument,
  [a, b]: [Point, Point],
  at: readonly [number, number],
): FacePlace {
  const length = lengthOf([a, b]);
  const [ux, uy] = [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
  const step = 1e-4 * length;
  for (const along of [0, step, -step]) {
    for (const side of [1, -1]) {
      // −side·(−uy, ux) points out of the ground
      const soil = materialAt(
        document,
        at[0] + along * ux - side * step * uy,
        at[1] + along * uy + side * step * ux,
      );
      if (soil) return { rise: -side * ux, soil };
    }
  }
  return { rise: Math.abs(ux), soil: null };
}
