import { describe, it } from 'vitest';
import { cofferdamInner } from '@/lib/hand-methods/cofferdam';
import { faceHead, groundGradient } from '@/lib/hand-methods/single-wall';
import { buildWeir, turnSection } from '../fixtures/builders';
import { type ClosedForm, expectClosedForm } from './closed-form';

const rectangle = (s: number, T: number, b: number): number => 1 / (2 * cofferdamInner(s, T, b).formFactor);
const craig = { thickness: 16, embedment: 12, head: 4 };
const half = { thickness: 1, embedment: 0.5, head: 1 };
const twoCutoffs = {
  floor: [0, 16] as const,
  walls: [
    { x: 0, depth: 4 },
    { x: 16, depth: 5 },
  ],
};

const walls: ClosedForm[] = [
  {
    title: 'wall of 12 m in 16 m of sand, H = 4 m: q = 1.36127e-6, i = 0.0885495, head on the face',
    source: 'Muskat 1937; Harr 1962, secs. 5–6; flow net of Craig 2004, problem 2.2',
    section: buildWeir({
      thickness: 16,
      walls: [{ x: 0, depth: 12 }],
      head: 4,
      extent: 96,
      soil: { k: 1e-6 },
      points: [
        [1e-4, -6],
        [-1e-4, -6],
        [0, -12],
      ],
    }),
    q: [1.36127e-6, 0.003],
    bracketed: 1.36127e-6,
    exit: [0.0885495, 0.02],
    heads: [
      [faceHead(craig, 6), 0.01],
      [4 - faceHead(craig, 6), 0.01],
      [2, 0.01],
    ],
  },
  {
    title: 'half-depth wall: q/kH = 1/2, i = 0.599070, i(x) along the ground',
    source: 'Muskat 1937; Harr 1962; Polubarinova-Kochina 1962, ch. III',
    section: buildWeir({ thickness: 1, walls: [{ x: 0, depth: 0.5 }], extent: 6, points: [[1e-5, -0.25]] }),
    q: [0.5, 0.002],
    bracketed: 0.5,
    exit: [0.59907, 0.01],
    along: [0.25, 0.5, 1].map((x) => [x, groundGradient(half, x), 0.02] as const),
    heads: [[0.158444, 0.003]],
  },
  {
    title: 'half-depth wall in a box of 3T either side: the exact rectangle, q/kH = 0.499926',
    source: 'inner rectangle of a pit, exact map; bounds of Pólya & Szegő 1951, Synge 1957',
    section: buildWeir({ thickness: 1, walls: [{ x: 0, depth: 0.5 }], extent: 3 }),
    q: [0.499926, 0.002],
    bracketed: rectangle(0.5, 1, 3),
  },
  {
    title: 'half-depth wall, kx = 4 kz: q/√(kx kz)H and i as in isotropic ground',
    source: 'transformed section, Samsioe 1931; Casagrande 1937',
    section: buildWeir({
      thickness: 1,
      walls: [{ x: 0, depth: 0.5 }],
      extent: 6,
      soil: { kMajor: 4, kMinor: 1 },
    }),
    q: [2 * 0.499926, 0.002],
    bracketed: 2 * rectangle(0.5, 1, 3),
    exit: [0.59907, 0.02],
  },
  {
    title: 'the same turned by 30° with its principal axes: q unchanged',
    source: 'invariance of the tensor equation; Bear 1972, sec. 5.6',
    section: turnSection(
      buildWeir({ thickness: 1, walls: [{ x: 0, depth: 0.5 }], extent: 6, soil: { kMajor: 4, kMinor: 1 } }),
      30,
      10,
    ),
    q: [2 * 0.499926, 0.002],
    bracketed: 2 * rectangle(0.5, 1, 3),
  },
  {
    title: 'deep ground (T = 40 s): i = H/πs = 0.238732, face head H asin(y/s)/π',
    source: 'Harr 1962, sec. 5–5; H = 3 m, s = 4 m',
    section: buildWeir({
      thickness: 160,
      walls: [{ x: 0, depth: 4 }],
      head: 3,
      extent: 640,
      points: [
        [1e-4, -2],
        [0, -4],
      ],
    }),
    exit: [0.238732, 0.02],
    heads: [
      [0.5, 0.02],
      [1.5, 0.02],
    ],
  },
  {
    title: 'shallow wall, s/T = 0.1: q/kH = 1.02981, i s/H = 0.317652',
    source: 'Muskat 1937; Harr 1962',
    section: buildWeir({ thickness: 10, walls: [{ x: 0, depth: 1 }], extent: 60 }),
    q: [1.02981, 0.003],
    bracketed: 1.02981,
    exit: [0.317652, 0.02],
  },
  {
    title: 'deep wall, s/T = 0.9: q/kH = 0.242764, i s/H = 0.219847',
    source: 'Muskat 1937; Harr 1962',
    section: buildWeir({ thickness: 10, walls: [{ x: 0, depth: 9 }], extent: 60 }),
    q: [0.242764, 0.003],
    bracketed: 0.242764,
    exit: [0.219847 / 9, 0.02],
  },
];

