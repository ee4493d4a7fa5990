import { describe, expect, it } from 'vitest';
import { parseNumber, toShown, writeShort } from './units';

describe('numbers as typed', () => {
  it.each([
    ['12 ft', 'length', 3.6576],
    ["6'", 'length', 1.8288],
    ['0,5', 'length', 0.5],
    ['10+2.4', 'length', 12.4],
    ['10 - 2,5', 'length', 7.5],
    ['−3.2', 'length', -3.2],
    ['3e-5', 'permeability', 3e-5],
    ['2.592 m/day', 'permeability', 3e-5],
    ['3e-3 cm/s', 'permeability', 3e-5],
    ['1,234.5', 'length', 1234.5],
    ['1.234,5', 'length', 1234.5],
    ['127.32 pcf', 'unit-weight', 20.0004],
    ['15°', 'angle', 15],
  ] as const)('%s', (text, quantity, value) => {
    const parsed = parseNumber(text, quantity);
    expect(parsed.ok && parsed.value).toBeCloseTo(value, quantity === 'permeability' ? 12 : 3);
  });

  it.each(['', 'deep', '1.2.3', '3 furlongs', '--4'])('refuses “%s” with a sentence', (text) => {
    const parsed = parseNumber(text, 'length');
    expect(parsed.ok).toBe(false);
    if (!parsed.ok) expect(parsed.message).toMatch(/\.$/);
  });

  it('says what it understood where that is not what was typed', () => {
    expect(parseNumber('12 ft', 'length')).toMatchObject({ understood: '3.6576 m' });
    expect(parseNumber('12.4', 'length')).toMatchObject({ understood: '' });
    expect(parseNumber('12', 'length', 'us')).toMatchObject({ understood: '3.6576 m' });
  });

  it('shows what it reads', () => {
    expect(toShown(3.6576, 'length', 'us')).toBeCloseTo(12, 12);
    expect(writeShort(3e-5)).toBe('3e-5');
    expect(writeShort(12.400000001)).toBe('12.4');
  });
});
