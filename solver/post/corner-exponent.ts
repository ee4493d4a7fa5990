// How the head behaves at a corner of the boundary: h ~ r^λ with the smallest λ > 0 that the wedge of ground and the conditions on its
// two sides allow. λ < 1 means an infinite gradient. Williams (1952), J. Appl. Mech. 19 (the method, for plates); Strang & Fix (1973),
// An Analysis of the Finite Element Method, ch. 8 (from memory).
import type { Mesh } from '../mesh/mesh';
import type { Conductivity } from '../problem';
import { isotropicMap } from './isotropic-map';

/** A part of a wedge in one material, from one ray to the next, counter-clockwise. */
export interface WedgeSector {
  readonly conductivity: Conductivity;
  /** Directions of its first and last ray, any length. */
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
}

/** What holds on the two sides of a wedge: a head (the same on both where both have one) or no flow. */
export type WedgeSides = readonly [first: 'head' | 'impervious', last: 'head' | 'impervious'];

/**
 * Exponents closer to 1 than this are taken as 1. Coordinates typed to the millimetre over tens of metres leave angles uncertain by
 * about 1e-5, and λ moves by as little: a right or straight angle as drawn must not read as a singular one. r^(−2e-5) is 1.0005 at
 * a ten-thousandth of a metre: nothing that is infinite in practice is lost.
 */
const exponentSlack = 2e-5;

/**
 * Finds whether the gradient at the point of a wedge is infinite, and how fast it grows.
 *
 * @param sectors - From the first side to the last, counter-clockwise, each under 180°.
 * @param sides - Conditions on the first and last side.
 * @returns The least exponent λ of h ~ r^λ, or 1 where there is none below 1: the gradient, r^(λ−1), is bounded.
 * @source Strang & Fix (1973), ch. 8 (from memory); see {@link listExponents}.
 */
export function cornerExponent(sectors: readonly WedgeSector[], sides: WedgeSides): number {
  const [least] = listExponents(sectors, sides, 1);
  return least < 1 - exponentSlack ? least : 1;
}

/**
 * Lists the exponents λ of the terms r^λ f(θ) that the head may have at the point of a wedge, the constant term left out.
 *
 * In each sector h and ψ are Re and Im of c ζ^λ in the section that makes its material isotropic; across rays h and ψ are continuous.
 * So the vector (k h, ψ) turns by λ times the sector's transformed angle, and k changes at a ray without moving the vector out of its
 * quadrant. The phase at the last side grows steadily with λ from any conditions on the first (Sturm's theorem), each exponent is
 * where it passes the next right value, and bisection finds every one of them.
 *
 * @param sectors - From the first side to the last, counter-clockwise, each under 180°.
 * @param sides - Conditions on the first and last side.
 * @param count - How many.
 * @returns Positive exponents, ascending.
 * @source Strang & Fix (1973), An Analysis of the Finite Element Method, ch. 8, for one material; D. Leguillon, E. Sanchez-Palencia
 *   (1987), Computation of Singular Solutions in Elliptic Problems and Elasticity, for several (both from memory).
 */