const floors: ClosedForm[] = [
  ...(
    [
      [1, 0.53318],
      [3, 0.257564],
    ] as const
  ).map(([B, q]): ClosedForm => ({
    title: `flat floor, B/T = ${B}: q/kH = ${q}; no finite exit gradient`,
    source: 'Pavlovsky 1922; Harr 1962, ch. 5',
    section: buildWeir({ thickness: 1, floor: [-B / 2, B / 2], extent: B / 2 + 6, points: [[0, 0]] }),
    q: [q, 0.003],
    bracketed: q,
    exit: 'unbounded',
    heads: [[0.5, 0.003]],
  })),
  {
    title: 'flat floor on deep ground (T = 40 b): h = (H/π) arccos(x/b), i at 1.5 b = 0.284705',
    source: 'Weaver 1932; Khosla, Bose & Taylor 1936; Harr 1962, sec. 5–2',
    section: buildWeir({
      thickness: 40,
      floor: [-1, 1],
      extent: 160,
      points: [
        [-0.5, 0],
        [0, 0],
        [0.5, 0],
      ],
    }),
    exit: 'unbounded',
    along: [[1.5, 0.284705, 0.02]],
    heads: [
      [2 / 3, 0.005],
      [1 / 2, 0.005],
      [1 / 3, 0.005],
    ],
  },
  {
    title: 'floor with a central cutoff, b/T = s/T = 0.5: q/kH = 0.406360',
    source: 'Pavlovsky 1922; Harr 1962, type III',
    section: buildWeir({ thickness: 1, floor: [-0.5, 0.5], walls: [{ x: 0, depth: 0.5 }], extent: 6.5 }),
    q: [0.40636, 0.003],
    bracketed: 0.40636,
    exit: 'unbounded',
  },
  {
    title: 'floor with a central cutoff, b/T = 1, s/T = 0.75: Φ = 2.07597',
    source: 'Pavlovsky 1922; Harr 1962, type III',
    section: buildWeir({ thickness: 1, floor: [-1, 1], walls: [{ x: 0, depth: 0.75 }], extent: 7 }),
    q: [1 / (2 * 2.07597), 0.003],
    bracketed: 1 / (2 * 2.07597),
  },
  {
    title: 'floor with a central cutoff, kx = 4 kz: the transformed section has half the width',
    source: 'Casagrande 1937; type III with b/T = 0.5',
    section: buildWeir({
      thickness: 1,
      floor: [-1, 1],
      walls: [{ x: 0, depth: 0.5 }],
      extent: 14,
      soil: { kMajor: 4, kMinor: 1 },
    }),
    q: [2 * 0.40636, 0.003],
    bracketed: 2 * 0.40636,
  },
  {
    title: 'floor of 16 m with cutoffs of 4 and 5 m on 20 m: q, tips, key points, exit gradient',
    source: 'independent finite-element bracket, h = 0.25 m (0.44797, 0.45092); compare Khosla 1936',
    section: buildWeir({
      thickness: 20,
      ...twoCutoffs,
      extent: 76,
      points: [
        [0, -4],
        [16, -5],
        [1e-3, 0],
        [16 - 1e-3, 0],
      ],
    }),
    q: [0.4494, 0.0015 / 0.4494],
    exit: [0.0366, 0.0012 / 0.0366],
    heads: [
      [0.76, 0.004],
      [0.2747, 0.004],
      [0.644, 0.006],
      [0.414, 0.006],
    ],
  },
];

describe('closed forms: walls', () => it.each(walls)('$title [$source]', expectClosedForm));
describe('closed forms: floors', () => it.each(floors)('$title [$source]', expectClosedForm));
