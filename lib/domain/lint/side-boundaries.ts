// Whether the drawn section ends far enough from whatever disturbs its heads.
import { describeNumber, pointerTo } from '../describe';
import { createGround, type Ground } from '../ground';
import { cutColumn } from '../ground-column';
import type { Issue } from '../issue';
import type { Edge, SectionDocument } from '../section';
import { findDecayLength } from './decay-length';
import { sideSettings as settings } from './settings';
import { verticalPermeability } from './tensor';

/**
 * Asks about sides of the section that lie close to a wall, a structure, a drain or a change of level, where water stands above.
 *
 * @param document - Without stops.
 * @returns Checks, with the error of the discharge to expect and how far the section should reach.
 */
export function lintSideBoundaries(document: SectionDocument): Issue[] {
  const ground = createGround(document);
  const sides = [
    { name: 'left', x: ground.bounds.xMin, inward: 1 },
    { name: 'right', x: ground.bounds.xMax, inward: -1 },
  ] as const;
  return sides.flatMap((side) => {
    // the axis of a round section is no cut
    if (document.geometry === 'axisymmetric' && Math.abs(side.x) <= ground.snap) return [];
    const issue = lintSide(document, ground, side);
    return issue ? [issue] : [];
  });
}

interface Side {
  readonly name: 'left' | 'right';
  readonly x: number;
  readonly inward: 1 | -1;
}

function lintSide(document: SectionDocument, ground: Ground, side: Side): Issue | null {
  const column = cutColumn(document, side.x + side.inward * 20 * ground.snap);
  const top = column.at(-1)?.top;
  if (top === undefined) return null;
  const bed = findBed(document, ground, side, top);
  if (!bed) return null;
  const distance = measureDistance(document, ground, side, bed);
  if (distance === null || distance <= ground.snap) return null;
  const layers = column
    .slice(column.findLastIndex((piece, i) => i > 0 && column[i - 1]!.top < piece.bottom - ground.snap) + 1)
    .map(({ bottom, top: upper, material }) => {
      const { vertical, determinant } = verticalPermeability(material);
      return { thickness: upper - bottom, vertical, horizontal: determinant / vertical };
    });
  const length = findDecayLength(layers);
  if ((2 * distance) / (Math.PI * length) >= settings.enough * (1 - 1e-6)) return null;
  return word(document, ground, side, { top, distance, length });
}

/** The edge with standing water that reaches the side at ground level. */
function findBed(document: SectionDocument, ground: Ground, side: Side, top: number): Edge | null {
  return (
    document.edges.find(
      ({ path, condition }) =>
        'level' in condition &&
        path.some(
          ([x, y]) => Math.abs(x - side.x) <= 2 * ground.snap && Math.abs(y - top) <= 1e-3 * ground.size,
        ) &&
        path.some(([x]) => Math.abs(x - side.x) > 2 * ground.snap),
    ) ?? null
  );
}

/** From the side to where its level ends or something stands in the way; null where one level spans the section. */
function measureDistance(document: SectionDocument, ground: Ground, side: Side, bed: Edge): number | null {
  const away = (x: number): number => (x - side.x) * side.inward;
  const level = 'level' in bed.condition ? bed.condition.level : null;
  let end = 0;
  const beds = document.edges
    .filter(({ condition }) => 'level' in condition && condition.level === level)
    .map(({ path }) => path.map(([x]) => away(x)))
    .map((xs) => [Math.min(...xs), Math.max(...xs)] as const)
    .sort((a, b) => a[0] - b[0]);
  for (const [from, to] of beds) if (from <= end + 2 * ground.snap) end = Math.max(end, to);
  if (end >= ground.bounds.xMax - ground.bounds.xMin - 2 * ground.snap) return null;
  const lines = [
    ...document.barriers.map(({ path }) => path),
    ...document.drains.map(({ path }) => path),
    ...document.structures.map(({ base }) => base),
  ];
  return Math.min(end, ...lines.flat().map(([x]) => away(x)));
}

interface Found {
  readonly top: number;
  readonly distance: number;
  readonly length: number;
}

function word(
  document: SectionDocument,
  ground: Ground,
  side: Side,
  { top, distance, length }: Found,
): Issue {
  const error = settings.factor * Math.exp((-2 * distance) / length);
  const percent =
    error > 0.3
      ? 'more than 30 %'
      : `something like ${describeNumber(Number((100 * error).toPrecision(2)))} %`;
  const enough = (settings.enough * Math.PI * length) / 2;
  const reach = describeNumber(roundOut(side.x + side.inward * (distance - enough), -side.inward));
  const isHeld = document.edges.some(
    ({ path, condition }) =>
      'level' in condition &&
      path.some(
        ([x], i) => i > 0 && [x, path[i - 1]![0]].every((end) => Math.abs(end - side.x) <= 2 * ground.snap),
      ),
  );
  const effect = isHeld
    ? `held at a level, it makes the discharge too high by ${percent} and shifts the exit gradients`
    : `taken as impervious, it makes the discharge too low by ${percent} and shifts the exit gradients`;
  const keep = isHeld
    ? 'or keep it where the level is known there'
    : 'or keep it where it is a line of symmetry or meets tight ground';
  return {
    code: 'side-too-close',
    severity: 'check',
    pointer: pointerTo('zones'),
    at: [side.x, top],
    message: `The ${side.name} side at x = ${describeNumber(side.x)} m is ${writeLength(distance)} m from the nearest wall, structure, drain or change of level, and heads level out over ${writeLength(length)} m: ${effect}. Extend the section to x = ${reach} m or beyond, ${keep}.`,
  };
}

function writeLength(value: number): string {
  return describeNumber(Number(value.toPrecision(3)));
}

/** Rounds a chainage outwards to whole metres where it is large, to tenths where it is small. */
function roundOut(x: number, direction: number): number {
  const step = Math.abs(x) >= 10 ? 1 : 0.1;
  return (direction > 0 ? Math.ceil(x / step - 1e-6) : Math.floor(x / step + 1e-6)) * step;
}
