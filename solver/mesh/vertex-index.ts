// Points found again by place: two within the snap distance are one.

/** Vertices with a hash grid over them. */
export class VertexIndex {
  readonly x: number[] = [];
  readonly y: number[] = [];
  readonly #cells = new Map<string, number[]>();
  readonly #snap: number;

  /**
   * Starts an empty index.
   *
   * @param snap - Distance within which two points are one, metres, > 0.
   */
  constructor(snap: number) {
    this.#snap = snap;
  }

  /**
   * Finds the vertex at a place or makes one.
   *
   * @param x - metres
   * @param y - metres
   * @returns Index of the nearest vertex within the snap distance, else of a new one.
   */
  find(x: number, y: number): number {
    const cell = 2 * this.#snap;
    const column = Math.floor(x / cell);
    const row = Math.floor(y / cell);
    let best = -1;
    let bestDistance = this.#snap;
    for (let i = column - 1; i <= column + 1; i++) {
      for (let j = row - 1; j <= row + 1; j++) {
        for (const v of this.#cells.get(`${i},${j}`) ?? []) {
          const distance = Math.hypot(this.x[v] - x, this.y[v] - y);
          if (distance < bestDistance || (distance === bestDistance && best < 0)) {
            best = v;
            bestDistance = distance;
          }
        }
      }
    }
    if (best >= 0) return best;
    const vertex = this.x.length;
    this.x.push(x);
    this.y.push(y);
    const key = `${column},${row}`;
    const list = this.#cells.get(key);
    if (list) list.push(vertex);
    else this.#cells.set(key, [vertex]);
    return vertex;
  }
}
