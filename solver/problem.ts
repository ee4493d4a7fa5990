// The solver's input: plain numbers in SI, no names, no document words. lib/analysis/build-problem.ts makes it.

/** A polyline, `[x, y]` pairs in metres. */
export type Path = readonly (readonly [number, number])[];

/** What holds along a path, for one situation. */
export type Condition =
  /** Total head in metres along the whole path. */
  | { readonly type: 'head'; readonly head: number }
  /** Inflow normal to the path, m/s, positive into the ground. */
  | { readonly type: 'flux'; readonly rate: number }
  | { readonly type: 'impervious' };

/** Conductivity of one material; `kMajor >= 0` acts along `angle`. */
export interface Conductivity {
  /** m/s */
  readonly kMajor: number;
  /** m/s */
  readonly kMinor: number;
  /** Radians anticlockwise from +x to the major axis. */
  readonly angle: number;
}

/** An area of one material. A later region overrides an earlier one where they overlap. */
export interface Region {
  readonly outline: Path;
  readonly holes: readonly Path[];
  /** Index into `conductivities`. */
  readonly material: number;
}

/** A thin wall; flux across it = conductance times the head jump. */
export interface Barrier {
  readonly path: Path;
  /** 1/s; 0 is watertight. */
  readonly conductance: number;
}

/** What the mesh depends on: unchanged between the situations of one section. */
export interface SectionGeometry {
  readonly kind: 'plane' | 'axisymmetric';
  readonly regions: readonly Region[];
  readonly barriers: readonly Barrier[];
  /** Paths inside the ground that carry a condition. */
  readonly drains: readonly Path[];
  /** Paths along the outline that carry a condition. */
  readonly edges: readonly Path[];
  /** Paths along which water pressure acts on a structure. */
  readonly bases: readonly Path[];
}

/** One situation of a section: a condition for each edge and drain, in their order. */
export interface SituationConditions {
  readonly edges: readonly Condition[];
  readonly drains: readonly Condition[];
}
