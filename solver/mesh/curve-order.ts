// Order of points along a space-filling curve: near in the list is near in the plane.

const lastCell = 32767;
const indexSpan = 8388608;

/**
 * Orders points along a Hilbert curve over their bounding square.
 *
 * @param x - x of the points.
 * @param y - y of the points.
 * @param count - How many of them, at most 2^23.
 * @returns Indices 0 to count − 1 in curve order; points of one cell in index order.
 * @source D. Hilbert (1891), Mathematische Annalen 38; the bit form is common practice.
 */
export function orderAlongCurve(x: ArrayLike<number>, y: ArrayLike<number>, count: number): Int32Array {
  let [left, right, bottom, top] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let i = 0; i < count; i++) {
    left = Math.min(left, x[i]);
    right = Math.max(right, x[i]);
    bottom = Math.min(bottom, y[i]);
    top = Math.max(top, y[i]);
  }
  const scale = lastCell / Math.max(right - left, top - bottom, Number.MIN_VALUE);
  const keys = new Float64Array(count); // 30 bits of place, 23 of index: sorts as numbers, without a comparison function
  for (let i = 0; i < count; i++) {
    keys[i] =
      hilbertKey(Math.floor((x[i] - left) * scale), Math.floor((y[i] - bottom) * scale)) * indexSpan + i;
  }
  keys.sort();
  return Int32Array.from(keys, (key) => key % indexSpan);
}

// Place of a cell along the curve of order 15.
function hilbertKey(column: number, row: number): number {
  let key = 0;
  let c = column;
  let r = row;
  for (let s = 16384; s > 0; s >>= 1) {
    const right = (c & s) > 0 ? 1 : 0;
    const upper = (r & s) > 0 ? 1 : 0;
    key = key * 4 + ((3 * right) ^ upper);
    if (upper === 0) {
      if (right === 1) {
        c = lastCell - c;
        r = lastCell - r;
      }
      const swap = c;
      c = r;
      r = swap;
    }
  }
  return key;
}
