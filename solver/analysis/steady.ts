// Steady confined flow: ∇·(K ∇h) = 0 with prescribed heads and fluxes. Bear (1972), Dynamics of Fluids in Porous Media, ch. 5–6.
import type { CellSet } from '../assembly/cells';
import { assemble, multiplyCells, scatterCells, type ScatteredPattern, sumEnergy } from '../assembly/cells';
import { conductivityTensor, integrateStiffness, type Weight } from '../assembly/element-stiffness';
import { addFluxLoad, integrateLeak, sideNodes } from '../assembly/line-integrals';
import type { LineSides, Mesh } from '../mesh/mesh';
import type { Condition, Conductivity, SectionGeometry, SituationConditions } from '../problem';
import { analyze, type SymbolicFactor } from '../sparse/analyze';
import { factorize, type FactorizeMemory, type NumericFactor, reserveFactor } from '../sparse/factorize';
import { order } from '../sparse/order';
import { solve } from '../sparse/solve';
import { attributeFlows } from './line-flows';
import { findUnreached } from './reach';

/** Permeabilities of one solve. */
export interface Medium {
  /** One per material. */
  readonly conductivities: readonly Conductivity[];
  /** One per barrier, 1/s; 0 is watertight. */
  readonly conductances: readonly number[];
}

/** A mesh with everything that solves on it may share. */
export interface SteadyModel {
  readonly mesh: Mesh;
  readonly kind: SectionGeometry['kind'];
  readonly weight: Weight;
  /** Filled by the solves: systems by the set of prescribed lines and leaky barriers. */
  readonly systems: Map<string, SteadySystem>;
}

/** Pattern, analysis and latest factor for one set of prescribed lines and leaky barriers. */
export interface SteadySystem {
  readonly elements: CellSet;
  readonly leaks: CellSet;
  /** Barrier of each leak cell. */
  readonly leakBarriers: Int32Array;
  readonly nodeDofs: Int32Array;
  readonly dofCount: number;
  readonly scattered: ScatteredPattern;
  readonly symbolic: SymbolicFactor;
  readonly memory: FactorizeMemory;
  readonly elementMatrices: Float64Array;
  readonly leakMatrices: Float64Array;
  /** The medium whose numbers stand in `factor`. */
  medium: Medium | null;
  factor: NumericFactor | null;
}

/** Heads and flows of one situation. */
export interface SteadySolution {
  /** Total head per node, m. */
  readonly heads: Float64Array;
  /** Nodal flow per node, m³/s per metre run (or m³/s), positive into the ground; zero at free nodes but for rounding. */
  readonly reactions: Float64Array;
  /** Net flow along each edge, positive into the ground. */
  readonly edgeFlows: Float64Array;
  readonly drainFlows: Float64Array;
  readonly inflow: number;
  readonly outflow: number;
  /** |inflow − outflow| / inflow. */
  readonly balance: number;
  /** ∫ ∇h · K ∇h, the rate of dissipation over γw, m⁴/s per metre run. */
  readonly energy: number;
  readonly unknowns: number;
  readonly system: SteadySystem;
}

/** The solution, or why there is none and where. */
export type SteadyOutcome =
  | { readonly status: 'solved'; readonly solution: SteadySolution }
  | {
      readonly status: 'refused';
      readonly reason: 'unconstrained' | 'conflicting-heads' | 'not-positive-definite';
      readonly at: readonly [number, number];
    };

/**
 * Prepares a mesh for steady solves.
 *
 * @param mesh - Mesh in metres.
 * @param kind - Plane (per metre run) or axisymmetric (full circle).
 * @returns A model; what the solves analyze on the way is kept in it and used again.
 */
export function prepareSteady(mesh: Mesh, kind: SectionGeometry['kind']): SteadyModel {
  return { mesh, kind, weight: kind === 'plane' ? 'plane' : 'circle', systems: new Map() };
}

