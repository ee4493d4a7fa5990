// Values were computed from the stated closed forms with 15 or more digits in another arithmetic, and printed with six.
import { describe, expect, it } from 'vitest';
import { blanketHeadAt, computeBlanket, type Levee } from './blanket';
import { computeCentralCutoff } from './central-cutoff';
import { cofferdamInner, computeCofferdam } from './cofferdam';
import { creepRatios } from './creep';
import { computeFlatFloor, describeDeepFloor } from './flat-floor';
import { computeFragments, formFactor } from './fragments';
import {
  interferenceCorrection,
  keyPointsOfEndPile,
  keyPointsOfIntermediatePile,
  keyPointsOfUpstreamPile,
  slopeCorrection,
} from './khosla';
import { directionalPermeability, equivalentPermeabilities, rotateTensor } from './layered';
import {
  averagePrismHead,
  computeSingleWall,
  describeDeepWall,
  faceHead,
  groundGradient,
} from './single-wall';
import {
  chapmanSlot,
  dupuitWellDischarge,
  kozenyPenetration,
  sichardtRadius,
  slotExtraLength,
  thiemDischarge,
} from './wells';

/** Agreement to the digits printed. */
function agrees(value: number, printed: number, relative = 1e-5): void {
  expect(Math.abs(value - printed)).toBeLessThanOrEqual(relative * Math.abs(printed) + 1e-12);
}

describe('one wall in a layer (Muskat 1937; Harr 1962)', () => {
  it('s = 12 m in 16 m, H = 4 m: q, exit gradient and head on the face', () => {
    const wall = { thickness: 16, embedment: 12, head: 4, permeability: 1e-6 };
    const { discharge, exitGradient } = computeSingleWall(wall).values;
    agrees(discharge, 1.36127e-6);
    agrees(exitGradient, 0.0885495);
    agrees(faceHead(wall, 6), 0.572087);
  });

  it('agrees within 1.5 % with the flow net of 3.7 channels and 11 drops (Craig 2004, problem 2.2)', () => {
    const wall = { thickness: 16, embedment: 12, head: 4, permeability: 1e-6 };
    agrees(computeSingleWall(wall).values.discharge, (1e-6 * 4 * 3.7) / 11, 0.015);
  });

  it.each([
    [0.05, 1.25094, 0.318146],
    [0.1, 1.02981, 0.317652],
    [0.25, 0.734609, 0.314086],
    [0.5, 0.5, 0.299535],
    [0.75, 0.340317, 0.265649],
    [0.9, 0.242764, 0.219847],
    [0.95, 0.19985, 0.190151],
  ])('s/T = %f: q/kH = %f and i s/H = %f', (s, q, i) => {
    const { values } = computeSingleWall({ thickness: 1, embedment: s, head: 1, permeability: 1 });
    agrees(values.discharge, q);
    agrees(values.exitGradient * s, i);
  });

  it('half-depth wall: gradient along the ground and head on the face', () => {
    const wall = { thickness: 1, embedment: 0.5, head: 1 };
    [
      [0, 0.59907],
      [0.25, 0.520516],
      [0.5, 0.378192],
      [1, 0.175954],
    ].forEach(([x, i]) => agrees(groundGradient(wall, x!), i!));
    agrees(faceHead(wall, 0.25), 0.158444);
    agrees(faceHead(wall, 0.5), 0.5, 1e-7);
  });

  it('deep ground: H = 3 m, s = 4 m', () => {
    const wall = describeDeepWall({ embedment: 4, head: 3 });
    agrees(wall.exitGradient, 0.238732);
    agrees(wall.faceHeadAt(2), 0.5);
    agrees(wall.faceHeadAt(3.2), 3 * 0.295167);
    agrees(wall.gradientAt(0), wall.exitGradient, 1e-12);
  });

  it('a very deep layer tends to the deep-ground exit gradient', () => {
    const { exitGradient } = computeSingleWall({
      thickness: 4000,
      embedment: 4,
      head: 3,
      permeability: 1,
    }).values;
    agrees(exitGradient, 3 / (4 * Math.PI), 1e-5);
  });

  it.each([
    [0.1, 0.35354],
    [0.2, 0.35225],
    [1 / 3, 0.34895],
    [0.5, 0.34136],
    [0.7, 0.32254],
    [0.9, 0.2686],
  ])('average head on the prism, D/T = %f: C₀ = %f (exact map; Terzaghi 1943, art. 94)', (depth, c0) =>
    agrees(averagePrismHead(depth, 1), c0, 3e-5),
  );

  it('refuses a wall through the whole layer', () =>
    expect(() => computeSingleWall({ thickness: 4, embedment: 4, head: 1, permeability: 1 })).toThrow(
      /inside the layer/,
    ));
});

