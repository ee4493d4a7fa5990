import {
  buildMesh,
  exitProfile,
  type Medium,
  type Mesh,
  prepareSteady,
  type SectionGeometry,
  type SituationConditions,
  solveSteady,
  solveStreamFunction,
  type SteadySolution,
} from '@/solver';
import { makeRandom, median, peakMegabytes, quantile } from './timing';

const conditions: SituationConditions = {
  edges: [
    { type: 'head', head: 1 },
    { type: 'head', head: 0 },
  ],
  drains: [],
};
const sand: Medium = { conductivities: [{ kMajor: 1, kMinor: 1, angle: 0 }], conductances: [0] };

/** A wall in one layer of depth 1, far ends at five times the depth. */
function pile(depth: number): SectionGeometry {
  const outline = [
    [-5, -1],
    [5, -1],
    [5, 0],
    [-5, 0],
  ] as const;
  return {
    kind: 'plane',
    regions: [{ outline, holes: [], material: 0 }],
    barriers: [
      {
        path: [
          [0, 0],
          [0, -depth],
        ],
        conductance: 0,
      },
    ],
    drains: [],
    edges: [
      [
        [-5, 0],
        [0, 0],
      ],
      [
        [0, 0],
        [5, 0],
      ],
    ],
    bases: [],
  };
}

/** Two anisotropic layers, a lens of another permeability, an apron with two walls. */
function zoned(): SectionGeometry {
  const box = (x0: number, y0: number, x1: number, y1: number) =>
    [
      [x0, y0],
      [x1, y0],
      [x1, y1],
      [x0, y1],
    ] as const;
  return {
    kind: 'plane',
    regions: [
      { outline: box(-60, -20, 80, -9), holes: [], material: 1 },
      { outline: box(-60, -9, 80, 0), holes: [], material: 0 },
      { outline: box(-5, -7, 30, -5), holes: [], material: 2 },
    ],
    barriers: [
      {
        path: [
          [0, 0],
          [0, -4],
        ],
        conductance: 0,
      },
      {
        path: [
          [20, 0],
          [20, -6],
        ],
        conductance: 0,
      },
    ],
    drains: [],
    edges: [
      [
        [-60, 0],
        [0, 0],
      ],
      [
        [20, 0],
        [80, 0],
      ],
    ],
    bases: [],
  };
}

const layers: Medium = {
  conductivities: [
    { kMajor: 2e-4, kMinor: 4e-5, angle: 0.1 },
    { kMajor: 1e-5, kMinor: 1e-6, angle: -0.05 },
    { kMajor: 1e-6, kMinor: 1e-6, angle: 0 },
  ],
  conductances: [0, 0],
};

function meshOf(geometry: SectionGeometry, sizeFactor: number): Mesh {
  const outcome = buildMesh(geometry, { order: 2, sizeFactor, maxElements: 1_000_000 });
  if (outcome.status !== 'meshed') throw new RangeError(`No mesh: ${outcome.findings[0]?.code}.`);
  return outcome.mesh;
}

function solveOn(mesh: Mesh, medium: Medium): SteadySolution {
  const outcome = solveSteady(prepareSteady(mesh, 'plane'), medium, conditions);
  if (outcome.status !== 'solved') throw new RangeError(`No solution: ${outcome.reason}.`);
  return outcome.solution;
}

interface BoundedAnswer {
  readonly discharge: number;
  readonly halfBracket: number;
  readonly exitGradient: number;
  readonly unknowns: number;
}

function answer(geometry: SectionGeometry, sizeFactor: number, withExit: boolean): BoundedAnswer {
  const mesh = meshOf(geometry, sizeFactor);
  const model = prepareSteady(mesh, 'plane');
  const outcome = solveSteady(model, sand, conditions);
  if (outcome.status !== 'solved') throw new RangeError(`No solution: ${outcome.reason}.`);
  const { solution } = outcome;
  const { lower, upper } = solveStreamFunction(model, sand, conditions, solution);
  const { heads, reactions } = solution;
  const section = {
    mesh,
    kind: 'plane' as const,
    conductivities: sand.conductivities,
    conditions,
    heads,
    reactions,
  };
  const exit = withExit ? exitProfile(section, 1, 0.5).max.gradient! : 0;
  return {
    discharge: solution.inflow,
    halfBracket: (upper! - lower!) / 2,
    exitGradient: exit,
    unknowns: solution.unknowns,
  };
}

