import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { inCircle, orient } from './predicates';

// The same determinants in whole numbers of arbitrary length: exact by construction.
const exactOrient = ([ax, ay, bx, by, cx, cy]: bigint[]): bigint =>
  (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);

function exactInCircle(p: bigint[]): bigint {
  const [dx, dy] = [p[6], p[7]];
  const rows = [0, 2, 4].map((k) => {
    const [x, y] = [p[k] - dx, p[k + 1] - dy];
    return [x, y, x * x + y * y];
  });
  const [[a, b, c], [d, e, f], [g, h, i]] = rows;
  return a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g);
}

const sign = (value: number | bigint): number => (value > 0 ? 1 : value < 0 ? -1 : 0);

// Large whole numbers close to a common line or circle: doubles hold them exactly, plain determinants fail.
const base = 2 ** 40;
const offset = fc.integer({ min: -2, max: 2 });

describe('orient', () => {
  it('is positive for counter-clockwise points, y upwards', () => {
    expect(orient(0, 0, 1, 0, 0, 1)).toBeGreaterThan(0);
    expect(orient(0, 0, 0, 1, 1, 0)).toBeLessThan(0);
    expect(orient(0, 0, 1, 1, 3, 3)).toBeCloseTo(0, 300);
  });

  it('has the exact sign next to a line', () => {
    fc.assert(
      fc.property(
        fc.array(offset, { minLength: 6, maxLength: 6 }),
        fc.integer({ min: 1, max: 2 ** 20 }),
        (o, k) => {
          const p = [0, 0, base, base + k, base * 2, 2 * (base + k)].map((value, i) => value + o[i]);
          const [ax, ay, bx, by, cx, cy] = p;
          expect(sign(orient(ax, ay, bx, by, cx, cy))).toBe(sign(exactOrient(p.map(BigInt))));
        },
      ),
      { numRuns: 500 },
    );
  });
});

describe('inCircle', () => {
  it('has the exact sign next to a circle', () => {
    fc.assert(
      fc.property(fc.array(offset, { minLength: 8, maxLength: 8 }), (o) => {
        const s = 2 ** 26;
        const p = [s, 0, 0, s, -s, 0, 0, -s].map((value, i) => value + o[i]);
        const x = Float64Array.of(p[0], p[2], p[4], p[6]);
        const y = Float64Array.of(p[1], p[3], p[5], p[7]);
        expect(sign(inCircle(x, y, 0, 1, 2, 3))).toBe(sign(exactInCircle(p.map(BigInt))));
      }),
      { numRuns: 500 },
    );
  });
});
