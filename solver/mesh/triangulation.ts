// A growing triangulation in flat arrays: location by walking, insertion by cavity (Bowyer 1981, Watson 1981).
import { inCircle, orient } from '../geometry/predicates';

/** Triangles with neighbours; side `s` of a triangle joins its corners `s` and `(s + 1) % 3`. */
export class Triangulation {
  vertexCount = 0;
  triangleCount = 0;
  x: Float64Array;
  y: Float64Array;
  /** Some triangle at each vertex, −1 where none. */
  triangleAt: Int32Array;
  /** Counter-clockwise, stride 3. */
  corners: Int32Array;
  /** Triangle across each side, stride 3, −1 on the hull. */
  neighbours: Int32Array;
  /** Segment lying on each side, stride 3, −1 where none: the side is then free to change. */
  segments: Int32Array;
  /** Material of each triangle. */
  materials: Int32Array;
  /** Raised whenever a triangle's slot is filled anew. */
  generations: Int32Array;
  /** Triangles made by the last insertion. */
  created: Int32Array = new Int32Array(64);
  createdCount = 0;
  /** Sides round the last cavity: first and second vertex (cavity to the left), triangle and side across, segment, owner. */
  rim: Int32Array = new Int32Array(6 * 64);
  rimCount = 0;

  #cavity = new Int32Array(64);
  #cavityCount = 0;
  #marks: Int32Array; // per triangle: the cavity it was last taken into
  #mark = 0;
  #spokes: Int32Array; // per vertex: the new triangle whose rim side starts there
  #spokeMarks: Int32Array;

  /**
   * Makes an empty triangulation.
   *
   * @param capacity - Vertices expected; it grows as needed.
   */
  constructor(capacity: number) {
    const vertices = Math.max(16, capacity);
    this.x = new Float64Array(vertices);
    this.y = new Float64Array(vertices);
    this.triangleAt = new Int32Array(vertices).fill(-1);
    this.#spokes = new Int32Array(vertices);
    this.#spokeMarks = new Int32Array(vertices);
    this.corners = new Int32Array(6 * vertices);
    this.neighbours = new Int32Array(6 * vertices);
    this.segments = new Int32Array(6 * vertices);
    this.materials = new Int32Array(2 * vertices);
    this.generations = new Int32Array(2 * vertices);
    this.#marks = new Int32Array(2 * vertices);
  }

  /**
   * Adds a vertex that no triangle uses yet.
   *
   * @param x - metres
   * @param y - metres
   * @returns Its index.
   */
  addVertex(x: number, y: number): number {
    const v = this.vertexCount++;
    if (v === this.x.length) {
      this.x = grow(this.x);
      this.y = grow(this.y);
      this.triangleAt = grow(this.triangleAt);
      this.#spokes = grow(this.#spokes);
      this.#spokeMarks = grow(this.#spokeMarks);
    }
    this.x[v] = x;
    this.y[v] = y;
    this.triangleAt[v] = -1;
    return v;
  }

  /**
   * Adds an unconnected triangle.
   *
   * @param a - First corner.
   * @param b - Second corner, counter-clockwise.
   * @param c - Third corner.
   * @returns Its index.
   */
  addTriangle(a: number, b: number, c: number): number {
    const t = this.triangleCount++;
    if (t === this.materials.length) {
      this.corners = grow(this.corners);
      this.neighbours = grow(this.neighbours);
      this.segments = grow(this.segments);
      this.materials = grow(this.materials);
      this.generations = grow(this.generations);
      this.#marks = grow(this.#marks);
    }
    this.#marks[t] = 0;
    this.#setTriangle(t, a, b, c);
    this.neighbours.fill(-1, 3 * t, 3 * t + 3);
    return t;
  }

