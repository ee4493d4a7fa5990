import { describe, expect, it } from 'vitest';
import { completeK, completeKPrime, incompleteF, jacobiSn, modulusOf } from './elliptic';

describe('elliptic integrals take the modulus', () => {
  // Abramowitz & Stegun (1964), table 17.1: K(0.5) of the PARAMETER 0.5 is 1.854074677301372
  it('K(1/√2) = 1.854074677301372 (Abramowitz & Stegun 1964, table 17.1)', () => {
    const half = modulusOf(Math.SQRT1_2);
    expect(completeK(half)).toBeCloseTo(1.854074677301372, 13);
    expect(completeKPrime(half)).toBeCloseTo(1.854074677301372, 13);
  });

  it('K(0) = π/2', () => expect(completeK(modulusOf(0))).toBeCloseTo(Math.PI / 2, 15));

  it('Legendre’s limits: F(π/2, m) = K(m), F(φ, 0) = φ, F(φ, 1) = ln tan(π/4 + φ/2)', () => {
    for (const m of [0.1, 0.5, 0.9, 0.999]) {
      expect(incompleteF(Math.PI / 2, modulusOf(m))).toBeCloseTo(completeK(modulusOf(m)), 12);
    }
    expect(incompleteF(0.7, modulusOf(0))).toBeCloseTo(0.7, 14);
    expect(incompleteF(0.7, modulusOf(1 - 1e-14))).toBeCloseTo(Math.log(Math.tan(Math.PI / 4 + 0.35)), 6);
  });

  it('F agrees with numerical integration', () => {
    for (const [phi, m] of [
      [0.4, 0.3],
      [1.2, 0.8],
      [1.5, 0.95],
    ] as const) {
      const n = 20000;
      let sum = 0;
      for (let i = 0; i < n; i++) {
        const t = (phi * (i + 0.5)) / n;
        sum += phi / n / Math.sqrt(1 - m * m * Math.sin(t) ** 2);
      }
      expect(incompleteF(phi, modulusOf(m))).toBeCloseTo(sum, 7);
    }
  });

  it('sn inverts F: sn(F(φ, m), m) = sin φ', () => {
    for (const phi of [-1.4, -0.3, 0.2, 0.9, 1.55]) {
      for (const m of [1e-9, 0.2, 0.7, 0.99]) {
        const u = Math.sign(phi) * incompleteF(Math.abs(phi), modulusOf(m));
        expect(jacobiSn(u, modulusOf(m))).toBeCloseTo(Math.sin(phi), 10);
      }
    }
  });
});
