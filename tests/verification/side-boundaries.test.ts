// The lint's estimate of what a near side does to the discharge, against the exact half-depth wall (q = kH/2, Muskat 1937).
import { describe, expect, it } from 'vitest';
import { readSection } from '@/lib/domain/validate';
import { buildWeir } from '../fixtures/builders';
import { solveSection } from '../fixtures/solve-section';

const soil = { k: 1e-4 };

describe('sides near a wall', () => {
  it.each([0.75, 1, 1.25, 1.5])('at %f thicknesses: the stated error within a quarter', (distance) => {
    const section = buildWeir({ thickness: 10, walls: [{ x: 0, depth: 5 }], extent: 10 * distance, soil });
    const { issues } = readSection(section);
    const stated = issues.filter(({ code }) => code === 'side-too-close');
    expect(stated).toHaveLength(2);
    const percent = Number(/like ([\d.]+) %/.exec(stated[0]!.message)![1]);
    const error = 100 * (1 - solveSection(section).discharge.value / (0.5 * soil.k));
    expect(Math.abs(percent / error - 1)).toBeLessThan(0.25);
  });

  it('two thicknesses away nothing is asked, and the error is under half a percent', () => {
    const section = buildWeir({ thickness: 10, walls: [{ x: 0, depth: 5 }], extent: 20, soil });
    expect(readSection(section).issues).toEqual([]);
    expect(Math.abs(solveSection(section).discharge.value / (0.5 * soil.k) - 1)).toBeLessThan(0.005);
  });
});
