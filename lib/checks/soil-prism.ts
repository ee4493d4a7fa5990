// The prism of soil in front of a wall: where it is, what it weighs, what head stands on its base.
import { cutColumn } from '@/lib/domain/ground-column';
import { createGround } from '@/lib/domain/ground';
import type { Barrier, Edge, Point, SectionDocument } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { waterUnitWeight } from '@/solver';
import type { CheckInput } from './check';

/** A prism beside a wall, from the bed down. */
export interface SoilPrism {
  readonly wall: Barrier;
  readonly edge: Edge;
  /** Where the bed meets the line of the wall. */
  readonly foot: Point;
  /** +1 where the bed lies to the right of the wall. */
  readonly direction: 1 | -1;
  /** From the foot down to the base, m. */
  readonly depth: number;
  readonly width: number;
  /** Head on the bed, m. */
  readonly bedHead: number;
}

/** A bed rising or falling more than this per metre is another shape of failure. */
const steepestBed = 0.2;
/** A wall leaning more than this per metre is another shape too. */
const steepestLean = 0.05;

/**
 * Finds the prism in front of every wall beside which water leaves through a nearly level bed: as deep as the wall's tip, half as wide.
 *
 * @param input - Document, situation and result.
 * @returns The prisms; none for a wall that ends above the bed.
 * @source Terzaghi (1943), Theoretical Soil Mechanics, art. 94.
 */
export function findPrisms({ document, situation, result }: CheckInput): SoilPrism[] {
  const { snap, bounds } = createGround(document);
  return document.barriers.flatMap((wall) => {
    const tip = wall.path.reduce((low, p) => (p[1] < low[1] ? p : low));
    if (tip[1] <= bounds.yMin + 2 * snap) return [];
    return result.exit.flatMap((face): SoilPrism[] => {
      const edge = document.edges.find(({ id }) => id === face.edge);
      const bedHead = edge ? levelOf(edge.condition, situation) : null;
      if (!edge || bedHead === null) return [];
      return [edge.path, [...edge.path].reverse()].flatMap((path): SoilPrism[] => {
        const [foot, next] = [path[0]!, path[1]!];
        const depth = foot[1] - tip[1];
        const run = Math.abs(next[0] - foot[0]);
        const isBed = run > 0 && Math.abs(next[1] - foot[1]) <= steepestBed * run;
        if (!isBed || depth <= 4 * snap || !isUpright(wall, foot, depth, snap)) return [];
        const direction = next[0] > foot[0] ? 1 : -1;
        const width = Math.min(depth / 2, run, gapBeside(document, wall, { foot, direction, depth }));
        return [{ wall, edge, foot, direction, depth, width, bedHead }];
      });
    });
  });
}

/** Whether a wall goes down from the foot, nearly upright, all the way in the line of the foot. */
function isUpright(wall: Barrier, foot: Point, depth: number, snap: number): boolean {
  const top = Math.max(...wall.path.map(([, y]) => y));
  const reaches = top >= foot[1] - 0.5 * depth;
  return (
    reaches &&
    wall.path
      .filter(([, y]) => y <= foot[1] + snap)
      .every(([x]) => Math.abs(x - foot[0]) <= steepestLean * depth)
  );
}

/** Distance to the next wall in front, m; infinite where there is none. */
function gapBeside(
  { barriers }: SectionDocument,
  wall: Barrier,
  { foot, direction, depth }: Pick<SoilPrism, 'foot' | 'direction' | 'depth'>,
): number {
  const gaps = barriers
    .filter((other) => other !== wall && other.path.some(([, y]) => y < foot[1] && y > foot[1] - depth))
    .flatMap(({ path }) => path.map(([x]) => direction * (x - foot[0])))
    .filter((gap) => gap > steepestLean * depth);
  return Math.min(...gaps, Number.POSITIVE_INFINITY);
}

/**
 * Averages the head over the base of a prism.
 *
 * Points gather towards the wall, where the head changes as the root of the distance.
 *
 * @param prism - The prism.
 * @param probe - Gives heads.
 * @returns Metres, or null where the base leaves the ground.
 */
export function averageHead(prism: SoilPrism, probe: CheckInput['probe']): number | null {
  const { foot, direction, depth, width } = prism;
  const steps = 48;
  let sum = 0;
  for (let i = 0; i < steps; i++) {
    const t = (i + 0.5) / steps;
    const head = probe.headAt(foot[0] + direction * width * t * t, foot[1] - depth);
    if (head === null) return null;
    sum += (head * 2 * t) / steps;
  }
  return sum;
}

/** Average over the width of a prism, kPa at its base. */
export interface PrismWeight {
  /** Saturated soil. */
  readonly total: number;
  /** Soil less its buoyancy. */
  readonly submerged: number;
  /** Water standing on the bed. */
  readonly water: number;
}

/**
 * Weighs a prism, material by material.
 *
 * @param document - The section.
 * @param prism - The prism.
 * @returns The weights, or the name of the material without a unit weight.
 */
export function weighPrism(
  document: SectionDocument,
  { foot, direction, depth, width, bedHead }: SoilPrism,
): PrismWeight | { missing: string } {
  const base = foot[1] - depth;
  const columns = 16;
  let [total, thickness, water] = [0, 0, 0];
  for (let i = 0; i < columns; i++) {
    let top = base;
    for (const piece of cutColumn(document, foot[0] + (direction * width * (i + 0.5)) / columns)) {
      // upward from the base without a gap
      if (piece.top <= top || piece.bottom > top + 1e-9 * depth) continue;
      if (piece.material.saturatedUnitWeight === undefined) return { missing: piece.material.name };
      total += (piece.material.saturatedUnitWeight * (piece.top - top)) / columns;
      thickness += (piece.top - top) / columns;
      top = piece.top;
    }
    water += (waterUnitWeight * Math.max(0, bedHead - top)) / columns;
  }
  return { total, submerged: total - waterUnitWeight * thickness, water };
}
