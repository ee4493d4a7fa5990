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
  return catchReason(() => {
    const axes = readGround(document).map(readAxes);
    const [first] = axes;
    requireThat(first !== undefined, 'There is no ground.');
    requireThat(
      axes.every((one) => isSame(one, first)),
      mixed,
    );
    return { status: 'covered', section: layOutWith(document, situation, first) };
  });
}

/** Two uniform sections that enclose a mixed one, or the reason why not. */
export type BoundRecognition =
  | { readonly status: 'covered'; readonly low: RecognisedSection; readonly high: RecognisedSection }
  | { readonly status: 'not-covered'; readonly reason: string };

/** Beyond this contrast the two enclosing discharges say nothing about the one between. */
const greatestContrast = 30;

/**
 * Encloses a section of mixed ground between two uniform ones: all of it as tight as its tightest part, and as loose as its loosest.
 *
 * Raising a permeability anywhere never lowers the discharge between two levels, so its discharge lies between theirs.
 *
 * @param document - The section.
 * @param situation - Gives the levels.
 * @returns Both, or the reason why the section is not covered.
 * @source Rayleigh's monotonicity; Pólya & Szegő (1951), Isoperimetric Inequalities in Mathematical Physics, ch. 2.
 */
export function recogniseBounds(document: SectionDocument, situation: Situation): BoundRecognition {
  return catchReason(() => {
    const axes = readGround(document).map(encloseAxes);
    const low = {
      kx: Math.min(...axes.map((one) => one.low.kx)),
      kz: Math.min(...axes.map((one) => one.low.kz)),
    };
    const high = {
      kx: Math.max(...axes.map((one) => one.high.kx)),
      kz: Math.max(...axes.map((one) => one.high.kz)),
    };
    requireThat(
      Math.max(high.kx / low.kx, high.kz / low.kz) <= greatestContrast,
      'The permeabilities of the ground differ too much for the method, which takes one uniform layer.',
    );
    return {
      status: 'covered',
      low: layOutWith(document, situation, low),
      high: layOutWith(document, situation, high),
    };
  });
}

/** Permeability along x and upward, m/s. */
interface Axes {
  readonly kx: number;
  readonly kz: number;
}

const mixed = 'The ground has more than one permeability; the method takes one uniform layer.';

function isSame(a: Axes, b: Axes): boolean {
  return Math.abs(a.kx / b.kx - 1) < 1e-9 && Math.abs(a.kz / b.kz - 1) < 1e-9;
}

function catchReason<T>(read: () => T): T | { readonly status: 'not-covered'; readonly reason: string } {
  try {
    return read();
  } catch (reason) {
    if (reason instanceof NotCovered) return { status: 'not-covered', reason: reason.reason };
    throw reason;
  }
}

function readGround(document: SectionDocument): Material[] {
  requireThat(document.geometry === 'plane', 'The method is for plane sections.');
  return document.zones.map(({ material }) => document.materials.find(({ id }) => id === material)!);
}

function layOutWith(document: SectionDocument, situation: Situation, { kx, kz }: Axes): RecognisedSection {
  const horizontalScale = Math.sqrt(kz / kx);
  const layout = readLayout(document, situation, horizontalScale);
  return { ...assembleFragments(layout), permeability: Math.sqrt(kx * kz), horizontalScale };
}

/** Level and upright axes as they are; inclined ones between two circles, which enclose their ellipse. */
function encloseAxes(material: Material): { low: Axes; high: Axes } {
  const { kMajor, kMinor } = material;
  if (isUpright(material)) {
    const axes = readAxes(material);
    return { low: axes, high: axes };
  }
  const [low, high] = [Math.min(kMajor, kMinor), Math.max(kMajor, kMinor)];
  return { low: { kx: low, kz: low }, high: { kx: high, kz: high } };
}

function isUpright({ kMajor, kMinor, angle }: Material): boolean {
  const turns = angle / 90;
  return kMajor === kMinor || Math.abs(turns - Math.round(turns)) < 1e-6;
}

function readAxes(material: Material): Axes {
  const { name, kMajor, kMinor, angle } = material;
  requireThat(
    isUpright(material),
    `The axes of “${name}” are inclined; the transformed section needs them level and upright.`,
  );
  return Math.round(angle / 90) % 2 === 0 ? { kx: kMajor, kz: kMinor } : { kx: kMinor, kz: kMajor };
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
