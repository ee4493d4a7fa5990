// Patches of elements round corner nodes, for recovery. A patch never crosses a change of conductivity, a barrier or
// the outline: it grows only through `neighbours`, and only into elements of its own class.
import type { Mesh } from '../mesh/mesh';
import type { Conductivity } from '../problem';

/** Elements at each patch centre: a corner node seen from one class of material. */
export interface Patches {
  readonly count: number;
  /** Corner node at each patch's centre. */
  readonly nodes: Int32Array;
  /** Patch of each element corner, length `3 * elementCount`. */
  readonly cornerPatches: Int32Array;
  /** Start of each patch's elements in `members`, length count + 1. */
  readonly starts: Int32Array;
  readonly members: Int32Array;
  /** Class of each element; materials of equal conductivity share one. */
  readonly classes: Int32Array;
  /** Angle that the patch's elements fill round the node, radians. */
  readonly angles: Float64Array;
}

/**
 * Groups the elements round every corner node into patches.
 *
 * @param mesh - The mesh.
 * @param conductivities - One a material.
 * @returns The patches, before any extension.
 */
export function findPatches(mesh: Mesh, conductivities: readonly Conductivity[]): Patches {
  const { elementCount, elements, neighbours } = mesh;
  const stride = mesh.order === 1 ? 3 : 6;
  const classes = classifyElements(mesh, conductivities);
  const cornerPatches = new Int32Array(3 * elementCount).fill(-1);
  const nodes: number[] = [];
  const angles: number[] = [];
  const starts: number[] = [0];
  const members = new Int32Array(3 * elementCount);
  let filled = 0;
  const cornerOf = (e: number, node: number): number =>
    elements[stride * e] === node ? 0 : elements[stride * e + 1] === node ? 1 : 2;
  for (let corner = 0; corner < 3 * elementCount; corner++) {
    if (cornerPatches[corner] >= 0) continue;
    const patch = nodes.length;
    const first = (corner / 3) | 0;
    const node = elements[stride * first + (corner % 3)];
    let angle = 0;
    let open = true;
    for (const step of [2, 0]) {
      // Anticlockwise through side c + 2, then clockwise from the start through side c.
      let at = step === 2 ? first : nextElement(first, corner % 3);
      while (at >= 0 && classes[at] === classes[first]) {
        const c = cornerOf(at, node);
        if (cornerPatches[3 * at + c] === patch) {
          open = false;
          break;
        }
        cornerPatches[3 * at + c] = patch;
        members[filled++] = at;
        angle += cornerAngle(mesh, at, c);
        at = neighbours[3 * at + ((c + step) % 3)];
      }
      if (!open) break;
    }
    nodes.push(node);
    angles.push(angle);
    starts.push(filled);
  }
  return {
    count: nodes.length,
    nodes: Int32Array.from(nodes),
    cornerPatches,
    starts: Int32Array.from(starts),
    members,
    classes,
    angles: Float64Array.from(angles),
  };

  function nextElement(e: number, side: number): number {
    return neighbours[3 * e + side];
  }
}

/**
 * Measures the angle of an element at a corner.
 *
 * @param mesh - The mesh.
 * @param element - Element index.
 * @param corner - 0, 1, 2.
 * @returns Radians.
 */
export function cornerAngle(mesh: Mesh, element: number, corner: number): number {
  const { coordinates, elements } = mesh;
  const stride = mesh.order === 1 ? 3 : 6;
  const a = 2 * elements[stride * element + corner];
  const b = 2 * elements[stride * element + ((corner + 1) % 3)];
  const c = 2 * elements[stride * element + ((corner + 2) % 3)];
  const ux = coordinates[b] - coordinates[a];
  const uy = coordinates[b + 1] - coordinates[a + 1];
  const vx = coordinates[c] - coordinates[a];
  const vy = coordinates[c + 1] - coordinates[a + 1];
  return Math.atan2(ux * vy - uy * vx, ux * vx + uy * vy);
}

function classifyElements(mesh: Mesh, conductivities: readonly Conductivity[]): Int32Array {
  const classOf = conductivities.map(({ kMajor, kMinor, angle }) =>
    conductivities.findIndex(
      (other) =>
        other.kMajor === kMajor && other.kMinor === kMinor && (other.angle === angle || kMajor === kMinor),
    ),
  );
  return mesh.elementMaterials.map((material) => classOf[material]);
}
