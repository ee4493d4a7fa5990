// A long pit between two parallel walls: the inside as an exact rectangle, the outside as a type II fragment.
import { computed, demand, given, type HandCalculation } from './calculation';
import { completeK, completeKPrime, jacobiSn, type Modulus } from './elliptic';
import { wallModulus } from './single-wall';

/**
 * Computes form factor and exit gradient of the rectangle inside one wall of a symmetric pit.
 *
 * The rectangle of width b and height T maps to a half plane by sn; the wall's tip becomes u_s.
 *
 * @param embedment - Wall below the pit's bed s, m.
 * @param thickness - Layer below the pit's bed T, m.
 * @param halfWidth - From the wall to the middle of the pit b, m.
 * @returns Φ and `i_E T/h`, the exit gradient at the wall per head lost inside.
 * @throws {HandMethodError} `outside-definition` unless 0 < s < T and b > 0.
 * @source Derived by conformal mapping of the rectangle; compare McNamee (1949), Géotechnique 1.
 */
export function cofferdamInner(
  embedment: number,
  thickness: number,
  halfWidth: number,
): { formFactor: number; exitRatio: number } {
  demand(embedment > 0 && embedment < thickness && halfWidth > 0, 'the wall must end inside the layer');
  // a modulus within 1e-15 of 0 makes the rectangle a half strip: the limit is the type II fragment
  const nome = Math.exp((-2 * Math.PI * halfWidth) / thickness);
  const modulus = modulusOfNome(nome);
  const k = modulus.m;
  const K = completeK(modulus);
  const us = jacobiSn(K * ((2 * embedment) / thickness - 1), modulus);
  // κ² = (u_s + 1)(1 + 1/k) / (2 (u_s + 1/k)), written without 1/k
  const kappa2 = ((us + 1) * (k + 1)) / (2 * (k * us + 1));
  const complement2 = ((1 - us) * (1 - k)) / (2 * (k * us + 1));
  const kappa: Modulus = { m: Math.sqrt(kappa2), complement: Math.sqrt(complement2) };
  // √((a₄ − a₂)(a₃ − a₁)) = √(2 (u_s + 1/k)); times √(k(1 + k)/(u_s + 1))
  const root = Math.sqrt((2 * (k * us + 1) * (1 + k)) / (us + 1));
  const exitRatio = (root / (2 * completeK(kappa))) * 2 * K;
  return { formFactor: completeK(kappa) / completeKPrime(kappa), exitRatio };
}

/** Modulus whose nome exp(−πK′/K) is given, by theta series (Abramowitz & Stegun 16.38): √k = θ₂/θ₃, √k′ = θ₄/θ₃. */
function modulusOfNome(nome: number): Modulus {
  demand(nome < 0.95, 'the pit is too narrow for its depth');
  // Landen's transformation keeps the series short for narrow pits: nome q² first, then up again
  if (nome > 0.3) {
    const inner = modulusOfNome(nome * nome);
    const m = (2 * Math.sqrt(inner.m)) / (1 + inner.m);
    return { m, complement: (1 - inner.m) / (1 + inner.m) };
  }
  let theta2 = 0;
  let theta3 = 1;
  let theta4 = 1;
  for (let n = 0; n < 12; n++) {
    theta2 += 2 * nome ** ((n + 0.5) ** 2);
    if (n === 0) continue;
    theta3 += 2 * nome ** (n * n);
    theta4 += 2 * (n % 2 === 0 ? 1 : -1) * nome ** (n * n);
  }
  return { m: (theta2 / theta3) ** 2, complement: (theta4 / theta3) ** 2 };
}

/** A long pit between two parallel walls. */
export interface Cofferdam {
  /** Layer below the outer ground T_o, m. */
  readonly outerThickness: number;
  /** Wall below the outer ground s_o, m. */
  readonly outerEmbedment: number;
  /** Outer ground above the pit's bed, m. */
  readonly dredge: number;
  /** From the wall to the middle, m. */
  readonly halfWidth: number;
  readonly head: number;
  readonly permeability: number;
}

/** Answers for a pit. */
export interface CofferdamValues {
  readonly outerFormFactor: number;
  readonly innerFormFactor: number;
  /** Per wall, m³/s per metre. */
  readonly dischargePerWall: number;
  /** Head lost inside, from the tip up, m. */
  readonly innerLoss: number;
  readonly exitGradient: number;
}

/**
 * Computes inflow and exit gradient of a long pit between two parallel walls.
 *
 * @param pit - Thickness, embedment, dredge, half width, head and permeability.
 * @returns The calculation laid out, per wall.
 * @throws {HandMethodError} `outside-definition` where the wall ends above the pit's bed or below the layer.
 * @source Harr (1962), ch. 6 (fragments); inner rectangle derived exactly; compare Griffiths (1984), Géotechnique 34:229–238.
 */
export function computeCofferdam(pit: Cofferdam): HandCalculation<CofferdamValues> {
  const { outerThickness, outerEmbedment, dredge, halfWidth, head, permeability } = pit;
  const outer = wallModulus(outerEmbedment, outerThickness);
  const outerFormFactor = completeK(outer) / completeKPrime(outer);
  const [s, T] = [outerEmbedment - dredge, outerThickness - dredge];
  const { formFactor: innerFormFactor, exitRatio } = cofferdamInner(s, T, halfWidth);
  const sum = outerFormFactor + innerFormFactor;
  const dischargePerWall = (permeability * head) / sum;
  const innerLoss = (head * innerFormFactor) / sum;
  const exitGradient = (exitRatio * innerLoss) / T;
  return {
    title: 'Long pit between two walls',
    values: { outerFormFactor, innerFormFactor, dischargePerWall, innerLoss, exitGradient },
    working: [
      given('T_o', 'layer below the outer ground', outerThickness, 'm'),
      given('s_o', 'wall below the outer ground', outerEmbedment, 'm'),
      given('T_i', 'layer below the bed of the pit', T, 'm'),
      given('s_i', 'wall below the bed of the pit', s, 'm'),
      given('b', 'from the wall to the middle of the pit', halfWidth, 'm'),
      given('H', 'head lost', head, 'm'),
      given('k', 'permeability', permeability, 'm/s'),
      computed('Φ_o', 'form factor outside', 'K / K′, m = sin(π s_o / 2T_o)', outerFormFactor, ''),
      computed('Φ_i', 'form factor inside', 'exact rectangle: K(κ) / K′(κ)', innerFormFactor, ''),
      computed('h_i', 'head lost inside', 'H Φ_i / (Φ_o + Φ_i)', innerLoss, 'm'),
      computed('q', 'inflow per wall', 'k H / (Φ_o + Φ_i)', dischargePerWall, 'm³/s per m'),
      computed('i_E', 'exit gradient at the wall', 'exact rectangle', exitGradient, ''),
    ],
    source:
      'Harr (1962), Groundwater and Seepage, ch. 6; inner rectangle by exact conformal mapping; compare McNamee (1949), Griffiths (1984)',
    range:
      'A pit long in plan (length over width above about 5), symmetric, in one uniform layer. A round or square pit has a greater exit gradient than this.',
    isInRange: true,
  };
}
