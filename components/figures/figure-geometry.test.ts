import { describe, expect, it } from 'vitest';
import { sectionSchema } from '@/lib/domain/section';
import { fitFigure, waterOutline } from './figure-geometry';

describe('waterOutline', () => {
  it('follows a flat bed and closes along the surface', () =>
    expect(
      waterOutline(
        [
          [0, 0],
          [10, 0],
        ],
        2,
      ),
    ).toEqual([
      [0, 0],
      [10, 0],
      [10, 2],
      [0, 2],
    ]));

  it('ends where a slope rises out of the water', () =>
    expect(
      waterOutline(
        [
          [0, 0],
          [10, 0],
          [20, 5],
        ],
        2,
      ),
    ).toEqual([
      [0, 0],
      [10, 0],
      [14, 2],
      [14, 2],
      [0, 2],
    ]));

  it('is empty over dry ground', () =>
    expect(
      waterOutline(
        [
          [0, 3],
          [10, 3],
        ],
        2,
      ),
    ).toEqual([]));
});

function layer(length: number, depth: number) {
  return sectionSchema.parse({
    format: 'underfall-section/1',
    title: 'Layer',
    geometry: 'plane',
    materials: [{ id: 'sand', name: 'Sand', kMajor: 1e-4, kMinor: 1e-4 }],
    zones: [
      {
        id: 'z',
        material: 'sand',
        outline: [
          [0, 0],
          [length, 0],
          [length, -depth],
          [0, -depth],
        ],
      },
    ],
    situations: [{ id: 'flood' }],
  });
}

describe('fitFigure', () => {
  it('draws a deep section to one scale', () =>
    expect(fitFigure(layer(40, 20), 320, 170).exaggeration).toBe(1));

  it('says so where it draws heights larger', () => {
    const frame = fitFigure(layer(400, 20), 320, 170);
    expect(frame.exaggeration).toBeGreaterThan(1);
    const [left, top] = frame.place([0, 0]).split(' ').map(Number) as [number, number];
    const [right, bottom] = frame.place([400, -20]).split(' ').map(Number) as [number, number];
    expect((bottom - top) / 20 / ((right - left) / 400)).toBeCloseTo(frame.exaggeration, 1);
    expect(bottom).toBeLessThan(frame.height);
  });
});
