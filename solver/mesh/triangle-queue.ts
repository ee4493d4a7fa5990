// Triangles waiting for refinement, least key first; ties in the order of arrival, so that runs repeat exactly.

/** A binary heap of triangles with the generation they were judged in. */
export class TriangleQueue {
  size = 0;
  /** Triangle and generation last taken. */
  triangle = -1;
  generation = -1;
  #keys = new Float64Array(1024);
  #triangles = new Int32Array(1024);
  #generations = new Int32Array(1024);

  /**
   * Adds a triangle.
   *
   * @param key - Its rank.
   * @param triangle - Its index.
   * @param generation - Its generation now.
   */
  push(key: number, triangle: number, generation: number): void {
    if (this.size === this.#keys.length) this.#grow();
    let at = this.size++;
    while (at > 0) {
      const parent = (at - 1) >> 1;
      if (this.#keys[parent] <= key) break;
      this.#copy(parent, at);
      at = parent;
    }
    this.#put(at, key, triangle, generation);
  }

  /**
   * Takes the triangle of least key into `triangle` and `generation`.
   *
   * @returns False where the queue is empty.
   */
  pop(): boolean {
    if (this.size === 0) return false;
    this.triangle = this.#triangles[0];
    this.generation = this.#generations[0];
    const last = --this.size;
    const key = this.#keys[last];
    let at = 0;
    for (let child = 1; child < last; child = 2 * at + 1) {
      if (child + 1 < last && this.#keys[child + 1] < this.#keys[child]) child++;
      if (this.#keys[child] >= key) break;
      this.#copy(child, at);
      at = child;
    }
    this.#put(at, key, this.#triangles[last], this.#generations[last]);
    return true;
  }

  #copy(from: number, to: number): void {
    this.#put(to, this.#keys[from], this.#triangles[from], this.#generations[from]);
  }

  #put(at: number, key: number, triangle: number, generation: number): void {
    this.#keys[at] = key;
    this.#triangles[at] = triangle;
    this.#generations[at] = generation;
  }

  #grow(): void {
    const keys = new Float64Array(2 * this.#keys.length);
    const triangles = new Int32Array(keys.length);
    const generations = new Int32Array(keys.length);
    keys.set(this.#keys);
    triangles.set(this.#triangles);
    generations.set(this.#generations);
    this.#keys = keys;
    this.#triangles = triangles;
    this.#generations = generations;
  }
}
