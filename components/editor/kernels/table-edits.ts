// What the table view does to a document: fresh ids, sensible new objects, pasted grids. Pure.
import type { Point, SectionDocument } from '@/lib/domain/section';

type Identified = { readonly id: string };

/**
 * Makes an id that a list does not have yet.
 *
 * @param list - Objects with ids.
 * @param stem - For instance `zone`.
 * @returns For instance `zone-3`.
 */
export function freshId(list: readonly Identified[], stem: string): string {
  let n = list.length + 1;
  while (list.some(({ id }) => id === `${stem}-${n}`)) n++;
  return `${stem}-${n}`;
}

/** Extent of the ground, m. */
interface Bounds {
  readonly xMin: number;
  readonly xMax: number;
  readonly yMin: number;
  readonly yMax: number;
}

/**
 * Measures the zones.
 *
 * @param document - The section.
 * @returns Their extent, m.
 */
export function boundsOf(document: Pick<SectionDocument, 'zones'>): Bounds {
  const points = document.zones.flatMap(({ outline }) => outline);
  const xs = points.map(([x]) => x);
  const ys = points.map(([, y]) => y);
  return { xMin: Math.min(...xs), xMax: Math.max(...xs), yMin: Math.min(...ys), yMax: Math.max(...ys) };
}

/**
 * Finds the ground surface at a chainage.
 *
 * @param document - The section.
 * @param x - Chainage, m.
 * @returns The highest point of any zone's outline there, m; the top of the section where none passes.
 */
export function surfaceAt(document: Pick<SectionDocument, 'zones'>, x: number): number {
  let top = -Infinity;
  for (const { outline } of document.zones) {
    outline.forEach(([x0, y0], i) => {
      const [x1, y1] = outline[(i + 1) % outline.length]!;
      if ((x0 - x) * (x1 - x) > 0) return;
      top = Math.max(top, x0 === x1 ? Math.max(y0, y1) : y0 + ((x - x0) / (x1 - x0)) * (y1 - y0));
    });
  }
  return Number.isFinite(top) ? top : boundsOf(document).yMax;
}

/**
 * Proposes a wall: at a quarter of the section's width, from the surface down a third of its depth.
 *
 * @param document - The section.
 * @returns Its path, m.
 */
export function proposeWall(document: SectionDocument): Point[] {
  const { xMin, xMax, yMin } = boundsOf(document);
  const x = Math.round((xMin + 0.25 * (xMax - xMin)) * 10) / 10;
  const top = surfaceAt(document, x);
  return [
    [x, top],
    [x, Math.round((top - (top - yMin) / 3) * 10) / 10],
  ];
}

/**
 * Proposes a zone: a lens in the middle of the section.
 *
 * @param document - The section.
 * @returns Its outline, m.
 */
export function proposeLens(document: SectionDocument): Point[] {
  const { xMin, xMax, yMin, yMax } = boundsOf(document);
  const round = (value: number): number => Math.round(value * 10) / 10;
  const [x, y] = [(xMin + xMax) / 2, (yMin + yMax) / 2];
  const [dx, dy] = [(xMax - xMin) / 10, (yMax - yMin) / 16];
  return [
    [round(x - dx), round(y - dy)],
    [round(x + dx), round(y - dy)],
    [round(x + dx), round(y + dy)],
    [round(x - dx), round(y + dy)],
  ];
}

/**
 * Reads pasted rows of two numbers, as a spreadsheet copies them.
 *
 * @param rows - Cells as text.
 * @param metres - Length of one pasted unit, m.
 * @returns Points, m; null where a row is not two numbers. A row of headings at the top is passed over.
 */
export function readPoints(rows: readonly (readonly string[])[], metres = 1): Point[] | null {
  const filled = rows.filter((row) => row.some((cell) => cell.trim() !== ''));
  const numbers = filled.map((row) =>
    row.slice(0, 2).map((cell) => Number(cell.trim().replace('−', '-').replace(',', '.'))),
  );
  const isHeading = numbers.length > 1 && numbers[0]!.some(Number.isNaN);
  const points = isHeading ? numbers.slice(1) : numbers;
  if (points.length === 0 || points.some((row) => row.length < 2 || row.some((n) => !Number.isFinite(n))))
    return null;
  return points.map(([x, y]) => [x! * metres, y! * metres]);
}
