// Remarks on a section that can be meshed: narrow gaps, sharp corners, separate pieces.
import { projectOntoSegment } from '../geometry/segments';
import type { SectionGeometry } from '../problem';
import type { Ground } from './ground';
import type { Mesh } from './mesh';
import type { GeometryFinding } from './outcome';
import type { Spoke } from './spokes';
import { listSpokes, turnFrom } from './spokes';

const sharpDegrees = 26;
const nearRatio = 0.005;

/**
 * Remarks on the ground's drawing.
 *
 * @param ground - The ground, before refinement.
 * @returns Small angles and near gaps.
 */
export function remarkOnGround(ground: Ground): GeometryFinding[] {
  const spokes = listSpokes(ground);
  return [...findSharpSectors(ground, spokes), ...findNearGaps(ground, spokes)];
}

function findSharpSectors({ x, y }: Ground, all: readonly Spoke[][]): GeometryFinding[] {
  const findings: GeometryFinding[] = [];
  all.forEach((spokes, v) => {
    let least = Infinity;
    spokes.forEach((spoke, i) => {
      if (spoke.after < 0 || spokes.length < 2) return;
      least = Math.min(least, turnFrom(spoke, spokes[(i + 1) % spokes.length]));
    });
    const value = (least * 180) / Math.PI;
    if (value < sharpDegrees) findings.push({ code: 'small-angle', at: [x[v], y[v]], value });
  });
  return findings;
}

/** A vertex and the nearest segment that might have been meant to meet it. */
interface Near {
  readonly distance: number;
  readonly segment: number;
  readonly direction: number;
}

function findNearGaps(ground: Ground, all: readonly Spoke[][]): GeometryFinding[] {
  const { x, y, size } = ground;
  const findings: GeometryFinding[] = [];
  const isNew = ([px, py]: readonly [number, number]): boolean =>
    findings.every(({ at }) => Math.hypot(at[0] - px, at[1] - py) > 4 * nearRatio * size);
  for (const { kind, index, vertices, segments } of ground.lines) {
    if (kind !== 'barrier' && kind !== 'drain') continue;
    for (const v of [vertices[0], vertices[vertices.length - 1]]) {
      if (v === undefined || v < 0 || all[v].length !== 1) continue; // an end that meets something is joined
      const own = new Set([...segments, ...vertices.flatMap((w) => all[w].map(({ segment }) => segment))]);
      const near = findNearest(ground, v, own);
      const at = [x[v], y[v]] as const;
      if (near) findings.push({ code: 'near-gap', at, line: { kind, index }, value: near.distance });
    }
  }
  all.forEach((spokes, v) => {
    if (!spokes.some(({ after }) => after < 0)) return;
    const near = findNearest(ground, v, new Set(spokes.map(({ segment }) => segment)));
    if (!near || !leavesGround(spokes, near.direction) || !entersFromOutside(ground, v, near.segment)) return;
    const at = [x[v], y[v]] as const;
    if (isNew(at)) findings.push({ code: 'near-gap', at, value: near.distance });
  });
  return findings;
}

function findNearest(
  { x, y, starts, ends, size, snap }: Ground,
  v: number,
  own: ReadonlySet<number>,
): Near | null {
  let best: Near | null = null;
  let reach = nearRatio * size;
  for (let s = 0; s < starts.length; s++) {
    const [a, b] = [starts[s], ends[s]];
    if (Math.min(x[a], x[b]) > x[v] + reach || Math.max(x[a], x[b]) < x[v] - reach) continue;
    if (Math.min(y[a], y[b]) > y[v] + reach || Math.max(y[a], y[b]) < y[v] - reach) continue;
    if (a === v || b === v || own.has(s)) continue;
    const t = projectOntoSegment(x[v], y[v], x[a], y[a], x[b], y[b]);
    const dx = x[a] + t * (x[b] - x[a]) - x[v];
    const dy = y[a] + t * (y[b] - y[a]) - y[v];
    const distance = Math.hypot(dx, dy);
    if (distance >= reach || distance <= snap) continue;
    reach = distance;
    best = { distance, segment: s, direction: Math.atan2(dy, dx) };
  }
  return best;
}

// Whether a direction from a vertex points out of the ground, clear of the outline itself.
function leavesGround(spokes: readonly Spoke[], direction: number): boolean {
  const clear = 0.05;
  return spokes.some((spoke, i) => {
    const turn = turnFrom(spoke, { ...spoke, angle: direction });
    return spoke.after < 0 && turn > clear && turn < turnFrom(spoke, spokes[(i + 1) % spokes.length]) - clear;
  });
}

function entersFromOutside({ x, y, starts, ends, left, right }: Ground, v: number, s: number): boolean {
  const [a, b] = [starts[s], ends[s]];
  const side = (x[b] - x[a]) * (y[v] - y[a]) - (y[b] - y[a]) * (x[v] - x[a]);
  return (side > 0 ? left[s] : right[s]) < 0;
}

/**
 * Remarks on ground that falls into pieces between which no water can pass.
 *
 * @param mesh - The mesh.
 * @param geometry - Tells which barriers let water through.
 * @returns One finding with the number of pieces, at an element of the second; none for one piece.
 */
export function remarkOnPieces(mesh: Mesh, geometry: SectionGeometry): GeometryFinding[] {
  const across = new Map<number, number>();
  mesh.barriers.forEach(({ left, right }, k) => {
    if (!(geometry.barriers[k].conductance > 0)) return;
    left.elements.forEach((e, i) => {
      across.set(3 * e + left.sides[i], right.elements[i]);
      across.set(3 * right.elements[i] + right.sides[i], e);
    });
  });
  const seen = new Uint8Array(mesh.elementCount);
  const firsts: number[] = [];
  for (let first = 0; first < mesh.elementCount; first++) {
    if (seen[first]) continue;
    firsts.push(first);
    seen[first] = 1;
    const stack = [first];
    for (let e = stack.pop(); e !== undefined; e = stack.pop()) {
      for (let s = 0; s < 3; s++) {
        const open = mesh.neighbours[3 * e + s];
        const n = open >= 0 ? open : (across.get(3 * e + s) ?? -1);
        if (n < 0 || seen[n]) continue;
        seen[n] = 1;
        stack.push(n);
      }
    }
  }
  if (firsts.length < 2) return [];
  const node = mesh.elements[firsts[1] * (mesh.order === 1 ? 3 : 6)];
  const at = [mesh.coordinates[2 * node], mesh.coordinates[2 * node + 1]] as const;
  return [{ code: 'ground-in-pieces', at, value: firsts.length }];
}
