// Cuts a covered section into its fragments, in the direction of flow.
import type { Fragment } from './fragments';
import { type Bed, type Layout, type RecognisedSection, requireThat, type UprightWall } from './layout';

type Assembled = Omit<RecognisedSection, 'permeability' | 'horizontalScale'>;

/** Beyond this many thicknesses an end is remote for the ends of a floor, whose exact finite form is not at hand. */
const remoteFloorEnd = 2;

/**
 * Cuts a covered section into fragments.
 *
 * @param layout - Beds, walls and floors.
 * @returns The fragments from the higher to the lower level.
 */
export function assembleFragments(layout: Layout): Assembled {
  const { beds } = layout;
  if (beds.length === 3) return assemblePit(layout);
  const [left, right] = [beds[0]!, beds[1]!];
  const chain = chainBetween(layout, left, right, layout.walls);
  const isLeftHigh = left.head > right.head;
  const fragments = isLeftHigh ? chain.fragments : [...chain.fragments].reverse();
  return {
    ...chain,
    fragments,
    head: Math.abs(left.head - right.head),
    flows: 1,
    exitEdge: isLeftHigh ? right.edge : left.edge,
  };
}

/** A pit drawn whole: the left half stands for both. */
function assemblePit(layout: Layout): Assembled {
  const { beds, walls, tolerance } = layout;
  const [left, middle, right] = [beds[0]!, beds[1]!, beds[2]!];
  const axis = (middle.from + middle.to) / 2;
  const isMirrored =
    left.head === right.head &&
    Math.abs(left.elevation - right.elevation) <= tolerance &&
    Math.abs(left.to + right.from - 2 * axis) <= 2 * tolerance &&
    Math.abs(left.from + right.to - 2 * axis) <= 2 * tolerance &&
    walls.every((wall) =>
      walls.some(
        ({ x, tip }) =>
          Math.abs(x + wall.x - 2 * axis) <= 2 * tolerance && Math.abs(tip - wall.tip) <= tolerance,
      ),
    );
  requireThat(isMirrored, 'Three beds are covered only as a pit that is its own mirror image.');
  const chain = chainBetween(
    layout,
    left,
    { ...middle, to: axis },
    walls.filter(({ x }) => x < axis),
  );
  requireThat(chain.kind === 'single-wall', 'The walls of a pit are covered without floors.');
  const isInward = left.head > middle.head;
  return {
    kind: 'symmetric-pit',
    floor: null,
    fragments: isInward ? chain.fragments : [...chain.fragments].reverse(),
    head: Math.abs(left.head - middle.head),
    flows: 2,
    exitEdge: isInward ? middle.edge : left.edge,
  };
}

interface Chain {
  readonly kind: RecognisedSection['kind'];
  readonly floor: RecognisedSection['floor'];
  readonly fragments: Fragment[];
}

/** Fragments from the left bed to the right one. */
function chainBetween(layout: Layout, left: Bed, right: Bed, walls: readonly UprightWall[]): Chain {
  const { tolerance, base, horizontalScale: scale } = layout;
  const [from, to] = [left.to, right.from];
  const isOutside = walls.some(({ x }) => x < from - tolerance || x > to + tolerance);
  requireThat(!isOutside, 'A wall stands away from the structure.');
  requireThat(
    walls.every(({ tip }) => tip > base + tolerance),
    'A wall reaches the base: no water passes.',
  );
  if (to - from <= tolerance) return singleWall(layout, left, right, walls);
  const level = layout.surfaceAt((from + to) / 2);
  requireThat(
    level <= Math.min(left.elevation, right.elevation) + tolerance,
    'The floor lies above a bed, which leaves ground beside it open.',
  );
  requireThat(
    walls.every(({ top }) => top >= level - tolerance),
    'A wall does not reach the floor.',
  );
  const isEmbedded = [left, right].map(({ elevation }) => elevation - level > tolerance);
  const stops = walls.map(({ x, tip }) => ({ x, depth: Math.max(0, level - tip) }));
  if (stops.length === 0 && !isEmbedded[0] && !isEmbedded[1]) {
    requireRemote(layout, [left, right]);
    const floor = { width: scale * (to - from), thickness: level - base };
    return { kind: 'flat-floor', floor, fragments: [] };
  }
  // the side of an embedded floor works as a wall as deep as the floor
  if (isEmbedded[0] && !stops.some(({ x }) => x <= from + tolerance)) stops.unshift({ x: from, depth: 0 });
  if (isEmbedded[1] && !stops.some(({ x }) => x >= to - tolerance)) stops.push({ x: to, depth: 0 });
  return { kind: 'floor-with-cutoffs', floor: null, fragments: cutFloor(layout, left, right, level, stops) };
}

function singleWall(layout: Layout, left: Bed, right: Bed, walls: readonly UprightWall[]): Chain {
  const { base, tolerance, horizontalScale: scale } = layout;
  const [wall, more] = walls;
  requireThat(wall !== undefined && more === undefined, 'Two beds meet without one wall between them.');
  const low = Math.min(left.elevation, right.elevation);
  requireThat(wall.tip < low - tolerance && wall.top >= low - tolerance, 'The wall has no embedment.');
  const end = (bed: Bed): Fragment => ({
    type: 'II',
    embedment: bed.elevation - wall.tip,
    thickness: bed.elevation - base,
    width: scale * (bed.to - bed.from),
  });
  return { kind: 'single-wall', floor: null, fragments: [end(left), end(right)] };
}

interface Stop {
  readonly x: number;
  /** Of the wall below the floor, 0 where an embedded floor ends without one. */
  readonly depth: number;
}

function cutFloor(layout: Layout, left: Bed, right: Bed, level: number, stops: readonly Stop[]): Fragment[] {
  const { base, tolerance, horizontalScale: scale } = layout;
  const thickness = level - base;
  const end = (bed: Bed, stop: Stop, edge: number): Fragment => {
    const gap = scale * Math.abs(stop.x - edge);
    if (gap <= scale * tolerance) {
      return {
        type: 'II',
        embedment: stop.depth + bed.elevation - level,
        thickness: bed.elevation - base,
        width: scale * (bed.to - bed.from),
      };
    }
    requireRemote(layout, [bed]);
    return { type: 'III', floor: gap, embedment: stop.depth, thickness };
  };
  const between = stops.slice(1).map((stop, i): Fragment => {
    const before = stops[i]!;
    return internal(scale * (stop.x - before.x), before.depth, stop.depth, thickness);
  });
  return [end(left, stops[0]!, left.to), ...between, end(right, stops.at(-1)!, right.from)];
}

/** The type that Harr's table names for the geometry; IV and V are special cases of VI. */
function internal(floor: number, first: number, second: number, thickness: number): Fragment {
  if (first === 0 && second === 0) return { type: 'I', length: floor, thickness };
  if (first === 0 || second === 0)
    return { type: 'IV', floor, embedment: Math.max(first, second), thickness };
  if (Math.abs(first - second) <= 1e-9 * thickness) return { type: 'V', floor, embedment: first, thickness };
  requireThat(floor >= Math.abs(first - second), 'The walls are too unequal for so short a floor.');
  return { type: 'VI', floor, first, second, thickness };
}

function requireRemote({ base, horizontalScale }: Layout, beds: readonly Bed[]): void {
  for (const { from, to, elevation } of beds) {
    requireThat(
      horizontalScale * (to - from) >= remoteFloorEnd * (elevation - base) * 0.999,
      'A bed is drawn shorter than twice the thickness of the layer (on the transformed section), so its end is felt; the method takes remote ends.',
    );
  }
}
