import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { SizeField } from './size-field';

const coordinate = fc.double({ min: -50, max: 50, noNaN: true });
const source = fc.record({
  x: coordinate,
  y: coordinate,
  size: fc.double({ min: 0.01, max: 20, noNaN: true }),
});

describe('SizeField', () => {
  it('is the least of size plus slope times distance over all sources', () => {
    fc.assert(
      fc.property(
        fc.array(source, { maxLength: 60 }),
        fc.array(fc.tuple(coordinate, coordinate)),
        (list, asked) => {
          const field = new SizeField(list, 0.3, 7);
          for (const [x, y] of asked) {
            const wanted = list.reduce(
              (least, s) => Math.min(least, s.size + 0.3 * Math.hypot(s.x - x, s.y - y)),
              7,
            );
            expect(field.sizeAt(x, y)).toBeCloseTo(wanted, 12);
          }
        },
      ),
    );
  });
});
