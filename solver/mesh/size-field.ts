// The wanted element size at any place: the least over sources of (size + slope × distance), below a ceiling.

/** A place where a given size is wanted. */
export interface SizeSource {
  readonly x: number;
  readonly y: number;
  /** metres, > 0 */
  readonly size: number;
}

const leafSize = 6;

/** Sources in a tree of boxes; asking prunes boxes that cannot lower the answer. */
export class SizeField {
  readonly #ceiling: number;
  readonly #slope: number;
  readonly #x: Float64Array;
  readonly #y: Float64Array;
  readonly #size: Float64Array;
  /** Boxes: left, right, bottom, top, least size, first source, end source, next box where this one is pruned. */
  readonly #boxes: number[] = [];
  // Source that ruled the last answer: the next question is most often asked nearby. It only speeds up the pruning.
  #last = -1;

  /**
   * Builds the field.
   *
   * @param sources - Where sizes are wanted.
   * @param slope - Growth of the size per metre of distance.
   * @param ceiling - Largest size anywhere, metres.
   */
  constructor(sources: readonly SizeSource[], slope: number, ceiling: number) {
    this.#ceiling = ceiling;
    this.#slope = slope;
    const kept = sources.filter(({ size }) => size < ceiling);
    this.#x = Float64Array.from(kept, ({ x }) => x);
    this.#y = Float64Array.from(kept, ({ y }) => y);
    this.#size = Float64Array.from(kept, ({ size }) => size);
    if (kept.length > 0) this.#build(0, kept.length);
  }

  // Sorts sources first to end into a box and its two halves.
  #build(first: number, end: number): void {
    const at = this.#boxes.length;
    const xs = this.#x.subarray(first, end);
    const ys = this.#y.subarray(first, end);
    let [left, right, bottom, top, least] = [Infinity, -Infinity, Infinity, -Infinity, Infinity];
    for (let i = 0; i < xs.length; i++) {
      left = Math.min(left, xs[i]);
      right = Math.max(right, xs[i]);
      bottom = Math.min(bottom, ys[i]);
      top = Math.max(top, ys[i]);
      least = Math.min(least, this.#size[first + i]);
    }
    const leaf = end - first <= leafSize;
    this.#boxes.push(left, right, bottom, top, least, first, leaf ? end : -1, 0);
    if (!leaf) {
      this.#sort(first, end, right - left >= top - bottom ? xs : ys);
      const middle = (first + end) >> 1;
      this.#build(first, middle);
      this.#build(middle, end);
    }
    this.#boxes[at + 7] = this.#boxes.length;
  }

  #sort(first: number, end: number, by: Float64Array): void {
    const order = Array.from({ length: end - first }, (_, i) => i).sort((a, b) => by[a] - by[b] || a - b);
    for (const values of [this.#x, this.#y, this.#size]) {
      const copy = values.slice(first, end);
      order.forEach((from, to) => (values[first + to] = copy[from]));
    }
  }

  /**
   * Gives the wanted size at a place.
   *
   * @param px - metres
   * @param py - metres
   * @returns Edge length, metres.
   */
  sizeAt(px: number, py: number): number {
    const boxes = this.#boxes;
    const slope = this.#slope;
    let best = this.#ceiling;
    let last = this.#last;
    if (last >= 0) {
      const ux = this.#x[last] - px;
      const uy = this.#y[last] - py;
      best = Math.min(best, this.#size[last] + slope * Math.sqrt(ux * ux + uy * uy));
    }
    for (let at = 0; at < boxes.length;) {
      const dx = Math.max(boxes[at] - px, px - boxes[at + 1], 0);
      const dy = Math.max(boxes[at + 2] - py, py - boxes[at + 3], 0);
      const room = best - boxes[at + 4];
      if (room <= 0 || slope * slope * (dx * dx + dy * dy) >= room * room) {
        at = boxes[at + 7];
        continue;
      }
      const end = boxes[at + 6];
      for (let i = boxes[at + 5]; i < end; i++) {
        const ux = this.#x[i] - px;
        const uy = this.#y[i] - py;
        const size = this.#size[i] + slope * Math.sqrt(ux * ux + uy * uy);
        if (size < best) {
          best = size;
          last = i;
        }
      }
      at += 8;
    }
    this.#last = last;
    return best;
  }
}
