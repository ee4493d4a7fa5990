// An edge as straight runs of one material between corners, with the outward gradient anywhere along each.
import { conductivityTensor } from '../assembly/element-stiffness';
import type { LineSides } from '../mesh/mesh';
import type { CornerSeries } from './corner-series';
import { fitCornerSeries } from './corner-series';
import type { WedgeSides } from './corner-exponent';
import { cornerExponent, listExponents, wedgeAt } from './corner-exponent';
import { PatchFit } from './patch-fit';
import type { Recovery } from './recover';
import { readSide } from './side-geometry';
import type { SolvedSection } from './solved-section';

/** What the profiles of one situation share. */
export interface ExitContext {
  readonly section: SolvedSection;
  /** All that flows into the ground, in the unit of the nodal flows. */
  readonly inflow: number;
  /** Diagonal of the section, metres. */
  readonly size: number;
  readonly recovery: Recovery;
  /** Sides, 3 · element + side, with a prescribed head: those of edges, and of drains from both hands. */
  readonly headSides: ReadonlySet<number>;
  /** Sides of drains, from both hands: rays end there. */
  readonly drainSides: ReadonlySet<number>;
  /** Nodes of the outline, of barriers and of changes of material, by which the reach of a corner is measured. */
  readonly features: Float64Array;
}

/** One end of a run. */
export interface RunCorner {
  readonly x: number;
  readonly y: number;
  /** Least exponent of the head there, see `cornerExponent`; 1 where the gradient is bounded. */
  readonly exponent: number;
  /** Whether the gradient is infinite: `exponent < 1` and water comes out beside it. */
  readonly unbounded: boolean;
}

/** A straight part of an edge in one material. */
export interface FaceRun {
  readonly start: RunCorner;
  readonly end: RunCorner;
  /** Metres. */
  readonly length: number;
  /** Unit vector along the path, and unit normal out of the ground. */
  readonly tx: number;
  readonly ty: number;
  readonly nx: number;
  readonly ny: number;
  /** n · K n of its ground, m/s. */
  readonly conductivity: number;
  /** Element whose side holds the place, and the outward gradient there. */
  elementAt(s: number): number;
  gradientAt(s: number): number;
}

/** Sides of one run: places of their ends along it, and their elements and corners in path order. */
export interface RunSides {
  /** Length count + 1, metres from the run's start. */
  readonly places: number[];
  readonly elements: number[];
  readonly startCorners: number[];
  readonly endCorners: number[];
}

/** Turns smaller than this, radians, are rounding of the coordinates. */
const straightTurn = 1e-6;

/**
 * Divides an edge into straight runs of one material.
 *
 * @param context - Solution and recovery.
 * @param edge - Index of the edge.
 * @returns The runs in order along the path.
 */
export function listRuns(context: ExitContext, edge: number): FaceRun[] {
  const { mesh } = context.section;
  const line = mesh.edges[edge];
  const groups: number[][] = [];
  for (let i = 0; i < line.elements.length; i++) {
    if (i > 0 && continues(context, line, i)) groups[groups.length - 1].push(i);
    else groups.push([i]);
  }
  return groups.map((group) =>
    makeRun(context, line, group, context.section.conditions.edges[edge].type === 'head'),
  );
}

function endNodes(
  { section: { mesh } }: ExitContext,
  line: LineSides,
  i: number,
): [start: number, end: number] {
  const side = readSide(mesh, line.elements[i], line.sides[i]);
  return line.directions[i] > 0 ? [side.from, side.to] : [side.to, side.from];
}

function continues(context: ExitContext, line: LineSides, i: number): boolean {
  const { mesh } = context.section;
  const before = readSide(mesh, line.elements[i - 1], line.sides[i - 1]);
  const after = readSide(mesh, line.elements[i], line.sides[i]);
  const joined = endNodes(context, line, i - 1)[1] === endNodes(context, line, i)[0];
  const turn = Math.abs(before.nx * after.ny - before.ny * after.nx);
  const { classes } = context.recovery.patches;
  return joined && turn < straightTurn && classes[line.elements[i - 1]] === classes[line.elements[i]];
}

