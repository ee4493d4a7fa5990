// Where the points of an outflow profile stand: dense where the curves bend and towards corners.
import type { FaceRun } from './exit-face';

/** Points of a profile at the least, and about at the most. */
const leastPoints = 44;
const mostPoints = 400;
/** Error of linear interpolation halfway between two points, relative: under half of the 1 % promised. */
const relativeTolerance = 0.004;
/** The same relative to the largest average on the face, where the value itself is near zero. */
const absoluteTolerance = 4e-4;
/** Each point towards a corner stands at this part of the distance of the one before. */
const cornerRatio = 0.7;
/** The same at a singular corner: a line between points at r and 0.78 r misses r^(−1/2) by 0.6 % at most, whatever the mesh says. */
const singularRatio = 0.78;
/** Nearest point to a corner, relative to the run's length: the more where the gradient grows without bound. */
const nearestPlace = 0.005;
const nearestSingularPlace = 1e-4;
const mostPasses = 12;

/** Two neighbouring points and the values between which a reader would draw a line. */
interface Gap {
  readonly run: number;
  readonly from: number;
  readonly to: number;
}

/**
 * Chooses the points of a profile, run by run.
 *
 * Even spacing, geometric spacing towards both ends of every run, then halving wherever a straight line between two points misses gradient
 * or average halfway by more than 0.4 %; the worst first when points run short.
 *
 * @param runs - Runs of one edge, in order.
 * @param averageAt - The averaged gradient at a distance along a run.
 * @returns Distances along each run, ascending from 0 to its length.
 */
export function placeFacePoints(
  runs: readonly FaceRun[],
  averageAt: (run: FaceRun, s: number) => number,
): number[][] {
  const total = runs.reduce((sum, { length }) => sum + length, 0);
  const places = runs.map((run) => startPlaces(run, total));
  const values = runs.map((run, r) => new Map(places[r].map((s) => [s, readValues(run, s, averageAt)])));
  let count = places.reduce((sum, list) => sum + list.length, 0);
  let gaps: Gap[] = places.flatMap((list, run) =>
    list.slice(1).map((to, i): Gap => ({ run, from: list[i], to })),
  );
  const largest = Math.max(
    ...values.flatMap((map) => [...map.values()].map(([, averaged]) => Math.abs(averaged))),
  );
  for (let pass = 0; pass < mostPasses && gaps.length > 0 && count < mostPoints; pass++) {
    const rough = gaps
      .map((gap) => ({ gap, ...judgeGap(gap, runs[gap.run], values[gap.run], largest, averageAt) }))
      .filter(({ miss }) => miss > 1)
      .sort((a, b) => b.miss - a.miss || a.gap.run - b.gap.run || a.gap.from - b.gap.from)
      .slice(0, mostPoints - count);
    gaps = [];
    for (const { gap, middle, value } of rough) {
      places[gap.run].push(middle);
      values[gap.run].set(middle, value);
      gaps.push({ ...gap, to: middle }, { ...gap, from: middle });
      count++;
    }
  }
  for (const list of places) list.sort((a, b) => a - b);
  return places;
}

type Values = readonly [gradient: number, averaged: number];

function readValues(run: FaceRun, s: number, averageAt: (run: FaceRun, s: number) => number): Values {
  const singular = (s === 0 && run.start.exponent < 1) || (s === run.length && run.end.exponent < 1);
  return [singular ? Number.NaN : run.gradientAt(s), averageAt(run, s)];
}

function startPlaces(run: FaceRun, total: number): number[] {
  const pieces = Math.max(4, Math.ceil((leastPoints * run.length) / total));
  const even = run.length / pieces;
  const places = new Set(
    Array.from({ length: pieces + 1 }, (_, i) => (i === pieces ? run.length : i * even)),
  );
  for (const atEnd of [false, true]) {
    const corner = atEnd ? run.end : run.start;
    const singular = corner.exponent < 1;
    const nearest = (singular ? nearestSingularPlace : nearestPlace) * run.length;
    const ratio = singular ? singularRatio : cornerRatio;
    for (let r = even * ratio; r > nearest; r *= ratio) places.add(atEnd ? run.length - r : r);
  }
  return [...places].sort((a, b) => a - b);
}

// How far a straight line misses halfway, in tolerances. Beside a singular point no line can hold.
function judgeGap(
  { from, to }: Gap,
  run: FaceRun,
  values: ReadonlyMap<number, Values>,
  largest: number,
  averageAt: (run: FaceRun, s: number) => number,
): { middle: number; value: Values; miss: number } {
  const middle = (from + to) / 2;
  const value = readValues(run, middle, averageAt);
  const [a, b] = [values.get(from)!, values.get(to)!];
  let miss = 0;
  for (const k of [0, 1]) {
    const error = Math.abs(value[k] - (a[k] + b[k]) / 2);
    const allowed = relativeTolerance * Math.abs(value[k]) + absoluteTolerance * largest;
    if (error > allowed * miss) miss = error / allowed;
  }
  return { middle, value, miss };
}
