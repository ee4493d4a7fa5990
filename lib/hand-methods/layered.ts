// Equivalent permeabilities of layered ground and of rotated axes.

/** One layer. */
export interface Layer {
  readonly thickness: number;
  readonly permeability: number;
}

/**
 * Computes the equivalent permeabilities of a stack of layers.
 *
 * @param layers - Thickness m and permeability m/s each.
 * @returns Along the layers `Σkd/Σd` and across them `Σd/Σ(d/k)`, m/s.
 * @source Harr (1962), ch. 1; Freeze & Cherry (1979), sec. 2.4 (from memory).
 */
export function equivalentPermeabilities(layers: readonly Layer[]): { along: number; across: number } {
  let depth = 0;
  let conductance = 0;
  let resistance = 0;
  for (const { thickness, permeability } of layers) {
    depth += thickness;
    conductance += thickness * permeability;
    resistance += thickness / permeability;
  }
  return { along: conductance / depth, across: depth / resistance };
}

/**
 * Computes the permeability tensor of rotated principal axes.
 *
 * @param k1 - Along the major axis, m/s.
 * @param k2 - Across it, m/s.
 * @param angle - From +x to the major axis, anticlockwise, degrees.
 * @returns Components kxx, kzz, kxz, m/s.
 * @source Bear (1972), Dynamics of Fluids in Porous Media, sec. 5.6 (from memory).
 */
export function rotateTensor(k1: number, k2: number, angle: number): { xx: number; zz: number; xz: number } {
  const c = Math.cos((angle * Math.PI) / 180);
  const s = Math.sin((angle * Math.PI) / 180);
  return { xx: k1 * c * c + k2 * s * s, zz: k1 * s * s + k2 * c * c, xz: (k1 - k2) * s * c };
}

/**
 * Computes the permeability in one direction: along a flow direction and along a gradient direction, which differ.
 *
 * @param k1 - Along the major axis, m/s.
 * @param k2 - Across it, m/s.
 * @param angle - Between the direction and the major axis, degrees.
 * @returns Both, m/s.
 * @source Freeze & Cherry (1979), sec. 2.4 (from memory).
 */
export function directionalPermeability(
  k1: number,
  k2: number,
  angle: number,
): { alongFlow: number; alongGradient: number } {
  const c2 = Math.cos((angle * Math.PI) / 180) ** 2;
  return { alongFlow: 1 / (c2 / k1 + (1 - c2) / k2), alongGradient: k1 * c2 + k2 * (1 - c2) };
}
