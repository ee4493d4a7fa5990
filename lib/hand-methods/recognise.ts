// Which sections the hand methods cover, and what a covered one is made of. Everything here is a condition of the method, not of the solver.
import { createGround } from '@/lib/domain/ground';
import { cutColumn } from '@/lib/domain/ground-column';
import type { Material, Point, SectionDocument, Situation } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { assembleFragments } from './assemble-fragments';
import {
  type Bed,
  type Layout,
  NotCovered,
  type RecognisedSection,
  requireThat,
  type UprightWall,
} from './layout';

/** Covered, or the reason why not. */
export type Recognition =
  | { readonly status: 'covered'; readonly section: RecognisedSection }
  | { readonly status: 'not-covered'; readonly reason: string };

/**
 * Decides whether the hand methods cover a section, and lays it out if they do.
 *
 * Covered: one permeability with level and upright axes throughout, on a level impervious base, between two water levels over level beds, past
 * upright watertight walls and level floors; anisotropy through the transformed section.
 *
 * @param document - The section.
 * @param situation - Gives the levels.
 * @returns The parts of the calculation, or the reason why the section is not covered.
 * @source Harr (1962), ch. 6 (conditions of the method); Samsioe (1931), Casagrande (1937) (transformed section).
 */
export function recogniseSection(document: SectionDocument, situation: Situation): Recognition {
  try {
    const { permeability, horizontalScale } = readPermeability(document);
    const layout = readLayout(document, situation, horizontalScale);
    return { status: 'covered', section: { ...assembleFragments(layout), permeability, horizontalScale } };
  } catch (reason) {
    if (reason instanceof NotCovered) return { status: 'not-covered', reason: reason.reason };
    throw reason;
  }
}

function readPermeability(document: SectionDocument): { permeability: number; horizontalScale: number } {
  requireThat(document.geometry === 'plane', 'The method is for plane sections.');
  const used = document.zones.map(({ material }) => document.materials.find(({ id }) => id === material)!);
  const axes = used.map(readAxes);
  const [first] = axes;
  requireThat(first !== undefined, 'There is no ground.');
  const isSame = axes.every(
    ({ kx, kz }) => Math.abs(kx / first.kx - 1) < 1e-9 && Math.abs(kz / first.kz - 1) < 1e-9,
  );
  requireThat(isSame, 'The ground has more than one permeability; the method takes one uniform layer.');
  return { permeability: Math.sqrt(first.kx * first.kz), horizontalScale: Math.sqrt(first.kz / first.kx) };
}

function readAxes({ name, kMajor, kMinor, angle }: Material): { kx: number; kz: number } {
  const turns = angle / 90;
  const isUpright = Math.abs(turns - Math.round(turns)) < 1e-6;
  requireThat(
    isUpright || kMajor === kMinor,
    `The axes of “${name}” are inclined; the transformed section needs them level and upright.`,
  );
  return Math.round(turns) % 2 === 0 ? { kx: kMajor, kz: kMinor } : { kx: kMinor, kz: kMajor };
}

function readLayout(document: SectionDocument, situation: Situation, horizontalScale: number): Layout {
  requireThat(document.drains.length === 0, 'Drains are outside the method.');
  const ground = createGround(document);
  const { xMin, xMax, yMin } = ground.bounds;
  const tolerance = 1e-4 * ground.size;
  const beds = readBeds(document, situation, tolerance);
  const walls = document.barriers
    .map(({ path, conductance }) => {
      requireThat(conductance === 0, 'A wall leaks; the method takes watertight walls.');
      return readWall(path, tolerance);
    })
    .sort((a, b) => a.x - b.x);
  const surfaceAt = (x: number): number => {
    // a little aside, since an outline may run down exactly here
    const column = cutColumn(document, x + 1e-7 * ground.size);
    const joined = column.every((piece, i) => i === 0 || piece.bottom - column[i - 1]!.top <= tolerance);
    requireThat(column.length > 0 && joined, 'The ground has a gap.');
    requireThat(Math.abs(column[0]!.bottom - yMin) <= tolerance, 'The base of the layer is not level.');
    return column.at(-1)!.top;
  };
  requireThat(
    Math.abs(beds[0]!.from - xMin) <= tolerance && Math.abs(beds.at(-1)!.to - xMax) <= tolerance,
    'The beds do not reach the ends of the drawn ground.',
  );
  const layout = { base: yMin, beds, walls, tolerance, horizontalScale, surfaceAt };
  checkSurface(layout);
  return layout;
}

function readBeds(document: SectionDocument, situation: Situation, tolerance: number): Bed[] {
  const beds: Bed[] = [];
  for (const { id, path, condition } of document.edges) {
    if (condition.type === 'impervious') continue;
    const head = levelOf(condition, situation);
    requireThat(head !== null, 'An edge has a condition other than a water level.');
    const xs = path.map(([x]) => x);
    const ys = path.map(([, y]) => y);
    const elevation = ys[0]!;
    requireThat(
      Math.max(...ys) - Math.min(...ys) <= tolerance,
      'A bed is not level, or an end of the section is open.',
    );
    beds.push({ edge: id, from: Math.min(...xs), to: Math.max(...xs), elevation, head });
  }
  beds.sort((a, b) => a.from - b.from);
  const joined: Bed[] = [];
  for (const bed of beds) {
    const last = joined.at(-1);
    const continues =
      last &&
      Math.abs(last.to - bed.from) <= tolerance &&
      Math.abs(last.elevation - bed.elevation) <= tolerance &&
      last.head === bed.head;
    if (continues) joined[joined.length - 1] = { ...last, to: bed.to };
    else joined.push(bed);
  }
  const levels = new Set(joined.map(({ head }) => head));
  requireThat(levels.size === 2, 'The method takes exactly two water levels.');
  requireThat(joined.length <= 3, 'There are more than three beds.');
  return joined;
}

function readWall(path: readonly Point[], tolerance: number): UprightWall {
  const xs = path.map(([x]) => x);
  const ys = path.map(([, y]) => y);
  const x = xs[0]!;
  requireThat(
    Math.max(...xs) - Math.min(...xs) <= tolerance,
    'A wall is inclined; the method takes upright walls.',
  );
  return { x, top: Math.max(...ys), tip: Math.min(...ys) };
}

/** The ground's surface must be the beds, and level floors between them. */
function checkSurface({ beds, walls, tolerance, surfaceAt }: Layout): void {
  for (const { from, to, elevation } of beds) {
    for (let i = 1; i < 20; i++) {
      const y = surfaceAt(from + ((to - from) * i) / 20);
      requireThat(Math.abs(y - elevation) <= tolerance, 'A bed is buried or does not lie on the surface.');
    }
  }
  for (let i = 1; i < beds.length; i++) {
    const [from, to] = [beds[i - 1]!.to, beds[i]!.from];
    if (to - from <= tolerance) continue;
    const level = surfaceAt((from + to) / 2);
    for (let j = 1; j < 40; j++) {
      const y = surfaceAt(from + ((to - from) * j) / 40);
      requireThat(
        Math.abs(y - level) <= tolerance,
        'The base of the structure is not level; the method takes level floors.',
      );
    }
  }
  const isSpread = walls.every((wall, i) => i === 0 || wall.x - walls[i - 1]!.x > tolerance);
  requireThat(isSpread, 'Two walls stand in one line.');
}
