// What the screen draws: made beside the result in the worker, as transferable arrays.

/** Polylines packed flat: line i is points `offsets[i] … offsets[i + 1] − 1`. */
export interface Lines {
  /** x, y pairs, metres. */
  readonly points: Float64Array;
  readonly offsets: Int32Array;
  /** One value a line. */
  readonly values: Float64Array;
}

/** Nodal fields of one situation on its mesh. */
export interface SituationFields {
  readonly situation: string;
  readonly order: 1 | 2;
  /** x, y pairs, metres. */
  readonly coordinates: Float64Array;
  /** Stride 3 or 6, corners first, see solver/mesh/mesh.ts. */
  readonly elements: Int32Array;
  /** Index into the document's materials. */
  readonly elementMaterials: Int32Array;
  /** Total head, m, per node. */
  readonly heads: Float64Array;
  /** Recovered ∂h/∂x, ∂h/∂y per element corner, length 6 * elementCount (discontinuous across materials); empty in a live answer. */
  readonly cornerGradients: Float64Array;
  /** Stream function per node, 0 … discharge; null where none exists. */
  readonly streamFunction: Float64Array | null;
  readonly equipotentials: Lines;
  /** Seepage paths between equal channels; the last channel is fractional. */
  readonly seepagePaths: Lines;
  /** Lowest and highest head, m. */
  readonly headRange: readonly [number, number];
  /** Water pressure along each structure's base and outward flow along each edge stand in the result document. */
}
