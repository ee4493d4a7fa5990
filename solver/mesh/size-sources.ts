// Where small elements are wanted: corners by the strength of their singularity, thin layers by their thickness.
import { distanceToSegment } from '../geometry/segments';
import { AcrossFinder } from './across-finder';
import type { Ground } from './ground';
import type { SizeSource } from './size-field';
import { findSharpCorners, measureShell } from './sharp-corners';
import { SizeField } from './size-field';
import type { Spoke } from './spokes';
import { listSpokes, turnFrom } from './spokes';

/** Size at a square-root singularity relative to the distance to the next feature. */
const tipRatio = 1 / 1000;
/** The same where gradients are read though the field is regular: a wall's foot at the surface. */
const footRatio = 1 / 20;
const leastRatio = 1 / 4000;
/** Features this many times smaller than the largest elements are details. */
const detailShare = 16;
const footExponent = 0.95;
/** Elements across a thin layer. */
const acrossCount = 1.25;

/** Where small elements are wanted, sizes in metres. */
export interface SizeSources {
  /** Points that disturb the flow. */
  readonly corners: SizeSource[];
  /** Points along thin places. */
  readonly thin: SizeSource[];
  /** Short segments and sharp corners, which no density changes. */
  readonly forced: SizeSource[];
}

/**
 * Lists the places that want small elements at size factor 1.
 *
 * @param ground - The ground.
 * @param ceiling - Largest size anywhere, metres.
 * @returns Sources by reason.
 */
export function listSizeSources(ground: Ground, ceiling: number): SizeSources {
  const corners = listCornerSources(ground, ceiling);
  const field = new SizeField(corners, 0.4, ceiling);
  const thin = listThinSources(ground, ceiling).filter(({ x, y, size }) => size < field.sizeAt(x, y));
  return { corners, thin, forced: listForcedSources(ground, ceiling) };
}

function listCornerSources(ground: Ground, ceiling: number): SizeSource[] {
  const all = listSpokes(ground);
  const sources: SizeSource[] = [];
  all.forEach((spokes, v) => {
    const exponent = findExponent(spokes);
    if (exponent === null) return;
    const reach = Math.min(measureRoom(ground, all, v), 3 * ceiling);
    // Energy missed within r of a corner goes as r^(2 exponent): equal shares give each corner its size.
    const ratio = exponent === footExponent ? footRatio : Math.pow(tipRatio, 0.5 / exponent);
    // A corner of a detail moves the whole by the square of the detail's share of it.
    const detail = Math.pow(Math.max(1, ceiling / (detailShare * reach)), 1 / exponent);
    const share = Math.min(Math.max(ratio, leastRatio) * detail, 0.5);
    sources.push({ x: ground.x[v], y: ground.y[v], size: reach * share });
  });
  return sources;
}

// The least exponent of the head, r^exponent, over the sectors of ground round a vertex; null where nothing there
// wants small elements. Homogeneous isotropic sectors: pi/angle between like sides, half that between unlike ones
// (closed form, e.g. Strang and Fix 1973, section 8.1); less where materials change within the sector.
function findExponent(spokes: readonly Spoke[]): number | null {
  const bounds = spokes.map((_, i) => i).filter((i) => spokes[i].condition !== -2);
  if (spokes.length === 0) return null;
  if (bounds.length === 0) return interfaceExponent(spokes);
  let least = Infinity;
  bounds.forEach((i, k) => {
    const from = spokes[i];
    if (from.after < 0) return;
    const j = bounds[(k + 1) % bounds.length];
    const to = spokes[j];
    const angle = turnFrom(from, to);
    const inner = (j - i - 1 + spokes.length) % spokes.length;
    const alike = from.condition === to.condition;
    let exponent = (alike ? 1 : 0.5) * (Math.PI / angle);
    if (inner > 0 && Math.abs(exponent - 1) > 0.02) exponent *= 0.8;
    // Regular, but gradients are read here: a wall's foot, or another soil under a face that carries a condition.
    const isRead = !alike || (inner > 0 && from.condition >= 0);
    const foot = isRead && exponent > 0.95 && exponent < 1.05;
    if (exponent < footExponent) least = Math.min(least, exponent);
    else if (foot) least = Math.min(least, footExponent);
  });
  return least === Infinity ? null : least;
}

// Corner of a change of material: at worst that of a closed corner on its wide side.
function interfaceExponent(spokes: readonly Spoke[]): number | null {
  let widest = 0;
  for (let i = 0; i < spokes.length; i++) {
    widest = Math.max(widest, turnFrom(spokes[i], spokes[(i + 1) % spokes.length]));
  }
  const exponent = Math.max(Math.PI / widest, spokes.length > 2 ? 0.6 : 0);
  return exponent < 0.9 ? exponent : null;
}

