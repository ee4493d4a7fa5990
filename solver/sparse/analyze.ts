// Symbolic analysis: elimination tree, column counts, supernodes, fronts, and where each entry of the matrix goes.
// Liu (1990), "The role of elimination trees in sparse factorization", SIAM J. Matrix Anal. Appl. 11:134–172;
// Duff & Reid (1983), "The multifrontal solution of indefinite sparse symmetric linear equations", ACM TOMS 9:302–325.
import type { SparsityPattern } from './csc-matrix';

/** All that a factorization needs but the numbers; reused while the pattern stays. */
export interface SymbolicFactor {
  readonly size: number;
  /** `permutation[k] = i`: row i is the k-th pivot. Postordered, so it may differ from the order given. */
  readonly permutation: Int32Array;
  readonly supernodeCount: number;
  /** First pivot of each supernode, length `supernodeCount + 1`. */
  readonly supernodeStart: Int32Array;
  /** Supernode that takes the update of each supernode, −1 for a root. */
  readonly supernodeParent: Int32Array;
  /** Pivots below each supernode's own, ascending, packed; `belowStart` has length `supernodeCount + 1`. */
  readonly below: Int32Array;
  readonly belowStart: Int32Array;
  /** Row of `below` within the parent's front (its own pivots first, then its below). */
  readonly relative: Int32Array;
  /** Start of each supernode's panel (column-major, leading dimension own + below), length `supernodeCount + 1`. */
  readonly panelStart: Float64Array;
  /** Place in the panels of each entry of the matrix. */
  readonly valuePlaces: Float64Array;
  /** Depth of each supernode in the tree: parents' updates lie on the other of two stacks. */
  readonly depthParity: Uint8Array;
  /** Largest extent of the two update stacks. */
  readonly stackSizes: readonly [number, number];
  readonly factorNonzeros: number;
}

/**
 * Analyzes a pattern under a fill-reducing order.
 *
 * @param pattern - Lower triangle with diagonal.
 * @param permutation - From `order`.
 * @returns What `factorize` needs; depends on the pattern alone.
 * @source Liu (1990), SIAM J. Matrix Anal. Appl. 11; Duff & Reid (1983), ACM TOMS 9.
 */
export function analyze(pattern: SparsityPattern, permutation: Int32Array): SymbolicFactor {
  const first = permuteUpper(pattern, permutation);
  const post = postorder(eliminationTree(pattern.size, first));
  const ordered = permutation.map((_, k) => permutation[post[k]]);
  const upper = permuteUpper(pattern, ordered);
  const parent = eliminationTree(pattern.size, upper);
  const counts = columnCounts(pattern.size, upper, parent);
  const supernodeStart = findSupernodes(parent, counts);
  const fronts = buildFronts(pattern.size, upper, parent, supernodeStart);
  const layout = layOut(supernodeStart, fronts);
  return {
    size: pattern.size,
    permutation: ordered,
    supernodeCount: supernodeStart.length - 1,
    supernodeStart,
    ...fronts,
    ...layout,
    valuePlaces: placeValues(pattern, ordered, supernodeStart, fronts, layout.panelStart),
  };
}

/** Columns above the diagonal of the permuted matrix: for pivot k, the earlier pivots it meets. */
interface UpperPattern {
  readonly start: Int32Array;
  readonly indices: Int32Array;
}

function permuteUpper(pattern: SparsityPattern, permutation: Int32Array): UpperPattern {
  const { size, columnPointers, rowIndices } = pattern;
  const inverse = new Int32Array(size);
  for (let k = 0; k < size; k++) inverse[permutation[k]] = k;
  const start = new Int32Array(size + 1);
  for (let column = 0; column < size; column++) {
    const a = inverse[column];
    for (let p = columnPointers[column]; p < columnPointers[column + 1]; p++) {
      const b = inverse[rowIndices[p]];
      if (a !== b) start[(a > b ? a : b) + 1]++;
    }
  }
  for (let k = 0; k < size; k++) start[k + 1] += start[k];
  const fill = start.slice(0, size);
  const indices = new Int32Array(start[size]);
  for (let column = 0; column < size; column++) {
    const a = inverse[column];
    for (let p = columnPointers[column]; p < columnPointers[column + 1]; p++) {
      const b = inverse[rowIndices[p]];
      if (a > b) indices[fill[a]++] = b;
      else if (b > a) indices[fill[b]++] = a;
    }
  }
  return { start, indices };
}

function eliminationTree(size: number, upper: UpperPattern): Int32Array {
  const parent = new Int32Array(size).fill(-1);
  const ancestor = new Int32Array(size).fill(-1);
  for (let k = 0; k < size; k++) {
    for (let p = upper.start[k]; p < upper.start[k + 1]; p++) {
      let i = upper.indices[p];
      while (i !== -1 && i < k) {
        const next = ancestor[i];
        ancestor[i] = k;
        if (next === -1) parent[i] = k;
        i = next;
      }
    }
  }
  return parent;
}

