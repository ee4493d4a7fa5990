// The stiffness of one triangle: K_ab = ∫ w ∇N_a · D ∇N_b dA, with w = 1, 2πr (heads about an axis) or 1/(2πr) (its stream function).
import type { ElementType } from '../element/element-type';
import { elementTypeOf, jacobian, physicalGradients } from '../element/mapping';
import { triangleRule } from '../element/quadrature';
import { tri3 } from '../element/tri3';
import { tri6 } from '../element/tri6';
import { SolverError } from '../errors';
import type { Mesh } from '../mesh/mesh';
import type { Conductivity } from '../problem';

/** Weight of the element integrals: plane, full circle, or its reciprocal for the stream function. */
export type Weight = 'plane' | 'circle' | 'reciprocal-circle';

/** Symmetric tensor, m/s (or s/m for its dual): xx, xy, yy. */
export type Tensor = readonly [xx: number, xy: number, yy: number];

/**
 * Rotates principal permeabilities into the section's axes.
 *
 * @param conductivity - Principal values in m/s and the angle of the major axis in radians.
 * @returns kxx, kxy, kyy in m/s.
 * @source Bear (1972), Dynamics of Fluids in Porous Media, §5.6.
 */
export function conductivityTensor({ kMajor, kMinor, angle }: Conductivity): Tensor {
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  return [kMajor * c * c + kMinor * s * s, (kMajor - kMinor) * s * c, kMajor * s * s + kMinor * c * c];
}

/**
 * Turns a conductivity into the tensor of the stream function, K / det K.
 *
 * @param tensor - kxx, kxy, kyy in m/s.
 * @returns The dual tensor in s/m.
 * @source Bear (1972), §6.5: curl(K⁻¹ v) = 0 with v = (∂ψ/∂y, −∂ψ/∂x).
 */
export function dualTensor([xx, xy, yy]: Tensor): Tensor {
  const determinant = xx * yy - xy * xy;
  return [xx / determinant, xy / determinant, yy / determinant];
}

/** ∫ L_c ∂N_a/∂ξ_i ∂N_b/∂ξ_j over the parent for i, j in 11, 12 + 21, 22 and each corner's linear weight L_c. */
interface ReferenceMatrices {
  readonly m11: readonly Float64Array[];
  readonly m12: readonly Float64Array[];
  readonly m22: readonly Float64Array[];
}

function integrateReference(type: ElementType): ReferenceMatrices {
  const n = type.nodeCount;
  const make = (): Float64Array[] => [0, 1, 2].map(() => new Float64Array(n * n));
  const result = { m11: make(), m12: make(), m22: make() };
  const rule = triangleRule(3);
  const dN = new Float64Array(2 * n);
  rule.weights.forEach((weight, q) => {
    const xi = rule.points[2 * q];
    const eta = rule.points[2 * q + 1];
    type.shapeGradients(xi, eta, dN);
    [1 - xi - eta, xi, eta].forEach((linear, c) => {
      for (let a = 0; a < n; a++) {
        for (let b = 0; b < n; b++) {
          const w = weight * linear;
          result.m11[c][a * n + b] += w * dN[2 * a] * dN[2 * b];
          result.m12[c][a * n + b] += w * (dN[2 * a] * dN[2 * b + 1] + dN[2 * a + 1] * dN[2 * b]);
          result.m22[c][a * n + b] += w * dN[2 * a + 1] * dN[2 * b + 1];
        }
      }
    });
  });
  return result;
}

const reference = new Map<ElementType, ReferenceMatrices>([
  [tri3, integrateReference(tri3)],
  [tri6, integrateReference(tri6)],
]);

/**
 * Integrates the stiffness of every element.
 *
 * Straight-sided elements with a polynomial weight use reference matrices, which is exact; curved ones and the reciprocal weight are
 * integrated by quadrature of degree 6.
 *
 * @param mesh - Mesh in metres.
 * @param tensors - One per material.
 * @param weight - Weight of the integrals.
 * @param out - Receives n × n entries per element, row by row; overwritten.
 * @throws {SolverError} `invalid-mesh` where an element's area is not positive.
 * @source Zienkiewicz & Taylor (2000), The Finite Element Method, vol. 1, ch. 8–9; Hughes (2000), ch. 3 (from memory).
 */
export function integrateStiffness(
  mesh: Mesh,
  tensors: readonly Tensor[],
  weight: Weight,
  out: Float64Array,
): void {
  const type = elementTypeOf(mesh);
  const size = type.nodeCount * type.nodeCount;
  const matrices = reference.get(type)!;
  for (let element = 0; element < mesh.elementCount; element++) {
    const tensor = tensors[mesh.elementMaterials[element]];
    if (weight === 'reciprocal-circle' || !isStraight(mesh, element)) {
      integrateByQuadrature(
        mesh,
        element,
        tensor,
        weight,
        out.subarray(element * size, (element + 1) * size),
      );
    } else {
      integrateStraight(mesh, element, tensor, matrices, weight === 'circle', out);
    }
  }
}

