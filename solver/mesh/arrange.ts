// The planar arrangement: every input line cut where it meets another, coincident pieces kept once.
import { orient } from '../geometry/predicates';
import { crossLines, distanceToSegment, projectOntoSegment } from '../geometry/segments';
import type { Path, SectionGeometry } from '../problem';
import type { LineKind } from './outcome';
import { VertexIndex } from './vertex-index';

/** One input line after the cutting: a chain of arrangement segments. */
export interface ArrangedLine {
  readonly kind: LineKind;
  /** Position in the geometry's list of that kind. */
  readonly index: number;
  /** 0: a region's outline or an open path; 1 and up: the region's holes. */
  readonly ring: number;
  /** Vertices along the line; a ring repeats its first at the end. */
  readonly vertices: number[];
  /** Distance along the path as given, metres, at each of `vertices`. */
  readonly distances: number[];
  /** Segment between consecutive vertices, length `vertices.length - 1`. */
  readonly segments: number[];
}

/** All lines cut against each other. */
export interface Arrangement {
  /** Larger extent of the ground, metres. */
  readonly size: number;
  /** Points closer than this are one point, metres. */
  readonly snap: number;
  /** x and y of the vertices, metres. */
  readonly x: number[];
  readonly y: number[];
  /** First and second vertex of each segment, first < second. */
  readonly starts: number[];
  readonly ends: number[];
  readonly lines: ArrangedLine[];
}

interface Chain {
  readonly kind: LineKind;
  readonly index: number;
  readonly ring: number;
  vertices: number[];
  distances: number[];
}

const snapRatio = 1e-6;
const maxRounds = 40;

/**
 * Measures a section: the larger extent of all its regions.
 *
 * @param geometry - The section, metres.
 * @returns The larger of width and height, 0 without regions; NaN or infinite where a coordinate is.
 */
export function measureSection(geometry: SectionGeometry): number {
  const low = [Infinity, Infinity];
  const high = [-Infinity, -Infinity];
  for (const { outline } of geometry.regions) {
    for (const point of outline) {
      for (let k = 0; k < 2; k++) {
        low[k] = Math.min(low[k], point[k]);
        high[k] = Math.max(high[k], point[k]);
      }
    }
  }
  return low[0] === Infinity ? 0 : Math.max(high[0] - low[0], high[1] - low[1]);
}

/**
 * Cuts all input lines against each other.
 *
 * Points within the snap distance become one, points within it of a line come to lie on the line, crossings become
 * vertices. Earlier lines' points win, in the order regions, barriers, drains, edges, bases.
 *
 * @param geometry - The section, metres; all coordinates finite.
 * @param size - From {@link measureSection}, > 0.
 * @returns The arrangement, or null where the cutting does not come to an end.
 */
export function arrangeLines(geometry: SectionGeometry, size: number): Arrangement | null {
  const snap = size * snapRatio;
  const points = new VertexIndex(snap);
  const chains = listPaths(geometry).map(({ kind, index, ring, path }) => {
    const chain: Chain = { kind, index, ring, vertices: [], distances: [] };
    let distance = 0;
    path.forEach(([x, y], i) => {
      if (i > 0) distance += Math.hypot(x - path[i - 1][0], y - path[i - 1][1]);
      const vertex = points.find(x, y);
      if (chain.vertices.at(-1) === vertex) return;
      chain.vertices.push(vertex);
      chain.distances.push(distance);
    });
    return chain;
  });
  for (let round = 0; round < maxRounds; round++) {
    const cuts = findCuts(points, chains, snap);
    if (cuts.size === 0) return indexSegments(points, chains, size, snap);
    for (const chain of chains) applyCuts(points, chain, cuts);
  }
  return null;
}

function listPaths(geometry: SectionGeometry): { kind: LineKind; index: number; ring: number; path: Path }[] {
  const close = (path: Path): Path => (path.length > 0 ? [...path, path[0]] : path);
  return [
    ...geometry.regions.flatMap(({ outline, holes }, index) =>
      [outline, ...holes].map((path, ring) => ({ kind: 'region' as const, index, ring, path: close(path) })),
    ),
    ...geometry.barriers.map(({ path }, index) => ({ kind: 'barrier' as const, index, ring: 0, path })),
    ...geometry.drains.map((path, index) => ({ kind: 'drain' as const, index, ring: 0, path })),
    ...geometry.edges.map((path, index) => ({ kind: 'edge' as const, index, ring: 0, path })),
    ...geometry.bases.map((path, index) => ({ kind: 'base' as const, index, ring: 0, path })),
  ];
}

function segmentKey(a: number, b: number): number {
  return a < b ? a * 0x4000000 + b : b * 0x4000000 + a;
}

// Unique pieces of all chains, by x of their left end.
function listPieces(points: VertexIndex, chains: readonly Chain[]): { a: number[]; b: number[] } {
  const keys = new Set<number>();
  for (const { vertices } of chains) {
    for (let i = 1; i < vertices.length; i++) keys.add(segmentKey(vertices[i - 1], vertices[i]));
  }
  const left = (key: number): number =>
    Math.min(points.x[Math.floor(key / 0x4000000)], points.x[key % 0x4000000]);
  const sorted = [...keys].sort((p, q) => left(p) - left(q) || p - q);
  return { a: sorted.map((key) => Math.floor(key / 0x4000000)), b: sorted.map((key) => key % 0x4000000) };
}

