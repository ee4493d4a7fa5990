// The public names of the solver. Nothing else is imported from outside this folder.
export { waterUnitWeight } from './constants';
export { SolverError, type SolverErrorCode, type SolverErrorMessage, packSolverError } from './errors';
export type {
  Barrier,
  Condition,
  Conductivity,
  Path,
  Region,
  SectionGeometry,
  SituationConditions,
} from './problem';
export type { BarrierSides, LineSides, Mesh } from './mesh/mesh';
export { buildMesh } from './mesh/build-mesh';
export type {
  GeometryFinding,
  GeometryFindingCode,
  LineKind,
  MeshOptions,
  MeshOutcome,
} from './mesh/outcome';
export {
  type Medium,
  prepareSteady,
  type SteadyModel,
  type SteadyOutcome,
  type SteadySolution,
  solveSteady,
} from './analysis/steady';
export { solveStreamFunction, type StreamSolution } from './analysis/stream-function';
export { conductivityTensor } from './assembly/element-stiffness';
export { type BaseForces, baseForces, type PressurePoint } from './post/base-forces';
export { type ErrorIndicator, estimateError } from './post/error-indicator';
export { type ExitProfile, exitProfile, type ExitProfilePoint } from './post/exit-profile';
export { type FlowNet, flowNet } from './post/flow-net';
export { createLocator, interpolate, type Locator, type Place } from './post/locate';
export { recoverGradients } from './post/recover';
export type { SolvedSection } from './post/solved-section';
export { type LevelLines, traceLevels } from './post/trace-levels';
export { type CscMatrix, multiply, type SparsityPattern } from './sparse/csc-matrix';
export { order } from './sparse/order';
export { analyze, type SymbolicFactor } from './sparse/analyze';
export {
  factorize,
  type FactorizeMemory,
  type FactorizeOutcome,
  type NumericFactor,
  reserveFactor,
} from './sparse/factorize';
export { solve } from './sparse/solve';
export { type MatrixMarketOutcome, readMatrixMarket } from './sparse/matrix-market';
