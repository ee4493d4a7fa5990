import { sideNodes } from '../assembly/line-integrals';
import type { LineSides, Mesh } from '../mesh/mesh';
import type { SituationConditions } from '../problem';
import type { SteadySystem } from './steady';

/**
 * Attributes the nodal flows at prescribed nodes to the lines that prescribe them.
 *
 * A node of one line gives it all its flow. A node that several lines share is divided element by element: an element's share goes to
 * the line that has a side of that element, else to all of them equally, so that the sum over lines is the sum over nodes.
 *
 * @param mesh - The mesh.
 * @param conditions - One per edge and drain.
 * @param system - With the element matrices of the solve.
 * @param heads - Nodal heads over any level, m.
 * @param reactions - Nodal flows, positive into the ground.
 * @returns Flow per edge, then per drain.
 */
export function attributeFlows(
  mesh: Mesh,
  conditions: SituationConditions,
  system: SteadySystem,
  heads: Float64Array,
  reactions: Float64Array,
): Float64Array {
  const lines = [...mesh.edges, ...mesh.drains];
  const all = [...conditions.edges, ...conditions.drains];
  const flows = new Float64Array(lines.length);
  const owner = new Int32Array(mesh.nodeCount).fill(-1);
  const shared = new Map<number, number[]>();
  const nodes = new Int32Array(mesh.order + 1);
  lines.forEach((line, index) => {
    if (all[index].type !== 'head') return;
    for (let side = 0; side < line.elements.length; side++) {
      sideNodes(mesh, line, side, nodes);
      for (const node of nodes) {
        if (owner[node] === -1) owner[node] = index;
        else if (owner[node] !== index) {
          const list = shared.get(node) ?? [owner[node]];
          if (!list.includes(index)) list.push(index);
          shared.set(node, list);
        }
      }
    }
  });
  for (let node = 0; node < mesh.nodeCount; node++) {
    if (owner[node] >= 0 && !shared.has(node)) flows[owner[node]] += reactions[node];
  }
  if (shared.size > 0) divideShared(system, heads, { lines, shared, reactions, flows });
  return flows;
}

interface SharedNodes {
  readonly lines: readonly LineSides[];
  readonly shared: ReadonlyMap<number, readonly number[]>;
  readonly reactions: Float64Array;
  readonly flows: Float64Array;
}

function divideShared(
  system: SteadySystem,
  heads: Float64Array,
  { lines, shared, reactions, flows }: SharedNodes,
): void {
  const { stride, count, nodes } = system.elements;
  const matrices = system.elementMatrices;
  const touches = lines.map((line) => new Set(line.elements));
  const rest = new Map([...shared.keys()].map((node) => [node, reactions[node]]));
  for (let element = 0; element < count; element++) {
    for (let a = 0; a < stride; a++) {
      const node = nodes[element * stride + a];
      const candidates = shared.get(node);
      if (!candidates) continue;
      let flow = 0;
      const row = (element * stride + a) * stride;
      const first = heads[nodes[element * stride]];
      for (let b = 1; b < stride; b++)
        flow += matrices[row + b] * (heads[nodes[element * stride + b]] - first);
      const own = candidates.filter((line) => touches[line].has(element));
      for (const line of own) flows[line] += flow / own.length;
      if (own.length > 0) rest.set(node, rest.get(node)! - flow);
    }
  }
  for (const [node, flow] of rest) {
    const candidates = shared.get(node)!;
    for (const line of candidates) flows[line] += flow / candidates.length;
  }
}
