// The constrained Delaunay triangulation of points and segments.
import { inCircle, orient } from '../geometry/predicates';
import { orderAlongCurve } from './curve-order';
import { Triangulation } from './triangulation';

/** Points and segments to triangulate; segments meet at their ends only and pass through no other point. */
export interface PlanarGraph {
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
  readonly starts: ArrayLike<number>;
  readonly ends: ArrayLike<number>;
}

/**
 * Triangulates points and segments.
 *
 * @param graph - Distinct points and their segments.
 * @returns The triangulation of a large triangle round all points: vertices 0 to n − 1 are the points, n to n + 2 the
 *   large triangle's corners. Segments carry their index in `segments`. Null where a segment cannot be recovered.
 * @source A. Bowyer, D. F. Watson (1981), both Computer Journal 24; S. W. Sloan (1993), A fast algorithm for
 *   generating constrained Delaunay triangulations, Computers and Structures 47.
 */
export function triangulate(graph: PlanarGraph): Triangulation | null {
  const count = graph.x.length;
  const mesh = new Triangulation(Math.max(1024, 4 * count));
  const box = boundPoints(graph);
  for (let i = 0; i < count; i++) mesh.addVertex(graph.x[i], graph.y[i]);
  const reach = 50 * Math.max(box.width, box.height, Number.MIN_VALUE);
  const cx = box.left + box.width / 2;
  const cy = box.bottom + box.height / 2;
  const a = mesh.addVertex(cx - reach, cy - reach);
  const b = mesh.addVertex(cx + reach, cy - reach);
  const c = mesh.addVertex(cx, cy + reach);
  let last = mesh.addTriangle(a, b, c);
  for (const v of orderAlongCurve(mesh.x, mesh.y, count)) {
    const seed = mesh.walkTo(mesh.x[v], mesh.y[v], last);
    if (seed < 0 || !mesh.gatherCavity(v, seed)) return null;
    mesh.fillCavity(v);
    last = mesh.created[0];
  }
  for (let s = 0; s < graph.starts.length; s++) {
    if (!recoverSegment(mesh, graph.starts[s], graph.ends[s], s)) return null;
  }
  restoreDelaunay(mesh);
  return mesh;
}

function boundPoints({ x, y }: PlanarGraph): { left: number; bottom: number; width: number; height: number } {
  let [left, right, bottom, top] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let i = 0; i < x.length; i++) {
    left = Math.min(left, x[i]);
    right = Math.max(right, x[i]);
    bottom = Math.min(bottom, y[i]);
    top = Math.max(top, y[i]);
  }
  return { left, bottom, width: right - left, height: top - bottom };
}

/**
 * Finds the side that runs from one vertex to another.
 *
 * @param mesh - The triangulation.
 * @param a - Where the side starts.
 * @param b - Where it ends.
 * @returns 3 t + s, −1 where the two are not joined (or only by the side from b to a).
 */
export function findSide(mesh: Triangulation, a: number, b: number): number {
  const { corners, neighbours } = mesh;
  const first = mesh.triangleAt[a];
  if (first < 0) return -1;
  let t = first;
  do {
    const s = mesh.sideFrom(t, a);
    if (corners[3 * t + ((s + 1) % 3)] === b) return 3 * t + s;
    t = neighbours[3 * t + ((s + 2) % 3)]; // anticlockwise round a
  } while (t >= 0 && t !== first);
  if (t === first) return -1;
  t = neighbours[3 * first + mesh.sideFrom(first, a)]; // met the hull: the other way round
  while (t >= 0) {
    const s = mesh.sideFrom(t, a);
    if (corners[3 * t + ((s + 1) % 3)] === b) return 3 * t + s;
    t = neighbours[3 * t + s];
  }
  return -1;
}

function recoverSegment(mesh: Triangulation, a: number, b: number, id: number): boolean {
  if (findSide(mesh, a, b) < 0 && !clearWay(mesh, a, b)) return false;
  const side = findSide(mesh, a, b);
  if (side < 0) return false;
  mesh.segments[side] = id;
  const n = mesh.neighbours[side];
  if (n >= 0) mesh.segments[3 * n + mesh.sideFrom(n, b)] = id;
  return true;
}

// Flips sides that cross a–b until none does (Sloan 1993, section 4).
function clearWay(mesh: Triangulation, a: number, b: number): boolean {
  const queue = listCrossings(mesh, a, b);
  if (!queue) return false;
  let budget = 64 + 16 * queue.length * queue.length;
  const { x, y } = mesh;
  for (let head = 0; head < queue.length; head++) {
    if (budget-- === 0) return false;
    const [p, q] = queue[head];
    const side = findSide(mesh, p, q);
    const n = side < 0 ? -1 : mesh.neighbours[side];
    if (n < 0 || mesh.segments[side] >= 0) return false;
    const r = mesh.corners[side - (side % 3) + ((side + 2) % 3)];
    const s = mesh.corners[3 * n + ((mesh.sideFrom(n, q) + 2) % 3)];
    const convex =
      orient(x[r], y[r], x[s], y[s], x[q], y[q]) > 0 && orient(x[s], y[s], x[r], y[r], x[p], y[p]) > 0;
    if (!convex) {
      queue.push([p, q]);
      continue;
    }
    flipSide(mesh, side);
    if (crosses(mesh, a, b, r, s)) queue.push([r, s]);
  }
  return true;
}

