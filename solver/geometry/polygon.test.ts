import { polygonArea, polygonContains } from 'd3';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { containsPoint, signedArea } from './polygon';

const coordinate = fc.integer({ min: -100, max: 100 });
const point = fc.tuple(coordinate, coordinate);
const ring = fc.array(point, { minLength: 3, maxLength: 12 });

describe('signedArea', () => {
  it('agrees with an outside library, but for its sign', () => {
    fc.assert(
      fc.property(ring, (points) => {
        expect(signedArea(points)).toBeCloseTo(-polygonArea(points), 6);
      }),
    );
  });

  it('keeps its digits far from the origin', () => {
    const far = 1e9;
    expect(
      signedArea([
        [far, far],
        [far + 1, far],
        [far + 1, far + 1],
        [far, far + 1],
      ]),
    ).toBe(1);
  });

  it('is zero for fewer than three points', () => {
    expect(
      signedArea([
        [0, 0],
        [1, 1],
      ]),
    ).toBe(0);
  });
});

describe('containsPoint', () => {
  it('agrees with an outside library off the ring', () => {
    fc.assert(
      fc.property(ring, point, (points, [x, y]) => {
        const [px, py] = [x + 1 / Math.SQRT2, y + 1 / Math.E]; // on no line through whole points but by rare chance
        expect(containsPoint(points, px, py)).toBe(polygonContains(points, [px, py]));
      }),
    );
  });
});