/** Meshes and solves the half-depth pile until the reported errors are below 0.1 % and 1 %. Exact: q = ½, i = 0.599070 (Muskat 1937). */
export function pileToAccuracy(): object {
  const { seconds, value } = median(() => {
    let before: BoundedAnswer | null = null;
    for (const size of [2.6, 1.8, 1.25, 0.9, 0.6]) {
      const now = answer(pile(0.5), size, true);
      const isSettled = before !== null && Math.abs(now.exitGradient / before.exitGradient - 1) < 0.01;
      if (now.halfBracket / now.discharge < 0.001 && isSettled) return now;
      before = now;
    }
    return before!;
  });
  return {
    seconds,
    unknowns: value.unknowns,
    dischargeError: Math.abs(value.discharge / 0.5 - 1),
    exitGradientError: Math.abs(value.exitGradient / 0.5990701173677961 - 1),
  };
}

/** 200 positions of a wall's tip, each a full new answer with bounds at about 2 000 unknowns. */
export function drag(): object {
  const times: number[] = [];
  let unknowns = 0;
  for (let i = 0; i < 240; i++) {
    const began = performance.now();
    unknowns = answer(pile(0.3 + (0.4 * (i % 200)) / 200), 0.92, false).unknowns;
    if (i >= 40) times.push((performance.now() - began) / 1000);
  }
  return { seconds: quantile(times, 0.5), p50: quantile(times, 0.5), p95: quantile(times, 0.95), unknowns };
}

/** 200 realisations of lognormal permeabilities on one mesh of about 20 000 unknowns: analysis reused, numbers and solve anew. */
export function ensemble(): object {
  const model = prepareSteady(meshOf(zoned(), 0.6), 'plane');
  const random = makeRandom(20_261);
  const normal = (): number => Math.sqrt(-2 * Math.log(random())) * Math.cos(2 * Math.PI * random());
  const samples = 200;
  let unknowns = 0;
  const run = (): void => {
    const conductivities = layers.conductivities.map(({ kMajor, kMinor, angle }) => {
      const factor = Math.exp(0.8 * normal());
      return { kMajor: kMajor * factor, kMinor: kMinor * factor, angle };
    });
    const outcome = solveSteady(model, { conductivities, conductances: [0, 0] }, conditions);
    if (outcome.status !== 'solved') throw new RangeError(`No solution: ${outcome.reason}.`);
    unknowns = outcome.solution.unknowns;
  };
  for (let i = 0; i < 10; i++) run();
  const began = performance.now();
  for (let i = 0; i < samples; i++) run();
  const seconds = (performance.now() - began) / 1000;
  return { seconds, samplesPerSecond: samples / seconds, unknowns };
}

/** Total time and peak memory, mesh included, at growing sizes. Peak memory is the process's so far, so it only grows. */
export function growth(): object {
  const points = [2.2, 0.42, 0.13, 0.041].map((size) => {
    const run = (): number => solveOn(meshOf(pile(0.5), size), sand).unknowns;
    const { seconds, value } = size > 0.05 ? median(run, 3, 1) : median(run, 1, 0);
    return { unknowns: value, seconds, megabytes: peakMegabytes() };
  });
  return { seconds: points.at(-1)!.seconds, points };
}

/** A zoned, anisotropic section on a million unknowns; mesh excluded. Solved directly: no iterations. */
export function million(): object {
  const mesh = meshOf(zoned(), 0.077);
  const began = performance.now();
  const { unknowns, balance } = solveOn(mesh, layers);
  const seconds = (performance.now() - began) / 1000;
  return { seconds, unknowns, iterations: 0, balance, peakMegabytes: peakMegabytes() };
}
