// Fill-reducing order by approximate minimum degree on the quotient graph.
// Amestoy, Davis & Duff (1996), "An approximate minimum degree ordering algorithm", SIAM J. Matrix Anal. Appl. 17:886–905.
// With aggressive absorption; dense rows are put last (Davis 2006, Direct Methods for Sparse Linear Systems, §7.1).
import type { SparsityPattern } from './csc-matrix';

/** The quotient graph: variables not yet eliminated and elements (cliques left by those that are). */
interface QuotientGraph {
  readonly size: number;
  /** Adjacency lists; an element's list holds its variables, a variable's list its elements first, then variables. */
  lists: Int32Array;
  /** Where the free space of `lists` begins. */
  free: number;
  /** Start of each list in `lists`; −1 for an absorbed one. */
  readonly start: Int32Array;
  /** Length of each list. */
  readonly length: Int32Array;
  /** Elements at the head of a variable's list. */
  readonly elementCount: Int32Array;
  /** Variables a supervariable stands for; 0 once merged or eliminated. Negative while marked in the pivot's list. */
  readonly weight: Int32Array;
  /** External degree, approximate. */
  readonly degree: Int32Array;
  /** Time stamps; 0 for a dead element. */
  readonly stamp: Int32Array;
  /** Of a merged variable or an absorbed element: what took it in. −1 for a root. */
  readonly parent: Int32Array;
  /** Degree lists, doubly linked. */
  readonly head: Int32Array;
  readonly next: Int32Array;
  readonly last: Int32Array;
  readonly isElement: Uint8Array;
}

/**
 * Orders a symmetric pattern so that its Cholesky factor stays sparse.
 *
 * @param pattern - Lower triangle with diagonal.
 * @returns `permutation[k] = i`: row i is the k-th pivot. The same pattern always gives the same order.
 * @source Amestoy, Davis & Duff (1996), SIAM J. Matrix Anal. Appl. 17(4).
 */
export function order(pattern: SparsityPattern): Int32Array {
  const graph = buildGraph(pattern);
  const pivots: number[] = [];
  let eliminated = setAsideDense(graph, pivots);
  const dense = pivots.splice(0);
  let minimumDegree = 0;
  let stamp = 1;
  while (eliminated < graph.size) {
    while (graph.head[minimumDegree] === -1) minimumDegree++;
    const pivot = graph.head[minimumDegree];
    unlink(graph, pivot);
    pivots.push(pivot);
    eliminated += graph.weight[pivot];
    const degree = formElement(graph, pivot);
    stamp = approximateDegrees(graph, pivot, stamp, degree);
    stamp = mergeIndistinguishable(graph, pivot, stamp);
    const freed = finishElement(graph, pivot, eliminated, degree);
    eliminated += freed.massEliminated;
    graph.weight[pivot] = 0;
    minimumDegree = Math.min(minimumDegree, freed.minimumDegree);
  }
  return expandPivots(graph, [...pivots, ...dense]);
}

function buildGraph(pattern: SparsityPattern): QuotientGraph {
  const { size, columnPointers, rowIndices } = pattern;
  const length = new Int32Array(size);
  for (let column = 0; column < size; column++) {
    for (let p = columnPointers[column]; p < columnPointers[column + 1]; p++) {
      const row = rowIndices[p];
      if (row === column) continue;
      length[row]++;
      length[column]++;
    }
  }
  const start = new Int32Array(size);
  let total = 0;
  for (let i = 0; i < size; i++) {
    start[i] = total;
    total += length[i];
  }
  const lists = new Int32Array(Math.ceil(total * 1.2) + 4 * size + 16);
  const fill = start.slice();
  for (let column = 0; column < size; column++) {
    for (let p = columnPointers[column]; p < columnPointers[column + 1]; p++) {
      const row = rowIndices[p];
      if (row === column) continue;
      lists[fill[row]++] = column;
      lists[fill[column]++] = row;
    }
  }
  const graph: QuotientGraph = {
    size,
    lists,
    free: total,
    start,
    length,
    elementCount: new Int32Array(size),
    weight: new Int32Array(size).fill(1),
    degree: length.slice(),
    stamp: new Int32Array(size).fill(1),
    parent: new Int32Array(size).fill(-1),
    head: new Int32Array(size + 1).fill(-1),
    next: new Int32Array(size).fill(-1),
    last: new Int32Array(size).fill(-1),
    isElement: new Uint8Array(size),
  };
  for (let i = size - 1; i >= 0; i--) link(graph, i);
  return graph;
}

function link(graph: QuotientGraph, variable: number): void {
  const degree = graph.degree[variable];
  const first = graph.head[degree];
  graph.next[variable] = first;
  graph.last[variable] = -1;
  if (first !== -1) graph.last[first] = variable;
  graph.head[degree] = variable;
}

function unlink(graph: QuotientGraph, variable: number): void {
  const before = graph.last[variable];
  const after = graph.next[variable];
  if (after !== -1) graph.last[after] = before;
  if (before !== -1) graph.next[before] = after;
  else graph.head[graph.degree[variable]] = after;
}

