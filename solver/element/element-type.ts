/** Shape functions of one kind of element on its parent. */
export interface ElementType {
  readonly nodeCount: 3 | 6;
  /** Degree of the shape functions. */
  readonly degree: 1 | 2;
  /** Fills `N` (length `nodeCount`) at (xi, eta). */
  shapeFunctions(xi: number, eta: number, N: Float64Array): void;
  /** Fills `dN` with ∂N/∂xi, ∂N/∂eta per node (length `2 * nodeCount`). */
  shapeGradients(xi: number, eta: number, dN: Float64Array): void;
}