describe('floors (Pavlovsky 1922; Weaver 1932; Harr 1962)', () => {
  it('deep ground: uplift and gradient beyond the floor', () => {
    const floor = describeDeepFloor(1, 1);
    agrees(floor.headAt(-0.5), 2 / 3);
    agrees(floor.headAt(0), 0.5);
    agrees(floor.headAt(0.5), 1 / 3);
    [
      [1.05, 0.994233],
      [1.1, 0.694609],
      [1.25, 0.424413],
      [1.5, 0.284705],
      [2, 0.183776],
    ].forEach(([x, i]) => agrees(floor.gradientAt(x!), i!));
  });

  it.each([
    [0.25, 0.960451],
    [0.5, 0.742797],
    [1, 0.53318],
    [2, 0.346952],
    [3, 0.257564],
    [5, 0.169995],
  ])('B/T = %f: q/kH = %f', (width, q) =>
    agrees(computeFlatFloor({ width, thickness: 1, head: 1, permeability: 1 }).values.discharge, q),
  );

  it('long floor: q = kHT/(B + 4 ln2/π T) within 0.1 %', () => {
    const { discharge } = computeFlatFloor({ width: 1.6, thickness: 1, head: 1, permeability: 1 }).values;
    agrees(discharge, 1 / (1.6 + (4 * Math.LN2) / Math.PI), 1e-3);
  });

  it.each([
    [0.25, 0, 0.673131],
    [0.5, 0.1, 0.949957],
    [0.5, 0.5, 1.23044],
    [1, 0.25, 1.49574],
    [1.5, 0.75, 2.55764],
  ])('central cutoff, b/T = %f, s/T = %f: Φ = %f', (halfWidth, embedment, phi) =>
    agrees(
      computeCentralCutoff({ halfWidth, embedment, thickness: 1, head: 1, permeability: 1 }).values
        .formFactor,
      phi,
    ),
  );

  it('central cutoff without a wall is the flat floor', () => {
    const cutoff = { halfWidth: 0.7, embedment: 0, thickness: 1, head: 1, permeability: 1 };
    const floor = computeFlatFloor({ width: 1.4, thickness: 1, head: 1, permeability: 1 });
    agrees(computeCentralCutoff(cutoff).values.discharge, floor.values.discharge, 1e-12);
  });
});

describe('key points (Khosla, Bose & Taylor 1936)', () => {
  it.each([
    [0.5, 84.8282, 48.2252, 0.309313],
    [1, 72.8113, 44.5115, 0.289719],
    [3.2, 47.4185, 31.8233, 0.21577],
    [10, 27.976, 19.4527, 0.135421],
    [30, 16.3448, 11.4933, 0.0808291],
  ])('end pile, α = %f: E, D = %f, %f per cent, G d/H = %f', (alpha, E, D, G) => {
    const points = keyPointsOfEndPile(alpha, 1);
    agrees(points.E, E);
    agrees(points.D, D);
    agrees(points.exitGradientRatio, G);
  });

  it.each([
    [5, 5, 56.2833, 50, 43.7167],
    [2, 6, 74.8079, 65.3014, 57.1255],
    [4, 8, 66.2055, 60.4782, 55.0871],
  ])('intermediate pile, α = %f and %f: E, D, C = %f, %f, %f per cent', (a, b, E, D, C) => {
    const points = keyPointsOfIntermediatePile(a, b, 1);
    agrees(points.E, E);
    agrees(points.D, D);
    agrees(points.C, C);
  });

  it('textbook floor of 16 m with piles of 4 and 5 m, H = 2.5 m (Garg; inputs from memory)', () => {
    const upstream = keyPointsOfUpstreamPile(16, 4);
    const downstream = keyPointsOfEndPile(16, 5);
    const c1 = upstream.C + interferenceCorrection(5, 4, 16, 16);
    const e2 = downstream.E - interferenceCorrection(4, 5, 16, 16);
    expect(c1).toBeCloseTo(63.01, 1);
    expect(e2).toBeCloseTo(42.07, 1);
    expect(upstream.D).toBeCloseTo(70.87, 1);
    expect((c1 / 100) * 2.5).toBeCloseTo(1.575, 2);
    expect((e2 / 100) * 2.5).toBeCloseTo(1.052, 2);
    agrees((downstream.exitGradientRatio * 2.5) / 5, 0.107885);
  });

  it('slope correction: tabulated at 3:1, between at 3.5:1', () => {
    expect(slopeCorrection(3, 6, 12)).toBeCloseTo(2.25, 12);
    expect(slopeCorrection(3.5, 12, 12)).toBeCloseTo(3.9, 12);
  });
});