/** Takes rows with more than 10√n entries out; they come last. Returns how many. */
function setAsideDense(graph: QuotientGraph, pivots: number[]): number {
  const limit = Math.max(16, 10 * Math.sqrt(graph.size));
  for (let i = 0; i < graph.size; i++) {
    if (graph.length[i] <= limit) continue;
    unlink(graph, i);
    pivots.push(i);
    graph.weight[i] = 0;
    graph.stamp[i] = 0;
    graph.degree[i] = 1;
    graph.isElement[i] = 1; // of no variables: skipped wherever it is met
    graph.start[i] = -1;
    graph.length[i] = 0;
  }
  return pivots.length;
}

/** Builds the pivot's element in fresh space: its own variables and those of its elements, which are absorbed. Returns its degree. */
function formElement(graph: QuotientGraph, pivot: number): number {
  reserve(graph, pivot);
  const { start, length, elementCount, weight, stamp, parent, isElement } = graph;
  const begin = graph.free;
  const pivotStart = start[pivot];
  let write = begin;
  let degree = 0;
  weight[pivot] = -weight[pivot];
  const take = (variable: number): void => {
    const own = weight[variable];
    if (own <= 0) return; // merged, eliminated, or taken already
    degree += own;
    weight[variable] = -own;
    graph.lists[write++] = variable;
    unlink(graph, variable);
  };
  const listEnd = pivotStart + length[pivot];
  for (let p = pivotStart; p < pivotStart + elementCount[pivot]; p++) {
    const element = graph.lists[p];
    if (stamp[element] === 0) continue;
    for (let q = start[element]; q < start[element] + length[element]; q++) take(graph.lists[q]);
    parent[element] = pivot;
    stamp[element] = 0;
  }
  for (let p = pivotStart + elementCount[pivot]; p < listEnd; p++) take(graph.lists[p]);
  isElement[pivot] = 1; // its weight stays negative until the element is finished, so that no list keeps it as a variable
  start[pivot] = begin;
  length[pivot] = write - begin;
  elementCount[pivot] = -1;
  graph.free = write;
  return degree;
}

/** Makes room for one more element, packing the living lists together when the space runs out. */
function reserve(graph: QuotientGraph, pivot: number): void {
  let need = graph.length[pivot];
  for (let p = graph.start[pivot]; p < graph.start[pivot] + graph.elementCount[pivot]; p++) {
    need += graph.length[graph.lists[p]];
  }
  if (graph.free + need <= graph.lists.length) return;
  const living: number[] = [];
  for (let i = 0; i < graph.size; i++) {
    const isAlive = graph.isElement[i] ? graph.stamp[i] !== 0 : graph.weight[i] > 0;
    if (isAlive && graph.start[i] >= 0) living.push(i);
  }
  living.sort((a, b) => graph.start[a] - graph.start[b]);
  let used = 0;
  for (const i of living) used += graph.length[i];
  const target = used + need > 0.9 * graph.lists.length ? new Int32Array(2 * (used + need)) : graph.lists;
  let write = 0;
  for (const i of living) {
    const from = graph.start[i];
    graph.start[i] = write;
    for (let k = 0; k < graph.length[i]; k++) target[write++] = graph.lists[from + k];
  }
  graph.lists = target;
  graph.free = write;
}

/** Stamps every element met from the pivot's variables with |Le \ Lp|, then bounds each variable's external degree by them. */
function approximateDegrees(graph: QuotientGraph, pivot: number, stamp: number, pivotDegree: number): number {
  const { lists, start, length, elementCount, weight, degree, stamp: stamps } = graph;
  const base = clearStamps(graph, stamp);
  const end = start[pivot] + length[pivot];
  for (let p = start[pivot]; p < end; p++) {
    const variable = lists[p];
    const own = -weight[variable];
    const from = start[variable];
    for (let q = from; q < from + elementCount[variable]; q++) {
      const element = lists[q];
      if (stamps[element] >= base) stamps[element] -= own;
      else if (stamps[element] !== 0) stamps[element] = degree[element] + base - own;
    }
  }
  for (let p = start[pivot]; p < end; p++) updateVariable(graph, lists[p], pivot, base);
  return base + pivotDegree + graph.size + 1;
}

function clearStamps(graph: QuotientGraph, stamp: number): number {
  if (stamp + 2 * graph.size < 0x3fffffff) return stamp + 1;
  for (let i = 0; i < graph.size; i++) if (graph.stamp[i] !== 0) graph.stamp[i] = 1;
  return 2;
}

