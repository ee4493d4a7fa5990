// What comes out of the ground along an edge: outward gradient, flux, the average over a length, and the singular points.
import type { LineSides, Mesh } from '../mesh/mesh';
import { placeFacePoints } from './exit-places';
import type { ExitContext, FaceRun, RunCorner } from './exit-face';
import { listRuns } from './exit-face';
import { fitPatches } from './recover';
import { interpolate, parentCoordinates } from './locate';
import { measureMesh } from './side-geometry';
import type { SolvedSection } from './solved-section';
import { walkRay } from './walk-ray';

/** One point of an outflow face. */
export interface ExitProfilePoint {
  readonly at: [number, number];
  /** Outward component of the hydraulic gradient, −∇h·n; null exactly at a singular point. */
  readonly gradient: number | null;
  /** Head lost along the inward normal over the averaging length, divided by it. */
  readonly averaged: number;
  /** Outward, m/s; null exactly at a singular point. */
  readonly flux: number | null;
  /** Metres, where the normal met a barrier, the outline or a drain before the length asked for. */
  readonly averagingLength?: number;
}

/** The largest values of a profile. */
export interface ExitMaximum {
  /** Null where theory gives an infinite gradient at some point of the face. */
  readonly gradient: number | null;
  /** Largest average along the face. */
  readonly averaged: number;
  /** Length of that average, metres. */
  readonly averagingLength: number;
  /** Point of the largest gradient, or the singular point. */
  readonly at: [number, number];
  readonly unbounded: boolean;
}

/** An outflow face. */
export interface ExitProfile {
  readonly max: ExitMaximum;
  /** At least 40, in order along the path; twice in one place where the values jump (a bend, a change of material, a wall). */
  readonly profile: ExitProfilePoint[];
}

/** Part of an edge's own flow that must come out for it to be an outflow face: less is rounding at the ends of inflow. */
const outflowShare = 1e-3;
/** The same, of the inflow into the whole section. */
const leastShare = 1e-9;
/** Rays shorter than this part of the section's size have no average of their own. */
const shortestRay = 1e-7;

/** One context a solved section, for as long as the section lives: its edges share the recovery. */
const contexts = new WeakMap<SolvedSection, ExitContext>();

/**
 * Makes the profile of one edge of a solved section.
 *
 * The gradient comes from patch recovery; beside corners where the head is no polynomial, from the corner's own series fitted to it.
 *
 * Unbounded: a face meets an impervious side (a barrier's face too, leaky or not, since what leaks through stays finite) at more than 90°,
 * or another face at more than 180°, in the transformed section; with several materials, wherever the least exponent of h ~ r^λ is below 1.
 *
 * @param section - A solved section; not to be changed afterwards.
 * @param edge - Index of the edge.
 * @param averagingLength - Metres, positive.
 * @returns The largest values and the profile, which has no points where no water comes out.
 * @source Harr (1962), Groundwater and Seepage, ch. 5 (exit gradient); Zienkiewicz & Zhu (1992) for the recovery.
 */
export function exitProfile(section: SolvedSection, edge: number, averagingLength: number): ExitProfile {
  const condition = section.conditions.edges[edge];
  const context = contexts.get(section) ?? prepareContext(section);
  contexts.set(section, context);
  const runs = listRuns(context, edge);
  const closed = condition.type === 'impervious' || (condition.type === 'flux' && condition.rate >= 0);
  if (closed || !letsWaterOut(runs, context.inflow)) {
    const at: [number, number] = runs.length > 0 ? [runs[0].start.x, runs[0].start.y] : [0, 0];
    return { max: { gradient: 0, averaged: 0, averagingLength, at, unbounded: false }, profile: [] };
  }
  return profileEdge(context, runs, averagingLength);
}

function prepareContext(section: SolvedSection): ExitContext {
  const { mesh, conditions, conductivities, heads } = section;
  const headSides = new Set<number>();
  const drainSides = new Set<number>();
  mesh.edges.forEach((line, i) => {
    if (conditions.edges[i].type === 'head') addSides(mesh, line, headSides);
  });
  mesh.drains.forEach((line, i) => {
    addSides(mesh, line, drainSides);
    if (conditions.drains[i].type === 'head') addSides(mesh, line, headSides);
  });
  const recovery = fitPatches(mesh, conductivities, heads);
  let inflow = 0;
  for (const flow of section.reactions) inflow += Math.max(0, flow);
  return {
    section,
    inflow,
    size: measureMesh(mesh),
    recovery,
    headSides,
    drainSides,
    features: listFeatures(mesh, recovery.patches.classes),
  };
}

function addSides({ neighbours }: Mesh, { elements, sides }: LineSides, set: Set<number>): void {
  elements.forEach((e, i) => {
    set.add(3 * e + sides[i]);
    const across = neighbours[3 * e + sides[i]];
    for (let s = 0; across >= 0 && s < 3; s++) if (neighbours[3 * across + s] === e) set.add(3 * across + s);
  });
}

