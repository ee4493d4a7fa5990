import type { Point, SectionDocument, Situation } from '@/lib/domain/section';

/** How a section is laid into a small figure. */
export interface FigureFrame {
  /** Height of the figure, px. */
  height: number;
  /** Vertical over horizontal scale; 1 wherever the section is not too long for that. */
  exaggeration: number;
  /** A point of the section as SVG coordinates. */
  place: (point: Point) => string;
}

const margin = 6;
const leastHeight = 84;
const exaggerations = [1, 1.5, 2, 2.5, 3, 4, 5];

/** Lays a section, its water included, into a figure of the given width. */
export function fitFigure(document: SectionDocument, width: number, maxHeight: number): FigureFrame {
  const points = document.zones.flatMap((zone) => zone.outline);
  const tops = document.barriers.flatMap((barrier) => barrier.path);
  const levels = waterLevels(document);
  const xs = points.map(([x]) => x);
  const ys = [...points, ...tops].map(([, y]) => y).concat(levels);
  const [left, right] = [Math.min(...xs), Math.max(...xs)];
  const [bottom, top] = [Math.min(...ys), Math.max(...ys)];
  const across = Math.max(right - left, 1e-9);
  const up = Math.max(top - bottom, 1e-9);
  const fits = (width - 2 * margin) / across;
  const scale = Math.min(fits, (maxHeight - 2 * margin) / up);
  const wanted = leastHeight / (up * scale);
  const exaggeration = exaggerations.find((factor) => factor >= wanted) ?? 5;
  const vertical = Math.min(scale * exaggeration, (maxHeight - 2 * margin) / up);
  const shift = (width - across * scale) / 2;
  return {
    // a line of text under the ground says where heights are drawn larger than lengths
    height: Math.round(up * vertical + 2 * margin) + (vertical > scale ? 12 : 0),
    exaggeration: Math.round((vertical / scale) * 10) / 10,
    place: ([x, y]) =>
      `${(shift + (x - left) * scale).toFixed(1)} ${(margin + (top - y) * vertical).toFixed(1)}`,
  };
}

function waterLevels(document: SectionDocument): number[] {
  const [situation] = document.situations;
  return document.edges.flatMap(({ condition }) => {
    const level = condition.type === 'water' ? levelOf(condition.level, situation) : null;
    return level === null ? [] : [level];
  });
}

/** A level of a condition in a situation, metres; null where the situation does not name it. */
export function levelOf(level: string | number, situation: Situation | undefined): number | null {
  return typeof level === 'number' ? level : (situation?.levels[level] ?? null);
}

/** The water standing over an edge, as an outline: along the bed where it lies under the level, and back along the surface. */
export function waterOutline(path: readonly Point[], level: number): Point[] {
  const bed: Point[] = [];
  path.forEach(([x, y], index) => {
    const before = path[index - 1];
    if (before && before[1] > level !== y > level) {
      const part = (level - before[1]) / (y - before[1]);
      bed.push([before[0] + part * (x - before[0]), level]);
    }
    if (y <= level) bed.push([x, y]);
  });
  if (bed.length < 2) return [];
  const [first] = bed;
  const last = bed[bed.length - 1];
  return [...bed, [last[0], level], [first[0], level]];
}
