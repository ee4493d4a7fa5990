// From the refined triangulation to elements and nodes: slits along barriers, midside nodes, numbering.
import { orderAlongCurve } from './curve-order';
import type { Ground } from './ground';
import type { Triangulation } from './triangulation';

/** Elements and nodes before the lines are added. */
export interface Topology {
  readonly nodeCount: number;
  readonly elementCount: number;
  readonly coordinates: Float64Array;
  readonly elements: Int32Array;
  readonly elementMaterials: Int32Array;
  readonly neighbours: Int32Array;
  /** Segment of the ground on each side, −1 where none, length `3 * elementCount`. */
  readonly sideSegments: Int32Array;
  /** Vertex of the triangulation at each corner, length `3 * elementCount`. */
  readonly cornerVertices: Int32Array;
}

/**
 * Numbers elements and nodes; the ground on the two sides of an inner barrier gets nodes of its own.
 *
 * Round each vertex, triangles joined through sides that no barrier closes share one node. So a tip inside the ground
 * stays single and a foot at the surface or a junction of barriers splits into as many nodes as there are sides.
 *
 * @param mesh - The refined triangulation.
 * @param ground - Tells which segments are barriers.
 * @param order - 1 or 2.
 * @returns Elements along a space-filling curve, nodes in order of first use.
 */
export function buildTopology(mesh: Triangulation, ground: Ground, order: 1 | 2): Topology {
  const count = mesh.triangleCount;
  const renumbered = orderElements(mesh);
  const place = new Int32Array(count);
  renumbered.forEach((t, e) => (place[t] = e));
  const cornerVertices = new Int32Array(3 * count);
  const sideSegments = new Int32Array(3 * count);
  const neighbours = new Int32Array(3 * count);
  const elementMaterials = new Int32Array(count);
  for (let e = 0; e < count; e++) {
    const t = renumbered[e];
    elementMaterials[e] = mesh.materials[t];
    for (let s = 0; s < 3; s++) {
      const segment = mesh.segments[3 * t + s];
      const n = mesh.neighbours[3 * t + s];
      const closed = n < 0 || (segment >= 0 && ground.barrierOn[segment] >= 0);
      cornerVertices[3 * e + s] = mesh.corners[3 * t + s];
      sideSegments[3 * e + s] = segment;
      neighbours[3 * e + s] = closed ? -1 : place[n];
    }
  }
  const { nodeCount, elements } = numberNodes(cornerVertices, neighbours, order);
  const coordinates = new Float64Array(2 * nodeCount);
  const stride = order === 1 ? 3 : 6;
  const { x, y } = mesh;
  for (let e = 0; e < count; e++) {
    for (let s = 0; s < 3; s++) {
      const v = cornerVertices[3 * e + s];
      const node = elements[stride * e + s];
      coordinates[2 * node] = x[v];
      coordinates[2 * node + 1] = y[v];
      if (order === 1) continue;
      const w = cornerVertices[3 * e + ((s + 1) % 3)];
      const middle = elements[stride * e + 3 + s];
      coordinates[2 * middle] = (x[v] + x[w]) / 2;
      coordinates[2 * middle + 1] = (y[v] + y[w]) / 2;
    }
  }
  return {
    nodeCount,
    elementCount: count,
    coordinates,
    elements,
    elementMaterials,
    neighbours,
    sideSegments,
    cornerVertices,
  };
}

function orderElements({ x, y, corners, triangleCount }: Triangulation): Int32Array {
  const cx = new Float64Array(triangleCount);
  const cy = new Float64Array(triangleCount);
  for (let t = 0; t < triangleCount; t++) {
    const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
    cx[t] = (x[a] + x[b] + x[c]) / 3;
    cy[t] = (y[a] + y[b] + y[c]) / 3;
  }
  return orderAlongCurve(cx, cy, triangleCount);
}

// Gives nodes to corners, fan by fan, and to sides.
function numberNodes(
  vertices: Int32Array,
  neighbours: Int32Array,
  order: 1 | 2,
): { nodeCount: number; elements: Int32Array } {
  const count = vertices.length / 3;
  const stride = order === 1 ? 3 : 6;
  const elements = new Int32Array(stride * count).fill(-1);
  let nodes = 0;
  const cornerOf = (e: number, v: number): number =>
    vertices[3 * e] === v ? 0 : vertices[3 * e + 1] === v ? 1 : 2;
  for (let e = 0; e < count; e++) {
    for (let s = 0; s < 3; s++) {
      if (elements[stride * e + s] >= 0) continue;
      const v = vertices[3 * e + s];
      const node = nodes++;
      let at = e;
      while (at >= 0) {
        const c = cornerOf(at, v);
        if (elements[stride * at + c] >= 0) break; // once round
        elements[stride * at + c] = node;
        at = neighbours[3 * at + ((c + 2) % 3)]; // anticlockwise
      }
      at = at < 0 ? neighbours[3 * e + s] : -1;
      while (at >= 0) {
        const c = cornerOf(at, v);
        elements[stride * at + c] = node;
        at = neighbours[3 * at + c]; // clockwise
      }
    }
    if (order === 1) continue;
    for (let s = 0; s < 3; s++) {
      if (elements[6 * e + 3 + s] >= 0) continue;
      const node = nodes++;
      elements[6 * e + 3 + s] = node;
      const n = neighbours[3 * e + s];
      if (n >= 0) elements[6 * n + 3 + cornerOf(n, vertices[3 * e + ((s + 1) % 3)])] = node;
    }
  }
  return { nodeCount: nodes, elements };
}