// Distance from a vertex to the next thing that is not a straight continuation of what meets there.
function measureRoom(ground: Ground, all: readonly Spoke[][], v: number): number {
  const { x, y, starts, ends } = ground;
  const own = new Set<number>();
  let room = Infinity;
  for (const spoke of all[v]) {
    let at = v;
    let step: Spoke | undefined = spoke;
    while (step && !own.has(step.segment)) {
      own.add(step.segment);
      const { angle, to }: Spoke = step;
      at = to;
      step = all[at].find(
        (next) => turnBetween(angle, next.angle) < 0.35 && next.condition === spoke.condition,
      );
    }
    room = Math.min(room, Math.hypot(x[at] - x[v], y[at] - y[v]) || Infinity);
  }
  for (let s = 0; s < starts.length; s++) {
    if (own.has(s)) continue;
    const [a, b] = [starts[s], ends[s]];
    if (a === v || b === v) continue;
    room = Math.min(room, distanceToSegment(x[v], y[v], x[a], y[a], x[b], y[b]));
  }
  return room;
}

function turnBetween(from: number, to: number): number {
  const turn = Math.abs(to - from) % (2 * Math.PI);
  return Math.min(turn, 2 * Math.PI - turn);
}

// Places along segments where the ground across is thin: a layer, a lens, a gap under a wall.
function listThinSources(ground: Ground, ceiling: number): SizeSource[] {
  const { x, y, starts, ends, left, right } = ground;
  const sources: SizeSource[] = [];
  const finder = new AcrossFinder(ground, acrossCount * ceiling);
  const last: Record<number, WidthSample> = {};
  for (let s = 0; s < starts.length; s++) {
    const [a, b] = [starts[s], ends[s]];
    const [dx, dy] = [x[b] - x[a], y[b] - y[a]];
    const length = Math.hypot(dx, dy);
    for (const hand of [left[s] >= 0 ? 1 : 0, right[s] >= 0 ? -1 : 0]) {
      if (hand === 0) continue;
      for (let at = 0; at < length;) {
        const sample = {
          x: x[a] + (dx * at) / length,
          y: y[a] + (dy * at) / length,
          dx: dx / length,
          dy: dy / length,
        };
        if (at === 0 && last[hand] && speaksFor(last[hand], sample)) break;
        const width = finder.widthAt(s, hand, sample.x, sample.y);
        last[hand] = { ...sample, width };
        if (width / acrossCount < ceiling)
          sources.push({ x: sample.x, y: sample.y, size: width / acrossCount });
        at += Math.max(Math.min(width, length / 2), length / 2000);
      }
    }
  }
  return sources;
}

/** A place on a segment, its direction, and the width of the ground across. */
interface WidthSample {
  readonly x: number;
  readonly y: number;
  readonly dx: number;
  readonly dy: number;
  readonly width: number;
}

// Whether a short segment lies so near the last sample, and so much along it, that its width is the same.
function speaksFor(last: WidthSample, next: Omit<WidthSample, 'width'>): boolean {
  const distance = Math.hypot(next.x - last.x, next.y - last.y);
  return distance < 0.25 * last.width && last.dx * next.dx + last.dy * next.dy > 0.8;
}

// Short segments and sharp corners bring small elements with them; said beforehand, sizes grow from there in steps.
function listForcedSources(ground: Ground, ceiling: number): SizeSource[] {
  const { x, y, starts, ends } = ground;
  const sizes = new Float64Array(x.length).fill(Infinity);
  findSharpCorners(ground).forEach((sharp, v) => {
    if (sharp) sizes[v] = measureShell(ground, v);
  });
  starts.forEach((a, s) => {
    const b = ends[s];
    const length = Math.hypot(x[b] - x[a], y[b] - y[a]);
    sizes[a] = Math.min(sizes[a], length);
    sizes[b] = Math.min(sizes[b], length);
  });
  for (const { kind, segments, distances } of ground.lines) {
    if (kind !== 'barrier' || segments.length !== 1 || segments[0] < 0) continue;
    const half = distances[1] / 2.2; // one side alone, between two single tips, would part no nodes of order 1
    for (const v of [starts[segments[0]], ends[segments[0]]]) sizes[v] = Math.min(sizes[v], half);
  }
  return Array.from(sizes, (size, v) => ({ x: x[v], y: y[v], size })).filter(({ size }) => size < ceiling);
}
