// Delaunay refinement to a size field and a least angle.
import { findSide } from './delaunay';
import type { Ground } from './ground';
import type { Sizing } from './far-field';
import { placeAlong } from './place-along';
import { findSharpCorners, measureShell } from './sharp-corners';
import { TriangleQueue } from './triangle-queue';
import type { Triangulation } from './triangulation';

/** Bounds of a refinement. */
export interface RefineLimits {
  readonly maxTriangles: number;
  /** Triangles with a side shorter than this keep their angles, metres. */
  readonly floor: number;
}

const leastSine = Math.sin((25.5 * Math.PI) / 180);
/** Off-centres make the new triangle's apex angle a little above the least angle. */
const offCentreReach = 0.5 / Math.tan((29 * Math.PI) / 360);
const sizeSlack = 1.25;
/** Chord of 16 degrees: corners below it keep their narrow triangles, wider ones are refined like any other place. */
const sharpChord = 2 * Math.sin((8 * Math.PI) / 180);

/** The refined triangulation's vertices, or how many triangles it would have taken. */
export type RefineOutcome =
  /** Segment of each vertex inside a segment; −1 free, −2 a corner of the input. */
  | { readonly status: 'refined'; readonly segmentOf: Int32Array }
  | { readonly status: 'limit'; readonly estimate: number };

/**
 * Refines the ground's triangulation in place.
 *
 * @param ground - The ground; its `mesh` is changed.
 * @param field - Wanted sizes.
 * @param limits - When to give up.
 * @returns What lies on which segment, or a rough estimate of the triangles wanted where the limit was hit.
 * @source J. Ruppert (1995), A Delaunay refinement algorithm for quality 2-dimensional mesh generation;
 *   A. Üngör (2004), Off-centers; S. Rebay (1993), Efficient unstructured mesh generation (size of the new triangle);
 *   G. L. Miller, S. E. Pav, N. J. Walkington (2003), When and why Delaunay refinement algorithms work (small angles).
 */
export function refineGround(ground: Ground, field: Sizing, limits: RefineLimits): RefineOutcome {
  const refiner = new Refiner(ground, field, limits);
  const pieces = refiner.splitSegments();
  if (pieces > limits.maxTriangles) return { status: 'limit', estimate: 2 * pieces };
  const estimate = refiner.estimateCount();
  if (estimate > 1.5 * limits.maxTriangles) return { status: 'limit', estimate };
  if (!refiner.run()) return { status: 'limit', estimate: Math.max(estimate, 1.5 * limits.maxTriangles) };
  return { status: 'refined', segmentOf: Int32Array.from(refiner.segmentOf) };
}

class Refiner {
  readonly segmentOf: number[];
  readonly #mesh: Triangulation;
  readonly #ground: Ground;
  readonly #field: Sizing;
  readonly #limits: RefineLimits;
  readonly #queue = new TriangleQueue();
  readonly #sharp: Uint8Array;
  #running = false;
  // Place of the last proposed point.
  #px = 0;
  #py = 0;

  constructor(ground: Ground, field: Sizing, limits: RefineLimits) {
    this.#mesh = ground.mesh;
    this.#ground = ground;
    this.#field = field;
    this.#limits = limits;
    this.segmentOf = new Array<number>(ground.mesh.vertexCount).fill(-2);
    this.#sharp = findSharpCorners(ground);
  }

  // Splits every segment to the size field, before any point goes inside; the number of pieces, alone where too many.
  splitSegments(): number {
    const { x, y, starts, ends } = this.#ground;
    let pieces = 0;
    const places = starts.map((a, s) => {
      if (pieces > this.#limits.maxTriangles) return [];
      const b = ends[s];
      const list = placeAlong(this.#field, [x[a], y[a], x[b], y[b]], {
        sharpStart: this.#sharp[a] === 1,
        sharpEnd: this.#sharp[b] === 1,
        shellStart: this.#shellOf(a),
        shellEnd: this.#shellOf(b),
        most: this.#limits.maxTriangles,
      });
      pieces += list.length + 1;
      return list;
    });
    if (pieces <= this.#limits.maxTriangles) {
      places.forEach((list, s) => this.#splitBetween(starts[s], ends[s], list, s));
    }
    return pieces;
  }

  // Triangles the size field asks for: each triangle's area over that of an equilateral one of the wanted size.
  estimateCount(): number {
    const { x, y, corners, triangleCount } = this.#mesh;
    let sum = 0;
    for (let t = 0; t < triangleCount; t++) {
      const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
      const area = ((x[b] - x[a]) * (y[c] - y[a]) - (y[b] - y[a]) * (x[c] - x[a])) / 2;
      const size = this.#field.sizeAt((x[a] + x[b] + x[c]) / 3, (y[a] + y[b] + y[c]) / 3);
      sum += 1 + area / (0.55 * size * size);
    }
    return sum;
  }

  // Inserts the places from the middle one outwards, so that cavities stay small.
  #splitBetween(a: number, b: number, places: readonly number[], s: number): void {
    if (places.length === 0) return;
    const middle = places.length >> 1;
    const [p, q] = [this.#ground.starts[s], this.#ground.ends[s]];
    const { x, y } = this.#ground;
    const t = places[middle];
    const v = this.#splitEdge(a, b, x[p] + t * (x[q] - x[p]), y[p] + t * (y[q] - y[p]));
    if (v < 0) return;
    this.#splitBetween(a, v, places.slice(0, middle), s);
    this.#splitBetween(v, b, places.slice(middle + 1), s);
  }

  // Radius of the first shell round a corner with a small angle.
  #shellOf(v: number): number {
    const { x, y } = this.#ground;
    return this.#sharp[v] ? Math.min(this.#field.sizeAt(x[v], y[v]), measureShell(this.#ground, v)) : 0;
  }

