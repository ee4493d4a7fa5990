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
 * Rays closer to a right or straight angle than this are taken as such: coordinates typed to the millimetre over tens of metres
 * leave angles uncertain by about 1e-5, and λ moves by as little.
 */
const exponentSlack = 2e-5;

/**
 * Finds whether the gradient at the point of a wedge is infinite.
 *
 * In each sector h and ψ/k are Re and Im of c ζ^λ in the section that makes its material isotropic; across rays h and ψ are continuous.
 * The smallest λ in (0, 1) at which both sides' conditions can hold is sought by scan and bisection.
 *
 * @param sectors - From the first side to the last, counter-clockwise, each under 180°.
 * @param sides - Conditions on the first and last side.
 * @returns The exponent, or 1 where there is none below 1: the gradient is bounded.
 * @source Strang & Fix (1973), ch. 8; methods of transfer matrices for composite wedges (from memory).
 */
export function cornerExponent(sectors: readonly WedgeSector[], sides: WedgeSides): number {
  const parts = sectors.map(transformSector);
  const mismatch = (lambda: number): number => endValue(parts, sides, lambda);
  const steps = 400;
  let low = 0.01;
  let before = mismatch(low);
  for (let i = 1; i <= steps; i++) {
    const high = 0.01 + ((1 - exponentSlack - 0.01) * i) / steps;
    const now = mismatch(high);
    if (before * now <= 0) return bisect(mismatch, low, high, before);
    low = high;
    before = now;
  }
  return 1;
}

interface TransformedSector {
  /** √det K, m/s. */
  readonly k: number;
  /** Angle in the transformed section, radians. */
  readonly angle: number;
  /** Stretch of unit length along the first and last ray. */
  readonly stretchFrom: number;
  readonly stretchTo: number;
}

function transformSector({ conductivity, from, to }: WedgeSector): TransformedSector {
  const map = isotropicMap(conductivity);
  const u0 = map.a11 * from[0] + map.a12 * from[1];
  const v0 = map.a21 * from[0] + map.a22 * from[1];
  const u1 = map.a11 * to[0] + map.a12 * to[1];
  const v1 = map.a21 * to[0] + map.a22 * to[1];
  return {
    k: Math.sqrt(conductivity.kMajor * conductivity.kMinor),
    angle: Math.abs(Math.atan2(u0 * v1 - v0 * u1, u0 * u1 + v0 * v1)),
    stretchFrom: Math.hypot(u0, v0) / Math.hypot(from[0], from[1]),
    stretchTo: Math.hypot(u1, v1) / Math.hypot(to[0], to[1]),
  };
}

function endValue(parts: readonly TransformedSector[], sides: WedgeSides, lambda: number): number {
  let h = sides[0] === 'head' ? 0 : 1;
  let psi = sides[0] === 'head' ? parts[0].k : 0;
  for (const { k, angle, stretchFrom, stretchTo } of parts) {
    const c = Math.cos(lambda * angle);
    const s = Math.sin(lambda * angle);
    const grow = (stretchTo / stretchFrom) ** lambda;
    const p = psi / k;
    const next = grow * (h * c - p * s);
    psi = k * grow * (p * c + h * s);
    h = next;
  }
  return sides[1] === 'head' ? h : psi;
}

function bisect(f: (x: number) => number, low: number, high: number, atLow: number): number {
  let a = low;
  let b = high;
  for (let i = 0; i < 60; i++) {
    const middle = (a + b) / 2;
    if (f(middle) * atLow > 0) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}

/** The ground around a boundary node, from one boundary side to the other. */
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
 * @returns The wedge; null for a node inside the ground.
 */
export function wedgeAt(
  mesh: Mesh,
  conductivities: readonly Conductivity[],
  element: number,
  corner: number,
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
    const next = mesh.neighbours[3 * at + cornerIn(at)];
    if (next < 0) break;
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
    if (mesh.neighbours[side] < 0) return { sectors, first, last: side };
    at = mesh.neighbours[side];
  }
}

function rayTo({ coordinates }: Mesh, node: number, other: number): [number, number] {
  return [
    coordinates[2 * other] - coordinates[2 * node],
    coordinates[2 * other + 1] - coordinates[2 * node + 1],
  ];
}
