// Superconvergent patch recovery: smooth, accurate gradients from the raw ones, fitted patch by patch.
import type { Mesh } from '../mesh/mesh';
import type { Conductivity } from '../problem';
import { createGradientReader } from './gradients';
import { PatchFit } from './patch-fit';
import type { Patches } from './patches';
import { findPatches } from './patches';

/** Sampling points of the parent triangle where raw gradients are more accurate than elsewhere. */
const quadraticSamples = [1 / 6, 1 / 6, 2 / 3, 1 / 6, 1 / 6, 2 / 3];
const linearSamples = [1 / 3, 1 / 3];
/** A patch fills a re-entrant corner when its elements turn further than this round the node, radians. */
const reentrantAngle = (200 / 180) * Math.PI;

/** Fitted patches of one solved mesh. */
export interface Recovery {
  readonly patches: Patches;
  /** {@link PatchFit.size} numbers a patch, for {@link PatchFit.evaluate}. */
  readonly coefficients: Float64Array;
}

/** Recovered gradients at the nodes of each element: discontinuous where conductivity changes. */
export interface RecoveredGradients {
  /** ∂h/∂x, ∂h/∂y at each element's corners, length `6 * elementCount`. */
  readonly corners: Float64Array;
  /** The same at midsides 0, 1, 2; length `6 * elementCount`. On an order 1 mesh the mean of the corners. */
  readonly midsides: Float64Array;
}

/**
 * Recovers gradients at element corners from the heads of a solved mesh.
 *
 * @param mesh - The mesh.
 * @param conductivities - One a material; patches keep to one conductivity.
 * @param heads - One a node, metres.
 * @returns ∂h/∂x, ∂h/∂y at each corner of each element, length `6 * elementCount`; discontinuous across a change of
 *   conductivity and across barriers.
 * @source O. C. Zienkiewicz, J. Z. Zhu (1992), The superconvergent patch recovery and a posteriori error estimates,
 *   part 1, Int. J. Numer. Methods Eng. 33:1331–1364.
 */
export function recoverGradients(
  mesh: Mesh,
  conductivities: readonly Conductivity[],
  heads: Float64Array,
): Float64Array {
  return recoverNodeGradients(mesh, conductivities, heads).corners;
}

/**
 * Recovers gradients at corners and midsides.
 *
 * One fit a patch of the polynomials of the element's own degree; midsides take the mean of the two patches at the
 * side's ends. At the corner of a re-entrant wedge (a barrier's tip) the field has no polynomial: there the patches of
 * the element's other two corners speak.
 *
 * @param mesh - The mesh.
 * @param conductivities - One a material.
 * @param heads - One a node, metres.
 * @returns Gradients at corners and midsides.
 * @source Zienkiewicz & Zhu (1992), as for {@link recoverGradients}.
 */
export function recoverNodeGradients(
  mesh: Mesh,
  conductivities: readonly Conductivity[],
  heads: Float64Array,
): RecoveredGradients {
  const { patches, coefficients } = fitPatches(mesh, conductivities, heads);
  return evaluatePatches(mesh, patches, coefficients);
}

/**
 * Fits the gradients of every patch of a solved mesh.
 *
 * @param mesh - The mesh.
 * @param conductivities - One a material.
 * @param heads - One a node, metres.
 * @returns The fits, to be evaluated anywhere in their patches.
 * @source Zienkiewicz & Zhu (1992), as for {@link recoverGradients}.
 */
export function fitPatches(
  mesh: Mesh,
  conductivities: readonly Conductivity[],
  heads: Float64Array,
): Recovery {
  const patches = findPatches(mesh, conductivities);
  const samples = sampleGradients(mesh, heads);
  const fit = new PatchFit(mesh, samples.perElement, samples.points, samples.values);
  const coefficients = new Float64Array(PatchFit.size * patches.count);
  for (let p = 0; p < patches.count; p++) fit.fit(patches, p, coefficients);
  return { patches, coefficients };
}

