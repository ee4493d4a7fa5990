import { describe, expect, it } from 'vitest';
import { startingPoints } from '@/lib/domain/starting-points';
import type { Barrier, SectionDocument, Structure } from '@/lib/domain/section';
import { followCreep } from './creep-path';

const wall = (id: string, path: Barrier['path']): Barrier => ({ id, path, conductance: 0 });

function creep(base: Structure['base'], barriers: Barrier[], named?: string[]) {
  const document: SectionDocument = { ...startingPoints[0]!.document, barriers };
  return followCreep(document, { id: 's', base, ...(named ? { barriers: named } : {}) }, 1e-4);
}

describe('the line of creep', () => {
  // floor of 16 m, walls of 4 and 5 m: both faces of each count, the floor a third (Lane 1935)
  const base: Structure['base'] = [
    [0, 0],
    [16, 0],
  ];
  const walls = [
    wall('a', [
      [0, 0],
      [0, -4],
    ]),
    wall('b', [
      [16, 0],
      [16, -5],
    ]),
  ];

  it('goes down and up both faces of the walls under the base', () => {
    expect(creep(base, walls)).toMatchObject({ vertical: 18, horizontal: 16, weighted: 18 + 16 / 3 });
    expect(creep(base, walls).points).toHaveLength(6);
  });

  it('does not care which way a wall was drawn', () => {
    const turned = walls.map(({ id, path }) => wall(id, [...path].reverse()));
    expect(creep(base, turned)).toEqual(creep(base, walls));
  });

  it('takes only the walls a structure names, and none that stand elsewhere', () => {
    expect(creep(base, walls, ['b']).vertical).toBe(10);
    expect(
      creep(base, [
        wall('far', [
          [40, 0],
          [40, -9],
        ]),
      ]).vertical,
    ).toBe(0);
  });

  it('counts a wall in the middle of the base', () => {
    const middle = wall('m', [
      [6, 0],
      [6, -3],
    ]);
    expect(creep(base, [middle])).toMatchObject({ vertical: 6, horizontal: 16 });
  });

  it('counts what is steeper than 45° as vertical', () => {
    const stepped: Structure['base'] = [
      [0, 0],
      [0, -2],
      [3, -3],
      [4, -1.5],
    ];
    const { vertical, horizontal } = creep(stepped, []);
    expect(vertical).toBeCloseTo(2 + Math.hypot(1, 1.5), 12);
    expect(horizontal).toBeCloseTo(Math.hypot(3, 1), 12);
  });
});
