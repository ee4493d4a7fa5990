import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { crossLines, distanceToSegment, projectOntoSegment } from './segments';

const coordinate = fc.integer({ min: -50, max: 50 });
const four = fc.tuple(coordinate, coordinate, coordinate, coordinate);

describe('distanceToSegment', () => {
  it('is the least over many points of the segment', () => {
    fc.assert(
      fc.property(four, coordinate, coordinate, ([ax, ay, bx, by], px, py) => {
        let least = Infinity;
        for (let k = 0; k <= 1000; k++) {
          const t = k / 1000;
          least = Math.min(least, Math.hypot(ax + t * (bx - ax) - px, ay + t * (by - ay) - py));
        }
        const distance = distanceToSegment(px, py, ax, ay, bx, by);
        expect(distance).toBeLessThanOrEqual(least + 1e-12);
        expect(distance).toBeGreaterThan(least - 0.15);
      }),
    );
  });

  it('takes a segment of no length as a point', () => {
    expect(distanceToSegment(3, 4, 0, 0, 0, 0)).toBe(5);
    expect(projectOntoSegment(3, 4, 0, 0, 0, 0)).toBe(0);
  });
});

describe('crossLines', () => {
  it('gives a place that lies on both lines', () => {
    fc.assert(
      fc.property(four, four, (a, b) => {
        const det = (a[2] - a[0]) * (b[3] - b[1]) - (a[3] - a[1]) * (b[2] - b[0]);
        fc.pre(det !== 0);
        const t = crossLines(a, b);
        const [x, y] = [a[0] + t * (a[2] - a[0]), a[1] + t * (a[3] - a[1])];
        const off = (b[2] - b[0]) * (y - b[1]) - (b[3] - b[1]) * (x - b[0]);
        expect(Math.abs(off)).toBeLessThan(1e-6 * (1 + Math.abs(t)));
      }),
    );
  });
});
