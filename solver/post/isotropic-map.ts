import type { Conductivity } from '../problem';

/** A linear map of the section, u = a11 x + a12 y, v = a21 x + a22 y. */
export interface LinearMap {
  readonly a11: number;
  readonly a12: number;
  readonly a21: number;
  readonly a22: number;
}

/**
 * Finds the map to the transformed section in which a material is isotropic with √(kMajor kMinor).
 *
 * Rotation to the principal axes, then stretches (kMinor/kMajor)^¼ and its reciprocal: areas and orientation stay.
 *
 * @param conductivity - The material, both permeabilities positive.
 * @returns The map.
 * @source Samsioe (1931); Bear (1972), Dynamics of Fluids in Porous Media, section 5.11 (from memory).
 */
export function isotropicMap({ kMajor, kMinor, angle }: Conductivity): LinearMap {
  const stretch = (kMinor / kMajor) ** 0.25;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return { a11: stretch * c, a12: stretch * s, a21: -s / stretch, a22: c / stretch };
}
