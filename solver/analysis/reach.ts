import type { CellSet } from '../assembly/cells';

/** Union–find over nodes, with path halving. */
export interface Groups {
  readonly parent: Int32Array;
}

/**
 * Makes every node a group of its own.
 *
 * @param count - Number of nodes.
 * @returns The groups.
 */
export function makeGroups(count: number): Groups {
  return { parent: Int32Array.from({ length: count }, (_, i) => i) };
}

/**
 * Finds the group of a node.
 *
 * @param groups - The groups.
 * @param node - Node index.
 * @returns The node that stands for its group.
 */
export function groupOf({ parent }: Groups, node: number): number {
  let root = node;
  while (parent[root] !== root) {
    parent[root] = parent[parent[root]];
    root = parent[root];
  }
  return root;
}

/**
 * Joins the groups of two nodes; the lower index stands for both, so that the result does not depend on the order of calls.
 *
 * @param groups - The groups, changed.
 * @param a - Node index.
 * @param b - Node index.
 */
export function joinGroups(groups: Groups, a: number, b: number): void {
  const first = groupOf(groups, a);
  const second = groupOf(groups, b);
  if (first < second) groups.parent[second] = first;
  else groups.parent[first] = second;
}

/**
 * Groups nodes that are connected through cells.
 *
 * @param nodeCount - Number of nodes.
 * @param sets - Elements and leaky faces.
 * @returns One group per connected piece of ground.
 */
export function connectNodes(nodeCount: number, sets: readonly CellSet[]): Groups {
  const groups = makeGroups(nodeCount);
  for (const { stride, count, nodes } of sets) {
    for (let cell = 0; cell < count; cell++) {
      for (let a = 1; a < stride; a++) joinGroups(groups, nodes[cell * stride], nodes[cell * stride + a]);
    }
  }
  return groups;
}

/**
 * Finds a piece of ground that no prescribed head reaches: its heads are undetermined.
 *
 * @param nodeCount - Number of nodes.
 * @param sets - Elements and leaky faces.
 * @param isPrescribed - 1 at nodes with a prescribed head.
 * @returns A node of such a piece, or −1.
 */
export function findUnreached(nodeCount: number, sets: readonly CellSet[], isPrescribed: Uint8Array): number {
  const groups = connectNodes(nodeCount, sets);
  const isReached = new Uint8Array(nodeCount);
  for (let node = 0; node < nodeCount; node++) if (isPrescribed[node]) isReached[groupOf(groups, node)] = 1;
  for (let node = 0; node < nodeCount; node++) if (!isReached[groupOf(groups, node)]) return node;
  return -1;
}
