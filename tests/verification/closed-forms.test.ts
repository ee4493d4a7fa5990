// The whole path, section document to result document, against closed forms. Every case: one claim, its source, the exact value, the
// tolerance allowed to the solver. Heads are in metres, k = 1 m/s and H = 1 m unless the case says otherwise, so q reads as q/kH.
import { describe, expect, it } from 'vitest';
import { cofferdamInner } from '@/lib/hand-methods/cofferdam';
import { faceHead, groundGradient } from '@/lib/hand-methods/single-wall';
import { slotExtraLength } from '@/lib/hand-methods/wells';
import type { SectionInput } from '@/lib/domain/section';
import { buildBox, buildColumn, buildPit, buildWeir, turnSection } from '../fixtures/builders';
import { solveSection } from '../fixtures/solve-section';

interface Case {
  readonly title: string;
  readonly source: string;
  readonly section: SectionInput;
  /** Discharge and relative tolerance. */
  readonly q?: readonly [value: number, tolerance: number];
  /** The bracket must hold the exact discharge of the drawn, finite section. */
  readonly bracketed?: number;
  /** Greatest outward gradient and relative tolerance; `unbounded` where theory has none. */
  readonly exit?: readonly [value: number, tolerance: number] | 'unbounded';
  /** Outward gradient at x along the outflow bed, relative tolerance. */
  readonly along?: readonly (readonly [x: number, value: number, tolerance: number])[];
  /** Head at P1, P2, … and absolute tolerance. */
  readonly heads?: readonly (readonly [value: number, tolerance: number])[];
}

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

const walls: Case[] = [
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

const floors: Case[] = [
  ...(
    [
      [1, 0.53318],
      [3, 0.257564],
    ] as const
  ).map(([B, q]): Case => ({
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

const pits: Case[] = [
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
const columns: Case[] = [
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

describe.each([
  ['walls', walls],
  ['floors', floors],
  ['pits', pits],
  ['columns, boxes, wells', columns],
] as const)('closed forms: %s', (_, cases) => {
  it.each(cases)('$title [$source]', (one) => {
    const result = solveSection(one.section);
    const { discharge } = result;
    expect(Math.abs(discharge.balance)).toBeLessThan(1e-9);
    if (one.q) expect(Math.abs(discharge.value / one.q[0] - 1)).toBeLessThan(one.q[1]);
    if (one.bracketed !== undefined) {
      // exact values are printed with six digits
      expect(discharge.kind).toBe('bound');
      expect(discharge.lower).toBeLessThanOrEqual(one.bracketed * (1 + 3e-6));
      expect(discharge.upper).toBeGreaterThanOrEqual(one.bracketed * (1 - 3e-6));
    }
    checkExit(one, result);
    one.heads?.forEach(([head, tolerance], i) => {
      const found = result.piezometers[i]!.head!;
      expect(Math.abs(found - head), `head at P${i + 1}: ${found}, not ${head}`).toBeLessThan(tolerance);
    });
  });
});

function checkExit(one: Case, result: ReturnType<typeof solveSection>): void {
  if (one.exit === undefined) return;
  expect(result.exit).toHaveLength(1);
  const { max, profile } = result.exit[0]!;
  if (one.exit === 'unbounded') {
    expect(max).toMatchObject({ unbounded: true, gradient: null });
    expect(max.averaged).toBeGreaterThan(0);
  } else {
    expect(max.unbounded).toBe(false);
    expect(Math.abs(max.gradient! / one.exit[0] - 1), `exit ${max.gradient}`).toBeLessThan(one.exit[1]);
  }
  one.along?.forEach(([x, value, tolerance]) => {
    const i = profile.findIndex(({ at }) => at[0] >= x);
    const [a, b] = [profile[i - 1]!, profile[i]!];
    const part = (x - a.at[0]) / (b.at[0] - a.at[0]);
    const found = a.gradient! + part * (b.gradient! - a.gradient!);
    expect(Math.abs(found / value - 1), `gradient at ${x}: ${found}`).toBeLessThan(tolerance);
  });
}
