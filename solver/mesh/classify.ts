// Which ground each triangle is: painter's order over the regions.
import { containsPoint } from '../geometry/polygon';
import type { Arrangement } from './arrange';
import type { Triangulation } from './triangulation';

/** The rings of one region after the arrangement. */
export interface RegionRings {
  readonly rings: (readonly [number, number])[][];
  readonly material: number;
}

/**
 * Collects each region's rings with their arranged (snapped) vertices.
 *
 * @param arrangement - All lines, cut.
 * @param materials - Material of each region.
 * @returns Rings region by region, in painter's order.
 */
export function collectRings(arrangement: Arrangement, materials: readonly number[]): RegionRings[] {
  const regions = materials.map((material) => ({ rings: [] as (readonly [number, number])[][], material }));
  for (const { kind, index, vertices } of arrangement.lines) {
    if (kind !== 'region') continue;
    regions[index].rings.push(
      vertices.slice(0, -1).map((v) => [arrangement.x[v], arrangement.y[v]] as const),
    );
  }
  return regions;
}

/**
 * Writes the material of every triangle; −1 outside the ground.
 *
 * Triangles joined by free sides are of one kind, so one point speaks for each such patch.
 *
 * @param mesh - Triangulation whose segments include every outline that matters.
 * @param regions - Rings in painter's order.
 * @param frame - First of the three corners of the triangle round all.
 */
export function classifyTriangles(mesh: Triangulation, regions: readonly RegionRings[], frame: number): void {
  const { corners, neighbours, segments, materials } = mesh;
  const seen = new Uint8Array(mesh.triangleCount);
  for (let first = 0; first < mesh.triangleCount; first++) {
    if (seen[first]) continue;
    const patch = [first];
    seen[first] = 1;
    let largest = first;
    let largestArea = -1;
    let outside = false;
    for (let i = 0; i < patch.length; i++) {
      const t = patch[i];
      const area = triangleArea(mesh, t);
      if (area > largestArea) [largest, largestArea] = [t, area];
      for (let s = 0; s < 3; s++) {
        if (corners[3 * t + s] >= frame && corners[3 * t + s] < frame + 3) outside = true;
        const n = neighbours[3 * t + s];
        if (n < 0 || segments[3 * t + s] >= 0 || seen[n]) continue;
        seen[n] = 1;
        patch.push(n);
      }
    }
    const material = outside ? -1 : findMaterial(mesh, largest, regions);
    for (const t of patch) materials[t] = material;
  }
}

function triangleArea({ x, y, corners }: Triangulation, t: number): number {
  const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
  return ((x[b] - x[a]) * (y[c] - y[a]) - (y[b] - y[a]) * (x[c] - x[a])) / 2;
}

function findMaterial({ x, y, corners }: Triangulation, t: number, regions: readonly RegionRings[]): number {
  const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
  const px = (x[a] + x[b] + x[c]) / 3;
  const py = (y[a] + y[b] + y[c]) / 3;
  for (let r = regions.length - 1; r >= 0; r--) {
    const [outline, ...holes] = regions[r].rings;
    if (!containsPoint(outline, px, py)) continue;
    if (!holes.some((hole) => containsPoint(hole, px, py))) return regions[r].material;
  }
  return -1;
}

/**
 * Copies the triangles of the ground alone; sides towards the outside become hull sides.
 *
 * @param mesh - A classified triangulation; left as it is but for its triangle list.
 */
export function removeOutside(mesh: Triangulation): void {
  const { corners, neighbours, segments, materials, generations, triangleAt } = mesh;
  const moved = new Int32Array(mesh.triangleCount).fill(-1);
  let kept = 0;
  for (let t = 0; t < mesh.triangleCount; t++) if (materials[t] >= 0) moved[t] = kept++;
  triangleAt.fill(-1);
  for (let t = 0; t < mesh.triangleCount; t++) {
    const to = moved[t];
    if (to < 0) continue;
    materials[to] = materials[t];
    generations[to]++;
    for (let s = 0; s < 3; s++) {
      const n = neighbours[3 * t + s];
      corners[3 * to + s] = corners[3 * t + s];
      segments[3 * to + s] = segments[3 * t + s];
      neighbours[3 * to + s] = n < 0 ? -1 : moved[n];
      triangleAt[corners[3 * to + s]] = to;
    }
  }
  mesh.triangleCount = kept;
}
