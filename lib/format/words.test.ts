import { describe, expect, it } from 'vitest';
import { formatPowerOfTen } from './words';

describe('formatPowerOfTen', () => {
  it.each([
    [2e-4, '2 × 10⁻⁴'],
    [5e-5, '5 × 10⁻⁵'],
    [1.25e-10, '1.3 × 10⁻¹⁰'],
    [1, '1 × 10⁰'],
    [0.0099999, '1 × 10⁻²'],
    [300, '3 × 10²'],
  ])('writes %s as %s', (value, written) => expect(formatPowerOfTen(value)).toBe(written));
});
