// A cell is whatever contributes a small dense matrix: an element of the ground, or a piece of a leaky barrier with both faces.
import type { SparsityPattern } from '../sparse/csc-matrix';

/** Cells of one kind. */
export interface CellSet {
  /** Nodes per cell. */
  readonly stride: number;
  readonly count: number;
  /** Length `stride * count`. */
  readonly nodes: Int32Array;
}

/** A pattern and, for each cell set, the place of each entry of each cell matrix in it (−1: none). */
export interface ScatteredPattern {
  readonly pattern: SparsityPattern;
  /** One array per cell set, length `stride² * count`, row by row. */
  readonly scatters: readonly Int32Array[];
}

/**
 * Builds the lower triangle's pattern and the scatter maps of the cells.
 *
 * @param sets - The cell sets.
 * @param nodeDofs - Degree of freedom of each node, −1 where prescribed; nodes may share one.
 * @param dofCount - Number of degrees of freedom.
 * @returns Pattern with sorted rows, diagonal present, and scatter maps.
 */
export function scatterCells(
  sets: readonly CellSet[],
  nodeDofs: Int32Array,
  dofCount: number,
): ScatteredPattern {
  const start = new Int32Array(dofCount + 1);
  for (const { nodes } of sets) {
    for (let k = 0; k < nodes.length; k++) if (nodeDofs[nodes[k]] >= 0) start[nodeDofs[nodes[k]] + 1]++;
  }
  for (let dof = 0; dof < dofCount; dof++) start[dof + 1] += start[dof];
  const fill = start.slice(0, dofCount);
  const uses = new Int32Array(start[dofCount]); // position in the set's nodes; sets are told apart by an offset
  const offsets: number[] = [];
  let offset = 0;
  for (const { nodes } of sets) {
    offsets.push(offset);
    for (let k = 0; k < nodes.length; k++)
      if (nodeDofs[nodes[k]] >= 0) uses[fill[nodeDofs[nodes[k]]]++] = offset + k;
    offset += nodes.length;
  }
  return fillColumns({ sets, offsets, nodeDofs, dofCount, start, uses });
}

interface Uses {
  readonly sets: readonly CellSet[];
  readonly offsets: readonly number[];
  readonly nodeDofs: Int32Array;
  readonly dofCount: number;
  readonly start: Int32Array;
  readonly uses: Int32Array;
}

function fillColumns({ sets, offsets, nodeDofs, dofCount, start, uses }: Uses): ScatteredPattern {
  const scatters = sets.map(({ stride, count }) => new Int32Array(stride * stride * count).fill(-1));
  const columnPointers = new Int32Array(dofCount + 1);
  let rowIndices = new Int32Array(Math.max(16, 8 * dofCount));
  const place = new Int32Array(dofCount).fill(-1);
  let used = 0;
  for (let column = 0; column < dofCount; column++) {
    const begin = used;
    for (let u = start[column]; u < start[column + 1]; u++) {
      const set = setOf(offsets, uses[u]);
      const { stride, nodes } = sets[set];
      const at = uses[u] - offsets[set];
      const cell = at - (at % stride);
      for (let a = 0; a < stride; a++) {
        const row = nodeDofs[nodes[cell + a]];
        if (row < column || place[row] >= begin) continue;
        if (used === rowIndices.length) {
          const grown = new Int32Array(2 * used);
          grown.set(rowIndices);
          rowIndices = grown;
        }
        place[row] = begin;
        rowIndices[used++] = row;
      }
    }
    sortRange(rowIndices, begin, used);
    for (let p = begin; p < used; p++) place[rowIndices[p]] = p;
    for (let u = start[column]; u < start[column + 1]; u++) {
      const set = setOf(offsets, uses[u]);
      const { stride, nodes } = sets[set];
      const at = uses[u] - offsets[set];
      const b = at % stride;
      const cell = at - b;
      const to = (cell / stride) * stride * stride + b;
      for (let a = 0; a < stride; a++) {
        const row = nodeDofs[nodes[cell + a]];
        if (row >= column) scatters[set][to + a * stride] = place[row];
      }
    }
    columnPointers[column + 1] = used;
  }
  return { pattern: { size: dofCount, columnPointers, rowIndices: rowIndices.slice(0, used) }, scatters };
}

/** Insertion sort: a column has a dozen rows, too few for the library's. */
function sortRange(array: Int32Array, begin: number, end: number): void {
  for (let i = begin + 1; i < end; i++) {
    const value = array[i];
    let j = i - 1;
    for (; j >= begin && array[j] > value; j--) array[j + 1] = array[j];
    array[j + 1] = value;
  }
}

function setOf(offsets: readonly number[], use: number): number {
  let set = offsets.length - 1;
  while (offsets[set] > use) set--;
  return set;
}

/**
 * Adds cell matrices into the values of a pattern.
 *
 * @param scatter - The cells' scatter map.
 * @param matrices - Cell matrices row by row, same length as `scatter`.
 * @param values - Values of the pattern, added to.
 */
export function assemble(scatter: Int32Array, matrices: Float64Array, values: Float64Array): void {
  for (let k = 0; k < scatter.length; k++) if (scatter[k] >= 0) values[scatter[k]] += matrices[k];
}

/**
 * Adds the product of the cell matrices with a nodal vector.
 *
 * Works on differences from each cell's first node: what is the same at all nodes of a cell gives nothing, so its size costs no digits.
 *
 * @param cells - The cells.
 * @param matrices - Their matrices row by row; the entries of a row add up to zero.
 * @param nodal - One value a node.
 * @param out - One value a node, added to: Σ K_e x_e.
 */
export function multiplyCells(
  cells: CellSet,
  matrices: Float64Array,
  nodal: Float64Array,
  out: Float64Array,
): void {
  const { stride, count, nodes } = cells;
  for (let cell = 0; cell < count; cell++) {
    const base = cell * stride;
    const first = nodal[nodes[base]];
    for (let a = 0; a < stride; a++) {
      let sum = 0;
      const row = (base + a) * stride;
      for (let b = 1; b < stride; b++) sum += matrices[row + b] * (nodal[nodes[base + b]] - first);
      out[nodes[base + a]] += sum;
    }
  }
}

/**
 * Sums the energy of a nodal vector, Σ xᵀ K_e x, cell by cell.
 *
 * Every term is positive and formed from differences within the cell, so the sum is good to rounding whatever the level of `nodal` and the
 * contrast between cells.
 *
 * @param cells - The cells.
 * @param matrices - Their positive semidefinite matrices row by row; the entries of a row add up to zero.
 * @param nodal - One value a node.
 * @returns The energy.
 */
export function sumEnergy(cells: CellSet, matrices: Float64Array, nodal: Float64Array): number {
  const { stride, count, nodes } = cells;
  let energy = 0;
  for (let cell = 0; cell < count; cell++) {
    const base = cell * stride;
    const first = nodal[nodes[base]];
    for (let a = 1; a < stride; a++) {
      let sum = 0;
      const row = (base + a) * stride;
      for (let b = 1; b < stride; b++) sum += matrices[row + b] * (nodal[nodes[base + b]] - first);
      energy += sum * (nodal[nodes[base + a]] - first);
    }
  }
  return energy;
}
