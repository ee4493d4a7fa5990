/** Medium sand with invented numbers; several starting points vary it. */
export const sand = {
  id: 'sand',
  name: 'Medium sand',
  kMajor: 2e-4,
  kMinor: 1e-4,
  angle: 0,
  kRange: { low: 0.3, high: 3 },
  kSource: 'grading',
  saturatedUnitWeight: 20,
  porosity: 0.36,
  grading: { d10: 0.16, d15: 0.19, d50: 0.42, d60: 0.5, d85: 1.1, fines: 3 },
  hatch: 'sand',
} as const;
