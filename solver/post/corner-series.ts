// The gradient beside a corner as the first terms of its own series, fitted to what the patches say farther out.
import { Matrix, solve } from 'ml-matrix';

/** A fitted series, by distance r from the corner along the face. */
export interface CornerSeries {
  /** How much of the series counts: 1 beside the corner, 0 where the patches speak alone. */
  shareAt(r: number): number;
  /** Outward gradient; infinite at r = 0 of a singular corner. */
  valueAt(r: number): number;
}

/** What a series is fitted to. */
export interface SeriesInput {
  /** Exponents λ of the head's terms, ascending; the gradient's are λ − 1. */
  readonly exponents: readonly number[];
  /** Distances of the face's nodes from the corner, ascending from 0. */
  readonly places: readonly number[];
  /** Distance within which the wedge is all that matters. */
  readonly reach: number;
  /** Outward gradient of the patches. */
  readonly raw: (r: number) => number;
}

/** Sides next to the corner whose patches cannot follow the series: quadratics do not bend like r^(λ − 1). */
const skippedSides = 3;
const mostSides = 9;
/** Part of the reach that the first terms are trusted in. */
const reachShare = 0.5;
/** Largest misfit of the series relative to the patches, root mean square, beyond which it is not used. */
const misfitLimit = 0.02;

/**
 * Fits the first terms of the series Σ c_k r^(λ_k − 1) to the outward gradient near a corner.
 *
 * Polynomial recovery is wrong within a few elements of a corner where the head is no polynomial. The series is exact there, its
 * coefficients come from the nearest elements where both hold.
 *
 * @param input - Exponents, nodes of the face, reach and gradient.
 * @returns The series, its first term alone where too few nodes lie within reach or where series and patches disagree; null where the
 *   field is smooth (an integer least exponent).
 * @source Strang & Fix (1973), An Analysis of the Finite Element Method, ch. 8 (singular functions; from memory).
 */
export function fitCornerSeries({ exponents, places, reach, raw }: SeriesInput): CornerSeries | null {
  if (Math.abs(exponents[0] - Math.round(exponents[0])) < 1e-3) return null;
  const limit = reachShare * reach;
  const within = places.filter((r) => r <= limit).length;
  const skipped = Math.min(skippedSides, within - 3);
  if (skipped < 1) return matchFirstTerm(exponents[0], places, raw);
  const chosen = places.slice(skipped, Math.min(within, skipped + mostSides + 1));
  const samples = chosen.flatMap((r, i) => (i === 0 ? [r] : [(chosen[i - 1] + r) / 2, r]));
  const count = Math.min(exponents.length, samples.length - 2);
  const scale = samples[samples.length - 1];
  const values = samples.map(raw);
  // Each sample counts relative to the leading term, so that near and far ones weigh alike.
  const weight = (r: number): number => (r / scale) ** (1 - exponents[0]);
  const rows = samples.map((r) => exponents.slice(0, count).map((l) => weight(r) * (r / scale) ** (l - 1)));
  const right = samples.map((r, i) => [weight(r) * values[i]]);
  const coefficients = solve(new Matrix(rows), new Matrix(right), true).to1DArray();
  let [misfit, size] = [0, 0];
  rows.forEach((row, i) => {
    const fitted = row.reduce((sum, basis, k) => sum + basis * coefficients[k], 0);
    misfit += (fitted - right[i][0]) ** 2;
    size += right[i][0] ** 2;
  });
  if (!(misfit <= misfitLimit ** 2 * size)) return matchFirstTerm(exponents[0], places, raw);
  const [near, far] = [samples[0], samples[Math.min(samples.length - 1, 4)]];
  return {
    shareAt: (r) => (r <= near ? 1 : r >= far ? 0 : (far - r) / (far - near)),
    valueAt: (r) => coefficients.reduce((sum, c, k) => sum + c * (r / scale) ** (exponents[k] - 1), 0),
  };
}

// Within the first side the leading term, matched to the patches at the side's far end.
function matchFirstTerm(
  exponent: number,
  places: readonly number[],
  raw: (r: number) => number,
): CornerSeries {
  const end = Math.min(places[1], places[places.length - 1] / 2);
  const value = raw(end);
  return {
    shareAt: (r) => (r < end ? 1 : 0),
    valueAt: (r) => value * (r / end) ** (exponent - 1),
  };
}
