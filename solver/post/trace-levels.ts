// Contour lines on the elements themselves. Tracing a field resampled on a grid would smear it across barriers and blunt it
// at tips; here lines end where the ground ends, since the faces of a barrier have nodes of their own.
import type { Mesh } from '../mesh/mesh';

/** Polylines packed flat: line i is points `offsets[i] … offsets[i + 1] − 1`. */
export interface LevelLines {
  /** x, y pairs, metres. */
  readonly points: Float64Array;
  /** Length lines + 1. */
  readonly offsets: Int32Array;
  /** Level of each line. */
  readonly values: Float64Array;
}

/** Corners of the linear triangles that a tri6 divides into: corner pieces, then the middle. */
const quadraticParts = [0, 3, 5, 3, 1, 4, 5, 4, 2, 3, 4, 5];
const linearParts = [0, 1, 2];

/**
 * Traces contour lines of a nodal field.
 *
 * Each tri6 is divided in four through its midsides; a line crosses the sides of the parts exactly where the quadratic field
 * has the level, so that only its curvature within a part is straightened. A node at the level
 * counts as above it, which rules out branches. Higher values lie to the left of each line's direction.
 *
 * @param mesh - The mesh.
 * @param nodal - One value a node.
 * @param levels - Values to trace.
 * @returns Lines grouped by level in the order given; open ones before closed ones, whose first point is repeated at the end.
 */
export function traceLevels(mesh: Mesh, nodal: Float64Array, levels: readonly number[]): LevelLines {
  const points: number[] = [];
  const offsets: number[] = [0];
  const values: number[] = [];
  const finder = new CrossingFinder(mesh, nodal);
  const ranges = findRanges(mesh, nodal);
  for (const level of levels) {
    const segments = finder.collect(level, ranges);
    for (const chain of joinSegments(segments)) {
      const before = points.length;
      for (const key of chain) {
        const [x, y] = finder.place(key, level);
        const n = points.length;
        if (n > before && points[n - 2] === x && points[n - 1] === y) continue;
        points.push(x, y);
      }
      if (points.length - before < 4) points.length = before;
      else {
        offsets.push(points.length / 2);
        values.push(level);
      }
    }
  }
  return {
    points: Float64Array.from(points),
    offsets: Int32Array.from(offsets),
    values: Float64Array.from(values),
  };
}

// Least and greatest nodal value of each element.
function findRanges({ elementCount, elements, order }: Mesh, nodal: Float64Array): Float64Array {
  const stride = order === 1 ? 3 : 6;
  const ranges = new Float64Array(2 * elementCount);
  for (let e = 0; e < elementCount; e++) {
    let [low, high] = [Infinity, -Infinity];
    for (let a = 0; a < stride; a++) {
      const value = nodal[elements[stride * e + a]];
      if (value < low) low = value;
      if (value > high) high = value;
    }
    ranges[2 * e] = low;
    ranges[2 * e + 1] = high;
  }
  return ranges;
}

/** A directed piece of a line, from one crossed edge of the parts to another. */
interface Segment {
  readonly from: number;
  readonly to: number;
}

class CrossingFinder {
  readonly #mesh: Mesh;
  readonly #nodal: Float64Array;
  /** Value halfway along an edge of a part, by its key: with it the crossing of a quadratic is exact. */
  readonly #halfway = new Map<number, number>();

  constructor(mesh: Mesh, nodal: Float64Array) {
    this.#mesh = mesh;
    this.#nodal = nodal;
  }

