// How far the raw gradients are from the recovered ones: where the mesh is too coarse, and by how much.
import { conductivityTensor } from '../assembly/element-stiffness';
import { triangleRule } from '../element/quadrature';
import type { Mesh } from '../mesh/mesh';
import type { Conductivity, SectionGeometry } from '../problem';
import { createGradientReader } from './gradients';
import { recoverNodeGradients } from './recover';
import { tri6 } from '../element/tri6';

/** Estimated error of a solved mesh in the energy norm. */
export interface ErrorIndicator {
  /** Energy norm of recovered less raw gradient, per element; its square has the unit of ∫ ∇h·K∇h. */
  readonly elements: Float64Array;
  /** Estimated error over the norm of the solution, both in the energy norm. The discharge's relative error goes as its square. */
  readonly relative: number;
}

/** A wish for the next mesh. */
export interface RefinementPlace {
  readonly x: number;
  readonly y: number;
  /** Wanted size, metres. */
  readonly size: number;
}

const rule = triangleRule(4);

/**
 * Estimates the error of a solution from recovered gradients.
 *
 * η_e² = ∫ w (g* − ∇h)·K (g* − ∇h) dA over each element, with w = 1 or 2πx.
 *
 * @param mesh - The mesh.
 * @param kind - Plane or axisymmetric.
 * @param conductivities - One a material.
 * @param heads - One a node, metres.
 * @returns The error by element and in total.
 * @source O. C. Zienkiewicz, J. Z. Zhu (1987), A simple error estimator and adaptive procedure for practical engineering analysis,
 *   Int. J. Numer. Methods Eng. 24:337–357.
 */
export function estimateError(
  mesh: Mesh,
  kind: SectionGeometry['kind'],
  conductivities: readonly Conductivity[],
  heads: Float64Array,
): ErrorIndicator {
  const { corners, midsides } = recoverNodeGradients(mesh, conductivities, heads);
  const tensors = conductivities.map(conductivityTensor);
  const reader = createGradientReader(mesh);
  const shape = new Float64Array(6);
  const raw = new Float64Array(2);
  const elements = new Float64Array(mesh.elementCount);
  let [error, energy] = [0, 0];
  for (let e = 0; e < mesh.elementCount; e++) {
    const [xx, xy, yy] = tensors[mesh.elementMaterials[e]];
    const { area, x } = measureElement(mesh, e);
    let own = 0;
    for (let q = 0; q < rule.weights.length; q++) {
      const xi = rule.points[2 * q];
      const eta = rule.points[2 * q + 1];
      tri6.shapeFunctions(xi, eta, shape);
      reader.read(heads, { element: e, xi, eta }, raw);
      let [gx, gy] = [0, 0];
      for (let c = 0; c < 3; c++) {
        gx += shape[c] * corners[6 * e + 2 * c] + shape[3 + c] * midsides[6 * e + 2 * c];
        gy += shape[c] * corners[6 * e + 2 * c + 1] + shape[3 + c] * midsides[6 * e + 2 * c + 1];
      }
      const radius = (1 - xi - eta) * x[0] + xi * x[1] + eta * x[2];
      const weight = 2 * area * rule.weights[q] * (kind === 'plane' ? 1 : 2 * Math.PI * radius);
      const [dx, dy] = [gx - raw[0], gy - raw[1]];
      own += weight * (xx * dx * dx + 2 * xy * dx * dy + yy * dy * dy);
      energy += weight * (xx * raw[0] * raw[0] + 2 * xy * raw[0] * raw[1] + yy * raw[1] * raw[1]);
    }
    elements[e] = Math.sqrt(own);
    error += own;
  }
  return { elements, relative: error > 0 ? Math.sqrt(error / (energy + error)) : 0 };
}

/**
 * Proposes smaller elements where the estimated error is large.
 *
 * An element whose share exceeds an even share of the wanted error is to shrink as (share / even share)^(1 / degree), at most fourfold.
 *
 * @param mesh - The mesh.
 * @param indicator - From {@link estimateError}.
 * @param wanted - Wanted `relative` error.
 * @returns Places with sizes for the mesher's `refineAt`; none where the wanted error is met.
 * @source Zienkiewicz & Zhu (1987), as for {@link estimateError}.
 */
export function proposeRefinement(mesh: Mesh, indicator: ErrorIndicator, wanted: number): RefinementPlace[] {
  if (indicator.relative <= wanted) return [];
  let sum = 0;
  for (const own of indicator.elements) sum += own * own;
  const even = (Math.sqrt(sum / mesh.elementCount) * wanted) / indicator.relative;
  const places: RefinementPlace[] = [];
  for (let e = 0; e < mesh.elementCount; e++) {
    const ratio = indicator.elements[e] / even;
    if (ratio <= 1) continue;
    const { area, x, y } = measureElement(mesh, e);
    const size = 1.5 * Math.sqrt(area) * Math.max(0.25, ratio ** (-1 / mesh.order));
    places.push({ x: (x[0] + x[1] + x[2]) / 3, y: (y[0] + y[1] + y[2]) / 3, size });
  }
  return places;
}

function measureElement(
  { coordinates, elements, order }: Mesh,
  e: number,
): { area: number; x: number[]; y: number[] } {
  const stride = order === 1 ? 3 : 6;
  const nodes = [0, 1, 2].map((c) => 2 * elements[stride * e + c]);
  const x = nodes.map((n) => coordinates[n]);
  const y = nodes.map((n) => coordinates[n + 1]);
  return { area: ((x[1] - x[0]) * (y[2] - y[0]) - (x[2] - x[0]) * (y[1] - y[0])) / 2, x, y };
}
