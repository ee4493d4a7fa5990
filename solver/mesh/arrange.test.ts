import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { orient } from '../geometry/predicates';
import { distanceToSegment } from '../geometry/segments';
import type { Path, SectionGeometry } from '../problem';
import type { Arrangement } from './arrange';
import { arrangeLines, measureSection } from './arrange';

const section = (outlines: readonly Path[], parts: Partial<SectionGeometry> = {}): SectionGeometry => ({
  kind: 'plane',
  regions: outlines.map((outline) => ({ outline, holes: [], material: 0 })),
  barriers: [],
  drains: [],
  edges: [],
  bases: [],
  ...parts,
});
const box = (left: number, bottom: number, right: number, top: number): Path => [
  [left, bottom],
  [right, bottom],
  [right, top],
  [left, top],
];
const arrange = (geometry: SectionGeometry): Arrangement => arrangeLines(geometry, measureSection(geometry))!;
const placesOf = ({ x, y }: Arrangement, vertices: readonly number[]) => vertices.map((v) => [x[v], y[v]]);

describe('arrangeLines', () => {
  it('cuts neighbouring outlines at each other’s corners and keeps a shared piece once', () => {
    const a = arrange(section([box(0, 0, 10, 5), box(4, 5, 8, 7)]));
    expect(placesOf(a, a.lines[0].vertices)).toEqual([
      [0, 0],
      [10, 0],
      [10, 5],
      [8, 5],
      [4, 5],
      [0, 5],
      [0, 0],
    ]);
    expect(a.lines[0].distances).toEqual([0, 10, 15, 17, 21, 25, 30]);
    expect(a.lines[1].segments[0]).toBe(a.lines[0].segments[3]);
    expect(a.starts.length).toBe(6 + 3);
  });

  it('cuts crossing lines at a common vertex', () => {
    const barriers = [
      {
        path: [
          [2, 1],
          [2, 3],
        ] as Path,
        conductance: 0,
      },
      {
        path: [
          [1, 2],
          [3, 2],
        ] as Path,
        conductance: 0,
      },
    ];
    const a = arrange(section([box(0, 0, 4, 4)], { barriers }));
    expect(a.lines[1].vertices[1]).toBe(a.lines[2].vertices[1]);
    expect(placesOf(a, [a.lines[1].vertices[1]])).toEqual([[2, 2]]);
  });

  it('takes a tip within the snap distance of a line to lie on it, and leaves one just beyond', () => {
    const tipAt = (y: number) =>
      arrange(
        section([box(0, 0, 10, 5)], {
          drains: [
            [
              [3, 4],
              [3, y],
            ],
          ],
        }),
      );
    expect(tipAt(9e-6).lines[0].vertices).toContain(tipAt(9e-6).lines[1].vertices[1]);
    expect(tipAt(1.1e-5).lines[0].vertices).not.toContain(tipAt(1.1e-5).lines[1].vertices[1]);
  });

  it('lets an edge skip vertices of the outline', () => {
    const outline: Path = [
      [0, 0],
      [10, 0],
      [10, 4],
      [7, 4],
      [3, 4],
      [0, 4],
    ];
    const a = arrange(
      section([outline], {
        edges: [
          [
            [0, 4],
            [10, 4],
          ],
        ],
      }),
    );
    expect(placesOf(a, a.lines[1].vertices)).toEqual([
      [0, 4],
      [3, 4],
      [7, 4],
      [10, 4],
    ]);
    expect(a.lines[1].segments.every((s) => a.lines[0].segments.includes(s))).toBe(true);
  });

  it('leaves no two pieces crossing and no vertex on a piece', () => {
    const place = fc.tuple(fc.integer({ min: 0, max: 7 }), fc.integer({ min: 0, max: 7 }));
    const path = fc.array(place, { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(fc.array(path, { maxLength: 5 }), (drains) => {
        const { x, y, starts, ends, snap } = arrange(section([box(0, 0, 7, 7)], { drains }));
        starts.forEach((a, i) => {
          const b = ends[i];
          for (let v = 0; v < x.length; v++) {
            if (v === a || v === b) continue;
            expect(distanceToSegment(x[v], y[v], x[a], y[a], x[b], y[b])).toBeGreaterThan(snap);
          }
          for (let j = 0; j < i; j++) {
            const [c, d] = [starts[j], ends[j]];
            const side = (p: number, q: number, r: number) =>
              Math.sign(orient(x[p], y[p], x[q], y[q], x[r], y[r]));
            const crossing = side(a, b, c) * side(a, b, d) < 0 && side(c, d, a) * side(c, d, b) < 0;
            expect(crossing).toBe(false);
          }
        });
      }),
      { numRuns: 200, seed: 3 },
    );
  });
});
