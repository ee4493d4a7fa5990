// Raw gradients of a nodal field, through the inverse of the element's tangent.
import { elementTypeOf, jacobian, physicalGradients } from '../element/mapping';
import type { Mesh } from '../mesh/mesh';
import type { Place } from './locate';

/** Evaluates gradients of nodal fields on one mesh without allocating. */
export interface GradientReader {
  /**
   * Evaluates ∇f = Σ f_i J⁻ᵀ ∇_ξ N_i in an element.
   *
   * @param nodal - One value a node.
   * @param place - Element and parent coordinates.
   * @param out - Receives ∂f/∂x, ∂f/∂y at `offset`.
   * @param offset - Default 0.
   */
  read(nodal: Float64Array, place: Place, out: Float64Array, offset?: number): void;
}

/**
 * Prepares the evaluation of gradients.
 *
 * @param mesh - The mesh.
 * @returns A reader that reuses its buffers.
 * @source Zienkiewicz & Taylor (2000), The Finite Element Method, vol. 1, ch. 9 (from memory).
 */
export function createGradientReader(mesh: Mesh): GradientReader {
  const type = elementTypeOf(mesh);
  const dN = new Float64Array(2 * type.nodeCount);
  const tangent = new Float64Array(5);
  return {
    read(nodal, { element, xi, eta }, out, offset = 0) {
      type.shapeGradients(xi, eta, dN);
      jacobian(mesh, element, dN, tangent);
      physicalGradients(dN, tangent, dN);
      let gx = 0;
      let gy = 0;
      for (let a = 0; a < type.nodeCount; a++) {
        const value = nodal[mesh.elements[type.nodeCount * element + a]];
        gx += value * dN[2 * a];
        gy += value * dN[2 * a + 1];
      }
      out[offset] = gx;
      out[offset + 1] = gy;
    },
  };
}

/**
 * Evaluates the gradient of a nodal field at one place.
 *
 * @param mesh - The mesh.
 * @param nodal - One value a node.
 * @param place - Element and parent coordinates.
 * @returns ∂f/∂x, ∂f/∂y.
 */
export function gradientAt(mesh: Mesh, nodal: Float64Array, place: Place): [number, number] {
  const out = new Float64Array(2);
  createGradientReader(mesh).read(nodal, place, out);
  return [out[0], out[1]];
}
