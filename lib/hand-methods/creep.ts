// Creep ratios: old rules of thumb, for screening and comparison with existing works.

/** A path along base and walls. */
export interface CreepPath {
  /** Steeper than 45°, m. */
  readonly vertical: number;
  readonly horizontal: number;
}

/**
 * Computes the creep ratios of a path.
 *
 * @param path - Vertical and horizontal length, m.
 * @param head - Head lost, m.
 * @returns Lane's weighted length and ratio, Bligh's plain length and ratio.
 * @source Lane (1935), Trans. ASCE 100: L_w = vertical + horizontal/3; Bligh (1910): L = vertical + horizontal.
 */
export function creepRatios(
  { vertical, horizontal }: CreepPath,
  head: number,
): { weighted: number; lane: number; plain: number; bligh: number } {
  const weighted = vertical + horizontal / 3;
  const plain = vertical + horizontal;
  return { weighted, lane: weighted / head, plain, bligh: plain / head };
}
