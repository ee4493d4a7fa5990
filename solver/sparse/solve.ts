import type { NumericFactor } from './factorize';

/**
 * Solves A x = b by forward and back substitution.
 *
 * @param factor - From `factorize`.
 * @param rhs - b, length `size`; unchanged.
 * @param out - Receives x, length `size`; may be `rhs` itself.
 */
export function solve(factor: NumericFactor, rhs: Float64Array, out: Float64Array): void {
  const { permutation, size } = factor.symbolic;
  const work = new Float64Array(size);
  for (let k = 0; k < size; k++) work[k] = rhs[permutation[k]];
  forward(factor, work);
  backward(factor, work);
  for (let k = 0; k < size; k++) out[permutation[k]] = work[k];
}

function forward({ symbolic, panels }: NumericFactor, work: Float64Array): void {
  const { supernodeCount, supernodeStart, below, belowStart, panelStart } = symbolic;
  for (let s = 0; s < supernodeCount; s++) {
    const from = supernodeStart[s];
    const own = supernodeStart[s + 1] - from;
    const base = belowStart[s];
    const rest = belowStart[s + 1] - base;
    for (let j = 0; j < own; j++) {
      const column = panelStart[s] + j * (own + rest);
      const x = work[from + j] / panels[column + j];
      work[from + j] = x;
      for (let i = j + 1; i < own; i++) work[from + i] -= panels[column + i] * x;
      for (let i = 0; i < rest; i++) work[below[base + i]] -= panels[column + own + i] * x;
    }
  }
}

function backward({ symbolic, panels }: NumericFactor, work: Float64Array): void {
  const { supernodeCount, supernodeStart, below, belowStart, panelStart } = symbolic;
  for (let s = supernodeCount - 1; s >= 0; s--) {
    const from = supernodeStart[s];
    const own = supernodeStart[s + 1] - from;
    const base = belowStart[s];
    const rest = belowStart[s + 1] - base;
    for (let j = own - 1; j >= 0; j--) {
      const column = panelStart[s] + j * (own + rest);
      let sum = work[from + j];
      for (let i = j + 1; i < own; i++) sum -= panels[column + i] * work[from + i];
      for (let i = 0; i < rest; i++) sum -= panels[column + own + i] * work[below[base + i]];
      work[from + j] = sum / panels[column + j];
    }
  }
}