/**
 * Solves one situation.
 *
 * The analysis is reused while the same lines prescribe heads and the same barriers leak; the factor while the medium is the same object.
 *
 * @param model - From {@link prepareSteady}.
 * @param medium - Permeabilities; must not be changed in place between calls.
 * @param conditions - One condition per edge and drain of the mesh.
 * @returns Heads and flows, or the reason for refusing. Balance is at rounding level for any solved case.
 * @source Hughes (2000), The Finite Element Method, ch. 2 (consistent reactions; from memory).
 */
export function solveSteady(
  model: SteadyModel,
  medium: Medium,
  conditions: SituationConditions,
): SteadyOutcome {
  const { mesh, weight } = model;
  const prescribed = prescribeHeads(mesh, conditions);
  if ('conflict' in prescribed) return refuse(mesh, 'conflicting-heads', prescribed.conflict);
  const system = systemFor(model, medium, conditions, prescribed.isPrescribed);
  const unreached = findUnreached(mesh.nodeCount, [system.elements, system.leaks], prescribed.isPrescribed);
  if (unreached >= 0) return refuse(mesh, 'unconstrained', unreached);
  const failedDof = updateFactor(model, system, medium);
  if (failedDof >= 0) return refuse(mesh, 'not-positive-definite', system.nodeDofs.indexOf(failedDof));

  const loads = new Float64Array(mesh.nodeCount);
  const fluxTotals = new Float64Array(mesh.edges.length + mesh.drains.length);
  forEachLine(mesh, conditions, (line, condition, index) => {
    if (condition.type === 'flux') fluxTotals[index] = addFluxLoad(mesh, line, condition.rate, weight, loads);
  });
  // over the lowest level: heads of a thousand metres above the datum would cost three digits of every flow
  const lowest = lowestHead(conditions);
  const heads = prescribed.heads.map((head, node) => (prescribed.isPrescribed[node] ? head - lowest : 0));
  const reactions = solveHeads(system, loads, heads);
  const solution = collect(model, system, conditions, { heads, reactions, fluxTotals });
  for (let node = 0; node < mesh.nodeCount; node++) {
    heads[node] = prescribed.isPrescribed[node] ? prescribed.heads[node] : heads[node] + lowest;
  }
  return { status: 'solved', solution };
}

/**
 * Finds the lowest prescribed head: what flows depend on is the height above it.
 *
 * @param conditions - Of edges and drains.
 * @returns The head, m; 0 where none is prescribed.
 */
export function lowestHead(conditions: SituationConditions): number {
  const levels = [...conditions.edges, ...conditions.drains].flatMap((c) =>
    c.type === 'head' ? [c.head] : [],
  );
  return levels.length > 0 ? Math.min(...levels) : 0;
}

/** Flow left over at a free node, relative to the flow through, that is worth another step: between soils of like permeability none is. */
const leftoverTolerance = 1e-11;

/**
 * Solves for the free heads by steps of refinement: each solves for what the last left over. The first does all of the work unless
 * permeabilities differ by many orders of magnitude; then the second wins back digits (Wilkinson 1963, Rounding Errors in Algebraic Processes).
 */
function solveHeads(system: SteadySystem, loads: Float64Array, heads: Float64Array): Float64Array {
  const { nodeDofs, dofCount } = system;
  const rhs = new Float64Array(dofCount);
  let leftovers = Infinity;
  for (let step = 0; ; step++) {
    const reactions = loads.map((load) => -load);
    multiplyCells(system.elements, system.elementMatrices, heads, reactions);
    multiplyCells(system.leaks, system.leakMatrices, heads, reactions);
    const rest = measureLeftover(nodeDofs, reactions, loads);
    if (dofCount === 0 || (step > 0 && (rest < leftoverTolerance || step === 3 || rest > leftovers / 2)))
      return reactions;
    if (step > 0) leftovers = rest;
    for (let node = 0; node < nodeDofs.length; node++)
      if (nodeDofs[node] >= 0) rhs[nodeDofs[node]] = -reactions[node];
    solve(system.factor!, rhs, rhs);
    for (let node = 0; node < nodeDofs.length; node++)
      if (nodeDofs[node] >= 0) heads[node] += rhs[nodeDofs[node]];
  }
}

