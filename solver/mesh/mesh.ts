// The mesh as flat arrays. What it is made of is decided in arrange.ts and refine.ts; nothing here computes.

/** A conforming mesh of triangles; nodes on the two faces of a barrier are distinct. */
export interface Mesh {
  /** 1: corner nodes only (tri3). 2: corner and midside nodes (tri6). */
  readonly order: 1 | 2;
  readonly nodeCount: number;
  readonly elementCount: number;
  /** x, y of each node, metres, length `2 * nodeCount`. */
  readonly coordinates: Float64Array;
  /**
   * Nodes of each element. Stride 3 (order 1) or 6 (order 2): corners 0, 1, 2 counter-clockwise, then the
   * midsides of sides 0 (corner 0 to 1), 1 (corner 1 to 2), 2 (corner 2 to 0).
   */
  readonly elements: Int32Array;
  /** Material index of each element, length `elementCount`. */
  readonly elementMaterials: Int32Array;
  /**
   * Element across each side, length `3 * elementCount`; side `s` joins corners `s` and `(s + 1) % 3`.
   * −1 on the outline and across a barrier (use `barriers` to find the other face).
   */
  readonly neighbours: Int32Array;
  /** Element sides along each input line, in order along the path. */
  readonly edges: readonly LineSides[];
  /**
   * Both faces of each inner barrier piece, in order along the path. Pieces on the outline have no faces; a piece that
   * several barriers share is listed under the least conductive of them alone.
   */
  readonly barriers: readonly BarrierSides[];
  /**
   * Sides along each drain; one side is enough, its nodes are shared with the other. Where a barrier runs along the
   * drain the nodes differ, and both sides are listed, left before right.
   */
  readonly drains: readonly LineSides[];
  /** Sides along each base, ground side; where a base runs inside the ground both sides, left before right. */
  readonly bases: readonly LineSides[];
  /** Sides on the outline of the ground, all of them, ring after ring with the ground to the left. */
  readonly outline: LineSides;
  /** Smallest angle of any element, degrees. */
  readonly minAngle: number;
}

/** Element sides along one path. */
export interface LineSides {
  /** Element of each side. */
  readonly elements: Int32Array;
  /** Local side 0, 1, 2 of that element. */
  readonly sides: Int32Array;
  /**
   * +1 where the side, walked counter-clockwise round its element, runs along the path's direction; else −1.
   */
  readonly directions: Int8Array;
  /** Distance along the path at the side's start and end (in path direction), length `2 * count`, metres. */
  readonly distances: Float64Array;
}

/** The two faces of a barrier's inner part; face 0 lies to the left of the path's direction. */
export interface BarrierSides {
  readonly left: LineSides;
  readonly right: LineSides;
}
