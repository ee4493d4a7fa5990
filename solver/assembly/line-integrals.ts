// Integrals along element sides: loads of a prescribed flux, and the matrices of leaky barriers.
import { lineRule } from '../element/quadrature';
import type { LineSides, Mesh } from '../mesh/mesh';
import type { Weight } from './element-stiffness';

const rule = lineRule(5); // N N r is of degree 5 at most: exact

/**
 * Lists the nodes of one side in the path's direction.
 *
 * @param mesh - The mesh.
 * @param line - Sides along a path.
 * @param index - Which side of the line.
 * @param out - Receives start, end and, for order 2, the midside node between; length 2 or 3.
 */
export function sideNodes(mesh: Mesh, line: LineSides, index: number, out: Int32Array): void {
  const stride = mesh.order === 1 ? 3 : 6;
  const base = stride * line.elements[index];
  const side = line.sides[index];
  const isForward = line.directions[index] > 0;
  const first = mesh.elements[base + side];
  const second = mesh.elements[base + ((side + 1) % 3)];
  out[0] = isForward ? first : second;
  out[1] = isForward ? second : first;
  if (mesh.order === 2) out[2] = mesh.elements[base + 3 + side];
}

/** Shape functions of the 2- or 3-node line at ξ in [−1, 1], nodes start, end, middle. */
function lineShape(order: 1 | 2, xi: number, N: Float64Array): void {
  if (order === 1) {
    N[0] = (1 - xi) / 2;
    N[1] = (1 + xi) / 2;
  } else {
    N[0] = (xi * (xi - 1)) / 2;
    N[1] = (xi * (xi + 1)) / 2;
    N[2] = 1 - xi * xi;
  }
}

function lineGradient(order: 1 | 2, xi: number, dN: Float64Array): void {
  if (order === 1) {
    dN[0] = -0.5;
    dN[1] = 0.5;
  } else {
    dN[0] = xi - 0.5;
    dN[1] = xi + 0.5;
    dN[2] = -2 * xi;
  }
}

function weightAt(weight: Weight, radius: number): number {
  if (weight === 'plane') return 1;
  return weight === 'circle' ? 2 * Math.PI * radius : 1 / (2 * Math.PI * radius);
}

interface SideShape {
  readonly x0: number;
  readonly x1: number;
  readonly length: number;
}

function sideShape(mesh: Mesh, nodes: Int32Array): SideShape {
  const { coordinates } = mesh;
  const x0 = coordinates[2 * nodes[0]];
  const x1 = coordinates[2 * nodes[1]];
  return {
    x0,
    x1,
    length: Math.hypot(x1 - x0, coordinates[2 * nodes[1] + 1] - coordinates[2 * nodes[0] + 1]),
  };
}

/**
 * Adds the load of a uniform inflow along a line, ∫ w q N ds.
 *
 * @param mesh - Mesh in metres.
 * @param line - Sides of the line.
 * @param rate - Inflow normal to the line, m/s, positive into the ground.
 * @param weight - Plane or full circle.
 * @param out - Nodal loads, m³/s per metre run (or m³/s), added to.
 * @returns Total inflow along the line.
 */
export function addFluxLoad(
  mesh: Mesh,
  line: LineSides,
  rate: number,
  weight: Weight,
  out: Float64Array,
): number {
  const count = mesh.order + 1;
  const nodes = new Int32Array(count);
  const N = new Float64Array(count);
  let total = 0;
  for (let index = 0; index < line.elements.length; index++) {
    sideNodes(mesh, line, index, nodes);
    const { x0, x1, length } = sideShape(mesh, nodes);
    for (let q = 0; q < rule.weights.length; q++) {
      const xi = rule.points[q];
      lineShape(mesh.order, xi, N);
      const factor =
        rate * rule.weights[q] * (length / 2) * weightAt(weight, x0 + ((xi + 1) / 2) * (x1 - x0));
      total += factor;
      for (let a = 0; a < count; a++) out[nodes[a]] += factor * N[a];
    }
  }
  return total;
}

/**
 * Integrates the matrix of one piece of a leaky barrier, C ∫ w (N_left − N_right)(N_left − N_right)ᵀ ds.
 *
 * @param mesh - Mesh in metres.
 * @param nodes - Start, end(, middle) of the left face, then of the right face.
 * @param conductance - Permeability over thickness, 1/s.
 * @param weight - Plane or full circle.
 * @param out - Receives the matrix row by row, (2 · (order + 1))² entries; overwritten.
 */
export function integrateLeak(
  mesh: Mesh,
  nodes: Int32Array,
  conductance: number,
  weight: Weight,
  out: Float64Array,
): void {
  const half = mesh.order + 1;
  const N = new Float64Array(half);
  const { x0, x1, length } = sideShape(mesh, nodes);
  out.fill(0);
  for (let q = 0; q < rule.weights.length; q++) {
    const xi = rule.points[q];
    lineShape(mesh.order, xi, N);
    const factor =
      conductance * rule.weights[q] * (length / 2) * weightAt(weight, x0 + ((xi + 1) / 2) * (x1 - x0));
    for (let a = 0; a < 2 * half; a++) {
      const left = (a < half ? 1 : -1) * N[a % half];
      for (let b = 0; b < 2 * half; b++)
        out[a * 2 * half + b] += factor * left * (b < half ? 1 : -1) * N[b % half];
    }
  }
}

/**
 * Integrates the stream-function matrix of one piece of a leaky barrier, (1/C) ∫ w (dψ/ds)² ds.
 *
 * @param mesh - Mesh in metres.
 * @param nodes - Start, end(, middle) of one face.
 * @param conductance - 1/s, positive.
 * @param weight - Plane or reciprocal circle.
 * @param out - Receives the matrix row by row, (order + 1)² entries; overwritten.
 */
export function integrateLeakDual(
  mesh: Mesh,
  nodes: Int32Array,
  conductance: number,
  weight: Weight,
  out: Float64Array,
): void {
  const count = mesh.order + 1;
  const dN = new Float64Array(count);
  const { x0, x1, length } = sideShape(mesh, nodes);
  out.fill(0);
  for (let q = 0; q < rule.weights.length; q++) {
    const xi = rule.points[q];
    lineGradient(mesh.order, xi, dN);
    const factor =
      ((rule.weights[q] * 2) / (length * conductance)) * weightAt(weight, x0 + ((xi + 1) / 2) * (x1 - x0));
    for (let a = 0; a < count; a++)
      for (let b = 0; b < count; b++) out[a * count + b] += factor * dN[a] * dN[b];
  }
}