/** Sum of what is left over at free nodes, relative to what enters and leaves. */
function measureLeftover(nodeDofs: Int32Array, reactions: Float64Array, loads: Float64Array): number {
  let rest = 0;
  let through = 0;
  for (let node = 0; node < nodeDofs.length; node++) {
    if (nodeDofs[node] >= 0) {
      rest += Math.abs(reactions[node]);
      through += Math.abs(loads[node]);
    } else {
      through += Math.abs(reactions[node]);
    }
  }
  return through > 0 ? (2 * rest) / through : 0;
}

function refuse(
  mesh: Mesh,
  reason: 'unconstrained' | 'conflicting-heads' | 'not-positive-definite',
  node: number,
): SteadyOutcome {
  return { status: 'refused', reason, at: [mesh.coordinates[2 * node], mesh.coordinates[2 * node + 1]] };
}

/** Visits edges, then drains, each with its condition and its running index. */
function forEachLine(
  mesh: Mesh,
  conditions: SituationConditions,
  visit: (line: LineSides, condition: Condition, index: number) => void,
): void {
  mesh.edges.forEach((line, i) => visit(line, conditions.edges[i], i));
  mesh.drains.forEach((line, i) => visit(line, conditions.drains[i], mesh.edges.length + i));
}

type Prescribed = { heads: Float64Array; isPrescribed: Uint8Array } | { conflict: number };

/** Where two lines meet in one node their heads must agree to 1e-9 of the span: what differs by less is rounding of the input. */
function prescribeHeads(mesh: Mesh, conditions: SituationConditions): Prescribed {
  const heads = new Float64Array(mesh.nodeCount);
  const isPrescribed = new Uint8Array(mesh.nodeCount);
  const nodes = new Int32Array(mesh.order + 1);
  const levels = [...conditions.edges, ...conditions.drains].flatMap((c) =>
    c.type === 'head' ? [c.head] : [],
  );
  const tolerance = 1e-9 * (Math.max(...levels, -Infinity) - Math.min(...levels, Infinity));
  let conflict = -1;
  forEachLine(mesh, conditions, (line, condition) => {
    if (condition.type !== 'head') return;
    for (let index = 0; index < line.elements.length; index++) {
      sideNodes(mesh, line, index, nodes);
      for (const node of nodes) {
        if (isPrescribed[node] && Math.abs(heads[node] - condition.head) > tolerance) conflict = node;
        isPrescribed[node] = 1;
        heads[node] = condition.head;
      }
    }
  });
  return conflict >= 0 ? { conflict } : { heads, isPrescribed };
}

function systemFor(
  model: SteadyModel,
  medium: Medium,
  conditions: SituationConditions,
  isPrescribed: Uint8Array,
): SteadySystem {
  const types = [...conditions.edges, ...conditions.drains]
    .map((c) => (c.type === 'head' ? 'h' : '-'))
    .join('');
  const key = `${types}|${medium.conductances.map((c) => (c > 0 ? 'c' : '-')).join('')}`;
  const known = model.systems.get(key);
  if (known) return known;
  const { mesh } = model;
  const stride = mesh.order === 1 ? 3 : 6;
  const elements: CellSet = { stride, count: mesh.elementCount, nodes: mesh.elements };
  const { leaks, leakBarriers } = listLeaks(mesh, medium.conductances);
  const nodeDofs = new Int32Array(mesh.nodeCount);
  let dofCount = 0;
  for (let node = 0; node < mesh.nodeCount; node++) nodeDofs[node] = isPrescribed[node] ? -1 : dofCount++;
  const scattered = scatterCells([elements, leaks], nodeDofs, dofCount);
  const symbolic = analyze(scattered.pattern, order(scattered.pattern));
  const system: SteadySystem = {
    elements,
    leaks,
    leakBarriers,
    nodeDofs,
    dofCount,
    scattered,
    symbolic,
    memory: reserveFactor(symbolic),
    elementMatrices: new Float64Array(stride * stride * mesh.elementCount),
    leakMatrices: new Float64Array(leaks.stride * leaks.stride * leaks.count),
    medium: null,
    factor: null,
  };
  model.systems.set(key, system);
  return system;
}

