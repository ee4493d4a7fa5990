import type { Material } from '../section';

/**
 * Resolves the permeability of a material into level and upright parts.
 *
 * @param material - Principal permeabilities, m/s, and the angle of the major axis, degrees.
 * @returns The diagonal entries of the permeability tensor, m/s, and its determinant.
 */
export function verticalPermeability({
  kMajor,
  kMinor,
  angle,
}: Pick<Material, 'kMajor' | 'kMinor' | 'angle'>): {
  horizontal: number;
  vertical: number;
  determinant: number;
} {
  const c = Math.cos((angle * Math.PI) / 180) ** 2;
  return {
    horizontal: kMajor * c + kMinor * (1 - c),
    vertical: kMajor * (1 - c) + kMinor * c,
    determinant: kMajor * kMinor,
  };
}