// Vertices to insert into each piece, by piece key; empty once nothing meets away from a vertex.
function findCuts(points: VertexIndex, chains: readonly Chain[], snap: number): Map<number, number[]> {
  const { a, b } = listPieces(points, chains);
  const cuts = new Map<number, number[]>();
  const add = (piece: number, vertex: number): void => {
    if (vertex === a[piece] || vertex === b[piece]) return;
    const key = segmentKey(a[piece], b[piece]);
    const list = cuts.get(key);
    if (!list) cuts.set(key, [vertex]);
    else if (!list.includes(vertex)) list.push(vertex);
  };
  cutAtVertices(points, a, b, snap, add);
  const hasCut = a.map((_, i) => cuts.has(segmentKey(a[i], b[i])));
  const { x, y } = points;
  for (let i = 0; i < a.length; i++) {
    const right = Math.max(x[a[i]], x[b[i]]);
    const bottom = Math.min(y[a[i]], y[b[i]]);
    const top = Math.max(y[a[i]], y[b[i]]);
    for (let j = i + 1; j < a.length; j++) {
      if (Math.min(x[a[j]], x[b[j]]) > right) break;
      if (hasCut[i] || hasCut[j]) continue; // first settle on which vertices lie on the two
      if (Math.min(y[a[j]], y[b[j]]) > top || Math.max(y[a[j]], y[b[j]]) < bottom) continue;
      if (a[i] === a[j] || a[i] === b[j] || b[i] === a[j] || b[i] === b[j]) continue;
      const vertex = findCrossing(points, a[i], b[i], a[j], b[j]);
      if (vertex < 0) continue;
      add(i, vertex);
      add(j, vertex);
    }
  }
  return cuts;
}

// Cuts pieces at vertices that lie on them.
function cutAtVertices(
  { x, y }: VertexIndex,
  a: readonly number[],
  b: readonly number[],
  snap: number,
  add: (piece: number, vertex: number) => void,
): void {
  const used = x.map((_, v) => v).sort((p, q) => x[p] - x[q] || p - q); // also points that end no piece
  const sortedX = used.map((v) => x[v]);
  for (let i = 0; i < a.length; i++) {
    const right = Math.max(x[a[i]], x[b[i]]) + snap;
    const bottom = Math.min(y[a[i]], y[b[i]]) - snap;
    const top = Math.max(y[a[i]], y[b[i]]) + snap;
    for (let k = lowerBound(sortedX, Math.min(x[a[i]], x[b[i]]) - snap); k < used.length; k++) {
      const v = used[k];
      if (sortedX[k] > right) break;
      if (y[v] < bottom || y[v] > top || v === a[i] || v === b[i]) continue;
      if (distanceToSegment(x[v], y[v], x[a[i]], y[a[i]], x[b[i]], y[b[i]]) <= snap) add(i, v);
    }
  }
}

function lowerBound(sorted: readonly number[], value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (sorted[mid] < value) low = mid + 1;
    else high = mid;
  }
  return low;
}

// The vertex where segments a–b and c–d cross within both, or −1.
function findCrossing(points: VertexIndex, a: number, b: number, c: number, d: number): number {
  const { x, y } = points;
  const c1 = orient(x[a], y[a], x[b], y[b], x[c], y[c]);
  const d1 = orient(x[a], y[a], x[b], y[b], x[d], y[d]);
  if (c1 > 0 === d1 > 0 || c1 === 0 || d1 === 0) return -1;
  const a1 = orient(x[c], y[c], x[d], y[d], x[a], y[a]);
  const b1 = orient(x[c], y[c], x[d], y[d], x[b], y[b]);
  if (a1 > 0 === b1 > 0 || a1 === 0 || b1 === 0) return -1;
  const t = crossLines([x[a], y[a], x[b], y[b]], [x[c], y[c], x[d], y[d]]);
  if (!(t >= 0 && t <= 1)) return -1;
  return points.find(x[a] + t * (x[b] - x[a]), y[a] + t * (y[b] - y[a]));
}

// Inserts the cuts into one chain, in order along each of its pieces.
function applyCuts({ x, y }: VertexIndex, chain: Chain, cuts: ReadonlyMap<number, number[]>): void {
  const vertices: number[] = [];
  const distances: number[] = [];
  const push = (vertex: number, distance: number): void => {
    if (vertices.at(-1) === vertex) return;
    vertices.push(vertex);
    distances.push(distance);
  };
  chain.vertices.forEach((vertex, i) => {
    push(vertex, chain.distances[i]);
    if (i + 1 === chain.vertices.length) return;
    const next = chain.vertices[i + 1];
    const places = (cuts.get(segmentKey(vertex, next)) ?? [])
      .map((v) => ({ v, t: projectOntoSegment(x[v], y[v], x[vertex], y[vertex], x[next], y[next]) }))
      .sort((p, q) => p.t - q.t || p.v - q.v);
    for (const { v, t } of places) {
      push(v, chain.distances[i] + t * (chain.distances[i + 1] - chain.distances[i]));
    }
  });
  chain.vertices = vertices;
  chain.distances = distances;
}

function indexSegments(
  points: VertexIndex,
  chains: readonly Chain[],
  size: number,
  snap: number,
): Arrangement {
  const ids = new Map<number, number>();
  const starts: number[] = [];
  const ends: number[] = [];
  const lines = chains.map((chain) => {
    const segments: number[] = [];
    for (let i = 1; i < chain.vertices.length; i++) {
      const a = Math.min(chain.vertices[i - 1], chain.vertices[i]);
      const b = Math.max(chain.vertices[i - 1], chain.vertices[i]);
      const key = segmentKey(a, b);
      let id = ids.get(key);
      if (id === undefined) {
        id = starts.length;
        ids.set(key, id);
        starts.push(a);
        ends.push(b);
      }
      segments.push(id);
    }
    return { ...chain, segments };
  });
  return { size, snap, x: points.x, y: points.y, starts, ends, lines };
}
