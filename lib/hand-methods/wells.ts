// Flow to wells and slots.
import { demand } from './calculation';

/**
 * Computes the steady flow to a well in a confined layer, `Q = 2πkb (h₂ − h₁)/ln(r₂/r₁)`.
 *
 * @param permeability - k, m/s.
 * @param thickness - b, m.
 * @param drawdown - h₂ − h₁, m.
 * @param ratio - r₂/r₁, above 1.
 * @returns m³/s.
 * @source Thiem (1906), Hydrologische Methoden.
 */
export function thiemDischarge(
  permeability: number,
  thickness: number,
  drawdown: number,
  ratio: number,
): number {
  demand(ratio > 1, 'the outer radius must be the larger');
  return (2 * Math.PI * permeability * thickness * drawdown) / Math.log(ratio);
}

/**
 * Computes the steady flow to a well in an unconfined layer, `Q = πk (h₂² − h₁²)/ln(r₂/r₁)`.
 *
 * @param permeability - k, m/s.
 * @param outer - h₂, m.
 * @param inner - h₁, m.
 * @param ratio - r₂/r₁, above 1.
 * @returns m³/s.
 * @source Dupuit (1863), Études théoriques et pratiques sur le mouvement des eaux.
 */
export function dupuitWellDischarge(
  permeability: number,
  outer: number,
  inner: number,
  ratio: number,
): number {
  demand(ratio > 1, 'the outer radius must be the larger');
  return (Math.PI * permeability * (outer * outer - inner * inner)) / Math.log(ratio);
}

/**
 * Computes the radius of influence, `R = 3000 s √k`.
 *
 * @param drawdown - s, m.
 * @param permeability - k, m/s.
 * @returns m; empirical.
 * @source Sichardt (1928), as in Kyrieleis & Sichardt (1930) (from memory).
 */
export function sichardtRadius(drawdown: number, permeability: number): number {
  return 3000 * drawdown * Math.sqrt(permeability);
}

/**
 * Computes the length of layer that a partly penetrating slot adds to a confined flow from both sides.
 *
 * `E = −(2D/π) ln sin(πW/2D)`, to be added on each side. An opening W at the foot of a cutoff is the same figure on either side: it adds 2E.
 *
 * @param penetration - W, or the height of the opening, m.
 * @param thickness - D, m.
 * @returns m on each side; half of it where water comes from one side only.
 * @source Derived by conformal mapping; compare Mansur & Kaufman in Leonards (1962), ch. 3.
 */
export function slotExtraLength(penetration: number, thickness: number): number {
  demand(penetration > 0 && penetration <= thickness, 'the slot must lie within the layer');
  return (-2 * thickness * Math.log(Math.sin((Math.PI * penetration) / (2 * thickness)))) / Math.PI;
}

/**
 * Computes the discharge ratio of a partly penetrating slot with gravity flow, `[0.73 + 0.27 (H − h₀)/H] (H² − h₀²)/2L`.
 *
 * @param outer - H, m.
 * @param slot - h₀, m.
 * @param distance - L from the line source, m; L/H at least 3.
 * @returns q/k, m, and the greatest head behind the slot h_D, m.
 * @source Chapman (1957), Géotechnique 7; Mansur & Kaufman in Leonards (1962), ch. 3 (from memory).
 */
export function chapmanSlot(
  outer: number,
  slot: number,
  distance: number,
): { dischargeRatio: number; headBehind: number } {
  const fall = outer - slot;
  return {
    dischargeRatio: ((0.73 + (0.27 * fall) / outer) * (outer * outer - slot * slot)) / (2 * distance),
    headBehind: slot * ((1.48 * fall) / distance + 1),
  };
}

/**
 * Computes the reduction of a well's flow by partial penetration.
 *
 * @param penetration - W, m.
 * @param thickness - D, m.
 * @param radius - r_w, m.
 * @returns Q over that of the fully penetrating well.
 * @source Kozeny (1933), as in UFC 3-220-05, ch. 4 (from memory).
 */
export function kozenyPenetration(penetration: number, thickness: number, radius: number): number {
  const part = penetration / thickness;
  const root = Math.sqrt(radius / (2 * penetration));
  return part * (1 + 7 * root * Math.cos((Math.PI * part) / 2));
}