export function listExponents(sectors: readonly WedgeSector[], sides: WedgeSides, count: number): number[] {
  const parts = sectors.map(transformSector);
  const start = sides[0] === 'head' ? Math.PI / 2 : 0;
  const end = sides[1] === 'head' ? Math.PI / 2 : 0;
  // At λ = 0 the phase is the start's; the first target lies above it, for the constant term is no exponent.
  const first = end > start ? end : end + Math.PI;
  const total = parts.reduce((sum, { angle }) => sum + angle, 0);
  return Array.from({ length: count }, (_, i) => {
    const target = first + i * Math.PI;
    let low = 0;
    // Each quadrant the vector crosses takes at most a right angle of λ times an angle in the sector it is in.
    let high = (target - start) / total;
    while (phaseAt(parts, start, high) < target) high *= 2;
    for (let step = 0; step < 60; step++) {
      const middle = (low + high) / 2;
      if (phaseAt(parts, start, middle) < target) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  });
}

interface TransformedSector {
  /** √det K, m/s. */
  readonly k: number;
  /** Angle in the transformed section, radians. */
  readonly angle: number;
}

function transformSector({ conductivity, from, to }: WedgeSector): TransformedSector {
  const map = isotropicMap(conductivity);
  const u0 = map.a11 * from[0] + map.a12 * from[1];
  const v0 = map.a21 * from[0] + map.a22 * from[1];
  const u1 = map.a11 * to[0] + map.a12 * to[1];
  const v1 = map.a21 * to[0] + map.a22 * to[1];
  return {
    k: Math.sqrt(conductivity.kMajor * conductivity.kMinor),
    angle: Math.atan2(u0 * v1 - v0 * u1, u0 * u1 + v0 * v1),
  };
}

// Phase of (k h, ψ) at the last side, with the k of the last sector.
function phaseAt(parts: readonly TransformedSector[], start: number, lambda: number): number {
  let phase = start;
  parts.forEach(({ k, angle }, i) => {
    if (i > 0 && k !== parts[i - 1].k) {
      const turns = Math.round(phase / Math.PI);
      const rest = phase - turns * Math.PI;
      phase = turns * Math.PI + Math.atan((Math.tan(rest) * parts[i - 1].k) / k);
    }
    phase += lambda * angle;
  });
  return phase;
}

/** The ground around a boundary node, from one boundary side (or drain) to the other. */
export interface NodeWedge {
  readonly sectors: readonly WedgeSector[];
  /** Boundary sides, 3 · element + side, at the clockwise and the counter-clockwise end. */
  readonly first: number;
  readonly last: number;
}

/**
 * Collects the elements around a boundary node in order.
 *
 * @param mesh - The mesh.
 * @param conductivities - One per material.
 * @param element - An element at the node.
 * @param corner - The node's corner in it.
 * @param isWall - Says of a side, 3 · element + side, whether the wedge ends there though ground lies across: a drain with a head.
 * @returns The wedge; null for a node inside the ground.
 */
export function wedgeAt(
  mesh: Mesh,
  conductivities: readonly Conductivity[],
  element: number,
  corner: number,
  isWall: (side: number) => boolean = () => false,
): NodeWedge | null {
  const stride = mesh.order === 1 ? 3 : 6;
  const node = mesh.elements[stride * element + corner];
  const cornerIn = (e: number): number => {
    for (let k = 0; k < 3; k++) if (mesh.elements[stride * e + k] === node) return k;
    return -1;
  };
  // side k joins corner k to k + 1: turning clockwise round the node crosses the side that leaves it
  let at = element;
  for (let turns = 0; ; turns++) {
    const side = 3 * at + cornerIn(at);
    const next = mesh.neighbours[side];
    if (next < 0 || isWall(side)) break;
    if (next === element || turns > mesh.elementCount) return null;
    at = next;
  }
  const first = 3 * at + cornerIn(at);
  const sectors: WedgeSector[] = [];
  for (;;) {
    const k = cornerIn(at);
    sectors.push({
      conductivity: conductivities[mesh.elementMaterials[at]],
      from: rayTo(mesh, node, mesh.elements[stride * at + ((k + 1) % 3)]),
      to: rayTo(mesh, node, mesh.elements[stride * at + ((k + 2) % 3)]),
    });
    const side = 3 * at + ((k + 2) % 3);
    if (mesh.neighbours[side] < 0 || isWall(side)) return { sectors, first, last: side };
    at = mesh.neighbours[side];
  }
}

function rayTo({ coordinates }: Mesh, node: number, other: number): [number, number] {
  return [
    coordinates[2 * other] - coordinates[2 * node],
    coordinates[2 * other + 1] - coordinates[2 * node + 1],
  ];
}
