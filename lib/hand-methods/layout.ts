// What a section covered by the hand methods is made of, and how one that is not says why.
import type { Fragment } from './fragments';

/** A section the method of fragments covers. */
export interface RecognisedSection {
  readonly kind: 'single-wall' | 'flat-floor' | 'floor-with-cutoffs' | 'symmetric-pit';
  /** In the direction of flow, on the transformed section; empty for a flat floor. */
  readonly fragments: readonly Fragment[];
  /** Width and thickness of a flat floor, on the transformed section. */
  readonly floor: { readonly width: number; readonly thickness: number } | null;
  readonly head: number;
  /** √(k_h k_v), m/s. */
  readonly permeability: number;
  /** √(k_v/k_h), by which horizontal lengths were multiplied. */
  readonly horizontalScale: number;
  /** Equal flows side by side: 2 for a pit drawn whole. */
  readonly flows: 1 | 2;
  /** Edge from which water leaves. */
  readonly exitEdge: string;
}

/** Signals that a condition of the method does not hold. */
export class NotCovered {
  constructor(readonly reason: string) {}
}

/** A level bed under one water level. */
export interface Bed {
  readonly edge: string;
  readonly from: number;
  readonly to: number;
  readonly elevation: number;
  readonly head: number;
}

/** A straight, vertical, watertight wall. */
export interface UprightWall {
  readonly x: number;
  readonly top: number;
  readonly tip: number;
}

/** What a covered section is made of, before it is cut into fragments. */
export interface Layout {
  readonly base: number;
  /** From left to right. */
  readonly beds: readonly Bed[];
  /** From left to right. */
  readonly walls: readonly UprightWall[];
  /** Lengths nearer than this are equal, m. */
  readonly tolerance: number;
  readonly horizontalScale: number;
  /** Elevation of the ground's surface between two beds at a chainage, m. */
  surfaceAt(x: number): number;
}

/**
 * Refuses with a reason unless a condition of the method holds.
 *
 * @param holds - The condition.
 * @param reason - One sentence for the engineer.
 */
export function requireThat(holds: boolean, reason: string): asserts holds {
  if (!holds) throw new NotCovered(reason);
}