/** Pairs the faces of every barrier that lets water through: start, end(, middle) of the left face, then of the right. */
function listLeaks(
  mesh: Mesh,
  conductances: readonly number[],
): { leaks: CellSet; leakBarriers: Int32Array } {
  const half = mesh.order + 1;
  const nodes: number[] = [];
  const barriers: number[] = [];
  const face = new Int32Array(half);
  mesh.barriers.forEach(({ left, right }, barrier) => {
    if (!(conductances[barrier] > 0)) return;
    for (let index = 0; index < left.elements.length; index++) {
      sideNodes(mesh, left, index, face);
      nodes.push(...face);
      sideNodes(mesh, right, index, face);
      nodes.push(...face);
      barriers.push(barrier);
    }
  });
  return {
    leaks: { stride: 2 * half, count: barriers.length, nodes: Int32Array.from(nodes) },
    leakBarriers: Int32Array.from(barriers),
  };
}

/** Computes matrices and factor for a medium unless they stand already. Returns the failing degree of freedom or −1. */
function updateFactor({ mesh, weight }: SteadyModel, system: SteadySystem, medium: Medium): number {
  if (system.medium === medium && system.factor) return -1;
  system.medium = null;
  integrateStiffness(mesh, medium.conductivities.map(conductivityTensor), weight, system.elementMatrices);
  const { leaks, leakMatrices, leakBarriers, scattered } = system;
  const size = leaks.stride * leaks.stride;
  for (let cell = 0; cell < leaks.count; cell++) {
    const nodes = leaks.nodes.subarray(cell * leaks.stride, (cell + 1) * leaks.stride);
    const out = leakMatrices.subarray(cell * size, (cell + 1) * size);
    integrateLeak(mesh, nodes, medium.conductances[leakBarriers[cell]], weight, out);
  }
  const values = new Float64Array(scattered.pattern.rowIndices.length);
  assemble(scattered.scatters[0], system.elementMatrices, values);
  assemble(scattered.scatters[1], leakMatrices, values);
  const outcome = factorize(system.symbolic, values, system.memory);
  if (outcome.status !== 'factorized') return outcome.row;
  system.factor = outcome.factor;
  system.medium = medium;
  return -1;
}

function collect(
  model: SteadyModel,
  system: SteadySystem,
  conditions: SituationConditions,
  {
    heads,
    reactions,
    fluxTotals,
  }: { heads: Float64Array; reactions: Float64Array; fluxTotals: Float64Array },
): SteadySolution {
  const { mesh } = model;
  const energy =
    sumEnergy(system.elements, system.elementMatrices, heads) +
    sumEnergy(system.leaks, system.leakMatrices, heads);
  const lineFlows = attributeFlows(mesh, conditions, system, heads, reactions);
  let inflow = 0;
  let outflow = 0;
  lineFlows.forEach((flow, index) => {
    lineFlows[index] = flow + fluxTotals[index];
    if (lineFlows[index] > 0) inflow += lineFlows[index];
    else outflow -= lineFlows[index];
  });
  const through = Math.max(inflow, outflow);
  return {
    heads,
    reactions,
    edgeFlows: lineFlows.slice(0, mesh.edges.length),
    drainFlows: lineFlows.slice(mesh.edges.length),
    inflow,
    outflow,
    balance: through > 0 ? Math.abs(inflow - outflow) / through : 0,
    energy,
    unknowns: system.dofCount,
    system,
  };
}
