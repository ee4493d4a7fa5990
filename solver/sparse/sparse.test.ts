import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyze } from './analyze';
import { type CscMatrix, multiply } from './csc-matrix';
import { factorize, reserveFactor } from './factorize';
import { order } from './order';
import { solve } from './solve';

/** A symmetric, diagonally dominant matrix with the given off-diagonal pairs. */
function fromPairs(size: number, pairs: readonly (readonly [number, number, number])[]): CscMatrix {
  const columns = Array.from({ length: size }, () => new Map<number, number>());
  const sums = new Float64Array(size);
  for (const [a, b, value] of pairs) {
    if (a === b) continue;
    const row = Math.max(a, b);
    const column = Math.min(a, b);
    if (columns[column]!.has(row)) continue;
    columns[column]!.set(row, -value);
    sums[row]! += value;
    sums[column]! += value;
  }
  const columnPointers = new Int32Array(size + 1);
  const rowIndices: number[] = [];
  const values: number[] = [];
  columns.forEach((entries, column) => {
    rowIndices.push(column);
    values.push(sums[column]! + 0.1 + column / size);
    for (const [row, value] of [...entries].sort((x, y) => x[0] - y[0])) {
      rowIndices.push(row);
      values.push(value);
    }
    columnPointers[column + 1] = rowIndices.length;
  });
  return { size, columnPointers, rowIndices: Int32Array.from(rowIndices), values: Float64Array.from(values) };
}

function grid(width: number, height: number): CscMatrix {
  const pairs: [number, number, number][] = [];
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      if (x + 1 < width) pairs.push([y * width + x, y * width + x + 1, 1]);
      if (y + 1 < height) pairs.push([y * width + x, (y + 1) * width + x, 1]);
    }
  }
  return fromPairs(width * height, pairs);
}

function toDense(matrix: CscMatrix): Matrix {
  const dense = Matrix.zeros(matrix.size, matrix.size);
  for (let column = 0; column < matrix.size; column++) {
    for (let p = matrix.columnPointers[column]!; p < matrix.columnPointers[column + 1]!; p++) {
      dense.set(matrix.rowIndices[p]!, column, matrix.values[p]!);
      dense.set(column, matrix.rowIndices[p]!, matrix.values[p]!);
    }
  }
  return dense;
}

function solveAll(matrix: CscMatrix, rhs: Float64Array): Float64Array {
  const outcome = factorize(analyze(matrix, order(matrix)), matrix.values);
  if (outcome.status !== 'factorized') throw new RangeError(`stopped at ${outcome.row}`);
  const x = new Float64Array(matrix.size);
  solve(outcome.factor, rhs, x);
  return x;
}

const randomMatrix = fc.integer({ min: 1, max: 60 }).chain((size) =>
  fc
    .array(fc.tuple(fc.nat(size - 1), fc.nat(size - 1), fc.double({ min: 0.01, max: 10, noNaN: true })), {
      maxLength: 4 * size,
    })
    .map((pairs) => fromPairs(size, pairs)),
);

