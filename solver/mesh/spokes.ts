// What leaves each vertex of the ground, in order round it.
import type { Ground } from './ground';

/** One way out of a vertex along a segment. */
export interface Spoke {
  readonly segment: number;
  readonly to: number;
  readonly angle: number;
  /** Materials anticlockwise after the spoke and before it. */
  readonly after: number;
  readonly before: number;
  /** What holds along it: an edge's index, 1e6 + a drain's, −1 on a closed side, −2 on a mere change of material. */
  readonly condition: number;
}

/**
 * Lists the ways out of every vertex.
 *
 * @param ground - The ground.
 * @returns For each vertex its spokes, anticlockwise from −π.
 */
export function listSpokes(ground: Ground): Spoke[][] {
  const spokes: Spoke[][] = ground.x.map(() => []);
  ground.starts.forEach((a, segment) => {
    const b = ground.ends[segment];
    const inner = ground.left[segment] >= 0 && ground.right[segment] >= 0;
    const drain = ground.drainOn[segment];
    let condition = inner && ground.barrierOn[segment] < 0 ? -2 : ground.edgeOn[segment];
    if (drain >= 0) condition = 1e6 + drain;
    const [left, right] = [ground.left[segment], ground.right[segment]];
    const angle = Math.atan2(ground.y[b] - ground.y[a], ground.x[b] - ground.x[a]);
    const back = Math.atan2(ground.y[a] - ground.y[b], ground.x[a] - ground.x[b]);
    spokes[a].push({ segment, to: b, angle, after: left, before: right, condition });
    spokes[b].push({ segment, to: a, angle: back, after: right, before: left, condition });
  });
  for (const list of spokes) list.sort((p, q) => p.angle - q.angle || p.to - q.to);
  return spokes;
}

/**
 * Measures the turn from one spoke to the next of the same vertex.
 *
 * @param from - A spoke.
 * @param to - Another, or the same for the full turn.
 * @returns Radians anticlockwise, over 0 to 2π.
 */
export function turnFrom(from: Spoke, to: Spoke): number {
  const turn = to.angle - from.angle;
  return turn > 0 ? turn : turn + 2 * Math.PI;
}