function postorder(parent: Int32Array): Int32Array {
  const size = parent.length;
  const head = new Int32Array(size).fill(-1);
  const next = new Int32Array(size).fill(-1);
  for (let j = size - 1; j >= 0; j--) {
    if (parent[j] === -1) continue;
    next[j] = head[parent[j]];
    head[parent[j]] = j;
  }
  const post = new Int32Array(size);
  const stack = new Int32Array(size);
  let k = 0;
  for (let root = 0; root < size; root++) {
    if (parent[root] !== -1) continue;
    let top = 0;
    stack[0] = root;
    while (top >= 0) {
      const node = stack[top];
      const child = head[node];
      if (child === -1) {
        top--;
        post[k++] = node;
      } else {
        head[node] = next[child];
        stack[++top] = child;
      }
    }
  }
  return post;
}

/** Entries of each column of the factor, diagonal included, by walking the row subtrees. */
function columnCounts(size: number, upper: UpperPattern, parent: Int32Array): Int32Array {
  const counts = new Int32Array(size).fill(1);
  const seen = new Int32Array(size).fill(-1);
  for (let row = 0; row < size; row++) {
    seen[row] = row;
    for (let p = upper.start[row]; p < upper.start[row + 1]; p++) {
      for (let k = upper.indices[p]; seen[k] !== row; k = parent[k]) {
        seen[k] = row;
        counts[k]++;
      }
    }
  }
  return counts;
}

/**
 * Fundamental supernodes, then neighbours merged where few zeros are stored for it (relaxed amalgamation, Ashcraft & Grimes
 * 1989, ACM TOMS 15): dense kernels need columns to work on.
 */
function findSupernodes(parent: Int32Array, counts: Int32Array): Int32Array {
  const size = parent.length;
  const starts: number[] = [];
  const zeros: number[] = [];
  for (let j = 0; j < size;) {
    const begin = j;
    while (j + 1 < size && parent[j] === j + 1 && counts[j] === counts[j + 1] + 1) j++;
    j++;
    let at = begin;
    let stored = 0;
    while (starts.length > 0 && parent[at - 1] === at) {
      const previous = starts.at(-1)!;
      const columns = at - previous;
      const added = addedZeros(previous, at, counts) + zeros.at(-1)!;
      if (!isWorthMerging(j - previous, columns * (columns + counts[at]), added + stored)) break;
      stored += added;
      at = previous;
      starts.pop();
      zeros.pop();
    }
    starts.push(at);
    zeros.push(stored);
  }
  return Int32Array.from([...starts, size]);
}

/** Zeros stored when columns `from … at − 1` take on the rows of column `at`. */
function addedZeros(from: number, at: number, counts: Int32Array): number {
  const columns = at - from;
  let now = 0;
  for (let j = from; j < at; j++) now += counts[j];
  return Math.max(0, columns * counts[at] + (columns * (columns + 1)) / 2 - now);
}

function isWorthMerging(columns: number, stored: number, zeros: number): boolean {
  if (columns <= 4) return true;
  const share = zeros / stored;
  return (columns <= 16 && share < 0.5) || (columns <= 48 && share < 0.1) || share < 0.02;
}

type Fronts = Pick<SymbolicFactor, 'below' | 'belowStart' | 'relative' | 'supernodeParent'>;

function buildFronts(
  size: number,
  upper: UpperPattern,
  parent: Int32Array,
  supernodeStart: Int32Array,
): Fronts {
  const count = supernodeStart.length - 1;
  const supernodeOfLast = new Int32Array(size).fill(-1);
  const supernodeOf = new Int32Array(size);
  for (let s = 0; s < count; s++) {
    supernodeOfLast[supernodeStart[s + 1] - 1] = s;
    supernodeOf.fill(s, supernodeStart[s], supernodeStart[s + 1]);
  }
  const belowStart = walkBelow(size, upper, parent, supernodeOfLast, count, null);
  const below = new Int32Array(belowStart[count]);
  walkBelow(size, upper, parent, supernodeOfLast, count, { below, fill: belowStart.slice(0, count) });
  const supernodeParent = new Int32Array(count).fill(-1);
  const relative = new Int32Array(below.length);
  for (let s = 0; s < count; s++) {
    if (belowStart[s] === belowStart[s + 1]) continue;
    const p = supernodeOf[below[belowStart[s]]];
    supernodeParent[s] = p;
    const own = supernodeStart[p + 1] - supernodeStart[p];
    let q = belowStart[p];
    for (let k = belowStart[s]; k < belowStart[s + 1]; k++) {
      if (below[k] < supernodeStart[p + 1]) relative[k] = below[k] - supernodeStart[p];
      else {
        while (below[q] !== below[k]) q++;
        relative[k] = own + q - belowStart[p];
      }
    }
  }
  return { below, belowStart, relative, supernodeParent };
}