describe('method of fragments (Pavlovsky 1935; Harr 1962, ch. 6)', () => {
  it('floor of 16 m, walls of 4 and 5 m, T = 20 m', () => {
    const { values, working } = computeFragments({
      fragments: [
        { type: 'II', embedment: 4, thickness: 20 },
        { type: 'VI', floor: 16, first: 4, second: 5, thickness: 20 },
        { type: 'II', embedment: 5, thickness: 20 },
      ],
      head: 1,
      permeability: 1,
    });
    [0.619448, 0.860826, 0.680634].forEach((phi, i) => agrees(values.formFactors[i]!, phi));
    agrees(values.discharge, 0.462768);
    agrees(1 - values.losses[0]!, 0.713339);
    agrees(values.losses[2]!, 0.314976);
    agrees(values.exitGradient!, 0.0395718);
    expect(working.at(-1)).toMatchObject({ symbol: 'i_E' });
  });

  it('two type II fragments are the single wall, exactly', () => {
    const II = { type: 'II', embedment: 12, thickness: 16 } as const;
    const { values } = computeFragments({ fragments: [II, II], head: 4, permeability: 1e-6 });
    const exact = computeSingleWall({ thickness: 16, embedment: 12, head: 4, permeability: 1e-6 }).values;
    agrees(values.discharge, exact.discharge, 1e-12);
    agrees(values.exitGradient!, exact.exitGradient, 1e-12);
  });

  it('types IV, V and VI agree where they meet, and type VI without walls is type I', () => {
    const T = 10;
    const phi = formFactor;
    const vi = (floor: number, first: number, second: number): number =>
      phi({ type: 'VI', floor, first, second, thickness: T });
    agrees(vi(8, 3, 3), phi({ type: 'V', floor: 8, embedment: 3, thickness: T }), 1e-14);
    agrees(vi(8, 3, 0), phi({ type: 'IV', floor: 8, embedment: 3, thickness: T }), 1e-14);
    agrees(vi(8, 0, 0), phi({ type: 'I', length: 8, thickness: T }), 1e-14);
    agrees(vi(7 - 1e-12, 3, 4), vi(7 + 1e-12, 3, 4), 1e-10);
    const short = phi({ type: 'V', floor: 2, embedment: 3, thickness: T });
    agrees(short, 2 * Math.log(1 + 2 / 14), 1e-14);
    agrees(phi({ type: 'IV', floor: 2, embedment: 3, thickness: T }), Math.log(1 + 2 / 7), 1e-14);
  });
});

describe('pit between two walls (exact inner rectangle; Harr 1962, ch. 6)', () => {
  it.each([
    [0.25, 0.1, 2.94127, 3.40121],
    [0.25, 0.5, 0.943389, 2.65596],
    [0.25, 2, 0.682673, 2.51408],
    [0.5, 0.1, 5.44127, 1.83781],
    [0.5, 0.25, 2.44246, 1.64077],
    [0.5, 1, 1.08223, 1.25224],
    [0.75, 0.1, 7.94152, 1.25921],
    [0.75, 1, 1.57556, 0.770845],
  ])('s/T = %f, b/T = %f: Φ = %f, i T/h = %f', (s, b, phi, exit) => {
    const inner = cofferdamInner(s, 1, b);
    agrees(inner.formFactor, phi);
    agrees(inner.exitRatio, exit);
  });

  it('wide pit tends to the type II fragment as exp(−πb/T)', () => {
    agrees(cofferdamInner(0.5, 1, 4).formFactor, 1, 1e-5);
    agrees(cofferdamInner(0.5, 1, 6).formFactor, 1, 2e-8);
  });

  it('T_o = 12, s_o = 6, dredge 2, half width 4, H = 6 m', () => {
    const { values } = computeCofferdam({
      outerThickness: 12,
      outerEmbedment: 6,
      dredge: 2,
      halfWidth: 4,
      head: 6,
      permeability: 1,
    });
    agrees(values.outerFormFactor, 1);
    agrees(values.innerFormFactor, 1.44686);
    agrees(values.dischargePerWall, 6 * 0.408687);
    agrees(values.innerLoss, 3.54788);
    agrees(values.exitGradient, 0.640907);
  });
});

