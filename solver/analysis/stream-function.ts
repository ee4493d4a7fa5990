// The dual problem, ∇·((K / det K) ∇ψ) = 0: any stream function bounds the dissipation from below, as any head bounds it from above.
// Prager & Synge (1947), Quart. Appl. Math. 5; Pólya & Szegő (1951), Isoperimetric Inequalities in Mathematical Physics, ch. 2–3 (from memory).
import { assemble, type CellSet, scatterCells, sumEnergy } from '../assembly/cells';
import {
  conductivityTensor,
  dualTensor,
  integrateStiffness,
  type Weight,
} from '../assembly/element-stiffness';
import { integrateLeakDual, sideNodes } from '../assembly/line-integrals';
import type { LineSides, Mesh } from '../mesh/mesh';
import type { SituationConditions } from '../problem';
import { analyze } from '../sparse/analyze';
import { factorize } from '../sparse/factorize';
import { order } from '../sparse/order';
import { solve } from '../sparse/solve';
import { connectNodes, groupOf, type Groups, joinGroups, makeGroups } from './reach';
import { lowestHead, type Medium, type SteadyModel, type SteadySolution } from './steady';

/** Stream function and what it says of the discharge. */
export interface StreamSolution {
  /** ψ per node, 0 … discharge, m³/s per metre run (or m³/s); null where none exists: flux edges, drains inside, ring-shaped ground with flow through its hole. */
  readonly values: Float64Array | null;
  /** Lower bound of the discharge between two levels; null where there are not exactly two. */
  readonly lower: number | null;
  readonly upper: number | null;
  /** `bound`: both ends are mathematical bounds for the drawn section. */
  readonly kind: 'bound' | 'estimate';
}

const none: StreamSolution = { values: null, lower: null, upper: null, kind: 'estimate' };

/**
 * Solves for the stream function and brackets the discharge.
 *
 * Impervious pieces of the boundary (both faces of watertight barriers too) carry one unknown constant each, heads enter as natural loads
 * −∫ h dψ/ds, leaky barriers as ∫ (dψ/ds)² / C. With two levels, D_lower / ΔH ≤ q ≤ D_upper / ΔH.
 *
 * @param model - The prepared mesh.
 * @param medium - Permeabilities.
 * @param conditions - One per edge and drain.
 * @param solution - Heads of the same situation.
 * @returns Stream function and bracket, widened outward by a rounding allowance of 1e-9.
 * @source Bear (1972), §6.5; Fraeijs de Veubeke (1965) in Zienkiewicz & Holister, Stress Analysis, ch. 9 (from memory).
 */