  #setTriangle(t: number, a: number, b: number, c: number): void {
    const { corners, segments } = this;
    corners[3 * t] = a;
    corners[3 * t + 1] = b;
    corners[3 * t + 2] = c;
    segments[3 * t] = segments[3 * t + 1] = segments[3 * t + 2] = -1;
    this.triangleAt[a] = this.triangleAt[b] = this.triangleAt[c] = t;
    this.generations[t]++;
  }

  /**
   * Walks towards a point, round segments where it can, never across one.
   *
   * @param px - x of the point.
   * @param py - y of the point.
   * @param start - Triangle to start from.
   * @returns The triangle that contains it, or −1 − (3 t + s) where side s of triangle t bars the way.
   */
  walkTo(px: number, py: number, start: number): number {
    const { x, y, corners, neighbours, segments } = this;
    let t = start;
    let from = -1;
    for (let steps = 0; steps <= this.triangleCount; steps++) {
      let next = -1;
      let barred = -1;
      for (let s = 0; s < 3 && next < 0; s++) {
        const side = 3 * t + s;
        if (neighbours[side] === from && from >= 0) continue;
        const a = corners[side];
        const b = corners[s === 2 ? 3 * t : side + 1];
        if (orient(x[a], y[a], x[b], y[b], px, py) >= 0) continue;
        if (segments[side] >= 0 || neighbours[side] < 0) barred = side;
        else next = neighbours[side];
      }
      if (next < 0) return barred < 0 ? t : -1 - barred;
      from = t;
      t = next;
    }
    return this.#searchAll(px, py);
  }

  // Constrained triangulations can, in principle, send a walk in circles.
  #searchAll(px: number, py: number): number {
    for (let t = 0; t < this.triangleCount; t++) {
      let inside = true;
      for (let s = 0; s < 3 && inside; s++) inside = this.#sees(3 * t + s, px, py);
      if (inside) return t;
    }
    return -1;
  }

  #sees(side: number, px: number, py: number): boolean {
    const a = this.corners[side];
    const b = this.corners[side % 3 === 2 ? side - 2 : side + 1];
    return orient(this.x[a], this.y[a], this.x[b], this.y[b], px, py) >= 0;
  }

  /**
   * Gathers the cavity of a vertex: the triangles whose circle holds it, up to segments; fills `rim`.
   *
   * @param v - The vertex, not yet connected.
   * @param seed - The triangle that contains it.
   * @param across - A side (3 t + s) of `seed` on which the vertex lies, −1 where inside; a segment there is opened.
   * @returns False where no star-shaped cavity exists (a degenerate place): nothing was changed.
   */
  gatherCavity(v: number, seed: number, across = -1): boolean {
    this.#mark += 2; // mark − 1 bars a triangle from this cavity
    const barred: number[] = [];
    for (let attempt = 0; attempt < 16; attempt++) {
      this.#collect(v, seed, across);
      const bad = this.#findHiddenRim(v);
      if (bad < 0) return this.rimCount >= this.#cavityCount;
      if (bad === seed || (across >= 0 && bad === this.neighbours[across])) return false;
      barred.push(bad);
      for (let i = 0; i < this.#cavityCount; i++) this.#marks[this.#cavity[i]] = 0;
      for (const t of barred) this.#marks[t] = this.#mark - 1;
    }
    return false;
  }

  #collect(v: number, seed: number, across: number): void {
    const { x, y, corners, neighbours, segments } = this;
    const mark = this.#mark;
    this.#cavityCount = 0;
    this.rimCount = 0;
    this.#take(seed);
    const opposite = across >= 0 ? neighbours[across] : -1;
    if (opposite >= 0) this.#take(opposite);
    for (let i = 0; i < this.#cavityCount; i++) {
      const t = this.#cavity[i];
      for (let s = 0; s < 3; s++) {
        const side = 3 * t + s;
        if (side === across) continue;
        const n = neighbours[side];
        if (n >= 0 && (segments[side] < 0 || (t === opposite && n === seed))) {
          if (this.#marks[n] === mark) continue;
          if (
            this.#marks[n] !== mark - 1 &&
            inCircle(x, y, corners[3 * n], corners[3 * n + 1], corners[3 * n + 2], v) > 0
          ) {
            this.#take(n);
            continue;
          }
        }
        this.#addRim(side, n, t);
      }
    }
  }

  #take(t: number): void {
    if (this.#cavityCount === this.#cavity.length) this.#cavity = grow(this.#cavity);
    this.#cavity[this.#cavityCount++] = t;
    this.#marks[t] = this.#mark;
  }

  #addRim(side: number, n: number, owner: number): void {
    if (6 * this.rimCount === this.rim.length) this.rim = grow(this.rim);
    const at = 6 * this.rimCount++;
    const b = this.corners[side % 3 === 2 ? side - 2 : side + 1];
    this.rim[at] = this.corners[side];
    this.rim[at + 1] = b;
    this.rim[at + 2] = n;
    this.rim[at + 3] = n < 0 ? -1 : this.sideFrom(n, b);
    this.rim[at + 4] = this.segments[side];
    this.rim[at + 5] = owner;
  }

  // The owner of a rim side that the vertex does not see, −1 where it sees all.
  #findHiddenRim(v: number): number {
    const { x, y, rim } = this;
    for (let i = 0; i < this.rimCount; i++) {
      const a = rim[6 * i];
      const b = rim[6 * i + 1];
      if (orient(x[a], y[a], x[b], y[b], x[v], y[v]) <= 0) return rim[6 * i + 5];
    }
    return -1;
  }

  /**
   * Finds the side of a triangle that starts at a vertex.
   *
   * @param t - The triangle.
   * @param v - One of its corners.
   * @returns 0, 1 or 2.
   */
  sideFrom(t: number, v: number): number {
    return this.corners[3 * t] === v ? 0 : this.corners[3 * t + 1] === v ? 1 : 2;
  }

  /**
   * Fills the cavity last gathered with triangles round the vertex; `created` lists them.
   *
   * @param v - The vertex.
   * @param split - A segment the vertex splits, with its two ends; its halves become sides of the new triangles.
   */
  fillCavity(v: number, split?: { segment: number; a: number; b: number }): void {
    const { rim } = this;
    this.createdCount = this.rimCount;
    while (this.created.length < this.rimCount) this.created = grow(this.created);
    const stamp = ++this.#fills;
    const materials = new Array<number>(this.rimCount);
    for (let i = 0; i < this.rimCount; i++) materials[i] = this.materials[rim[6 * i + 5]];
    for (let i = 0; i < this.rimCount; i++) {
      const a = rim[6 * i];
      const b = rim[6 * i + 1];
      const t = i < this.#cavityCount ? this.#cavity[i] : this.addTriangle(a, b, v);
      if (i < this.#cavityCount) this.#setTriangle(t, a, b, v);
      this.created[i] = t;
      this.materials[t] = materials[i];
      this.segments[3 * t] = rim[6 * i + 4];
      const n = rim[6 * i + 2];
      this.neighbours[3 * t] = n;
      if (n >= 0) this.neighbours[3 * n + rim[6 * i + 3]] = t;
      this.#spokes[a] = t;
      this.#spokeMarks[a] = stamp;
      this.neighbours[3 * t + 1] = this.neighbours[3 * t + 2] = -1;
    }
    for (let i = 0; i < this.rimCount; i++) {
      const t = this.created[i];
      const b = rim[6 * i + 1];
      if (this.#spokeMarks[b] === stamp) {
        this.neighbours[3 * t + 1] = this.#spokes[b];
        this.neighbours[3 * this.#spokes[b] + 2] = t;
      }
      if (!split) continue;
      if (b === split.a || b === split.b) this.segments[3 * t + 1] = split.segment;
      if (rim[6 * i] === split.a || rim[6 * i] === split.b) this.segments[3 * t + 2] = split.segment;
    }
  }

  #fills = 0;
}

// The same array with twice the room.
function grow<T extends Float64Array | Int32Array>(array: T): T {
  const larger = new (array.constructor as new (length: number) => T)(2 * array.length);
  larger.set(array as never);
  return larger;
}