function makeRun(context: ExitContext, line: LineSides, group: readonly number[], isHead: boolean): FaceRun {
  const { mesh, conductivities } = context.section;
  const { coordinates } = mesh;
  const sides: RunSides = { places: [0], elements: [], startCorners: [], endCorners: [] };
  const [startNode] = endNodes(context, line, group[0]);
  const [, endNode] = endNodes(context, line, group[group.length - 1]);
  const [x0, y0] = [coordinates[2 * startNode], coordinates[2 * startNode + 1]];
  const [x1, y1] = [coordinates[2 * endNode], coordinates[2 * endNode + 1]];
  for (const i of group) {
    const [, node] = endNodes(context, line, i);
    sides.places.push(Math.hypot(coordinates[2 * node] - x0, coordinates[2 * node + 1] - y0));
    sides.elements.push(line.elements[i]);
    const forward = line.directions[i] > 0;
    const [side, next] = [line.sides[i], (line.sides[i] + 1) % 3];
    sides.startCorners.push(forward ? side : next);
    sides.endCorners.push(forward ? next : side);
  }
  const length = sides.places[group.length];
  const { nx, ny } = readSide(mesh, line.elements[group[0]], line.sides[group[0]]);
  const [xx, xy, yy] = conductivityTensor(conductivities[mesh.elementMaterials[line.elements[group[0]]]]);
  const frame = { x0, y0, tx: (x1 - x0) / length, ty: (y1 - y0) / length, nx, ny };
  const raw = (s: number): number => readPatches(context, sides, frame, s);
  const corner = (atEnd: boolean): { corner: RunCorner; series: CornerSeries | null } =>
    surveyCorner(context, sides, atEnd, { isHead, length, raw: atEnd ? (r) => raw(length - r) : raw });
  const [start, end] = [corner(false), corner(true)];
  const gradientAt = (s: number): number => {
    const near = s < length / 2 ? start.series : end.series;
    const r = s < length / 2 ? s : length - s;
    const share = near ? near.shareAt(r) : 0;
    if (!near || share === 0) return raw(s);
    return share === 1 ? near.valueAt(r) : share * near.valueAt(r) + (1 - share) * raw(s);
  };
  return {
    start: start.corner,
    end: end.corner,
    length,
    tx: frame.tx,
    ty: frame.ty,
    nx,
    ny,
    conductivity: nx * (xx * nx + xy * ny) + ny * (xy * nx + yy * ny),
    elementAt: (s) => sides.elements[findSide(sides.places, s)],
    gradientAt,
  };
}

function findSide(places: readonly number[], s: number): number {
  let low = 0;
  let high = places.length - 2;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (places[middle] <= s) low = middle;
    else high = middle - 1;
  }
  return low;
}

interface Frame {
  readonly x0: number;
  readonly y0: number;
  readonly tx: number;
  readonly ty: number;
  readonly nx: number;
  readonly ny: number;
}

const buffer = new Float64Array(2);

// Outward gradient from the patches at the two ends of the side, each weighted by its nearness.
function readPatches(
  { recovery }: ExitContext,
  sides: RunSides,
  { x0, y0, tx, ty, nx, ny }: Frame,
  s: number,
): number {
  const { patches, coefficients } = recovery;
  const i = findSide(sides.places, s);
  const t = (s - sides.places[i]) / (sides.places[i + 1] - sides.places[i]);
  const [x, y] = [x0 + s * tx, y0 + s * ty];
  let sum = 0;
  for (const [corner, share] of [
    [sides.startCorners[i], 1 - t],
    [sides.endCorners[i], t],
  ]) {
    if (share === 0) continue;
    PatchFit.evaluate(coefficients, patches.cornerPatches[3 * sides.elements[i] + corner], x, y, buffer);
    sum -= share * (buffer[0] * nx + buffer[1] * ny);
  }
  return sum;
}

function surveyCorner(
  context: ExitContext,
  sides: RunSides,
  atEnd: boolean,
  { isHead, length, raw }: { isHead: boolean; length: number; raw: (r: number) => number },
): { corner: RunCorner; series: CornerSeries | null } {
  const { section, headSides } = context;
  const { mesh, conductivities } = section;
  const last = sides.elements.length - 1;
  const element = sides.elements[atEnd ? last : 0];
  const local = atEnd ? sides.endCorners[last] : sides.startCorners[0];
  const node = mesh.elements[(mesh.order === 1 ? 3 : 6) * element + local];
  const [x, y] = [mesh.coordinates[2 * node], mesh.coordinates[2 * node + 1]];
  const bounded = { corner: { x, y, exponent: 1, unbounded: false }, series: null };
  if (!isHead) return bounded;
  const wedge = wedgeAt(mesh, conductivities, element, local, (side) => headSides.has(side));
  if (!wedge) return bounded;
  const kindOf = (side: number): 'head' | 'impervious' => (headSides.has(side) ? 'head' : 'impervious');
  const conditions: WedgeSides = [kindOf(wedge.first), kindOf(wedge.last)];
  const exponent = cornerExponent(wedge.sectors, conditions);
  const exponents = listExponents(wedge.sectors, conditions, 3);
  const rays = [wedge.sectors[0].from, ...wedge.sectors.map(({ to }) => to)];
  const places = atEnd ? sides.places.map((s) => length - s).reverse() : sides.places;
  const reach = Math.min(length, measureReach(context, x, y, rays));
  const series = fitCornerSeries({
    exponents: section.kind === 'plane' ? exponents : [exponents[0], exponents[0] + 1, exponents[1]],
    places,
    reach,
    raw,
  });
  // The first side's own middle: far enough in to have the sign of the water's way.
  const comesOut = raw((places[0] + places[1]) / 2) > 0;
  return { corner: { x, y, exponent, unbounded: exponent < 1 && comesOut }, series };
}

// Distance to the nearest thing that is not part of the wedge: there the corner's own series ends.
function measureReach(
  { features }: ExitContext,
  x: number,
  y: number,
  rays: readonly (readonly [number, number])[],
): number {
  let reach = Infinity;
  for (let i = 0; i < features.length; i += 2) {
    const [dx, dy] = [features[i] - x, features[i + 1] - y];
    const distance = Math.hypot(dx, dy);
    if (distance === 0 || distance >= reach) continue;
    const onRay = rays.some(
      ([rx, ry]) =>
        rx * dx + ry * dy > 0 && Math.abs(rx * dy - ry * dx) < 1e-6 * distance * Math.hypot(rx, ry),
    );
    if (!onRay) reach = distance;
  }
  return reach;
}
