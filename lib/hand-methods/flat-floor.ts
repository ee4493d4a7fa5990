// A flat impervious floor on the surface, without cutoffs, on a layer of finite depth or on deep ground.
import { computed, demand, given, type HandCalculation } from './calculation';
import { completeK, completeKPrime } from './elliptic';

/** A floor on a layer. */
export interface FlatFloor {
  /** Width B, m. */
  readonly width: number;
  /** Thickness of the layer T, m. */
  readonly thickness: number;
  readonly head: number;
  readonly permeability: number;
}

/**
 * Computes the discharge under a flat floor on a layer, `q = kH K′/2K`, `m = tanh(πB/4T)`.
 *
 * @param floor - Width, thickness, head and permeability.
 * @returns The calculation laid out; no exit gradient, which theory makes infinite at the floor's end.
 * @throws {HandMethodError} `outside-definition` unless B and T are positive.
 * @source Pavlovsky (1922); Harr (1962), ch. 5 (derived anew, section from memory).
 */
export function computeFlatFloor(floor: FlatFloor): HandCalculation<{ discharge: number }> {
  const { width, thickness, head, permeability } = floor;
  demand(width > 0 && thickness > 0, 'floor and layer must have a size');
  const angle = (Math.PI * width) / (4 * thickness);
  const modulus = { m: Math.tanh(angle), complement: 1 / Math.cosh(angle) };
  const K = completeK(modulus);
  const Kp = completeKPrime(modulus);
  const discharge = (permeability * head * Kp) / (2 * K);
  return {
    title: 'Flat floor without cutoffs',
    values: { discharge },
    working: [
      given('B', 'width of the floor', width, 'm'),
      given('T', 'thickness of the layer', thickness, 'm'),
      given('H', 'head lost', head, 'm'),
      given('k', 'permeability', permeability, 'm/s'),
      computed('m', 'modulus', 'tanh(π B / 4T)', modulus.m, ''),
      computed('K', 'complete elliptic integral of m', 'K(m)', K, ''),
      computed('K′', 'the same of √(1 − m²)', 'K(√(1 − m²))', Kp, ''),
      computed('q', 'discharge', 'k H K′ / (2 K)', discharge, 'm³/s per m'),
    ],
    source: 'Pavlovsky (1922); Harr (1962), Groundwater and Seepage, ch. 5 (section from memory)',
    range:
      'Floor on the surface of one uniform layer, level base, far ends remote. The exit gradient at the end of the floor is infinite in theory and is not stated.',
    isInRange: true,
  };
}

/**
 * Describes uplift and exit gradient of a flat floor on deep ground.
 *
 * @param halfWidth - b, m.
 * @param head - H, m.
 * @returns Head under the floor at x from its centre (downstream positive), and the gradient beyond it.
 * @source Weaver (1932); Khosla, Bose & Taylor (1936); Harr (1962), sec. 5–2 (from memory).
 */
export function describeDeepFloor(
  halfWidth: number,
  head: number,
): { headAt: (x: number) => number; gradientAt: (x: number) => number } {
  demand(halfWidth > 0, 'the floor must have a width');
  return {
    headAt: (x) => (head / Math.PI) * Math.acos(x / halfWidth),
    gradientAt: (x) => head / (Math.PI * Math.sqrt(x * x - halfWidth * halfWidth)),
  };
}
