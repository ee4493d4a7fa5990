import { describe, expect, it } from 'vitest';
import { startingPoints } from '@/lib/domain/starting-points';
import { fitCamera, toScreenX, toScreenY, toWorld, zoomCamera } from './camera';
import { listHandles, moveCorner, restCorner, restTip, roundTo, stepAt } from './move-points';

const wall = startingPoints.find(({ id }) => id === 'wall-in-ground')!.document;

describe('camera', () => {
  const camera = fitCamera({ xMin: -36, xMax: 36, yMin: -12, yMax: 5 }, 720, 400, 100);

  it('keeps one scale both ways and returns a point to itself', () => {
    expect(camera.scale).toBeCloseTo(10, 12);
    const [x, y] = toWorld(camera, toScreenX(camera, 3.25), toScreenY(camera, -7.5));
    expect([x, y]).toEqual([expect.closeTo(3.25, 10), expect.closeTo(-7.5, 10)]);
  });

  it('keeps the point under the pointer when moving closer', () => {
    const closer = zoomCamera(camera, 2, 100, 50, 1);
    expect(toWorld(closer, 100, 50)[0]).toBeCloseTo(toWorld(camera, 100, 50)[0], 9);
    expect(toWorld(closer, 100, 50)[1]).toBeCloseTo(toWorld(camera, 100, 50)[1], 9);
  });
});

describe('moving points', () => {
  it('finds the low end of a wall and each corner once', () => {
    const handles = listHandles(wall);
    expect(handles[0]).toMatchObject({ kind: 'tip', at: [0, -6] });
    expect(handles.filter(({ kind }) => kind === 'corner')).toHaveLength(6);
  });

  it('moves a shared corner of two zones together', () => {
    const draft = structuredClone(wall);
    moveCorner(draft, [52, -5], [52, -4.2]);
    const moved = draft.zones.flatMap(({ outline }) => outline).filter(([x, y]) => x === 52 && y === -4.2);
    expect(moved).toHaveLength(2);
  });

  it('moves the edge that ends on a corner', () => {
    const draft = structuredClone(wall);
    moveCorner(draft, [52, 0], [52, 0.5]);
    expect(draft.edges.find(({ id }) => id === 'bed')!.path.at(-1)).toEqual([52, 0.5]);
  });

  it('keeps an upright wall upright and its tip below its top', () => {
    expect(
      restTip(
        [
          [0, 0],
          [0, -6],
        ],
        1,
        [1.3, -7.123],
        0.05,
      ),
    ).toEqual([0, -7.1]);
    expect(
      restTip(
        [
          [0, 0],
          [0, -6],
        ],
        1,
        [0, 4],
        0.05,
      ),
    ).toEqual([0, -0.05]);
  });

  it('snaps a corner to another one close by', () => {
    expect(restCorner([10.04, -3.02], [[10, 8]], 0.1, 0.5)).toEqual([10, -3]);
  });

  it('rounds without binary dust', () => {
    expect(roundTo(0.1 + 0.2, 0.1)).toBe(0.3);
    expect(stepAt(10)).toBeCloseTo(0.2, 12);
  });
});
