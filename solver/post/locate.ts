// Finds the element at a point, and values there.
import { elementTypeOf } from '../element/mapping';
import type { Mesh } from '../mesh/mesh';

/** A point within an element, in the parent's coordinates. */
export interface Place {
  readonly element: number;
  readonly xi: number;
  readonly eta: number;
}

/** Point location by a grid of buckets. */
export interface Locator {
  /**
   * Finds the element at a point; on a line between elements, and so on a barrier, the one with the lowest index.
   *
   * @param x - Metres.
   * @param y - Metres.
   * @returns The place, or null outside the ground. Points within 1e-6 of the section's size, its snap distance, count as inside.
   */
  find(x: number, y: number): Place | null;
}

/**
 * Builds a point locator for straight-sided elements.
 *
 * @param mesh - Mesh in metres.
 * @returns The locator; about one element a bucket.
 */
export function createLocator(mesh: Mesh): Locator {
  const { coordinates, elementCount } = mesh;
  let xMin = Infinity;
  let xMax = -Infinity;
  let yMin = Infinity;
  let yMax = -Infinity;
  for (let k = 0; k < coordinates.length; k += 2) {
    xMin = Math.min(xMin, coordinates[k]);
    xMax = Math.max(xMax, coordinates[k]);
    yMin = Math.min(yMin, coordinates[k + 1]);
    yMax = Math.max(yMax, coordinates[k + 1]);
  }
  const size = Math.max(xMax - xMin, yMax - yMin);
  // Rounding first: a point a hair beside a barrier must not be given to the other face while its own element is there.
  const [rounding, slack] = [1e-11 * size, 1e-6 * size];
  const cell = Math.max(Math.sqrt(((xMax - xMin) * (yMax - yMin)) / elementCount), size / 2000);
  const columns = Math.max(1, Math.ceil((xMax - xMin) / cell));
  const rows = Math.max(1, Math.ceil((yMax - yMin) / cell));
  const columnOf = (x: number): number => Math.min(columns - 1, Math.max(0, Math.floor((x - xMin) / cell)));
  const rowOf = (y: number): number => Math.min(rows - 1, Math.max(0, Math.floor((y - yMin) / cell)));
  const buckets = new Map<number, number[]>();
  const box = new Float64Array(4);
  for (let element = 0; element < elementCount; element++) {
    elementBox(mesh, element, box);
    for (let row = rowOf(box[1] - slack); row <= rowOf(box[3] + slack); row++) {
      for (let column = columnOf(box[0] - slack); column <= columnOf(box[2] + slack); column++) {
        const key = row * columns + column;
        const list = buckets.get(key);
        if (list) list.push(element);
        else buckets.set(key, [element]);
      }
    }
  }
  return {
    find(x, y) {
      const candidates = buckets.get(rowOf(y) * columns + columnOf(x)) ?? [];
      for (const distance of [rounding, slack]) {
        for (const element of candidates) {
          const place = placeIn(mesh, element, x, y, distance);
          if (place) return place;
        }
      }
      return null;
    },
  };
}

function elementBox(mesh: Mesh, element: number, out: Float64Array): void {
  const stride = mesh.order === 1 ? 3 : 6;
  out[0] = out[1] = Infinity;
  out[2] = out[3] = -Infinity;
  for (let corner = 0; corner < 3; corner++) {
    const node = 2 * mesh.elements[stride * element + corner];
    out[0] = Math.min(out[0], mesh.coordinates[node]);
    out[1] = Math.min(out[1], mesh.coordinates[node + 1]);
    out[2] = Math.max(out[2], mesh.coordinates[node]);
    out[3] = Math.max(out[3], mesh.coordinates[node + 1]);
  }
}

function placeIn(mesh: Mesh, element: number, x: number, y: number, slack: number): Place | null {
  const place = parentCoordinates(mesh, element, x, y);
  const { coordinates, elements } = mesh;
  const stride = mesh.order === 1 ? 3 : 6;
  const a = 2 * elements[stride * element];
  const b = 2 * elements[stride * element + 1];
  const c = 2 * elements[stride * element + 2];
  const length = Math.max(
    Math.abs(coordinates[b] - coordinates[a]) + Math.abs(coordinates[b + 1] - coordinates[a + 1]),
    Math.abs(coordinates[c] - coordinates[a]) + Math.abs(coordinates[c + 1] - coordinates[a + 1]),
  );
  const tolerance = 1e-12 + (2 * slack) / length;
  return place.xi >= -tolerance && place.eta >= -tolerance && place.xi + place.eta <= 1 + tolerance
    ? place
    : null;
}

/**
 * Maps a point into an element's parent coordinates.
 *
 * @param mesh - Mesh in metres, straight-sided elements.
 * @param element - Element index.
 * @param x - Metres.
 * @param y - Metres.
 * @returns The place; outside the triangle's range where the point lies outside the element.
 */
export function parentCoordinates(mesh: Mesh, element: number, x: number, y: number): Place {
  const { coordinates, elements } = mesh;
  const stride = mesh.order === 1 ? 3 : 6;
  const a = 2 * elements[stride * element];
  const b = 2 * elements[stride * element + 1];
  const c = 2 * elements[stride * element + 2];
  const x1 = coordinates[b] - coordinates[a];
  const y1 = coordinates[b + 1] - coordinates[a + 1];
  const x2 = coordinates[c] - coordinates[a];
  const y2 = coordinates[c + 1] - coordinates[a + 1];
  const determinant = x1 * y2 - x2 * y1;
  const dx = x - coordinates[a];
  const dy = y - coordinates[a + 1];
  return { element, xi: (dx * y2 - dy * x2) / determinant, eta: (dy * x1 - dx * y1) / determinant };
}

const N = new Float64Array(6);

/**
 * Interpolates a nodal field.
 *
 * @param mesh - The mesh.
 * @param nodal - One value a node.
 * @param place - Where.
 * @returns The value, in the field's unit.
 */
export function interpolate(mesh: Mesh, nodal: Float64Array, place: Place): number {
  const type = elementTypeOf(mesh);
  type.shapeFunctions(place.xi, place.eta, N);
  let sum = 0;
  for (let a = 0; a < type.nodeCount; a++)
    sum += N[a] * nodal[mesh.elements[type.nodeCount * place.element + a]];
  return sum;
}
