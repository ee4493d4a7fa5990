// Elliptic integrals and functions by the arithmetic–geometric mean. Everywhere the argument is the MODULUS m, as Harr and
// Polubarinova-Kochina print it, not the parameter m² that most code libraries take.

/** Halvings after which the mean of two doubles has settled. */
const steps = 40;

/**
 * Computes the arithmetic–geometric mean.
 *
 * @param a - Positive.
 * @param b - Positive.
 * @returns The common limit of the two means.
 * @source Abramowitz & Stegun (1964), 17.6.
 */
export function arithmeticGeometricMean(a: number, b: number): number {
  for (let i = 0; i < steps && Math.abs(a - b) > 1e-16 * a; i++) [a, b] = [(a + b) / 2, Math.sqrt(a * b)];
  return (a + b) / 2;
}

/** A modulus with its complement, kept apart so that neither loses its digits near 1. */
export interface Modulus {
  readonly m: number;
  /** √(1 − m²) */
  readonly complement: number;
}

/**
 * Pairs a modulus with its complement.
 *
 * @param m - 0 … 1.
 * @returns Both.
 */
export function modulusOf(m: number): Modulus {
  return { m, complement: Math.sqrt((1 - m) * (1 + m)) };
}

/**
 * Computes the complete elliptic integral of the first kind, `K(m) = ∫₀^{π/2} dφ / √(1 − m² sin²φ)`.
 *
 * @param modulus - Modulus and complement.
 * @returns K; infinite at m = 1.
 * @source Abramowitz & Stegun (1964), 17.6.3: K = π / (2 AGM(1, m′)).
 */
export function completeK({ complement }: Modulus): number {
  return complement > 0 ? Math.PI / (2 * arithmeticGeometricMean(1, complement)) : Number.POSITIVE_INFINITY;
}

/**
 * Computes the complementary integral, `K′(m) = K(√(1 − m²))`.
 *
 * @param modulus - Modulus and complement.
 * @returns K′; infinite at m = 0.
 */
export function completeKPrime({ m, complement }: Modulus): number {
  return completeK({ m: complement, complement: m });
}

/**
 * Computes the incomplete elliptic integral of the first kind, `F(φ, m) = ∫₀^φ dθ / √(1 − m² sin²θ)`.
 *
 * @param phi - Amplitude, radians, 0 … π/2.
 * @param modulus - Modulus and complement.
 * @returns F.
 * @source Abramowitz & Stegun (1964), 17.6.8 (descending Landen transformation).
 */
export function incompleteF(phi: number, { m, complement }: Modulus): number {
  if (phi === 0) return 0;
  let [a, b, c] = [1, complement, m];
  let angle = phi;
  let doublings = 1;
  for (let i = 0; i < steps && Math.abs(c) > 1e-16; i++) {
    // tan(φ′ − φ) = (b/a) tan φ, on the branch in φ's own quadrant
    const step = Math.atan2(b * Math.sin(angle), a * Math.cos(angle));
    angle += step + 2 * Math.PI * Math.round((angle - step) / (2 * Math.PI));
    [a, b, c] = [(a + b) / 2, Math.sqrt(a * b), (a - b) / 2];
    doublings *= 2;
  }
  return angle / (doublings * a);
}

/**
 * Computes the Jacobian elliptic sine `sn(u, m)`.
 *
 * @param u - Any real number.
 * @param modulus - Modulus and complement.
 * @returns sn, −1 … 1.
 * @source Abramowitz & Stegun (1964), 16.4.
 */
export function jacobiSn(u: number, { m, complement }: Modulus): number {
  const a = [1];
  const c = [m];
  let b = complement;
  while (a.length < steps && Math.abs(c.at(-1)!) > 1e-16) {
    const last = a.at(-1)!;
    a.push((last + b) / 2);
    c.push((last - b) / 2);
    b = Math.sqrt(last * b);
  }
  let phi = 2 ** (a.length - 1) * a.at(-1)! * u;
  for (let n = a.length - 1; n > 0; n--) phi = (phi + Math.asin((c[n]! / a[n]!) * Math.sin(phi))) / 2;
  return Math.sin(phi);
}