describe('sparse Cholesky', () => {
  it('orders every row exactly once', () => {
    fc.assert(
      fc.property(randomMatrix, (matrix) => {
        expect([...order(matrix)].sort((a, b) => a - b)).toEqual(
          Array.from({ length: matrix.size }, (_, i) => i),
        );
      }),
    );
  });

  it('agrees with the dense Cholesky of ml-matrix', () => {
    fc.assert(
      fc.property(randomMatrix, (matrix) => {
        const rhs = Float64Array.from({ length: matrix.size }, (_, i) => Math.sin(i + 1));
        const expected = new CholeskyDecomposition(toDense(matrix))
          .solve(Matrix.columnVector([...rhs]))
          .to1DArray();
        const actual = solveAll(matrix, rhs);
        expected.forEach((value, i) => expect(actual[i]).toBeCloseTo(value, 9));
      }),
      { numRuns: 300 },
    );
  });

  it.each([
    [7, 5],
    [40, 40],
    [200, 30],
  ])('solves a %i by %i grid to a residual of 1e-12', (width, height) => {
    const matrix = grid(width, height);
    const rhs = Float64Array.from({ length: matrix.size }, (_, i) => Math.cos(i));
    const x = solveAll(matrix, rhs);
    const product = new Float64Array(matrix.size);
    multiply(matrix, x, product);
    expect(Math.max(...product.map((value, i) => Math.abs(value - rhs[i]!)))).toBeLessThan(1e-12);
  });

  it('fills a square grid no more than twice as much as the n log n of nested dissection', () => {
    // George (1973), SIAM J. Numer. Anal. 10: 31 n² log2(n) / 4 + O(n²) entries for an n by n grid
    const n = 100;
    const matrix = grid(n, n);
    const { factorNonzeros } = analyze(matrix, order(matrix));
    expect(factorNonzeros).toBeLessThan((2 * 31 * n * n * Math.log2(n)) / 4);
  });

  it('names the row at which a matrix is not positive definite', () => {
    const matrix = fromPairs(3, [
      [0, 1, 1],
      [1, 2, 1],
    ]);
    matrix.values[0] = -1;
    expect(factorize(analyze(matrix, order(matrix)), matrix.values)).toEqual({
      status: 'not-positive-definite',
      row: 0,
    });
  });

  it('makes L with L Lᵀ = P A Pᵀ', () => {
    fc.assert(
      fc.property(randomMatrix, (matrix) => {
        const outcome = factorize(analyze(matrix, order(matrix)), matrix.values);
        if (outcome.status !== 'factorized') throw new RangeError(`stopped at ${outcome.row}`);
        const { panels, symbolic } = outcome.factor;
        const { permutation, supernodeStart, belowStart, below, panelStart } = symbolic;
        const lower = Matrix.zeros(matrix.size, matrix.size);
        for (let s = 0; s < symbolic.supernodeCount; s++) {
          const own = supernodeStart[s + 1]! - supernodeStart[s]!;
          const height = own + belowStart[s + 1]! - belowStart[s]!;
          for (let j = 0; j < own; j++) {
            for (let i = j; i < height; i++) {
              const row = i < own ? supernodeStart[s]! + i : below[belowStart[s]! + i - own]!;
              lower.set(row, supernodeStart[s]! + j, panels[panelStart[s]! + j * height + i]!);
            }
          }
        }
        const product = lower.mmul(lower.transpose());
        const dense = toDense(matrix);
        for (let a = 0; a < matrix.size; a++) {
          for (let b = 0; b < matrix.size; b++) {
            expect(product.get(a, b)).toBeCloseTo(dense.get(permutation[a]!, permutation[b]!), 10);
          }
        }
      }),
    );
  });

  it('gives the same bits again, in reserved memory too', () => {
    const matrix = grid(40, 30);
    const rhs = Float64Array.from({ length: matrix.size }, (_, i) => Math.sin(i));
    const symbolic = analyze(matrix, order(matrix));
    const memory = reserveFactor(symbolic);
    const run = (values: Float64Array): Float64Array => {
      const outcome = factorize(symbolic, values, memory);
      const x = new Float64Array(matrix.size);
      if (outcome.status === 'factorized') solve(outcome.factor, rhs, x);
      return x;
    };
    const first = run(matrix.values);
    run(matrix.values.map((v) => 3 * v));
    expect(run(matrix.values)).toEqual(first);
    expect(solveAll(matrix, rhs)).toEqual(first);
  });

  it('takes an empty matrix, and refuses one with not-a-number on its diagonal', () => {
    const empty = fromPairs(0, []);
    expect(solveAll(empty, new Float64Array(0))).toHaveLength(0);
    const matrix = fromPairs(4, [
      [0, 1, 1],
      [2, 3, 1],
    ]);
    matrix.values[matrix.columnPointers[2]!] = NaN;
    expect(factorize(analyze(matrix, order(matrix)), matrix.values)).toMatchObject({
      status: 'not-positive-definite',
    });
  });
});