/** Rows of each supernode's last column, ascending since rows are walked in order; counts them when `out` is null. */
function walkBelow(
  size: number,
  upper: UpperPattern,
  parent: Int32Array,
  supernodeOfLast: Int32Array,
  count: number,
  out: { below: Int32Array; fill: Int32Array } | null,
): Int32Array {
  const start = new Int32Array(count + 1);
  const seen = new Int32Array(size).fill(-1);
  for (let row = 0; row < size; row++) {
    seen[row] = row;
    for (let p = upper.start[row]; p < upper.start[row + 1]; p++) {
      for (let k = upper.indices[p]; seen[k] !== row; k = parent[k]) {
        seen[k] = row;
        const s = supernodeOfLast[k];
        if (s === -1) continue;
        if (out) out.below[out.fill[s]++] = row;
        else start[s + 1]++;
      }
    }
  }
  for (let s = 0; s < count; s++) start[s + 1] += start[s];
  return start;
}

function layOut(
  supernodeStart: Int32Array,
  fronts: Fronts,
): Pick<SymbolicFactor, 'panelStart' | 'depthParity' | 'stackSizes' | 'factorNonzeros'> {
  const count = supernodeStart.length - 1;
  const panelStart = new Float64Array(count + 1);
  const depthParity = new Uint8Array(count);
  for (let s = count - 1; s >= 0; s--) {
    const p = fronts.supernodeParent[s];
    depthParity[s] = p === -1 ? 0 : 1 - depthParity[p];
  }
  const used: [number, number] = [0, 0];
  const peak: [number, number] = [0, 0];
  const childUse = new Float64Array(count);
  let factorNonzeros = 0;
  for (let s = 0; s < count; s++) {
    const own = supernodeStart[s + 1] - supernodeStart[s];
    const rest = fronts.belowStart[s + 1] - fronts.belowStart[s];
    panelStart[s + 1] = panelStart[s] + own * (own + rest);
    factorNonzeros += own * rest + (own * (own + 1)) / 2;
    const parity = depthParity[s];
    used[parity] += rest * rest;
    peak[parity] = Math.max(peak[parity], used[parity]);
    used[1 - parity] -= childUse[s];
    if (fronts.supernodeParent[s] !== -1) childUse[fronts.supernodeParent[s]] += rest * rest;
    else used[parity] -= rest * rest;
  }
  return { panelStart, depthParity, stackSizes: peak, factorNonzeros };
}

/** For each entry of the matrix its place in the panels. */
function placeValues(
  pattern: SparsityPattern,
  permutation: Int32Array,
  supernodeStart: Int32Array,
  fronts: Fronts,
  panelStart: Float64Array,
): Float64Array {
  const { size, columnPointers, rowIndices } = pattern;
  const inverse = new Int32Array(size);
  for (let k = 0; k < size; k++) inverse[permutation[k]] = k;
  const places = new Float64Array(rowIndices.length);
  const entryStart = new Int32Array(size + 1);
  const columnOf = new Int32Array(rowIndices.length);
  for (let column = 0; column < size; column++) {
    for (let p = columnPointers[column]; p < columnPointers[column + 1]; p++) {
      const pivot = Math.min(inverse[column], inverse[rowIndices[p]]);
      columnOf[p] = column;
      entryStart[pivot + 1]++;
    }
  }
  for (let k = 0; k < size; k++) entryStart[k + 1] += entryStart[k];
  const fill = entryStart.slice(0, size);
  const entries = new Int32Array(rowIndices.length);
  for (let p = 0; p < rowIndices.length; p++) {
    entries[fill[Math.min(inverse[columnOf[p]], inverse[rowIndices[p]])]++] = p;
  }
  const rowPlace = new Int32Array(size);
  for (let s = 0; s < supernodeStart.length - 1; s++) {
    const from = supernodeStart[s];
    const own = supernodeStart[s + 1] - from;
    for (let k = 0; k < own; k++) rowPlace[from + k] = k;
    for (let k = fronts.belowStart[s]; k < fronts.belowStart[s + 1]; k++) {
      rowPlace[fronts.below[k]] = own + k - fronts.belowStart[s];
    }
    const rows = own + fronts.belowStart[s + 1] - fronts.belowStart[s];
    for (let e = entryStart[from]; e < entryStart[from + own]; e++) {
      const p = entries[e];
      const a = inverse[columnOf[p]];
      const b = inverse[rowIndices[p]];
      const column = Math.min(a, b) - from;
      places[p] = panelStart[s] + column * rows + rowPlace[Math.max(a, b)];
    }
  }
  return places;
}
