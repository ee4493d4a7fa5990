import { describe, it } from 'vitest';
import { slotExtraLength } from '@/lib/hand-methods/wells';
import { buildBox, buildColumn, buildPit } from '../fixtures/builders';
import { type ClosedForm, expectClosedForm } from './closed-form';

const pits: ClosedForm[] = [
  {
    title: 'long pit: q per wall within the independent bracket, i, head at the tip',
    source: 'independent finite-element bracket (0.4023, 0.4085) kH; compare McNamee 1949, Griffiths 1984',
    section: buildPit({
      geometry: 'plane',
      thickness: 12,
      embedment: 6,
      dredge: 2,
      halfWidth: 4,
      head: 6,
      extent: 40,
      points: [[4, -6]],
    }),
    q: [6 * 0.4054, 0.0031 / 0.4054],
    exit: [0.636, 0.008 / 0.636],
    heads: [[-2 + 3.377, 0.03]],
  },
  {
    title: 'round pit of the same section: Q/2πRkH = 0.312, i = 0.95, tip 4.50 m',
    source: 'independent axisymmetric finite elements; compare Davidenkoff & Franke 1965',
    section: buildPit({
      geometry: 'axisymmetric',
      thickness: 12,
      embedment: 6,
      dredge: 2,
      halfWidth: 4,
      head: 6,
      extent: 40,
      points: [[4, -6]],
    }),
    q: [0.312 * 2 * Math.PI * 4 * 6, 0.004 / 0.312],
    exit: [0.95, 0.02 / 0.95],
    heads: [[-2 + 4.5, 0.05]],
  },
];

const opening = 0.25;
/** On each side of an opening at the foot of a wall. */
const footLength = slotExtraLength(opening, 1);
/** Both sides of a slot a tenth of the layer high in the middle of it: two mirrored halves of half the height. */
const slotLength = 2 * slotExtraLength(0.05, 0.5);
const columns: ClosedForm[] = [
  {
    title: 'column of 2 m at 1e-5 over 3 m at 1e-6: q = 3.125e-7, interface head 0.9375',
    source: 'series law',
    section: buildColumn(
      [
        { thickness: 2, k: 1e-5 },
        { thickness: 3, k: 1e-6 },
      ],
      1,
      [[0.5, -2]],
    ),
    q: [3.125e-7, 1e-9],
    heads: [[0.9375, 1e-9]],
  },
  {
    title: 'leaky wall across a box: q = kTH/(L + k/C)',
    source: 'series law',
    section: buildBox({
      length: 10,
      thickness: 4,
      head: 2,
      walls: [
        {
          path: [
            [5, 0],
            [5, -4],
          ],
          conductance: 0.25,
        },
      ],
      points: [
        [5 - 1e-6, -2],
        [5 + 1e-6, -2],
      ],
    }),
    q: [(4 * 2) / (10 + 4), 1e-6],
    heads: [
      [3 - (2 * 5) / 14, 1e-5],
      [1 + (2 * 5) / 14, 1e-5],
    ],
  },
  {
    title: 'wall with an opening of a quarter of the layer at its foot: q = kTH/(L + 2E)',
    source: 'exact length E = −(2T/π) ln sin(πW/2T) a side, conformal map; compare Leonards 1962, ch. 3',
    section: buildBox({
      length: 12,
      thickness: 1,
      head: 1,
      walls: [
        {
          path: [
            [6, 0],
            [6, -1 + opening],
          ],
          conductance: 0,
        },
      ],
    }),
    q: [1 / (12 + 2 * footLength), 0.002],
    bracketed: 1 / (12 + 2 * footLength),
  },
  {
    title: 'wall with a slot of a tenth of the layer in its middle: q = kTH/(L + (2T/π) ln(1/sin(πa/2T)))',
    source: 'the same map, mirrored',
    section: buildBox({
      length: 12,
      thickness: 1,
      head: 1,
      walls: [
        {
          path: [
            [6, 0],
            [6, -0.45],
          ],
          conductance: 0,
        },
        {
          path: [
            [6, -0.55],
            [6, -1],
          ],
          conductance: 0,
        },
      ],
    }),
    q: [1 / (12 + slotLength), 0.002],
    bracketed: 1 / (12 + slotLength),
  },
  {
    title: 'well in a confined layer: Q = 5.45751e-3 m³/s, head linear in ln r',
    source: 'Thiem 1906',
    section: buildBox({
      geometry: 'axisymmetric',
      left: 5,
      length: 45,
      thickness: 10,
      head: -2,
      soil: { k: 1e-4 },
      points: [[Math.sqrt(5 * 50), -5]],
    }),
    q: [5.45751e-3, 0.002],
    heads: [[2, 0.01]],
  },
  {
    title: 'long strip with axes at 30°, k1 = 10 k2: q = k_s t H/L, 1/k_s = cos²/k1 + sin²/k2',
    source: 'Freeze & Cherry 1979, sec. 2.4; ends of t/L = 1/60 feel the slant',
    section: buildBox({
      length: 60,
      thickness: 1,
      head: 1,
      soil: { kMajor: 1e-5, kMinor: 1e-6, angle: 30 },
      points: [[30, -0.5]],
    }),
    q: [3.07692e-6 / 60, 0.03],
    heads: [[1.5, 0.01]],
  },
];

describe('closed forms: pits', () => it.each(pits)('$title [$source]', expectClosedForm));
describe('closed forms: columns, boxes, wells', () => it.each(columns)('$title [$source]', expectClosedForm));
