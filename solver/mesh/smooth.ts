// Better-shaped triangles by moving free vertices.
import { restoreDelaunay } from './delaunay';
import type { Triangulation } from './triangulation';

/**
 * Moves free vertices to the mean of their neighbours where that widens the smallest angle round them.
 *
 * @param mesh - A refined triangulation; changed in place, Delaunay again afterwards.
 * @param segmentOf - −1 for vertices that may move.
 * @param sweeps - How many times over all vertices.
 * @source D. A. Field (1988), Laplacian smoothing and Delaunay triangulations (the guarded form).
 */
export function smoothMesh(mesh: Triangulation, segmentOf: Int32Array, sweeps: number): void {
  const { x, y } = mesh;
  for (let sweep = 0; sweep < sweeps; sweep++) {
    for (let v = 0; v < mesh.vertexCount; v++) {
      if (segmentOf[v] !== -1 || mesh.triangleAt[v] < 0) continue;
      const [ox, oy] = [x[v], y[v]];
      const before = judgeStar(mesh, v);
      [x[v], y[v]] = meanOfRing(mesh, v);
      if (judgeStar(mesh, v) > before) continue;
      x[v] = ox;
      y[v] = oy;
    }
    restoreDelaunay(mesh);
  }
}

function meanOfRing(mesh: Triangulation, v: number): [number, number] {
  const { x, y, corners, neighbours } = mesh;
  let [sx, sy, count] = [0, 0, 0];
  const first = mesh.triangleAt[v];
  let t = first;
  do {
    const s = mesh.sideFrom(t, v);
    const w = corners[3 * t + ((s + 1) % 3)];
    sx += x[w];
    sy += y[w];
    count++;
    t = neighbours[3 * t + ((s + 2) % 3)];
  } while (t !== first);
  return [sx / count, sy / count];
}

// Least over the triangles round a vertex of the squared sine of the smallest angle; negative where one is inverted.
function judgeStar(mesh: Triangulation, v: number): number {
  const { x, y, corners, neighbours } = mesh;
  let least = Infinity;
  const first = mesh.triangleAt[v];
  let t = first;
  do {
    const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
    const [ux, uy, wx, wy] = [x[b] - x[a], y[b] - y[a], x[c] - x[a], y[c] - y[a]];
    const twice = ux * wy - uy * wx;
    const uu = ux * ux + uy * uy;
    const ww = wx * wx + wy * wy;
    const zz = (ux - wx) * (ux - wx) + (uy - wy) * (uy - wy);
    const longest = (uu * ww * zz) / Math.min(uu, ww, zz); // squared product of the two longer sides
    least = Math.min(least, (twice * Math.abs(twice)) / longest);
    t = neighbours[3 * t + ((mesh.sideFrom(t, v) + 2) % 3)];
  } while (t !== first);
  return least;
}
