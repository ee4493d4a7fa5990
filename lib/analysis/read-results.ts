// Solver fields → the result document of one situation (section-format.md).
import { createGround } from '@/lib/domain/ground';
import type {
  ConvergenceLevel,
  Discharge,
  ExitResult,
  PiezometerResult,
  SituationResult,
  StructureResult,
} from '@/lib/domain/result';
import type { SectionDocument, Situation } from '@/lib/domain/section';
import {
  baseForces,
  createLocator,
  estimateError,
  exitProfile,
  flowNet,
  type FlowNet,
  interpolate,
  type Locator,
  type Mesh,
  type SolvedSection,
  type SteadySolution,
  type StreamSolution,
  waterUnitWeight,
} from '@/solver';
import { followCreep } from './creep-path';

/** One situation solved on one mesh. */
export interface SolvedSituation {
  readonly situation: Situation;
  readonly section: SolvedSection;
  readonly solution: SteadySolution;
  readonly stream: StreamSolution;
}

/** Reads whatever the document asks for of one solved situation; checks and timings are added by the caller. */
export class ResultReader {
  private readonly locator: Locator;
  private readonly mesh: Mesh;

  constructor(
    private readonly document: SectionDocument,
    private readonly solved: SolvedSituation,
  ) {
    this.mesh = solved.section.mesh;
    this.locator = createLocator(this.mesh);
  }

  /** Total head at a point, m; null outside the ground. */
  headAt(x: number, y: number): number | null {
    const place = this.locator.find(x, y);
    return place ? interpolate(this.mesh, this.solved.solution.heads, place) : null;
  }

  readMesh(): SituationResult['mesh'] {
    const { nodeCount, elementCount, order, minAngle } = this.mesh;
    return {
      nodes: nodeCount,
      elements: elementCount,
      unknowns: this.solved.solution.unknowns,
      order,
      minAngle,
    };
  }

  /** The bracket where there is one, else the value widened by the estimated relative error. */
  readDischarge(estimatedError: number): Discharge {
    const { solution, stream } = this.solved;
    const value = solution.inflow;
    const isBound = stream.kind === 'bound' && stream.lower !== null && stream.upper !== null;
    const byEdge: Record<string, number> = {};
    this.document.edges.forEach((edge, i) => (byEdge[edge.id] = solution.edgeFlows[i]!));
    this.document.drains.forEach((drain, i) => (byEdge[drain.id] = solution.drainFlows[i]!));
    return {
      value,
      lower: isBound ? Math.min(stream.lower!, value) : value * (1 - estimatedError),
      upper: isBound ? Math.max(stream.upper!, value) : value * (1 + estimatedError),
      unit: this.document.geometry === 'plane' ? 'm3/s/m' : 'm3/s',
      balance: solution.balance,
      byEdge,
      kind: isBound ? 'bound' : 'estimate',
    };
  }

  readPiezometers(): PiezometerResult[] {
    return this.document.piezometers.map(({ id, at, observed }) => {
      const head = this.headAt(at[0], at[1]);
      const measured = observed?.[this.solved.situation.id] ?? null;
      return {
        id,
        head,
        pressure: head === null ? null : waterUnitWeight * (head - at[1]),
        observed: measured,
        difference: head === null || measured === null ? null : head - measured,
      };
    });
  }

  /** Profiles of every edge with a prescribed head from which water leaves. */
  readExits(): ExitResult[] {
    const { section, solution } = this.solved;
    const length = this.document.assessment?.averagingLength ?? 0.5;
    return this.document.edges.flatMap((edge, index) => {
      const leaves = solution.edgeFlows[index]! < -1e-9 * solution.inflow;
      if (section.conditions.edges[index]!.type !== 'head' || !leaves) return [];
      const face = exitProfile(section, index, length);
      return face.profile.length > 0 ? [{ edge: edge.id, ...face }] : [];
    });
  }

  readStructures(): StructureResult[] {
    const { section, solution } = this.solved;
    const { snap } = createGround(this.document);
    return this.document.structures.map((structure, index) => ({
      id: structure.id,
      ...baseForces(this.mesh, section.kind, this.mesh.bases[index]!, solution.heads, structure.base[0]!),
      creepPath: followCreep(this.document, structure, snap),
    }));
  }

  readFlowNet(): FlowNet {
    const { section, solution } = this.solved;
    return flowNet({
      mesh: this.mesh,
      kind: section.kind,
      conductivities: section.conductivities,
      discharge: solution.inflow,
      headRange: headRange(section),
    });
  }

  /** Deepest suction, m of water, and where: ground above its own water that was solved as saturated. */
  readSuction(): { depth: number; at: [number, number] } {
    const { heads } = this.solved.solution;
    const { coordinates } = this.mesh;
    let depth = 0;
    let at: [number, number] = [0, 0];
    for (let node = 0; node < heads.length; node++) {
      const suction = coordinates[2 * node + 1]! - heads[node]!;
      if (suction > depth) {
        depth = suction;
        at = [coordinates[2 * node]!, coordinates[2 * node + 1]!];
      }
    }
    return { depth, at };
  }

  /** Whether the discharge has a mathematical bracket. */
  isBracketed(): boolean {
    return this.solved.stream.kind === 'bound' && this.solved.stream.lower !== null;
  }

  /** Estimated relative error of the discharge on this mesh alone: the energy error squared (Zienkiewicz & Zhu 1987). */
  estimateDischargeError(): number {
    const { mesh, kind, conductivities, heads } = this.solved.section;
    return estimateError(mesh, kind, conductivities, heads).relative ** 2;
  }

  readLevel(exitGradient: number | null): ConvergenceLevel {
    const { value, lower, upper } = this.readDischarge(0);
    return { unknowns: this.solved.solution.unknowns, discharge: value, lower, upper, exitGradient };
  }
}

/** Lowest and highest prescribed head, m. */
export function headRange(section: SolvedSection): [number, number] {
  const heads = [...section.conditions.edges, ...section.conditions.drains].flatMap((c) =>
    c.type === 'head' ? [c.head] : [],
  );
  return [Math.min(...heads), Math.max(...heads)];
}
