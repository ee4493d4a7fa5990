/** A layer of a column: thickness, m; its permeability upright and what of it acts along the layer, m/s. */
export interface DecayLayer {
  readonly thickness: number;
  readonly vertical: number;
  readonly horizontal: number;
}

/**
 * Finds the distance over which a disturbance of the heads falls to 1/e in level layers under standing water on a tight base.
 *
 * @param layers - From the base up.
 * @returns Metres: the slowest of the modes exp(−x/length)·g(y) of the layered column. In one layer 2T/π·√(kh/kv); under a thin tight
 *   cover the leakage length √(kh·D·d/kv′) of blanket theory.
 * @source Separation of variables; Prüfer's angle for the first eigenvalue (Prüfer 1926). Blanket limit: Bennett (1946), Trans. ASCE
 *   111:215–252 (from memory).
 */
export function findDecayLength(layers: readonly DecayLayer[]): number {
  const stretch = layers.map(({ horizontal, vertical }) => Math.sqrt(horizontal / vertical));
  const quarter = Math.PI / 2;
  // in any layer alone the mode would turn a quarter at this rate: the whole column does so sooner
  const highest = Math.min(...layers.map(({ thickness }, i) => quarter / (thickness * stretch[i]!)));
  /** Whether the head passes zero below the water at this rate. */
  const isTooFast = (rate: number): boolean => {
    let angle = 0;
    for (let i = 0; i < layers.length; i++) {
      angle += rate * stretch[i]! * layers[i]!.thickness;
      if (angle >= quarter) return true;
      const above = layers[i + 1];
      if (!above) break;
      const step = (layers[i]!.vertical * stretch[i]!) / (above.vertical * stretch[i + 1]!);
      angle = Math.atan(Math.tan(angle) * step);
    }
    return false;
  };
  let low = highest * 1e-9;
  let high = highest;
  for (let k = 0; k < 80 && high / low > 1 + 1e-9; k++) {
    const middle = Math.sqrt(low * high);
    if (isTooFast(middle)) high = middle;
    else low = middle;
  }
  return 1 / low;
}
