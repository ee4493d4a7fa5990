// A vertical cut through the ground: what lies above what at one chainage.
import { isInRing, ringSegments } from './ground';
import type { Material, SectionDocument } from './section';

/** A stretch of one material on a vertical. */
export interface ColumnPiece {
  readonly bottom: number;
  readonly top: number;
  readonly material: Material;
}

/**
 * Finds the material at a point: the last zone painted there.
 *
 * @param document - The section.
 * @param x - Metres.
 * @param y - Metres.
 * @returns The material, or null outside the ground.
 */
export function materialAt(
  document: Pick<SectionDocument, 'zones' | 'materials'>,
  x: number,
  y: number,
): Material | null {
  const zone = document.zones.findLast(
    ({ outline, holes }) => isInRing(outline, x, y) && !(holes ?? []).some((hole) => isInRing(hole, x, y)),
  );
  return document.materials.find((material) => material.id === zone?.material) ?? null;
}

/**
 * Cuts the ground along a vertical.
 *
 * @param document - The section.
 * @param x - Metres; not exactly on a vertical outline.
 * @returns Pieces from the bottom up, equal neighbours joined, gaps left out.
 */
export function cutColumn(document: Pick<SectionDocument, 'zones' | 'materials'>, x: number): ColumnPiece[] {
  const crossings: number[] = [];
  for (const { outline, holes } of document.zones) {
    for (const [a, b] of [outline, ...(holes ?? [])].flatMap(ringSegments)) {
      if (a[0] > x !== b[0] > x) crossings.push(a[1] + ((x - a[0]) / (b[0] - a[0])) * (b[1] - a[1]));
    }
  }
  crossings.sort((p, q) => p - q);
  const pieces: ColumnPiece[] = [];
  for (let i = 0; i + 1 < crossings.length; i++) {
    const [bottom, top] = [crossings[i]!, crossings[i + 1]!];
    const material = top > bottom ? materialAt(document, x, (bottom + top) / 2) : null;
    if (!material) continue;
    const last = pieces.at(-1);
    if (last && last.material === material && last.top === bottom)
      pieces[pieces.length - 1] = { ...last, top };
    else pieces.push({ bottom, top, material });
  }
  return pieces;
}
