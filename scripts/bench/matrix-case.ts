import { readFileSync } from 'node:fs';
import {
  analyze,
  type CscMatrix,
  factorize,
  multiply,
  order,
  readMatrixMarket,
  reserveFactor,
  solve,
} from '@/solver';
import { quantile } from './timing';

/** Orders, analyzes, factorizes and solves a symmetric positive definite matrix in Matrix Market form. */
export function matrix([file]: string[]): object {
  const matrix = readMatrix(file!);
  const rhs = Float64Array.from({ length: matrix.size }, (_, i) => Math.sin(i + 1));
  const x = new Float64Array(matrix.size);
  const times = { order: [] as number[], factorize: [] as number[], solve: [] as number[] };
  let nonzeros = 0;
  const symbolic0 = analyze(matrix, order(matrix));
  const memory = reserveFactor(symbolic0);
  for (let i = 0; i < 9; i++) {
    const t0 = performance.now();
    const symbolic = analyze(matrix, order(matrix));
    const t1 = performance.now();
    const outcome = factorize(symbolic, matrix.values, memory);
    if (outcome.status !== 'factorized')
      throw new RangeError(`The matrix is not positive definite (row ${outcome.row + 1}).`);
    const t2 = performance.now();
    solve(outcome.factor, rhs, x);
    const t3 = performance.now();
    nonzeros = symbolic.factorNonzeros;
    if (i < 2) continue;
    times.order.push((t1 - t0) / 1000);
    times.factorize.push((t2 - t1) / 1000);
    times.solve.push((t3 - t2) / 1000);
  }
  const [orderSeconds, factorizeSeconds, solveSeconds] = [times.order, times.factorize, times.solve].map(
    (t) => quantile(t, 0.5),
  );
  return {
    seconds: orderSeconds! + factorizeSeconds! + solveSeconds!,
    unknowns: matrix.size,
    orderSeconds,
    factorizeSeconds,
    solveSeconds,
    residual: residualOf(matrix, x, rhs),
    factorNonzeros: nonzeros,
  };
}

function readMatrix(file: string): CscMatrix {
  let text: string;
  try {
    text = readFileSync(file, 'utf8');
  } catch (error) {
    throw new RangeError(`“${file}” cannot be read: ${(error as NodeJS.ErrnoException).code}.`, {
      cause: error,
    });
  }
  const read = readMatrixMarket(text);
  if (read.status !== 'read') throw new RangeError(`“${file}”, line ${read.line}: ${read.reason}.`);
  return read.matrix;
}

function residualOf(matrix: CscMatrix, x: Float64Array, rhs: Float64Array): number {
  const product = new Float64Array(matrix.size);
  multiply(matrix, x, product);
  let difference = 0;
  let norm = 0;
  for (let i = 0; i < rhs.length; i++) {
    difference += (product[i]! - rhs[i]!) ** 2;
    norm += rhs[i]! ** 2;
  }
  return Math.sqrt(difference / norm);
}