export function solveStreamFunction(
  model: SteadyModel,
  medium: Medium,
  conditions: SituationConditions,
  solution: SteadySolution,
): StreamSolution {
  const { mesh } = model;
  if (!hasStreamFunction(mesh, conditions)) return none;
  const boundary = readBoundary(mesh, medium, conditions, solution);
  if (!boundary) return none;
  const { ties, loads } = boundary;
  const { nodeDofs, dofCount } = numberDofs(mesh, solution, ties);
  const weight: Weight = model.kind === 'plane' ? 'plane' : 'reciprocal-circle';
  const dual = dualCells(mesh, medium, solution, weight);
  const { pattern, scatters } = scatterCells([dual.elements, dual.leaks], nodeDofs, dofCount);
  const values = new Float64Array(pattern.rowIndices.length);
  assemble(scatters[0], dual.elementMatrices, values);
  assemble(scatters[1], dual.leakMatrices, values);
  const outcome = factorize(analyze(pattern, order(pattern)), values);
  if (outcome.status !== 'factorized') return none;
  const rhs = new Float64Array(dofCount);
  for (let node = 0; node < mesh.nodeCount; node++)
    if (nodeDofs[node] >= 0) rhs[nodeDofs[node]] += loads[node];
  solve(outcome.factor, rhs, rhs);
  const psi = new Float64Array(mesh.nodeCount);
  for (let node = 0; node < mesh.nodeCount; node++) psi[node] = nodeDofs[node] >= 0 ? rhs[nodeDofs[node]] : 0;
  const dissipation = 2 * dot(psi, loads) - energyOf(dual, psi);
  shiftToZero(psi, solution);
  return { values: psi, ...bracket(model, conditions, solution, dissipation) };
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

function energyOf(dual: DualCells, psi: Float64Array): number {
  return sumEnergy(dual.elements, dual.elementMatrices, psi) + sumEnergy(dual.leaks, dual.leakMatrices, psi);
}

/** Flux edges make ψ vary along them and drains inside make it many-valued: neither is treated here. */
function hasStreamFunction(mesh: Mesh, conditions: SituationConditions): boolean {
  const isQuiet = (type: string): boolean => type === 'impervious';
  return (
    conditions.edges.every((c) => c.type !== 'flux' || c.rate === 0) &&
    conditions.drains.every((c, i) => isQuiet(c.type) || mesh.drains[i].elements.length === 0)
  );
}

interface Boundary {
  /** Nodes that share one value of ψ. */
  readonly ties: Groups;
  /** −∫ h dψ/ds, per node. */
  readonly loads: Float64Array;
}

/** Ties the impervious pieces, loads the ends of the others. Null where water flows through more than one ring of the boundary of one piece of ground. */
function readBoundary(
  mesh: Mesh,
  medium: Medium,
  conditions: SituationConditions,
  solution: SteadySolution,
): Boundary | null {
  const ties = makeGroups(mesh.nodeCount);
  const rings = makeGroups(mesh.nodeCount);
  const loads = new Float64Array(mesh.nodeCount);
  const nodes = new Int32Array(mesh.order + 1);
  const headOf = headsBySide(mesh, conditions);
  const wetNodes: number[] = [];
  const visit = (line: LineSides, isFace: boolean): void => {
    for (let index = 0; index < line.elements.length; index++) {
      sideNodes(mesh, line, index, nodes);
      joinGroups(rings, nodes[0], nodes[1]);
      const head = isFace ? undefined : headOf.get(3 * line.elements[index] + line.sides[index]);
      if (head === undefined) {
        joinGroups(ties, nodes[0], nodes[1]);
        if (mesh.order === 2) joinGroups(ties, nodes[0], nodes[2]);
      } else {
        // counter-clockwise round the ground, the flow out of a side is ψ(end) − ψ(start)
        const sign = line.directions[index] > 0 ? 1 : -1;
        loads[nodes[1]] -= sign * head;
        loads[nodes[0]] += sign * head;
        wetNodes.push(nodes[0]);
      }
    }
  };
  visit(mesh.outline, false);
  mesh.barriers.forEach(({ left, right }, barrier) => {
    if (medium.conductances[barrier] > 0) {
      tieFaces(mesh, left, right, ties, rings);
    } else {
      visit(left, true);
      visit(right, true);
    }
  });
  const pieces = connectNodes(mesh.nodeCount, [solution.system.elements, solution.system.leaks]);
  const wetRing = new Map<number, number>();
  for (const node of wetNodes) {
    const piece = groupOf(pieces, node);
    const ring = groupOf(rings, node);
    if ((wetRing.get(piece) ?? ring) !== ring) return null;
    wetRing.set(piece, ring);
  }
  return { ties, loads };
}

/** Head over the lowest one of each element side that lies on a head edge, by 3 · element + side; a level common to all does no work. */
function headsBySide(mesh: Mesh, conditions: SituationConditions): Map<number, number> {
  const heads = new Map<number, number>();
  const lowest = lowestHead(conditions);
  mesh.edges.forEach((line, edge) => {
    const condition = conditions.edges[edge];
    if (condition.type !== 'head') return;
    for (let i = 0; i < line.elements.length; i++)
      heads.set(3 * line.elements[i] + line.sides[i], condition.head - lowest);
  });
  return heads;
}

/** The normal flux is the same on both faces of a leaky barrier, so ψ is too. */
function tieFaces(mesh: Mesh, left: LineSides, right: LineSides, ties: Groups, rings: Groups): void {
  const a = new Int32Array(mesh.order + 1);
  const b = new Int32Array(mesh.order + 1);
  for (let index = 0; index < left.elements.length; index++) {
    sideNodes(mesh, left, index, a);
    sideNodes(mesh, right, index, b);
    for (let k = 0; k < a.length; k++) joinGroups(ties, a[k], b[k]);
    joinGroups(rings, a[0], b[0]);
    joinGroups(rings, a[1], b[1]);
  }
}

/** One degree of freedom per group of tied nodes; in each piece of ground the first is zero, since only differences of ψ mean anything. */
function numberDofs(
  mesh: Mesh,
  solution: SteadySolution,
  ties: Groups,
): { nodeDofs: Int32Array; dofCount: number } {
  const pieces = connectNodes(mesh.nodeCount, [solution.system.elements, solution.system.leaks]);
  const dofOf = new Map<number, number>();
  const grounded = new Set<number>();
  const nodeDofs = new Int32Array(mesh.nodeCount);
  const tieSize = new Int32Array(mesh.nodeCount);
  for (let node = 0; node < mesh.nodeCount; node++) tieSize[groupOf(ties, node)]++;
  // the zero goes to a tied boundary piece: that spares its long row
  const bySize = [...tieSize.keys()]
    .filter((tie) => tieSize[tie] > 1)
    .sort((a, b) => tieSize[b] - tieSize[a] || a - b);
  for (const tie of bySize) {
    const piece = groupOf(pieces, tie);
    if (grounded.has(piece)) continue;
    grounded.add(piece);
    dofOf.set(tie, -1);
  }
  let dofCount = 0;
  for (let node = 0; node < mesh.nodeCount; node++) {
    const tie = groupOf(ties, node);
    let dof = dofOf.get(tie);
    if (dof === undefined) {
      const piece = groupOf(pieces, node);
      dof = grounded.has(piece) ? dofCount++ : -1;
      grounded.add(piece);
      dofOf.set(tie, dof);
    }
    nodeDofs[node] = dof;
  }
  return { nodeDofs, dofCount };
}

interface DualCells {
  readonly elements: CellSet;
  readonly elementMatrices: Float64Array;
  readonly leaks: CellSet;
  readonly leakMatrices: Float64Array;
}

function dualCells(mesh: Mesh, medium: Medium, solution: SteadySolution, weight: Weight): DualCells {
  const { elements, leaks: pairs, leakBarriers } = solution.system;
  const elementMatrices = new Float64Array(solution.system.elementMatrices.length);
  const tensors = medium.conductivities.map((k) => dualTensor(conductivityTensor(k)));
  integrateStiffness(mesh, tensors, weight, elementMatrices);
  const half = mesh.order + 1;
  const nodes = new Int32Array(half * pairs.count);
  const leakMatrices = new Float64Array(half * half * pairs.count);
  for (let cell = 0; cell < pairs.count; cell++) {
    const face = pairs.nodes.subarray(2 * half * cell, 2 * half * cell + half);
    nodes.set(face, half * cell);
    const out = leakMatrices.subarray(half * half * cell, half * half * (cell + 1));
    integrateLeakDual(mesh, face, medium.conductances[leakBarriers[cell]], weight, out);
  }
  return { elements, elementMatrices, leaks: { stride: half, count: pairs.count, nodes }, leakMatrices };
}

/** Shifts ψ so that its least value in each piece of ground is zero. */
function shiftToZero(psi: Float64Array, solution: SteadySolution): void {
  const pieces = connectNodes(psi.length, [solution.system.elements, solution.system.leaks]);
  const least = new Map<number, number>();
  for (let node = 0; node < psi.length; node++) {
    const piece = groupOf(pieces, node);
    least.set(piece, Math.min(least.get(piece) ?? Infinity, psi[node]));
  }
  for (let node = 0; node < psi.length; node++) psi[node] -= least.get(groupOf(pieces, node))!;
}

/** Rounding of the two solves stays orders of magnitude below this; measured balance is about 1e-12. */
const roundingAllowance = 1e-9;

function bracket(
  model: SteadyModel,
  conditions: SituationConditions,
  solution: SteadySolution,
  dissipation: number,
): Pick<StreamSolution, 'lower' | 'upper' | 'kind'> {
  const levels = new Set<number>();
  [...conditions.edges, ...conditions.drains].forEach((c) => c.type === 'head' && levels.add(c.head));
  if (levels.size !== 2) return { lower: null, upper: null, kind: 'estimate' };
  const span = Math.max(...levels) - Math.min(...levels);
  const lower = (dissipation / span) * (1 - roundingAllowance);
  const upper = (solution.energy / span) * (1 + roundingAllowance);
  // about an axis the weight 1/(2πr) is not integrated exactly, so the lower end is no mathematical bound
  return { lower, upper, kind: model.kind === 'plane' ? 'bound' : 'estimate' };
}
