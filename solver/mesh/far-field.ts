// Sizes that grow further far from everything that disturbs the flow, as in the ends of a long section.
import type { SizeSource } from './size-field';
import { SizeField } from './size-field';

/** Anything that can be asked for an element size. */
export interface Sizing {
  /** Edge length wanted at a place, metres. */
  sizeAt(px: number, py: number): number;
}

/** Sizes, in metres, of a {@link FarField}. */
export interface FarSizes {
  /** Largest size within `reach` of a disturbance. */
  readonly near: number;
  /** Largest size anywhere. */
  readonly far: number;
  /** Distance from the disturbances at which the growth from `near` to `far` starts. */
  readonly reach: number;
}

const farSlope = 0.2;

/** A size field with one ceiling near the disturbances and a higher one far from all of them. */
export class FarField implements Sizing {
  readonly #fine: SizeField;
  readonly #distance: SizeField;
  readonly #sizes: FarSizes;

  /**
   * Builds the field.
   *
   * @param sources - Where small sizes are wanted.
   * @param disturbances - Places the growth keeps away from.
   * @param slope - Growth of the size per metre of distance from a source.
   * @param sizes - The two ceilings.
   */
  constructor(
    sources: readonly SizeSource[],
    disturbances: readonly SizeSource[],
    slope: number,
    sizes: FarSizes,
  ) {
    this.#fine = new SizeField(sources, slope, sizes.far);
    const spread = spreadOut(disturbances, sizes.reach / 4);
    this.#distance = new SizeField(
      spread.map(({ x, y }) => ({ x, y, size: 0 })),
      1,
      disturbances.length > 0 ? Infinity : 0,
    );
    this.#sizes = sizes;
  }

  /**
   * Gives the wanted size at a place.
   *
   * @param px - metres
   * @param py - metres
   * @returns Edge length, metres.
   */
  sizeAt(px: number, py: number): number {
    const { near, reach } = this.#sizes;
    const size = this.#fine.sizeAt(px, py);
    if (size <= near) return size;
    const beyond = this.#distance.sizeAt(px, py) - reach;
    return beyond <= 0 ? near : Math.min(size, near + farSlope * beyond);
  }
}

// One of the places in each square of a grid: enough for a distance, and few however rough the outline.
function spreadOut(places: readonly SizeSource[], cell: number): SizeSource[] {
  const taken = new Set<string>();
  return places.filter(({ x, y }) => {
    const key = `${Math.floor(x / cell)},${Math.floor(y / cell)}`;
    if (taken.has(key)) return false;
    taken.add(key);
    return true;
  });
}