function isStraight(mesh: Mesh, element: number): boolean {
  if (mesh.order === 1) return true;
  const { coordinates, elements } = mesh;
  for (let side = 0; side < 3; side++) {
    const a = 2 * elements[6 * element + side];
    const b = 2 * elements[6 * element + ((side + 1) % 3)];
    const m = 2 * elements[6 * element + 3 + side];
    const length =
      Math.abs(coordinates[b] - coordinates[a]) + Math.abs(coordinates[b + 1] - coordinates[a + 1]);
    const off =
      Math.abs(coordinates[m] - (coordinates[a] + coordinates[b]) / 2) +
      Math.abs(coordinates[m + 1] - (coordinates[a + 1] + coordinates[b + 1]) / 2);
    if (off > 1e-9 * length) return false; // rounding of the midpoint stays far below this
  }
  return true;
}

function integrateStraight(
  mesh: Mesh,
  element: number,
  tensor: Tensor,
  { m11, m12, m22 }: ReferenceMatrices,
  isCircle: boolean,
  out: Float64Array,
): void {
  const { coordinates, elements } = mesh;
  const n = mesh.order === 1 ? 3 : 6;
  const node0 = 2 * elements[n * element];
  const node1 = 2 * elements[n * element + 1];
  const node2 = 2 * elements[n * element + 2];
  const x0 = coordinates[node0];
  const y0 = coordinates[node0 + 1];
  const xXi = coordinates[node1] - x0;
  const xEta = coordinates[node2] - x0;
  const yXi = coordinates[node1 + 1] - y0;
  const yEta = coordinates[node2 + 1] - y0;
  const determinant = xXi * yEta - xEta * yXi;
  if (!(determinant > 0)) {
    throw new SolverError('invalid-mesh', `Element ${element} has no positive area.`, {
      element,
      area: determinant / 2,
    });
  }
  const [kxx, kxy, kyy] = tensor;
  // D = det J · J⁻¹ K J⁻ᵀ
  const d11 = (kxx * yEta * yEta - 2 * kxy * xEta * yEta + kyy * xEta * xEta) / determinant;
  const d22 = (kxx * yXi * yXi - 2 * kxy * xXi * yXi + kyy * xXi * xXi) / determinant;
  const d12 = (-kxx * yEta * yXi + kxy * (yEta * xXi + xEta * yXi) - kyy * xEta * xXi) / determinant;
  const circle = 2 * Math.PI;
  const w0 = isCircle ? circle * x0 : 1;
  const w1 = isCircle ? circle * (x0 + xXi) : 1;
  const w2 = isCircle ? circle * (x0 + xEta) : 1;
  const base = element * n * n;
  for (let k = 0; k < n * n; k++) {
    out[base + k] =
      d11 * (w0 * m11[0][k] + w1 * m11[1][k] + w2 * m11[2][k]) +
      d12 * (w0 * m12[0][k] + w1 * m12[1][k] + w2 * m12[2][k]) +
      d22 * (w0 * m22[0][k] + w1 * m22[1][k] + w2 * m22[2][k]);
  }
}

const rule6 = triangleRule(6);
const N = new Float64Array(6);
const tangent = new Float64Array(5);

/**
 * Integrates the stiffness of one element, straight or curved, by quadrature through the isoparametric map.
 *
 * @param mesh - Mesh in metres.
 * @param element - Element index.
 * @param tensor - Of its material.
 * @param weight - Weight of the integral.
 * @param out - Receives n × n entries row by row; overwritten.
 * @throws {SolverError} `invalid-mesh` where the tangent's determinant is not positive at a point of the rule.
 * @source Zienkiewicz & Taylor (2000), The Finite Element Method, vol. 1, ch. 9 (from memory).
 */
export function integrateByQuadrature(
  mesh: Mesh,
  element: number,
  tensor: Tensor,
  weight: Weight,
  out: Float64Array,
): void {
  const type = elementTypeOf(mesh);
  const n = type.nodeCount;
  const gradients = new Float64Array(2 * n);
  out.fill(0);
  for (let q = 0; q < rule6.weights.length; q++) {
    const xi = rule6.points[2 * q];
    const eta = rule6.points[2 * q + 1];
    type.shapeGradients(xi, eta, gradients);
    jacobian(mesh, element, gradients, tangent);
    if (!(tangent[4] > 0)) {
      throw new SolverError('invalid-mesh', `Element ${element} is folded.`, {
        element,
        area: tangent[4] / 2,
      });
    }
    physicalGradients(gradients, tangent, gradients);
    let factor = rule6.weights[q] * tangent[4];
    if (weight !== 'plane') {
      type.shapeFunctions(xi, eta, N);
      let radius = 0;
      for (let a = 0; a < n; a++) radius += N[a] * mesh.coordinates[2 * mesh.elements[n * element + a]];
      factor *= weight === 'circle' ? 2 * Math.PI * radius : 1 / (2 * Math.PI * radius);
    }
    for (let a = 0; a < n; a++) {
      const fx = factor * (tensor[0] * gradients[2 * a] + tensor[1] * gradients[2 * a + 1]);
      const fy = factor * (tensor[1] * gradients[2 * a] + tensor[2] * gradients[2 * a + 1]);
      for (let b = 0; b < n; b++) out[a * n + b] += fx * gradients[2 * b] + fy * gradients[2 * b + 1];
    }
  }
}
