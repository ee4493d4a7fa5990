// Whether a mesh is what mesh.ts says it is.
import type { LineSides, Mesh } from './mesh';

/** What can be wrong with a mesh. */
export type MeshFault =
  | 'inverted-element'
  | 'unused-node'
  | 'asymmetric-neighbours'
  | 'unmatched-nodes'
  | 'midside-off-middle'
  | 'broken-line'
  | 'unpaired-faces'
  | 'open-outline';

/**
 * Checks a mesh in time proportional to its size.
 *
 * @param mesh - Any mesh.
 * @returns Each kind of fault found, once; empty for a sound mesh.
 */
export function validateMesh(mesh: Mesh): MeshFault[] {
  const faults = new Set<MeshFault>();
  checkElements(mesh, faults);
  checkNeighbours(mesh, faults);
  const slack = snapSlack * measureExtent(mesh);
  for (const line of [...mesh.edges, ...mesh.drains, ...mesh.bases]) checkLine(mesh, line, slack, faults);
  for (const { left, right } of mesh.barriers) {
    checkLine(mesh, left, slack, faults);
    checkLine(mesh, right, slack, faults);
    checkFaces(mesh, left, right, faults);
  }
  checkOutline(mesh, faults);
  return [...faults];
}

/** Points move by up to the snap distance, 1e-6 of the section, each. */
const snapSlack = 4e-6;

function measureExtent({ coordinates }: Mesh): number {
  const low = [Infinity, Infinity];
  const high = [-Infinity, -Infinity];
  coordinates.forEach((value, i) => {
    low[i % 2] = Math.min(low[i % 2], value);
    high[i % 2] = Math.max(high[i % 2], value);
  });
  return Math.max(high[0] - low[0], high[1] - low[1]);
}

function strideOf({ order }: Mesh): number {
  return order === 1 ? 3 : 6;
}

function checkElements(mesh: Mesh, faults: Set<MeshFault>): void {
  const { coordinates: xy, elements } = mesh;
  const stride = strideOf(mesh);
  const used = new Uint8Array(mesh.nodeCount);
  for (let e = 0; e < mesh.elementCount; e++) {
    const [a, b, c] = [elements[stride * e], elements[stride * e + 1], elements[stride * e + 2]];
    const twice =
      (xy[2 * b] - xy[2 * a]) * (xy[2 * c + 1] - xy[2 * a + 1]) -
      (xy[2 * b + 1] - xy[2 * a + 1]) * (xy[2 * c] - xy[2 * a]);
    if (!(twice > 0)) faults.add('inverted-element');
    for (let k = 0; k < stride; k++) used[elements[stride * e + k]] = 1;
    for (let s = 0; s < stride - 3; s++) {
      const middle = elements[stride * e + 3 + s];
      const [p, q] = [elements[stride * e + s], elements[stride * e + ((s + 1) % 3)]];
      for (const k of [0, 1]) {
        const wanted = (xy[2 * p + k] + xy[2 * q + k]) / 2;
        if (xy[2 * middle + k] !== wanted) faults.add('midside-off-middle');
      }
    }
  }
  if (used.includes(0)) faults.add('unused-node');
}

// The two end nodes and, for order 2, the midside node of a side.
function sideNodes(mesh: Mesh, e: number, s: number): [number, number, number] {
  const stride = strideOf(mesh);
  const { elements } = mesh;
  const middle = mesh.order === 2 ? elements[6 * e + 3 + s] : -1;
  return [elements[stride * e + s], elements[stride * e + ((s + 1) % 3)], middle];
}

function checkNeighbours(mesh: Mesh, faults: Set<MeshFault>): void {
  for (let e = 0; e < mesh.elementCount; e++) {
    for (let s = 0; s < 3; s++) {
      const n = mesh.neighbours[3 * e + s];
      if (n < 0) continue;
      const [a, b, m] = sideNodes(mesh, e, s);
      const back = [0, 1, 2].find((k) => mesh.neighbours[3 * n + k] === e && sideNodes(mesh, n, k)[0] === b);
      if (back === undefined) {
        faults.add('asymmetric-neighbours');
        continue;
      }
      const [c, d, w] = sideNodes(mesh, n, back);
      if (a !== d || b !== c || m !== w) faults.add('unmatched-nodes');
    }
  }
}

// End points of a side in the path's direction: x, y, x, y.
function sidePlaces(mesh: Mesh, line: LineSides, i: number): [number, number, number, number] {
  const [a, b] = sideNodes(mesh, line.elements[i], line.sides[i]);
  const [from, to] = line.directions[i] > 0 ? [a, b] : [b, a];
  const xy = mesh.coordinates;
  return [xy[2 * from], xy[2 * from + 1], xy[2 * to], xy[2 * to + 1]];
}

// Sides in order: distances rise, and where one stops the next starts, in space as along the path.
function checkLine(mesh: Mesh, line: LineSides, slack: number, faults: Set<MeshFault>): void {
  for (let i = 0; i < line.elements.length; i++) {
    const [from, to] = [line.distances[2 * i], line.distances[2 * i + 1]];
    const [ax, ay, bx, by] = sidePlaces(mesh, line, i);
    const length = Math.hypot(bx - ax, by - ay);
    if (!(to > from) || Math.abs(to - from - length) > 1e-3 * length + slack) faults.add('broken-line');
    if (i === 0) continue;
    const [px, py, qx, qy] = sidePlaces(mesh, line, i - 1);
    const twin = line.distances[2 * i - 2] === from && px === ax && py === ay && qx === bx && qy === by;
    const follows = line.distances[2 * i - 1] === from && qx === ax && qy === ay;
    const jumps = line.distances[2 * i - 1] < from; // an inner part after a part on the outline
    if (!twin && !follows && !jumps) faults.add('broken-line');
  }
}

// The two faces of a barrier: same places in the same order, walked in opposite senses, no neighbours across.
function checkFaces(mesh: Mesh, left: LineSides, right: LineSides, faults: Set<MeshFault>): void {
  if (left.elements.length !== right.elements.length) {
    faults.add('unpaired-faces');
    return;
  }
  for (let i = 0; i < left.elements.length; i++) {
    const p = sidePlaces(mesh, left, i);
    const q = sidePlaces(mesh, right, i);
    const same = p.every((value, k) => value === q[k]);
    const opposite = left.directions[i] === 1 && right.directions[i] === -1;
    const closed =
      mesh.neighbours[3 * left.elements[i] + left.sides[i]] === -1 &&
      mesh.neighbours[3 * right.elements[i] + right.sides[i]] === -1;
    if (!same || !opposite || !closed) faults.add('unpaired-faces');
  }
}

// The outline and the barriers' faces together are all sides without a neighbour.
function checkOutline(mesh: Mesh, faults: Set<MeshFault>): void {
  const open = new Uint8Array(3 * mesh.elementCount);
  for (const line of [mesh.outline, ...mesh.barriers.flatMap(({ left, right }) => [left, right])]) {
    line.elements.forEach((e, i) => (open[3 * e + line.sides[i]] += 1));
  }
  for (let side = 0; side < open.length; side++) {
    if (open[side] !== (mesh.neighbours[side] < 0 ? 1 : 0)) faults.add('open-outline');
  }
}