function sampleGradients(
  mesh: Mesh,
  heads: Float64Array,
): { perElement: number; points: Float64Array; values: Float64Array } {
  const parent = mesh.order === 1 ? linearSamples : quadraticSamples;
  const perElement = parent.length / 2;
  const points = new Float64Array(2 * perElement * mesh.elementCount);
  const values = new Float64Array(2 * perElement * mesh.elementCount);
  const stride = mesh.order === 1 ? 3 : 6;
  const reader = createGradientReader(mesh);
  const { elements, coordinates } = mesh;
  for (let e = 0; e < mesh.elementCount; e++) {
    const a = 2 * elements[stride * e];
    const b = 2 * elements[stride * e + 1];
    const c = 2 * elements[stride * e + 2];
    for (let s = 0; s < perElement; s++) {
      const at = 2 * (perElement * e + s);
      const xi = parent[2 * s];
      const eta = parent[2 * s + 1];
      const rest = 1 - xi - eta;
      points[at] = rest * coordinates[a] + xi * coordinates[b] + eta * coordinates[c];
      points[at + 1] = rest * coordinates[a + 1] + xi * coordinates[b + 1] + eta * coordinates[c + 1];
      reader.read(heads, { element: e, xi, eta }, values, at);
    }
  }
  return { perElement, points, values };
}

function evaluatePatches(mesh: Mesh, patches: Patches, coefficients: Float64Array): RecoveredGradients {
  const { elementCount, elements, coordinates } = mesh;
  const stride = mesh.order === 1 ? 3 : 6;
  const corners = new Float64Array(6 * elementCount);
  const midsides = new Float64Array(6 * elementCount);
  const value = new Float64Array(2);
  const add = (
    patch: number,
    x: number,
    y: number,
    share: number,
    out: Float64Array,
    offset: number,
  ): void => {
    PatchFit.evaluate(coefficients, patch, x, y, value);
    out[offset] += share * value[0];
    out[offset + 1] += share * value[1];
  };
  const fits = (corner: number): boolean => patches.angles[patches.cornerPatches[corner]] < reentrantAngle;
  const boundary = findBoundaryNodes(mesh);
  for (let e = 0; e < elementCount; e++) {
    for (let c = 0; c < 3; c++) {
      const node = elements[stride * e + c];
      const next = 3 * e + ((c + 1) % 3);
      const last = 3 * e + ((c + 2) % 3);
      const [x, y] = [coordinates[2 * node], coordinates[2 * node + 1]];
      if (!boundary[node] || fits(3 * e + c))
        add(patches.cornerPatches[3 * e + c], x, y, 1, corners, 6 * e + 2 * c);
      else {
        add(patches.cornerPatches[next], x, y, 0.5, corners, 6 * e + 2 * c);
        add(patches.cornerPatches[last], x, y, 0.5, corners, 6 * e + 2 * c);
      }
      const other = elements[stride * e + ((c + 1) % 3)];
      const [mx, my] = [(x + coordinates[2 * other]) / 2, (y + coordinates[2 * other + 1]) / 2];
      const [own, across] = [3 * e + c, next].map(
        (k) => !boundary[elements[stride * e + (k % 3)]] || fits(k),
      );
      const share = own === across ? 0.5 : own ? 1 : 0;
      if (share > 0) add(patches.cornerPatches[3 * e + c], mx, my, share, midsides, 6 * e + 2 * c);
      if (share < 1) add(patches.cornerPatches[next], mx, my, 1 - share, midsides, 6 * e + 2 * c);
    }
  }
  return { corners, midsides };
}

// Nodes on the outline or on a barrier's face: those of sides with nothing across.
function findBoundaryNodes({ elementCount, elements, neighbours, nodeCount, order }: Mesh): Uint8Array {
  const stride = order === 1 ? 3 : 6;
  const boundary = new Uint8Array(nodeCount);
  for (let e = 0; e < elementCount; e++) {
    for (let s = 0; s < 3; s++) {
      if (neighbours[3 * e + s] >= 0) continue;
      boundary[elements[stride * e + s]] = 1;
      boundary[elements[stride * e + ((s + 1) % 3)]] = 1;
    }
  }
  return boundary;
}
