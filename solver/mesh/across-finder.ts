// How far the ground reaches across from a point on a segment.
import { projectOntoSegment } from '../geometry/segments';
import type { Ground } from './ground';

const maxColumns = 256;

/** Segments in a grid, asked for the nearest one that faces a given segment. */
export class AcrossFinder {
  readonly #ground: Ground;
  readonly #reach: number;
  readonly #cell: number;
  readonly #left: number;
  readonly #bottom: number;
  readonly #cells = new Map<number, number[]>();
  readonly #asked: Int32Array;
  #ask = 0;

  /**
   * Indexes the ground's segments.
   *
   * @param ground - The ground.
   * @param reach - Widths from here on do not matter, metres, > 0.
   */
  constructor(ground: Ground, reach: number) {
    const { x, y, starts, ends } = ground;
    this.#ground = ground;
    this.#reach = reach;
    this.#cell = Math.max(reach, ground.size / maxColumns);
    this.#left = x.reduce((least, value) => Math.min(least, value), Infinity);
    this.#bottom = y.reduce((least, value) => Math.min(least, value), Infinity);
    this.#asked = new Int32Array(starts.length);
    for (let s = 0; s < starts.length; s++) {
      const [a, b] = [starts[s], ends[s]];
      this.#visit(
        Math.min(x[a], x[b]),
        Math.max(x[a], x[b]),
        Math.min(y[a], y[b]),
        Math.max(y[a], y[b]),
        (key) => {
          const list = this.#cells.get(key);
          if (list) list.push(s);
          else this.#cells.set(key, [s]);
        },
      );
    }
  }

  #visit(left: number, right: number, bottom: number, top: number, touch: (key: number) => void): void {
    const place = (value: number, from: number): number => Math.floor((value - from) / this.#cell);
    for (let i = place(left, this.#left); i <= place(right, this.#left); i++) {
      for (let j = place(bottom, this.#bottom); j <= place(top, this.#bottom); j++) touch(i * 65536 + j);
    }
  }

  /**
   * Measures the width of the ground across.
   *
   * @param segment - Segment the point lies on; it and those that share an end with it do not count.
   * @param hand - 1: look to its left, −1: to its right.
   * @param px - x of the point.
   * @param py - y of the point.
   * @returns Distance to the nearest segment seen within 45 degrees of square on, at most the reach, metres.
   */
  widthAt(segment: number, hand: number, px: number, py: number): number {
    const { x, y, starts, ends } = this.#ground;
    const [a, b] = [starts[segment], ends[segment]];
    const length = Math.hypot(x[b] - x[a], y[b] - y[a]);
    const nx = (-(y[b] - y[a]) / length) * hand;
    const ny = ((x[b] - x[a]) / length) * hand;
    let width = this.#reach;
    const ask = ++this.#ask;
    this.#visit(px - width, px + width, py - width, py + width, (key) => {
      for (const s of this.#cells.get(key) ?? []) {
        if (this.#asked[s] === ask) continue;
        this.#asked[s] = ask;
        const [c, d] = [starts[s], ends[s]];
        if (c === a || c === b || d === a || d === b) continue;
        const t = projectOntoSegment(px, py, x[c], y[c], x[d], y[d]);
        const ux = x[c] + t * (x[d] - x[c]) - px;
        const uy = y[c] + t * (y[d] - y[c]) - py;
        const distance = Math.hypot(ux, uy);
        if (distance < width && ux * nx + uy * ny > 0.7 * distance) width = distance;
      }
    });
    return width;
  }
}
