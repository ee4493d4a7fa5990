// The result document, `underfall-result/1` (section-format.md). Plain JSON; SI units.
import type { Issue } from './issue';

export interface ResultDocument {
  format: 'underfall-result/1';
  solver: { name: 'underfall'; version: string };
  section: { sha256: string };
  situations: SituationResult[];
  notes: ResultNote[];
}

export interface ResultNote {
  code: string;
  severity: Issue['severity'];
  message: string;
  at?: [number, number];
  subject?: string;
  /** JSON Pointer into the section document. */
  pointer?: string;
}

export interface SituationResult {
  id: string;
  regime: 'confined' | 'free-surface';
  mesh: { nodes: number; elements: number; unknowns: number; order: number; minAngle: number };
  discharge: Discharge;
  piezometers: PiezometerResult[];
  exit: ExitResult[];
  structures: StructureResult[];
  flowNet: FlowNetSummary;
  phreatic: [number, number][] | null;
  checks: CheckResult[];
  convergence: { dischargeError: number; exitGradientError: number | null; levels: ConvergenceLevel[] };
  timings: { mesh: number; assemble: number; factorize: number; solve: number; total: number };
}

export interface Discharge {
  value: number;
  lower: number;
  upper: number;
  unit: 'm3/s/m' | 'm3/s';
  /** Net of all flows over the inflow, should be round-off. */
  balance: number;
  /** By edge and drain id, positive into the ground. */
  byEdge: Record<string, number>;
  /** `bound`: a mathematical bracket (two levels, confined). `estimate`: from the change between meshes. */
  kind: 'bound' | 'estimate';
}

export interface PiezometerResult {
  id: string;
  head: number | null;
  /** kPa */
  pressure: number | null;
  observed: number | null;
  /** Head less observed, m. */
  difference: number | null;
}

export interface ExitResult {
  edge: string;
  max: {
    gradient: number | null;
    averaged: number;
    averagingLength: number;
    at: [number, number];
    unbounded: boolean;
  };
  profile: ExitPoint[];
}

export interface ExitPoint {
  at: [number, number];
  /** Outward component of the hydraulic gradient; null exactly at a singular point. */
  gradient: number | null;
  averaged: number;
  /** Outward, m/s; null exactly at a singular point. */
  flux: number | null;
  /** Metres, where it is not the document's length. */
  averagingLength?: number;
}

export interface StructureResult {
  id: string;
  upliftForce: number;
  horizontalForce: number;
  upliftMoment: number;
  profile: { at: [number, number]; pressure: number }[];
  /** Path of creep along base and walls, for the creep check. */
  creepPath: {
    vertical: number;
    horizontal: number;
    /** Vertical plus a third of the horizontal (Lane 1935). */
    weighted: number;
    points: [number, number][];
  };
}

export interface FlowNetSummary {
  drops: number;
  channels: number;
  shapeFactor: number;
  /** Permeability the shape factor is stated against, m/s: √(kMajor·kMinor) of the material it names. */
  referencePermeability?: number;
}

export interface ConvergenceLevel {
  unknowns: number;
  discharge: number;
  lower: number;
  upper: number;
  exitGradient: number | null;
}

/** One line of a calculation laid out. */
export interface WorkingLine {
  symbol: string;
  meaning: string;
  value: number;
  unit: string;
  /** The formula this line evaluates, where it is not an input. */
  formula?: string;
}

export type Verdict = 'meets' | 'falls-short' | 'attention' | 'not-applicable';

export interface CheckResult {
  /** Kebab-case kind of check: `exit-gradient`, `heave-prism`, `flotation`, `creep-lane`, `fragments`. */
  id: string;
  title: string;
  /** Id of the edge, barrier or structure it is about. */
  subject: string;
  /** What the value is, in words, with its definition. */
  quantity: string;
  value: number | null;
  required: number | null;
  verdict: Verdict;
  /** Why, where the verdict is `attention` or `not-applicable`; a caution otherwise. */
  remark?: string;
  /** Method, author, year, section; and the criterion's own source. */
  source: string;
  working: WorkingLine[];
}
