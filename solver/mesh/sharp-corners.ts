// Corners so sharp that the segments of both sides must be split in step (concentric shells, Ruppert 1995, section 5).
import type { Ground } from './ground';

/**
 * Marks corners where two segments meet at less than 61 degrees.
 *
 * @param ground - The ground.
 * @returns 1 at each such vertex, else 0.
 */
export function findSharpCorners({ x, y, starts, ends }: Ground): Uint8Array {
  const sharp = new Uint8Array(x.length);
  const angles: number[][] = x.map(() => []);
  for (let s = 0; s < starts.length; s++) {
    const [a, b] = [starts[s], ends[s]];
    angles[a].push(Math.atan2(y[b] - y[a], x[b] - x[a]));
    angles[b].push(Math.atan2(y[a] - y[b], x[a] - x[b]));
  }
  angles.forEach((list, v) => {
    list.sort((p, q) => p - q);
    for (let i = 0; i < list.length; i++) {
      const turn = i + 1 < list.length ? list[i + 1] - list[i] : list[0] + 2 * Math.PI - list[i];
      if (list.length > 1 && turn < (61 * Math.PI) / 180) sharp[v] = 1;
    }
  });
  return sharp;
}

/**
 * Measures the largest first shell round a corner.
 *
 * @param ground - The ground.
 * @param v - The corner.
 * @returns Radius that leaves the shortest segment there room for more splits, metres.
 */
export function measureShell({ x, y, starts, ends }: Ground, v: number): number {
  let shortest = Infinity;
  for (let s = 0; s < starts.length; s++) {
    if (starts[s] !== v && ends[s] !== v) continue;
    shortest = Math.min(shortest, Math.hypot(x[starts[s]] - x[ends[s]], y[starts[s]] - y[ends[s]]));
  }
  return shortest / 2.5;
}
