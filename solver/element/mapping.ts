// The map from the parent element to the element in the ground, and its tangent.
import type { Mesh } from '../mesh/mesh';
import type { ElementType } from './element-type';
import { tri3 } from './tri3';
import { tri6 } from './tri6';

/**
 * Picks the element type of a mesh.
 *
 * @param mesh - The mesh.
 * @returns tri3 for order 1, tri6 for order 2.
 */
export function elementTypeOf(mesh: Mesh): ElementType {
  return mesh.order === 1 ? tri3 : tri6;
}

/**
 * Evaluates the tangent of the isoparametric map, J = Σ x_i ⊗ ∇N_i.
 *
 * @param mesh - Mesh in metres.
 * @param element - Element index.
 * @param dN - ∂N/∂xi, ∂N/∂eta per node, length 2 · nodeCount.
 * @param out - Receives ∂x/∂ξ, ∂x/∂η, ∂y/∂ξ, ∂y/∂η, and the determinant; length 5.
 */
export function jacobian(mesh: Mesh, element: number, dN: Float64Array, out: Float64Array): void {
  const nodeCount = dN.length / 2;
  const base = nodeCount * element;
  let xXi = 0;
  let xEta = 0;
  let yXi = 0;
  let yEta = 0;
  for (let a = 0; a < nodeCount; a++) {
    const node = 2 * mesh.elements[base + a];
    const x = mesh.coordinates[node];
    const y = mesh.coordinates[node + 1];
    xXi += x * dN[2 * a];
    xEta += x * dN[2 * a + 1];
    yXi += y * dN[2 * a];
    yEta += y * dN[2 * a + 1];
  }
  out[0] = xXi;
  out[1] = xEta;
  out[2] = yXi;
  out[3] = yEta;
  out[4] = xXi * yEta - xEta * yXi;
}

/**
 * Turns gradients on the parent into gradients in the ground, ∇N = J⁻ᵀ ∇_ξ N.
 *
 * @param dN - ∂N/∂xi, ∂N/∂eta per node.
 * @param tangent - As filled by {@link jacobian}.
 * @param out - Receives ∂N/∂x, ∂N/∂y per node; may be `dN` itself.
 * @pre `tangent[4]` is not zero.
 */
export function physicalGradients(dN: Float64Array, tangent: Float64Array, out: Float64Array): void {
  const inverse = 1 / tangent[4];
  for (let a = 0; a < dN.length; a += 2) {
    const xi = dN[a];
    const eta = dN[a + 1];
    out[a] = inverse * (tangent[3] * xi - tangent[2] * eta);
    out[a + 1] = inverse * (-tangent[1] * xi + tangent[0] * eta);
  }
}