function crosses({ x, y }: Triangulation, a: number, b: number, p: number, q: number): boolean {
  if (p === a || p === b || q === a || q === b) return false;
  const left = orient(x[a], y[a], x[b], y[b], x[p], y[p]);
  const right = orient(x[a], y[a], x[b], y[b], x[q], y[q]);
  return left > 0 !== right > 0;
}

// Sides between a and b, in order; null where a vertex lies on the way.
function listCrossings(mesh: Triangulation, a: number, b: number): [number, number][] | null {
  const { x, y, corners, neighbours } = mesh;
  const first = mesh.triangleAt[a];
  let t = first;
  let side = -1;
  do {
    const s = mesh.sideFrom(t, a);
    const p = corners[3 * t + ((s + 1) % 3)];
    const q = corners[3 * t + ((s + 2) % 3)];
    if (
      orient(x[a], y[a], x[b], y[b], x[p], y[p]) < 0 &&
      orient(x[a], y[a], x[b], y[b], x[q], y[q]) > 0 &&
      orient(x[p], y[p], x[q], y[q], x[b], y[b]) < 0
    ) {
      side = 3 * t + ((s + 1) % 3);
      break;
    }
    t = neighbours[3 * t + ((s + 2) % 3)];
  } while (t >= 0 && t !== first);
  const crossings: [number, number][] = [];
  while (side >= 0 && crossings.length <= mesh.triangleCount) {
    const right = corners[side];
    const left = corners[side - (side % 3) + ((side + 1) % 3)];
    crossings.push([right, left]);
    const n = neighbours[side];
    if (n < 0) return null;
    const s = mesh.sideFrom(n, left);
    const apex = corners[3 * n + ((s + 2) % 3)];
    if (apex === b) return crossings;
    const place = orient(x[a], y[a], x[b], y[b], x[apex], y[apex]);
    if (place === 0) return null;
    side = 3 * n + (place > 0 ? (s + 1) % 3 : (s + 2) % 3);
  }
  return null;
}

/**
 * Swaps a side for the other diagonal of its two triangles.
 *
 * @param mesh - The triangulation.
 * @param side - 3 t + s, free and not on the hull, its quadrilateral convex.
 */
export function flipSide(mesh: Triangulation, side: number): void {
  const { corners, neighbours, segments } = mesh;
  const t = (side / 3) | 0;
  const s = side % 3;
  const n = neighbours[side];
  const p = corners[side];
  const q = corners[3 * t + ((s + 1) % 3)];
  const r = corners[3 * t + ((s + 2) % 3)];
  const m = mesh.sideFrom(n, q);
  const w = corners[3 * n + ((m + 2) % 3)];
  const outer = [
    3 * t + ((s + 2) % 3),
    3 * n + ((m + 1) % 3),
    3 * n + ((m + 2) % 3),
    3 * t + ((s + 1) % 3),
  ].map((k) => ({ neighbour: neighbours[k], segment: segments[k], start: corners[k] })); // sides r–p, p–w, w–q, q–r
  corners.set([r, p, w], 3 * t);
  corners.set([r, w, q], 3 * n);
  mesh.triangleAt[p] = mesh.triangleAt[r] = t;
  mesh.triangleAt[q] = mesh.triangleAt[w] = n;
  const places = [3 * t, 3 * t + 1, 3 * n + 1, 3 * n + 2];
  outer.forEach(({ neighbour, segment }, k) => {
    neighbours[places[k]] = neighbour;
    segments[places[k]] = segment;
    if (neighbour < 0) return;
    const end = corners[places[k] - (places[k] % 3) + ((places[k] + 1) % 3)];
    neighbours[3 * neighbour + mesh.sideFrom(neighbour, end)] = (places[k] / 3) | 0;
  });
  neighbours[3 * t + 2] = n;
  neighbours[3 * n] = t;
  segments[3 * t + 2] = segments[3 * n] = -1;
  mesh.generations[t]++;
  mesh.generations[n]++;
}

/**
 * Flips free sides until each is locally Delaunay.
 *
 * @param mesh - A triangulation without inverted triangles.
 * @source C. L. Lawson (1977), Software for C1 surface interpolation.
 */
export function restoreDelaunay(mesh: Triangulation): void {
  const stack: number[] = [];
  for (let side = 3 * mesh.triangleCount - 1; side >= 0; side--) stack.push(side);
  const { x, y, corners, neighbours, segments } = mesh;
  while (stack.length > 0) {
    const side = stack.pop()!;
    const n = neighbours[side];
    if (n < 0 || segments[side] >= 0) continue;
    const t = (side / 3) | 0;
    const end = corners[3 * t + ((side + 1) % 3)];
    const w = corners[3 * n + ((mesh.sideFrom(n, end) + 2) % 3)];
    if (inCircle(x, y, corners[3 * t], corners[3 * t + 1], corners[3 * t + 2], w) <= 0) continue;
    flipSide(mesh, side);
    stack.push(3 * t, 3 * t + 1, 3 * n + 1, 3 * n + 2);
  }
}
