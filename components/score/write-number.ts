/** Writes a number with significant digits, a true minus and a narrow space between thousands; powers of ten in words a printer would set. */
export function writeSignificant(value: number, digits: number): string {
  if (!Number.isFinite(value)) return '∞';
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size < 1e-3 || size >= 1e6) {
    const [mantissa, exponent] = value.toExponential(Math.max(0, digits - 1)).split('e');
    return `${mantissa!.replace('-', '−')} × 10${superscript(Number(exponent))}`;
  }
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(size)));
  const [whole, fraction] = value.toFixed(Math.min(decimals, 8)).split('.');
  const grouped = whole!.replace('-', '−').replace(/\B(?=(\d{3})+$)/g, size >= 1e4 ? '\u202f' : '');
  return fraction ? `${grouped}.${fraction}` : grouped;
}

function superscript(exponent: number): string {
  const digits = '⁰¹²³⁴⁵⁶⁷⁸⁹';
  return [...String(exponent)].map((c) => (c === '-' ? '⁻' : digits[Number(c)])).join('');
}

/** Writes a level or a length: two decimals, a true minus. */
export function writeLevel(value: number): string {
  return value.toFixed(2).replace('-', '−').replace('−0.00', '0.00');
}