/** Rewrites one variable's list (living elements, the pivot, living variables outside the pivot) and its degree. */
function updateVariable(graph: QuotientGraph, variable: number, pivot: number, base: number): void {
  const { lists, start, length, elementCount, weight, degree, stamp } = graph;
  const from = start[variable];
  const elementsEnd = from + elementCount[variable];
  const end = from + length[variable];
  let write = from;
  let sum = 0;
  for (let q = from; q < elementsEnd; q++) {
    const element = lists[q];
    if (stamp[element] === 0) continue;
    const outside = stamp[element] - base;
    if (outside > 0) {
      sum += outside;
      lists[write++] = element;
    } else {
      // every variable of it lies in the pivot's element: nothing is lost by dropping it
      graph.parent[element] = pivot;
      stamp[element] = 0;
    }
  }
  const elements = write - from + 1;
  const variablesStart = write;
  for (let q = elementsEnd; q < end; q++) {
    const other = lists[q];
    if (weight[other] <= 0) continue;
    sum += weight[other];
    lists[write++] = other;
  }
  // the pivot goes where the first variable stood; that one moves to the end. There is room: the pivot itself, or an absorbed
  // element, has left this list
  lists[write] = lists[variablesStart];
  lists[variablesStart] = pivot;
  elementCount[variable] = elements;
  length[variable] = write - from + 1;
  degree[variable] = Math.min(degree[variable], sum);
}

/** Merges variables of the pivot's element with the same lists: they stay together from here on. */
function mergeIndistinguishable(graph: QuotientGraph, pivot: number, stamp: number): number {
  const { lists, start, length, weight, stamp: stamps } = graph;
  const buckets = new Map<number, number[]>();
  for (let p = start[pivot]; p < start[pivot] + length[pivot]; p++) {
    const variable = lists[p];
    if (weight[variable] >= 0) continue;
    let hash = length[variable];
    for (let q = start[variable]; q < start[variable] + length[variable]; q++) hash = (hash + lists[q]) | 0;
    const bucket = buckets.get(hash);
    if (bucket) bucket.push(variable);
    else buckets.set(hash, [variable]);
  }
  let mark = stamp;
  for (const bucket of buckets.values()) {
    for (let i = 0; i < bucket.length - 1; i++) {
      const first = bucket[i]!;
      if (weight[first] === 0) continue;
      mark = clearStamps(graph, mark);
      for (let q = start[first]; q < start[first] + length[first]; q++) stamps[lists[q]] = mark;
      for (let j = i + 1; j < bucket.length; j++) mergeIfSame(graph, first, bucket[j]!, mark);
    }
  }
  return mark;
}

function mergeIfSame(graph: QuotientGraph, first: number, second: number, mark: number): void {
  const { lists, start, length, elementCount, weight, stamp, parent } = graph;
  if (
    weight[second] === 0 ||
    length[first] !== length[second] ||
    elementCount[first] !== elementCount[second]
  )
    return;
  for (let q = start[second]; q < start[second] + length[second]; q++) if (stamp[lists[q]] !== mark) return;
  weight[first] += weight[second]; // both negative while marked
  weight[second] = 0;
  parent[second] = first;
  graph.start[second] = -1;
  graph.length[second] = 0;
}

/** Packs the pivot's element, restores weights, links its variables by their new degree; mass elimination of those with no one outside. */
function finishElement(
  graph: QuotientGraph,
  pivot: number,
  eliminated: number,
  pivotDegree: number,
): { massEliminated: number; minimumDegree: number } {
  const { lists, start, length, weight, degree, parent, size } = graph;
  let write = start[pivot];
  let remaining = pivotDegree;
  let massEliminated = 0;
  let minimumDegree = size;
  const end = start[pivot] + length[pivot];
  for (let p = start[pivot]; p < end; p++) {
    const variable = lists[p];
    if (weight[variable] === 0) continue;
    const own = -weight[variable];
    weight[variable] = own;
    // only the pivot's own element is left: it can go with the pivot at no further fill
    if (graph.elementCount[variable] === 1 && length[variable] === 1) {
      parent[variable] = pivot;
      massEliminated += own;
      remaining -= own;
      weight[variable] = 0;
      start[variable] = -1;
      length[variable] = 0;
      continue;
    }
    lists[write++] = variable;
  }
  length[pivot] = write - start[pivot];
  const left = size - eliminated - massEliminated;
  for (let p = start[pivot]; p < write; p++) {
    const variable = lists[p];
    const bound = Math.max(
      0,
      Math.min(degree[variable] + remaining - weight[variable], left - weight[variable]),
    );
    degree[variable] = bound;
    link(graph, variable);
    minimumDegree = Math.min(minimumDegree, bound);
  }
  graph.stamp[pivot] = length[pivot] === 0 ? 0 : 1;
  graph.free = write;
  graph.degree[pivot] = remaining;
  return { massEliminated, minimumDegree };
}

/** Puts merged and mass-eliminated variables right behind the pivot that stands for them. */
function expandPivots(graph: QuotientGraph, pivots: number[]): Int32Array {
  const { size, parent } = graph;
  const position = new Int32Array(size).fill(-1);
  pivots.forEach((pivot, k) => (position[pivot] = k));
  const members: number[][] = pivots.map(() => []);
  for (let i = 0; i < size; i++) {
    if (position[i] !== -1) continue;
    let root = parent[i];
    while (position[root] === -1) root = parent[root];
    members[position[root]]!.push(i);
  }
  const permutation = new Int32Array(size);
  let k = 0;
  pivots.forEach((pivot, index) => {
    permutation[k++] = pivot;
    for (const i of members[index]!) permutation[k++] = i;
  });
  return permutation;
}
