// One watertight wall in level ground on a layer of finite depth, and its limit of infinite depth.
import { computed, demand, given, type HandCalculation } from './calculation';
import { completeK, completeKPrime, incompleteF, type Modulus } from './elliptic';

const source =
  'Muskat (1937), The Flow of Homogeneous Fluids; Pavlovsky (1922); Harr (1962), Groundwater and Seepage, secs. 5–6 (formulas derived anew, sections from memory)';

/** A wall in a layer. */
export interface SingleWall {
  /** Thickness of the pervious layer T, m. */
  readonly thickness: number;
  /** Embedment of the wall s, m. */
  readonly embedment: number;
  /** Head lost H, m. */
  readonly head: number;
  /** Permeability k, m/s. */
  readonly permeability: number;
}

/** Answers for a wall in a layer. */
export interface SingleWallValues {
  /** m³/s per metre */
  readonly discharge: number;
  /** At the wall, downstream. */
  readonly exitGradient: number;
  readonly modulus: Modulus;
}

/**
 * Forms the modulus of a wall in a layer, `m = sin(πs/2T)`.
 *
 * @param embedment - s, m.
 * @param thickness - T, m.
 * @returns The modulus and its complement.
 * @throws {HandMethodError} `outside-definition` unless 0 < s < T.
 */
export function wallModulus(embedment: number, thickness: number): Modulus {
  demand(embedment > 0 && embedment < thickness, 'the wall must end inside the layer');
  const angle = (Math.PI * embedment) / (2 * thickness);
  return { m: Math.sin(angle), complement: Math.cos(angle) };
}

/**
 * Computes discharge and exit gradient of one wall in level ground, `q = kH K′/2K`.
 *
 * @param wall - Thickness, embedment, head and permeability.
 * @returns The calculation laid out.
 * @throws {HandMethodError} `outside-definition` unless 0 < s < T.
 * @source Muskat (1937); Harr (1962), secs. 5–6.
 */
export function computeSingleWall(wall: SingleWall): HandCalculation<SingleWallValues> {
  const { thickness, embedment, head, permeability } = wall;
  const modulus = wallModulus(embedment, thickness);
  const K = completeK(modulus);
  const Kp = completeKPrime(modulus);
  const discharge = (permeability * head * Kp) / (2 * K);
  const exitGradient = (head * Math.PI) / (4 * K * thickness * modulus.m);
  return {
    title: 'One wall in a layer of finite depth',
    values: { discharge, exitGradient, modulus },
    working: [
      given('T', 'thickness of the layer', thickness, 'm'),
      given('s', 'embedment of the wall', embedment, 'm'),
      given('H', 'head lost', head, 'm'),
      given('k', 'permeability', permeability, 'm/s'),
      computed('m', 'modulus', 'sin(π s / 2T)', modulus.m, ''),
      computed('K', 'complete elliptic integral of m', 'K(m)', K, ''),
      computed('K′', 'the same of √(1 − m²)', 'K(√(1 − m²))', Kp, ''),
      computed('q', 'discharge', 'k H K′ / (2 K)', discharge, 'm³/s per m'),
      computed('i_E', 'exit gradient at the wall', 'π H / (4 K T m)', exitGradient, ''),
    ],
    source,
    range:
      'One watertight wall, level ground on both sides, one uniform layer on a level impervious base, far ends remote.',
    isInRange: true,
  };
}

/**
 * Computes the outward gradient at the ground downstream of a wall in a layer.
 *
 * @param wall - Thickness, embedment and head.
 * @param distance - From the wall, m.
 * @returns The gradient.
 * @source Derived from u = cosh(πz/T); Polubarinova-Kochina (1962), ch. III.
 */
export function groundGradient(wall: Omit<SingleWall, 'permeability'>, distance: number): number {
  const { thickness: T, embedment: s, head } = wall;
  const K = completeK(wallModulus(s, T));
  const root = Math.sqrt(Math.cosh((Math.PI * distance) / T) - Math.cos((Math.PI * s) / T));
  return (head * Math.PI) / (2 * Math.SQRT2 * K * T * root);
}

/**
 * Computes the head on the downstream face of a wall in a layer, above the downstream level.
 *
 * @param wall - Thickness, embedment and head.
 * @param depth - Below the bed, 0 … s, m.
 * @returns Metres; on the upstream face it is H less this.
 * @source Harr (1962), sec. 5–6: h = (H/2) F(φ, m)/K(m), sin φ = sin(πy/2T)/sin(πs/2T).
 */
export function faceHead(wall: Omit<SingleWall, 'permeability'>, depth: number): number {
  const { thickness: T, embedment: s, head } = wall;
  const modulus = wallModulus(s, T);
  const phi = Math.asin(Math.min(1, Math.sin((Math.PI * depth) / (2 * T)) / modulus.m));
  return ((head / 2) * incompleteF(phi, modulus)) / completeK(modulus);
}

/** A wall in ground without a base. */
export interface DeepWall {
  readonly embedment: number;
  readonly head: number;
}

/**
 * Computes exit gradient, ground gradient and face head of one wall in ground of infinite depth.
 *
 * @param wall - Embedment s and head H, m.
 * @returns Exit gradient `H/(πs)`, and functions of distance and depth.
 * @source Harr (1962), sec. 5–5; Polubarinova-Kochina (1962), ch. III.
 */
export function describeDeepWall({ embedment, head }: DeepWall): {
  exitGradient: number;
  gradientAt: (distance: number) => number;
  faceHeadAt: (depth: number) => number;
} {
  demand(embedment > 0, 'the wall must have an embedment');
  return {
    exitGradient: head / (Math.PI * embedment),
    gradientAt: (x) => head / (Math.PI * Math.hypot(x, embedment)),
    faceHeadAt: (y) => (head * Math.asin(y / embedment)) / Math.PI,
  };
}

/**
 * Computes the exact average head, over the head lost, on the base of the soil prism (depth s, width s/2) in front of one wall.
 *
 * Integrates `∂h/∂y + i ∂h/∂x = C/√(cosh(πz/T) − cos(πs/T))` along the level of the tip from the tip, where h = H/2.
 *
 * @param embedment - s, m.
 * @param thickness - T, m.
 * @returns C₀, so that h_a = C₀ H.
 * @source Derived from the conformal map above; compare Terzaghi (1943), Theoretical Soil Mechanics, art. 94.
 */
export function averagePrismHead(embedment: number, thickness: number): number {
  const s = embedment / thickness;
  const K = completeK(wallModulus(embedment, thickness));
  const scale = Math.PI / (2 * Math.SQRT2 * K);
  // x = t²/2·s removes the root at the tip; ∂h/∂x at depth s, heads over H, lengths over T
  const slope = (x: number): number => {
    const re = (Math.cosh(Math.PI * x) - 1) * Math.cos(Math.PI * s);
    const im = Math.sinh(Math.PI * x) * Math.sin(Math.PI * s);
    const angle = Math.atan2(im, re);
    return (scale * Math.sin(-angle / 2)) / Math.sqrt(Math.hypot(re, im));
  };
  // average of h over 0…w is h(tip) + ∫ (1 − x/w) h′ dx
  const w = s / 2;
  const n = 2000;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const t = (i + 0.5) / n;
    const x = w * t * t;
    sum += ((1 - t * t) * slope(x) * 2 * t * w) / n;
  }
  return 0.5 + sum;
}
