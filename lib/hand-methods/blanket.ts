// Seepage under a levee through a pervious layer with a top stratum of low permeability.
import { computed, demand, given, type HandCalculation } from './calculation';

/** What the top stratum does on one side of the levee. */
export type BlanketSide =
  | { readonly kind: 'none' }
  /** So long that its end is not felt. */
  | { readonly kind: 'infinite'; readonly permeability: number; readonly thickness: number }
  /** Ends in open water or exposed sand at `length`. */
  | {
      readonly kind: 'open';
      readonly permeability: number;
      readonly thickness: number;
      readonly length: number;
    }
  /** Ends at a vertical barrier at `length`. */
  | {
      readonly kind: 'blocked';
      readonly permeability: number;
      readonly thickness: number;
      readonly length: number;
    }
  /** Watertight up to open water or exposed sand at `length`. */
  | { readonly kind: 'impervious'; readonly length: number };

/** A levee on a pervious layer. */
export interface Levee {
  /** k_f, m/s. */
  readonly permeability: number;
  /** d, m. */
  readonly thickness: number;
  /** L₂, m. */
  readonly baseWidth: number;
  readonly head: number;
  readonly riverside: BlanketSide;
  readonly landside: BlanketSide;
}

/** Answers of the blanket equations. */
export interface BlanketValues {
  readonly entranceDistance: number;
  readonly exitDistance: number;
  /** Under the top stratum at the landside toe, m above the ground. */
  readonly toeHead: number;
  /** Upward through the landside top stratum at the toe; null without one. */
  readonly toeGradient: number | null;
  /** m³/s per metre */
  readonly discharge: number;
}

/**
 * Computes the effective length of one side.
 *
 * @param side - What the top stratum does there.
 * @param permeability - Of the pervious layer k_f, m/s.
 * @param thickness - Of the pervious layer d, m.
 * @returns x₁ or x₃, m.
 * @source Bennett (1946), Trans. ASCE 111; EM 1110-2-1913 (2000), app. B (from memory); open end 0.43 d as in the manual, exact 0.4413 d.
 */
export function effectiveDistance(side: BlanketSide, permeability: number, thickness: number): number {
  if (side.kind === 'none') return 0.43 * thickness;
  if (side.kind === 'impervious') return side.length;
  const c = leakage(side, permeability, thickness);
  if (side.kind === 'infinite') return 1 / c;
  const end = Math.tanh(c * side.length);
  return side.kind === 'open' ? end / c : 1 / (c * end);
}

function leakage(
  side: { permeability: number; thickness: number },
  permeability: number,
  thickness: number,
): number {
  demand(side.permeability > 0 && side.thickness > 0, 'the top stratum must have a size and a permeability');
  return Math.sqrt(side.permeability / (permeability * side.thickness * thickness));
}

/**
 * Computes head and gradient at the landside toe of a levee and the seepage under it.
 *
 * @param levee - Pervious layer, base width, head and the two sides.
 * @returns The calculation laid out; `isInRange` is false where the top stratum is less than ten times tighter than the layer.
 * @source Bennett (1946); Turnbull & Mansur (1961); EM 1110-2-1913 (2000), app. B (from memory).
 */
export function computeBlanket(levee: Levee): HandCalculation<BlanketValues> {
  const { permeability, thickness, baseWidth, head, riverside, landside } = levee;
  const x1 = effectiveDistance(riverside, permeability, thickness);
  const x3 = effectiveDistance(landside, permeability, thickness);
  const S = x1 + baseWidth + x3;
  const discharge = (permeability * thickness * head) / S;
  const toeHead = (head * x3) / S;
  const toeGradient = 'thickness' in landside ? toeHead / landside.thickness : null;
  const sides = [riverside, landside].filter((side) => 'permeability' in side);
  return {
    title: 'Levee on a pervious layer with a top stratum',
    values: { entranceDistance: x1, exitDistance: x3, toeHead, toeGradient, discharge },
    working: [
      given('k_f', 'permeability of the pervious layer', permeability, 'm/s'),
      given('d', 'thickness of the pervious layer', thickness, 'm'),
      given('L₂', 'base width of the levee', baseWidth, 'm'),
      given('H', 'net head', head, 'm'),
      computed('x₁', 'effective entrance distance', describeSide(riverside), x1, 'm'),
      computed('x₃', 'effective exit distance', describeSide(landside), x3, 'm'),
      computed('S', 'effective length of flow', 'x₁ + L₂ + x₃', S, 'm'),
      computed('q', 'seepage', 'k_f d H / S', discharge, 'm³/s per m'),
      computed('h₀', 'head under the top stratum at the landside toe', 'H x₃ / S', toeHead, 'm'),
      ...(toeGradient === null
        ? []
        : [computed('i₀', 'upward gradient through it', 'h₀ / z', toeGradient, '')]),
    ],
    source:
      'Bennett (1946), Trans. ASCE 111; Turnbull & Mansur (1961); EM 1110-2-1913 (2000), app. B (from memory)',
    range: 'Level layers; the top stratum at least ten times tighter than the pervious layer.',
    isInRange: sides.every((side) => permeability / side.permeability >= 10),
  };
}

function describeSide(side: BlanketSide): string {
  const forms = {
    none: '0.43 d',
    infinite: '1 / c, c = √(k_b / (k_f z d))',
    open: 'tanh(c L) / c, c = √(k_b / (k_f z d))',
    blocked: '1 / (c tanh(c L)), c = √(k_b / (k_f z d))',
    impervious: 'L',
  } as const;
  return forms[side.kind];
}

/**
 * Computes the head under the landside top stratum at a distance from the toe.
 *
 * @param levee - As for {@link computeBlanket}.
 * @param distance - Landward of the toe, m.
 * @returns m above the ground.
 * @source EM 1110-2-1913 (2000), app. B (from memory).
 */
export function blanketHeadAt(levee: Levee, distance: number): number {
  const { landside, permeability, thickness } = levee;
  const { toeHead } = computeBlanket(levee).values;
  demand(landside.kind !== 'none', 'without a top stratum there is no head under it');
  if (landside.kind === 'none') return 0;
  if (landside.kind === 'impervious') return toeHead * (1 - distance / landside.length);
  const c = leakage(landside, permeability, thickness);
  if (landside.kind === 'infinite') return toeHead * Math.exp(-c * distance);
  const rest = c * (landside.length - distance);
  const all = c * landside.length;
  return landside.kind === 'blocked'
    ? (toeHead * Math.cosh(rest)) / Math.cosh(all)
    : (toeHead * Math.sinh(rest)) / Math.sinh(all);
}
