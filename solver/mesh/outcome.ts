// What mesh generation is asked for and what it answers. Codes, not sentences: the caller words them.
import type { Mesh } from './mesh';

/** A kind of input line a finding can point at. */
export type LineKind = 'region' | 'barrier' | 'drain' | 'edge' | 'base';

/** What geometry can be found guilty of. The first six refuse the section, with 'too-fine'; the rest only remark. */
export type GeometryFindingCode =
  /** An outline or hole crosses itself. Refuses. */
  | 'region-crosses-itself'
  /** A region without area, or no ground at all. Refuses. */
  | 'region-empty'
  /** Part of an edge's path is not on the outline of the ground. Refuses. */
  | 'edge-off-outline'
  /** Part of a barrier lies outside the ground and off its outline. Refuses. */
  | 'barrier-outside'
  /** Part of a drain lies outside the ground. Refuses. */
  | 'drain-outside'
  /** Part of a base touches no ground. Refuses. */
  | 'base-off-outline'
  /** A coordinate is not a finite number, or the mesh cannot be made within reason. Refuses. */
  | 'too-fine'
  /** A gap wider than the snap distance and narrower than 0.5 % of the section; `value` is its width, metres. */
  | 'near-gap'
  /** The density was lowered to stay below `maxElements`; `value` is the size factor used. */
  | 'element-limit'
  /** The input itself has an angle below 26 degrees, which its triangles keep; `value` is that angle, degrees. */
  | 'small-angle'
  /** The ground is in several pieces between which no water can pass; `value` is their number. */
  | 'ground-in-pieces';

/** One remark or refusal, with the place it speaks of. */
export interface GeometryFinding {
  readonly code: GeometryFindingCode;
  /** metres */
  readonly at: readonly [number, number];
  readonly line?: { readonly kind: LineKind; readonly index: number };
  readonly value?: number;
}

/** How fine the mesh shall be. */
export interface MeshOptions {
  /** 1: tri3. 2: tri6. */
  readonly order: 1 | 2;
  /** Scales every element size; 1 gives about 2 000 unknowns for a simple section with order 2; halving it about quadruples the elements. */
  readonly sizeFactor: number;
  /** Upper limit on the number of elements. */
  readonly maxElements: number;
  /** Points where a given element size (metres, not scaled by `sizeFactor`) is wanted. */
  readonly refineAt?: readonly { readonly x: number; readonly y: number; readonly size: number }[];
}

/** A mesh with remarks, or the reasons why there is none. */
export type MeshOutcome =
  | { readonly status: 'meshed'; readonly mesh: Mesh; readonly findings: GeometryFinding[] }
  | { readonly status: 'refused'; readonly findings: GeometryFinding[] };
