import { describe, expect, it } from 'vitest';
import { startingPoints } from '@/lib/domain/starting-points';
import { readSection } from '@/lib/domain/validate';
import { freshId, proposeLens, proposeWall, readPoints, surfaceAt } from './table-edits';

describe('table edits', () => {
  it('never gives an id twice', () => {
    expect(freshId([{ id: 'zone-2' }], 'zone')).toBe('zone-3');
  });

  it.each(startingPoints.map(({ id, document }) => [id, document] as const))(
    'proposes a wall and a lens that keep %s valid',
    (_id, document) => {
      const material = document.materials[0]!.id;
      const { issues } = readSection({
        ...document,
        barriers: [...document.barriers, { id: 'new-wall', path: proposeWall(document), conductance: 0 }],
        zones: [...document.zones, { id: 'new-zone', material, outline: proposeLens(document) }],
      });
      expect(issues.filter(({ severity }) => severity === 'stop')).toEqual([]);
    },
  );

  it('reads the surface over a thick apron', () => {
    const apron = startingPoints.find(({ id }) => id === 'apron-with-cutoffs')!.document;
    expect(surfaceAt(apron, -30)).toBe(0);
    expect(surfaceAt(apron, 10)).toBe(-1);
  });

  it('reads pasted points, with headings and decimal commas', () => {
    expect(readPoints([['x', 'y'], ['1,5', '-2'], ['3', '−4,25'], ['']])).toEqual([
      [1.5, -2],
      [3, -4.25],
    ]);
    expect(readPoints([['1', 'two']])).toBeNull();
  });

  it('reads pasted feet as the international foot', () => {
    expect(readPoints([['10', '-100']], 0.3048)).toEqual([[3.048, -30.48]]);
  });
});
