// Thresholds of the section lint, in one place. They raise a question, never a verdict.

/** Limits beyond which a number of a material is asked about. */
export const materialSettings = {
  /** Permeability, m/s: beyond open gravel and beyond intact clay (common practice). */
  permeability: { low: 1e-12, high: 0.1 },
  /** Ratio of permeabilities along and across the bedding (common practice). */
  anisotropy: 100,
  /** Saturated unit weight, kN/m³: soft organic soil to dense well-graded gravel (common practice). */
  unitWeight: { low: 15, high: 23 },
  /** Where a value below the lowest saturated one looks like a buoyant unit weight, kN/m³. */
  buoyant: { low: 5, high: 12 },
} as const;

/** Limits on the distance from the last feature to a side of the section. */
export const sideSettings = {
  /** Distance over decay length times 2/π; in one isotropic layer the distance over the thickness. */
  enough: 2,
  /** Error of the discharge with both sides cut: this times exp(−2 × distance / decay length). Own runs, one wall in one layer. */
  factor: 1.8,
} as const;