describe('levee blanket (Bennett 1946; EM 1110-2-1913 app. B)', () => {
  const stratum = { permeability: 1e-6, thickness: 2.5 };
  const levee: Levee = {
    permeability: 1e-3,
    thickness: 20,
    baseWidth: 40,
    head: 6,
    riverside: { kind: 'open', length: 100, ...stratum },
    landside: { kind: 'infinite', ...stratum },
  };

  it('semipervious on both sides, infinite landside', () => {
    const { values, isInRange } = computeBlanket(levee);
    agrees(values.entranceDistance, 93.8267);
    agrees(values.exitDistance, 223.607);
    agrees(values.toeHead, 3.75354);
    agrees(values.toeGradient!, 1.50142);
    agrees(values.discharge, 3.35727e-4);
    agrees(blanketHeadAt(levee, 100), 2.40004);
    expect(isInRange).toBe(true);
  });

  it('landside blocked and open at 100 m', () => {
    const blocked = computeBlanket({
      ...levee,
      landside: { kind: 'blocked', length: 100, ...stratum },
    }).values;
    agrees(blocked.exitDistance, 532.897);
    agrees(blocked.toeHead, 4.79566);
    agrees(blocked.discharge, 1.79985e-4);
    const open = computeBlanket({ ...levee, landside: { kind: 'open', length: 100, ...stratum } }).values;
    agrees(open.exitDistance, 93.8267);
    agrees(open.toeHead, 2.47288);
    agrees(open.discharge, 5.27117e-4);
  });

  it('no stratum riverside, landside, on either side (0.43 d as in the manual)', () => {
    agrees(computeBlanket({ ...levee, riverside: { kind: 'none' } }).values.toeHead, 4.92876);
    agrees(computeBlanket({ ...levee, landside: { kind: 'none' } }).values.discharge, 8.42538e-4);
    const none = { ...levee, riverside: { kind: 'none' }, landside: { kind: 'none' } } as const;
    agrees(computeBlanket(none).values.discharge, 2.0979e-3);
  });

  it('says when the top stratum is not tight enough', () => {
    const loose = { kind: 'infinite', permeability: 2e-4, thickness: 2.5 } as const;
    expect(computeBlanket({ ...levee, landside: loose }).isInRange).toBe(false);
  });
});

describe('layers, axes, creep, wells', () => {
  it('layers of 2 m at 1e-5, 1 m at 1e-7, 3 m at 1e-6', () => {
    const { along, across } = equivalentPermeabilities([
      { thickness: 2, permeability: 1e-5 },
      { thickness: 1, permeability: 1e-7 },
      { thickness: 3, permeability: 1e-6 },
    ]);
    agrees(along, 3.85e-6, 1e-6);
    agrees(across, 4.54545e-7, 2e-6);
  });

  it('rotated axes at 30° (Bear 1972)', () => {
    const { xx, zz, xz } = rotateTensor(1e-5, 1e-6, 30);
    agrees(xx, 7.75e-6, 1e-9);
    agrees(zz, 3.25e-6, 1e-9);
    agrees(xz, 3.89711e-6, 2e-6);
    const { alongFlow, alongGradient } = directionalPermeability(1e-5, 1e-6, 30);
    agrees(alongFlow, 3.07692e-6, 2e-6);
    agrees(alongGradient, 7.75e-6, 1e-9);
  });

  it('floor of 16 m, walls of 4 and 5 m, H = 2.5 m (Lane 1935; Bligh 1910)', () => {
    const ratios = creepRatios({ vertical: 18, horizontal: 16 }, 2.5);
    agrees(ratios.weighted, 23.3333);
    agrees(ratios.lane, 9.33333);
    expect(ratios.plain).toBe(34);
    agrees(ratios.bligh, 13.6);
  });

  it('wells and slots (Thiem 1906; Dupuit 1863; Sichardt 1928; Chapman 1957; Kozeny 1933)', () => {
    agrees(thiemDischarge(1e-4, 10, 2, 10), 5.45751e-3);
    agrees(dupuitWellDischarge(1e-4, 10, 8, 10), 4.91175e-3);
    agrees(sichardtRadius(5, 1e-4), 150);
    const slot = chapmanSlot(10, 4, 50);
    agrees(slot.dischargeRatio, 0.74928);
    agrees(slot.headBehind, 4.7104);
    agrees(kozenyPenetration(10, 20, 0.15), 0.71433, 1e-5);
  });

  it.each([
    [0.25, 0.611503],
    [0.5, 0.220636],
    [0.75, 0.0504035],
    [0.9, 0.0078865],
  ])('slot, W/D = %f: E/D = %f', (w, e) => agrees(slotExtraLength(w, 1), e));
});
