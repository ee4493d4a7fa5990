// Water pressure of the ground on a structure: profile along the base, resultant force and moment.
import { waterUnitWeight } from '../constants';
import { lineRule } from '../element/quadrature';
import type { LineSides, Mesh } from '../mesh/mesh';
import type { SectionGeometry } from '../problem';
import type { Side } from './side-geometry';
import { readSide, valueOnSide } from './side-geometry';

/** A point of the pressure profile. */
export interface PressurePoint {
  readonly at: [number, number];
  /** kPa, zero where the pore pressure is below atmospheric. */
  readonly pressure: number;
}

/** Resultant of the water pressure of the ground on a structure. */
export interface BaseForces {
  /** Vertical component, upward positive: kN per metre run, or kN over the full circle. */
  readonly upliftForce: number;
  /** Component along +x; zero over a full circle, whose radial parts balance. */
  readonly horizontalForce: number;
  /** About the first point of the base, anticlockwise positive: kN m per metre run, or kN m. */
  readonly upliftMoment: number;
  /** In order along the base; two points in one place where the pressure jumps, at a wall. */
  readonly profile: PressurePoint[];
}

/** Points of a profile at the least. */
const leastPoints = 41;
const rule = lineRule(5);

/**
 * Integrates the water pressure p = max(0, γw (h − y)) along the base of a structure.
 *
 * The force acts from the ground into the structure, along the outward normal of the ground. Heads are quadratic along
 * each side, so that the integrals, split where the pressure passes zero, are exact for the heads given.
 *
 * In an axisymmetric section the force is ∫ 2πx p n_y ds over the full circle. Its line of action is the axis, so the moment
 * about the first point (x₀, y₀), seen in the section's plane, is −x₀ times the uplift force.
 *
 * @param mesh - The mesh.
 * @param kind - Plane or axisymmetric.
 * @param base - Sides along the base, such as `mesh.bases[i]`.
 * @param heads - One a node, metres.
 * @param origin - Point of the moment; by default where the base's first side starts.
 * @returns Forces and profile; zeros and no points where the base touches no ground.
 */
export function baseForces(
  mesh: Mesh,
  kind: SectionGeometry['kind'],
  base: LineSides,
  heads: Float64Array,
  origin?: readonly [number, number],
): BaseForces {
  const count = base.elements.length;
  if (count === 0) return { upliftForce: 0, horizontalForce: 0, upliftMoment: 0, profile: [] };
  const first = pointOf(readSide(mesh, base.elements[0], base.sides[0]), base.directions[0] > 0 ? 0 : 1);
  const [x0, y0] = origin ?? first;
  const pieces = Math.max(2, Math.ceil(leastPoints / count));
  const profile: PressurePoint[] = [];
  let [fx, fy, moment] = [0, 0, 0];
  for (let i = 0; i < count; i++) {
    const side = readSide(mesh, base.elements[i], base.sides[i]);
    const pressure = pressureOn(side, heads);
    const dryness = findZeros(pressure);
    const breaks = [0, ...dryness, 1];
    for (let b = 0; b + 1 < breaks.length; b++) {
      const part = integratePart(side, pressure, breaks[b], breaks[b + 1], { kind, x0, y0 });
      fx += part.fx;
      fy += part.fy;
      moment += part.moment;
    }
    addPoints(side, pressure, [...evenPlaces(pieces), ...dryness], base.directions[i] > 0, profile);
  }
  return kind === 'plane'
    ? { upliftForce: fy, horizontalForce: fx, upliftMoment: moment, profile }
    : { upliftForce: fy, horizontalForce: 0, upliftMoment: -x0 * fy, profile };
}

type Pressure = (t: number) => number;

// Pressure head times unit weight along a side, suction included.
function pressureOn(side: Side, heads: Float64Array): Pressure {
  return (t) => waterUnitWeight * (valueOnSide(side, heads, t) - side.y0 - t * (side.y1 - side.y0));
}

// Places strictly inside (0, 1) where a quadratic passes zero, ascending.
function findZeros(p: Pressure): number[] {
  const c = p(0);
  const a = 2 * (p(1) + c - 2 * p(0.5));
  const b = p(1) - c - a;
  const inside = (t: number): boolean => t > 0 && t < 1;
  const size = Math.abs(a) + Math.abs(b) + Math.abs(c);
  if (Math.abs(a) <= 1e-14 * size) return b === 0 ? [] : [-c / b].filter(inside);
  const root = Math.sqrt(b * b - 4 * a * c);
  if (!(root > 0)) return [];
  // The form that subtracts no nearly equal numbers.
  const q = -(b + Math.sign(b || 1) * root) / 2;
  return [q / a, c / q].filter(inside).sort((s, t) => s - t);
}

function integratePart(
  side: Side,
  p: Pressure,
  from: number,
  to: number,
  { kind, x0, y0 }: { kind: SectionGeometry['kind']; x0: number; y0: number },
): { fx: number; fy: number; moment: number } {
  const sum = { fx: 0, fy: 0, moment: 0 };
  if (p((from + to) / 2) <= 0) return sum;
  for (let q = 0; q < rule.points.length; q++) {
    const t = from + ((to - from) * (1 + rule.points[q])) / 2;
    const [x, y] = pointOf(side, t);
    const circle = kind === 'plane' ? 1 : 2 * Math.PI * x;
    const force = (p(t) * circle * rule.weights[q] * side.length * (to - from)) / 2;
    sum.fx += force * side.nx;
    sum.fy += force * side.ny;
    sum.moment += force * ((x - x0) * side.ny - (y - y0) * side.nx);
  }
  return sum;
}

function evenPlaces(pieces: number): number[] {
  return Array.from({ length: pieces + 1 }, (_, k) => k / pieces);
}

function addPoints(side: Side, p: Pressure, places: number[], forward: boolean, out: PressurePoint[]): void {
  places.sort((s, t) => (forward ? s - t : t - s));
  for (const t of places) {
    const at = pointOf(side, t);
    const pressure = Math.max(0, p(t));
    const last = out.at(-1);
    const repeated =
      last &&
      Math.hypot(last.at[0] - at[0], last.at[1] - at[1]) < 1e-9 * side.length &&
      Math.abs(last.pressure - pressure) <= 1e-9 * Math.max(last.pressure, pressure);
    if (!repeated) out.push({ at, pressure });
  }
}

function pointOf(side: Side, t: number): [number, number] {
  return [side.x0 + t * (side.x1 - side.x0), side.y0 + t * (side.y1 - side.y0)];
}