  collect(level: number, ranges: Float64Array): Segment[] {
    const { elementCount, elements, order } = this.#mesh;
    const stride = order === 1 ? 3 : 6;
    const parts = order === 1 ? linearParts : quadraticParts;
    const segments: Segment[] = [];
    for (let e = 0; e < elementCount; e++) {
      if (!(ranges[2 * e] < level && level <= ranges[2 * e + 1])) continue;
      for (let p = 0; p < parts.length; p += 3) {
        this.#crossPart(
          level,
          [
            elements[stride * e + parts[p]],
            elements[stride * e + parts[p + 1]],
            elements[stride * e + parts[p + 2]],
          ],
          segments,
        );
      }
      if (order === 2) this.#noteHalfways(e);
    }
    return segments;
  }

  // Where the field has the level on an edge of a part.
  place(key: number, level: number): [number, number] {
    const { nodeCount, coordinates } = this.#mesh;
    const a = Math.floor(key / nodeCount);
    const b = key - a * nodeCount;
    const t = this.#placeBetween(a, b, key, level);
    return [
      coordinates[2 * a] + t * (coordinates[2 * b] - coordinates[2 * a]),
      coordinates[2 * a + 1] + t * (coordinates[2 * b + 1] - coordinates[2 * a + 1]),
    ];
  }

  #placeBetween(a: number, b: number, key: number, level: number): number {
    const va = this.#nodal[a] - level;
    const vb = this.#nodal[b] - level;
    const middle = this.#halfway.get(key);
    const linear = va / (va - vb);
    if (middle === undefined) return linear;
    // f(t) = va + slope t + curvature t², of opposite signs at 0 and 1: one root between.
    const curvature = 2 * (va + vb - 2 * (middle - level));
    const slope = vb - va - curvature;
    const root = Math.sqrt(Math.max(0, slope * slope - 4 * curvature * va));
    const q = -(slope + (slope < 0 ? -root : root)) / 2;
    const inside = [va / q, q / curvature].find((t) => t >= 0 && t <= 1);
    return inside ?? linear;
  }

  #noteHalfways(e: number): void {
    const nodes = Array.from(this.#mesh.elements.subarray(6 * e, 6 * e + 6));
    const value = nodes.map((n) => this.#nodal[n]);
    for (let s = 0; s < 3; s++) {
      const [next, last] = [(s + 1) % 3, (s + 2) % 3];
      const [start, middle, end] = [value[s], value[3 + s], value[next]];
      this.#halfway.set(this.#keyOf(nodes[s], nodes[3 + s]), (3 * start + 6 * middle - end) / 8);
      this.#halfway.set(this.#keyOf(nodes[3 + s], nodes[next]), (3 * end + 6 * middle - start) / 8);
      // Between the midsides on both hands of corner s the shape functions are −⅛, −⅛ at the other corners, ½, ½, ¼ at midsides.
      const inner =
        (value[3 + s] + value[3 + last]) / 2 + value[3 + next] / 4 - (value[next] + value[last]) / 8;
      this.#halfway.set(this.#keyOf(nodes[3 + s], nodes[3 + last]), inner);
    }
  }

  #keyOf(a: number, b: number): number {
    return a < b ? a * this.#mesh.nodeCount + b : b * this.#mesh.nodeCount + a;
  }

  #crossPart(level: number, nodes: readonly [number, number, number], out: Segment[]): void {
    const [p, q, r] = nodes;
    const above = (n: number): boolean => this.#nodal[n] >= level;
    const [a, b, c] = [above(p), above(q), above(r)];
    if (a === b && b === c) return;
    // Turn the part until its first node stands alone.
    const [one, two, three] = b === c ? [p, q, r] : a === c ? [q, r, p] : [r, p, q];
    const leaving = this.#keyOf(one, two);
    const entering = this.#keyOf(one, three);
    // Counter-clockwise one, two, three: from edge one–two to edge one–three the lone node lies to the left.
    out.push(above(one) ? { from: leaving, to: entering } : { from: entering, to: leaving });
  }
}

// Chains of edge keys: open ones first, then closed ones, each in the order of its first segment.
function joinSegments(segments: readonly Segment[]): number[][] {
  const next = new Map<number, number>();
  const entered = new Set<number>();
  for (const { from, to } of segments) {
    next.set(from, to);
    entered.add(to);
  }
  const chains: number[][] = [];
  const follow = (start: number): void => {
    const chain = [start];
    for (let at = next.get(start); at !== undefined; at = next.get(at)) {
      next.delete(chain[chain.length - 1]);
      chain.push(at);
      if (at === start) break;
    }
    chains.push(chain);
  };
  for (const { from } of segments) if (!entered.has(from)) follow(from);
  for (const { from } of segments) if (next.has(from)) follow(from);
  return chains;
}
