// Numeric phase: multifrontal Cholesky, fronts written in place. Duff & Reid (1983), ACM TOMS 9:302–325.
import type { SymbolicFactor } from './analyze';

/** The factor's numbers; `panels` of supernode s start at `panelStart[s]`, column-major. */
export interface NumericFactor {
  readonly symbolic: SymbolicFactor;
  readonly panels: Float64Array;
}

/** Either the factor, or the row of the matrix at which it stops being positive definite. */
export type FactorizeOutcome =
  | { readonly status: 'factorized'; readonly factor: NumericFactor }
  | { readonly status: 'not-positive-definite'; readonly row: number };

/** Update stacks, kept between factorizations of one pattern: first touch of fresh memory costs more than its use. */
export interface FactorizeMemory {
  readonly panels: Float64Array;
  readonly stacks: readonly [Float64Array, Float64Array];
}

/**
 * Reserves the memory of a factorization.
 *
 * @param symbolic - From `analyze`.
 * @returns Arrays that `factorize` fills; may be used again for the same pattern, which overwrites the earlier factor.
 */
export function reserveFactor(symbolic: SymbolicFactor): FactorizeMemory {
  return {
    panels: new Float64Array(symbolic.panelStart[symbolic.supernodeCount]),
    stacks: [new Float64Array(symbolic.stackSizes[0]), new Float64Array(symbolic.stackSizes[1])],
  };
}

/**
 * Computes the Cholesky factor of a symmetric positive definite matrix.
 *
 * @param symbolic - Analysis of the matrix's pattern.
 * @param values - Entries of its lower triangle in the pattern's order.
 * @param memory - From {@link reserveFactor}; made afresh when absent.
 * @returns The factor, or where the matrix is not positive definite. Work grows as the sum of squared column counts.
 * @source Duff & Reid (1983), ACM TOMS 9:302–325; Liu (1992), SIAM Review 34:82–109.
 */
export function factorize(
  symbolic: SymbolicFactor,
  values: Float64Array,
  memory: FactorizeMemory = reserveFactor(symbolic),
): FactorizeOutcome {
  const { panels, stacks } = memory;
  const { supernodeCount, supernodeStart, belowStart, panelStart, depthParity, valuePlaces } = symbolic;
  panels.fill(0);
  for (let p = 0; p < values.length; p++) panels[valuePlaces[p]] += values[p];
  const children = childLists(symbolic);
  const tops: [number, number] = [0, 0];
  for (let s = 0; s < supernodeCount; s++) {
    const own = supernodeStart[s + 1] - supernodeStart[s];
    const rest = belowStart[s + 1] - belowStart[s];
    const parity = depthParity[s];
    const stack = stacks[parity];
    const update = tops[parity];
    stack.fill(0, update, update + rest * rest);
    for (let c = children.head[s]; c !== -1; c = children.next[c]) {
      const childRest = belowStart[c + 1] - belowStart[c];
      tops[1 - parity] -= childRest * childRest;
      extendAdd(symbolic, memory, c, s, tops[1 - parity], update);
    }
    const failed = eliminateFront(panels, panelStart[s], own, rest);
    if (failed >= 0)
      return { status: 'not-positive-definite', row: symbolic.permutation[supernodeStart[s] + failed] };
    for (let j = 0; j < rest; j += 2) {
      updateColumns(
        panels,
        panelStart[s] + own,
        own + rest,
        own,
        j,
        rest,
        stack,
        update,
        rest,
        Math.min(2, rest - j),
      );
    }
    if (symbolic.supernodeParent[s] !== -1) tops[parity] += rest * rest;
  }
  return { status: 'factorized', factor: { symbolic, panels } };
}

/** Children of each supernode, last first: the order in which their updates lie on the stack. */
function childLists(symbolic: SymbolicFactor): { head: Int32Array; next: Int32Array } {
  const head = new Int32Array(symbolic.supernodeCount).fill(-1);
  const next = new Int32Array(symbolic.supernodeCount).fill(-1);
  for (let s = 0; s < symbolic.supernodeCount; s++) {
    const p = symbolic.supernodeParent[s];
    if (p === -1) continue;
    next[s] = head[p];
    head[p] = s;
  }
  return { head, next };
}

