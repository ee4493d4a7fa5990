/** A symmetric matrix, its lower triangle by columns; rows ascend within a column and the diagonal comes first. */
export interface CscMatrix {
  readonly size: number;
  /** Length `size + 1`. */
  readonly columnPointers: Int32Array;
  /** Row of each entry, `row >= column`. */
  readonly rowIndices: Int32Array;
  readonly values: Float64Array;
}

/** The pattern of a {@link CscMatrix}. */
export type SparsityPattern = Omit<CscMatrix, 'values'>;

/**
 * Multiplies a symmetric matrix with a vector.
 *
 * @param matrix - Lower triangle.
 * @param x - Length `size`.
 * @param out - Receives A x, length `size`.
 */
export function multiply(matrix: CscMatrix, x: Float64Array, out: Float64Array): void {
  const { size, columnPointers, rowIndices, values } = matrix;
  out.fill(0);
  for (let column = 0; column < size; column++) {
    const xc = x[column];
    let sum = 0;
    for (let p = columnPointers[column]; p < columnPointers[column + 1]; p++) {
      const row = rowIndices[p];
      out[row] += values[p] * xc;
      if (row !== column) sum += values[p] * x[row];
    }
    out[column] += sum;
  }
}