  // Refines until nothing is left to do; false where the limit was hit.
  run(): boolean {
    const mesh = this.#mesh;
    this.#running = true;
    for (let t = 0; t < mesh.triangleCount; t++) this.#judge(t);
    while (this.#queue.pop()) {
      const t = this.#queue.triangle;
      if (mesh.generations[t] !== this.#queue.generation) continue;
      if (mesh.triangleCount > this.#limits.maxTriangles) return false;
      this.#improve(t);
    }
    return true;
  }

  // Queues a triangle that is too large or too narrow, shortest side first: the mesh grows out of its fine parts.
  #judge(t: number): void {
    const { x, y, corners } = this.#mesh;
    const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
    const ab = squaredLength(x, y, a, b);
    const bc = squaredLength(x, y, b, c);
    const ca = squaredLength(x, y, c, a);
    const shortest = Math.min(ab, bc, ca);
    const area2 = (x[b] - x[a]) * (y[c] - y[a]) - (y[b] - y[a]) * (x[c] - x[a]);
    const radius = Math.sqrt(ab * bc * ca) / (2 * area2);
    if (!(area2 > 0)) return;
    const size = this.#field.sizeAt((x[a] + x[b] + x[c]) / 3, (y[a] + y[b] + y[c]) / 3);
    // Where angles must stay, a flat triangle's circle says nothing of its size.
    const extent =
      shortest < this.#limits.floor * this.#limits.floor
        ? Math.sqrt(Math.max(ab, bc, ca)) / 1.15
        : radius * Math.sqrt(3);
    const large = extent > sizeSlack * size;
    if (large || this.#isNarrow(t, shortest, radius)) {
      this.#queue.push(shortest, t, this.#mesh.generations[t]);
    }
  }

  #isNarrow(t: number, shortest: number, radius: number): boolean {
    if (Math.sqrt(shortest) >= 2 * leastSine * radius) return false;
    if (shortest < this.#limits.floor * this.#limits.floor) return false;
    return !this.#isForced(t, shortest);
  }

  // Whether the shortest side spans two segments at equal distance from their common corner: the input's own angle.
  #isForced(t: number, shortest: number): boolean {
    const { x, y, corners } = this.#mesh;
    for (let s = 0; s < 3; s++) {
      const u = corners[3 * t + s];
      const v = corners[3 * t + ((s + 1) % 3)];
      if (squaredLength(x, y, u, v) > shortest) continue;
      const [p, q] = [this.segmentOf[u], this.segmentOf[v]];
      if (p < 0 || q < 0 || p === q) continue;
      const apex = commonEnd(this.#ground, p, q);
      if (apex < 0 || !this.#sharp[apex]) continue;
      const du = Math.sqrt(squaredLength(x, y, apex, u));
      const dv = Math.sqrt(squaredLength(x, y, apex, v));
      if (Math.abs(du - dv) > 0.05 * Math.min(du, dv)) continue;
      if (shortest < sharpChord * sharpChord * du * dv) return true;
    }
    return false;
  }

  #improve(t: number): void {
    const mesh = this.#mesh;
    this.#propose(t);
    const place = mesh.walkTo(this.#px, this.#py, t);
    if (place < 0) {
      if (this.#splitSide(-1 - place)) this.#requeue(t);
      return;
    }
    const v = mesh.addVertex(this.#px, this.#py);
    if (!mesh.gatherCavity(v, place)) {
      mesh.vertexCount--;
      return;
    }
    const encroached = this.#listEncroached(v);
    if (encroached.length > 0) {
      mesh.vertexCount--;
      let split = false;
      for (let i = 0; i < encroached.length; i += 2) {
        split = this.#splitEdgeMiddle(encroached[i], encroached[i + 1]) || split;
      }
      if (split) this.#requeue(t);
      return;
    }
    mesh.fillCavity(v);
    this.segmentOf[v] = -1;
    this.#judgeCreated();
  }

  #requeue(t: number): void {
    if (t < this.#mesh.triangleCount && this.#mesh.generations[t] === this.#queue.generation) this.#judge(t);
  }

  // The point that turns the triangle's shortest side into a good triangle of the wanted size.
  #propose(t: number): void {
    const { x, y, corners } = this.#mesh;
    let [p, q, r] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
    const pq = squaredLength(x, y, p, q);
    const qr = squaredLength(x, y, q, r);
    const rp = squaredLength(x, y, r, p);
    if (qr < pq && qr <= rp) [p, q, r] = [q, r, p];
    else if (rp < pq && rp < qr) [p, q, r] = [r, p, q];
    const [bx, by, cx, cy] = [x[q] - x[p], y[q] - y[p], x[r] - x[p], y[r] - y[p]];
    const twice = 2 * (bx * cy - by * cx);
    const bb = bx * bx + by * by;
    const cc = cx * cx + cy * cy;
    const ux = (cy * bb - by * cc) / twice - bx / 2; // from the side's middle to the circumcentre
    const uy = (bx * cc - cx * bb) / twice - by / 2;
    const mx = x[p] + bx / 2;
    const my = y[p] + by / 2;
    const far = Math.sqrt(ux * ux + uy * uy);
    const length = Math.sqrt(bb);
    const wanted = Math.max(this.#field.sizeAt(mx, my) / Math.sqrt(3), length / 2);
    const cap = (length * length * 0.25 + far * far) / (2 * far);
    const radius = Math.min(wanted, cap);
    const half2 = radius * radius - length * length * 0.25;
    const reach = Math.min(far, radius + Math.sqrt(Math.max(half2, 0)), length * offCentreReach);
    const scale = far > 0 ? reach / far : 0;
    this.#px = mx + ux * scale;
    this.#py = my + uy * scale;
  }

  // Ends of the cavity's segments that see the vertex under more than 120 degrees.
  #listEncroached(v: number): number[] {
    const { rim, rimCount, x, y } = this.#mesh;
    const found: number[] = [];
    for (let i = 0; i < rimCount; i++) {
      if (rim[6 * i + 4] < 0) continue;
      const a = rim[6 * i];
      const b = rim[6 * i + 1];
      const [ax, ay, bx, by] = [x[a] - x[v], y[a] - y[v], x[b] - x[v], y[b] - y[v]];
      const dot = ax * bx + ay * by;
      if (dot < 0 && 4 * dot * dot > (ax * ax + ay * ay) * (bx * bx + by * by)) found.push(a, b);
    }
    return found;
  }

  #splitSide(side: number): boolean {
    const a = this.#mesh.corners[side];
    const b = this.#mesh.corners[side % 3 === 2 ? side - 2 : side + 1];
    return this.#splitEdgeMiddle(a, b);
  }

  // Halves an edge of a segment; next to a sharp corner at a power of two from it, so that neighbours keep step.
  #splitEdgeMiddle(a: number, b: number): boolean {
    const { x, y } = this.#mesh;
    const length = Math.sqrt(squaredLength(x, y, a, b));
    if (length < 2 * this.#limits.floor || length < 4 * this.#ground.snap) return false;
    let t = 0.5;
    const sharpA = a < this.#sharp.length && this.#sharp[a] === 1;
    const sharpB = b < this.#sharp.length && this.#sharp[b] === 1;
    if (sharpA !== sharpB) {
      const shell = Math.pow(2, Math.round(Math.log2(length / 2 / this.#ground.size))) * this.#ground.size;
      t = Math.min(0.75, Math.max(0.25, shell / length));
      if (sharpB) t = 1 - t;
    }
    return this.#splitEdge(a, b, x[a] + t * (x[b] - x[a]), y[a] + t * (y[b] - y[a])) >= 0;
  }

  #splitEdge(a: number, b: number, px: number, py: number): number {
    const mesh = this.#mesh;
    let side = findSide(mesh, a, b);
    if (side < 0) side = findSide(mesh, b, a);
    if (side < 0) return -1;
    const segment = mesh.segments[side];
    const v = mesh.addVertex(px, py);
    if (!mesh.gatherCavity(v, (side / 3) | 0, side)) {
      mesh.vertexCount--;
      return -1;
    }
    mesh.fillCavity(v, { segment, a, b });
    this.segmentOf[v] = segment;
    this.#judgeCreated();
    return v;
  }

  #judgeCreated(): void {
    if (!this.#running) return;
    for (let i = 0; i < this.#mesh.createdCount; i++) this.#judge(this.#mesh.created[i]);
  }
}

function squaredLength(x: Float64Array, y: Float64Array, a: number, b: number): number {
  const dx = x[b] - x[a];
  const dy = y[b] - y[a];
  return dx * dx + dy * dy;
}

function commonEnd({ starts, ends }: Ground, p: number, q: number): number {
  if (starts[p] === starts[q] || starts[p] === ends[q]) return starts[p];
  if (ends[p] === starts[q] || ends[p] === ends[q]) return ends[p];
  return -1;
}