/** Adds a child's update matrix (lower triangle) into the parent's panel and update. */
function extendAdd(
  symbolic: SymbolicFactor,
  memory: FactorizeMemory,
  child: number,
  parent: number,
  from: number,
  update: number,
): void {
  const { belowStart, relative, supernodeStart, panelStart, depthParity } = symbolic;
  const own = supernodeStart[parent + 1] - supernodeStart[parent];
  const rest = belowStart[parent + 1] - belowStart[parent];
  const rows = own + rest;
  const base = belowStart[child];
  const count = belowStart[child + 1] - base;
  const source = memory.stacks[depthParity[child]];
  const target = memory.stacks[depthParity[parent]];
  const panels = memory.panels;
  for (let j = 0; j < count; j++) {
    const column = relative[base + j];
    const at = from + j * count;
    if (column < own) {
      const start = panelStart[parent] + column * rows;
      for (let i = j; i < count; i++) panels[start + relative[base + i]] += source[at + i];
    } else {
      const start = update + (column - own) * rest - own;
      for (let i = j; i < count; i++) target[start + relative[base + i]] += source[at + i];
    }
  }
}

/** Cholesky of a panel's own columns over all its rows, two columns at a time. Returns the failing column or −1. */
function eliminateFront(panels: Float64Array, start: number, own: number, rest: number): number {
  const rows = own + rest;
  for (let j = 0; j < own; j += 2) {
    const width = Math.min(2, own - j);
    updateColumns(panels, start, rows, j, j, rows, panels, start, rows, width);
    const first = start + j * rows;
    const pivot = panels[first + j];
    if (!(pivot > 0)) return j;
    const inverse = 1 / Math.sqrt(pivot);
    for (let i = j; i < rows; i++) panels[first + i] *= inverse;
    if (width === 1) continue;
    const second = first + rows;
    const factor = panels[first + j + 1];
    for (let i = j + 1; i < rows; i++) panels[second + i] -= factor * panels[first + i];
    const pivot2 = panels[second + j + 1];
    if (!(pivot2 > 0)) return j + 1;
    const inverse2 = 1 / Math.sqrt(pivot2);
    for (let i = j + 1; i < rows; i++) panels[second + i] *= inverse2;
  }
  return -1;
}

/**
 * C(i, j) −= Σ_k L(i, k) L(j, k) for one or two columns j and all rows i ≥ j: the one kernel of panels and updates. Two columns
 * by four rows of sums stay in registers.
 */
// eslint-disable-next-line max-params -- the inner kernel: an argument object would be made once per two columns
function updateColumns(
  L: Float64Array,
  l0: number,
  ld: number,
  depth: number,
  j: number,
  rowCount: number,
  C: Float64Array,
  c0: number,
  ldc: number,
  width: number,
): void {
  if (depth === 0) return;
  const stop = l0 + depth * ld;
  const cFirst = c0 + j * ldc;
  if (width === 1) {
    for (let i = j; i < rowCount; i++) {
      let sum = 0;
      for (let p = l0; p < stop; p += ld) sum += L[p + i] * L[p + j];
      C[cFirst + i] -= sum;
    }
    return;
  }
  const cSecond = cFirst + ldc;
  let i = j;
  for (; i + 3 < rowCount; i += 4) {
    let a0 = 0;
    let a1 = 0;
    let a2 = 0;
    let a3 = 0;
    let b0 = 0;
    let b1 = 0;
    let b2 = 0;
    let b3 = 0;
    for (let p = l0; p < stop; p += ld) {
      const u = L[p + j];
      const v = L[p + j + 1];
      const q = p + i;
      const r0 = L[q];
      const r1 = L[q + 1];
      const r2 = L[q + 2];
      const r3 = L[q + 3];
      a0 += r0 * u;
      a1 += r1 * u;
      a2 += r2 * u;
      a3 += r3 * u;
      b0 += r0 * v;
      b1 += r1 * v;
      b2 += r2 * v;
      b3 += r3 * v;
    }
    C[cFirst + i] -= a0;
    C[cFirst + i + 1] -= a1;
    C[cFirst + i + 2] -= a2;
    C[cFirst + i + 3] -= a3;
    C[cSecond + i] -= b0; // above the diagonal where i = j: never read
    C[cSecond + i + 1] -= b1;
    C[cSecond + i + 2] -= b2;
    C[cSecond + i + 3] -= b3;
  }
  for (; i < rowCount; i++) {
    let a = 0;
    let b = 0;
    for (let p = l0; p < stop; p += ld) {
      a += L[p + i] * L[p + j];
      b += L[p + i] * L[p + j + 1];
    }
    C[cFirst + i] -= a;
    C[cSecond + i] -= b;
  }
}