// Corner nodes of every side with nothing, or another material, across.
function listFeatures(
  { elementCount, elements, neighbours, coordinates, order }: Mesh,
  classes: Int32Array,
): Float64Array {
  const stride = order === 1 ? 3 : 6;
  const points: number[] = [];
  for (let side = 0; side < 3 * elementCount; side++) {
    const e = (side / 3) | 0;
    const across = neighbours[side];
    if (across >= 0 && classes[across] === classes[e]) continue;
    const node = elements[stride * e + (side % 3)];
    points.push(coordinates[2 * node], coordinates[2 * node + 1]);
  }
  return Float64Array.from(points);
}

function letsWaterOut(runs: readonly FaceRun[], inflow: number): boolean {
  const pieces = 16;
  let [out, total] = [0, 0];
  for (const run of runs) {
    for (let i = 0; i < pieces; i++) {
      const flow =
        (run.gradientAt((run.length * (i + 0.5)) / pieces) * run.conductivity * run.length) / pieces;
      out += Math.max(0, flow);
      total += Math.abs(flow);
    }
  }
  return out > outflowShare * total && out > leastShare * inflow;
}

function profileEdge(context: ExitContext, runs: readonly FaceRun[], averagingLength: number): ExitProfile {
  const places = placeFacePoints(runs, (run, s) => readAverage(context, run, s, averagingLength).averaged);
  const profile: ExitProfilePoint[] = [];
  runs.forEach((run, r) => {
    for (const s of places[r]) {
      const point = readPoint(context, run, s, averagingLength);
      if (!isRepeated(profile.at(-1), point)) profile.push(point);
    }
  });
  return { max: findMaximum(runs, profile, averagingLength), profile };
}

function readPoint(context: ExitContext, run: FaceRun, s: number, length: number): ExitProfilePoint {
  const corner = s === 0 ? run.start : s === run.length ? run.end : null;
  const at: [number, number] = corner
    ? [corner.x, corner.y]
    : [run.start.x + s * run.tx, run.start.y + s * run.ty];
  const gradient = corner && corner.exponent < 1 ? null : run.gradientAt(s);
  const { averaged, used } = readAverage(context, run, s, length);
  const flux = gradient === null ? null : gradient * run.conductivity;
  return { at, gradient, averaged, flux, ...(used < length ? { averagingLength: used } : {}) };
}

// Head lost along the inward normal. The ray starts a hair inside the run: from the foot of a wall it then follows the wall's face
// instead of crossing it by rounding.
function readAverage(
  { section, drainSides, size }: ExitContext,
  run: FaceRun,
  s: number,
  length: number,
): { averaged: number; used: number } {
  const { mesh, heads } = section;
  const hair = 1e-6 * run.length;
  const inside = Math.min(Math.max(s, hair), run.length - hair);
  const start: [number, number] = [run.start.x + inside * run.tx, run.start.y + inside * run.ty];
  const first = run.elementAt(inside);
  const ray = walkRay(mesh, first, start, [-run.nx, -run.ny], length, drainSides);
  // A ray cut at once (an acute foot) is too short to average over: its limit is the gradient itself.
  if (!(ray.length > shortestRay * size)) return { averaged: run.gradientAt(inside), used: 0 };
  const end = parentCoordinates(
    mesh,
    ray.element,
    start[0] - ray.length * run.nx,
    start[1] - ray.length * run.ny,
  );
  const lost =
    interpolate(mesh, heads, end) -
    interpolate(mesh, heads, parentCoordinates(mesh, first, start[0], start[1]));
  return { averaged: lost / ray.length, used: ray.length };
}

// Neighbouring runs meet in one point; it stands once where they agree.
function isRepeated(last: ExitProfilePoint | undefined, point: ExitProfilePoint): boolean {
  if (!last || last.at[0] !== point.at[0] || last.at[1] !== point.at[1]) return false;
  const agree = (a: number | null, b: number | null): boolean =>
    a === null || b === null ? a === b : Math.abs(a - b) <= 1e-3 * Math.max(Math.abs(a), Math.abs(b));
  return (
    agree(last.gradient, point.gradient) &&
    agree(last.averaged, point.averaged) &&
    agree(last.flux, point.flux)
  );
}

function findMaximum(
  runs: readonly FaceRun[],
  profile: readonly ExitProfilePoint[],
  length: number,
): ExitMaximum {
  let steepest = profile[0];
  let largest = profile[0];
  for (const point of profile) {
    if ((point.gradient ?? -Infinity) > (steepest.gradient ?? -Infinity)) steepest = point;
    if (point.averaged > largest.averaged) largest = point;
  }
  // Of several singular points, the one where most is lost over the averaging length.
  const averagedAt = ({ x, y }: RunCorner): number =>
    Math.max(
      ...profile.filter(({ at }) => at[0] === x && at[1] === y).map(({ averaged }) => averaged),
      -Infinity,
    );
  const strongest = runs
    .flatMap(({ start, end }) => [start, end])
    .filter(({ unbounded }) => unbounded)
    .reduce<RunCorner | null>(
      (best, corner) => (best && averagedAt(best) >= averagedAt(corner) ? best : corner),
      null,
    );
  return {
    gradient: strongest ? null : steepest.gradient,
    averaged: largest.averaged,
    averagingLength: largest.averagingLength ?? length,
    at: strongest ? [strongest.x, strongest.y] : steepest.at,
    unbounded: strongest !== null,
  };
}
