// Least squares of one patch: normal equations in reused buffers, an orthogonal method where they are too ill-conditioned.
import { Matrix, SVD } from 'ml-matrix';
import type { Mesh } from '../mesh/mesh';
import type { Patches } from './patches';

/** Terms of a complete quadratic. */
const terms = 6;
/** Fewest elements for a quadratic fit: their samples outnumber the terms twice. */
const wantedElements = 4;
const mostRings = 3;
/** Smallest pivot relative to the largest for which the normal equations are trusted: half the digits are left. */
const pivotRatio = 1e-9;
/** Singular values below this part of the largest are combinations of terms that the samples cannot tell apart. */
const singularRatio = 1e-6;

/** Fits polynomials to sampled gradients, patch by patch. */
export class PatchFit {
  /** Numbers kept a patch: centre x, centre y, 1/scale, then six terms for each component. */
  static readonly size = 3 + 2 * terms;

  readonly #mesh: Mesh;
  readonly #perElement: number;
  readonly #points: Float64Array;
  readonly #values: Float64Array;
  readonly #normal = new Float64Array(terms * terms);
  readonly #right = new Float64Array(2 * terms);
  readonly #basis = new Float64Array(terms);
  readonly #marks: Int32Array;
  #list: number[] = [];

  /**
   * @param mesh - The mesh.
   * @param perElement - Samples in each element.
   * @param points - x, y of each sample, element by element.
   * @param values - Gradient at each sample, in the same order.
   */
  constructor(mesh: Mesh, perElement: number, points: Float64Array, values: Float64Array) {
    this.#mesh = mesh;
    this.#perElement = perElement;
    this.#points = points;
    this.#values = values;
    this.#marks = new Int32Array(mesh.elementCount).fill(-1);
  }

  /**
   * Fits one patch: quadratic where there are samples enough (linear on an order 1 mesh), less where the ground's own
   * extent allows no more.
   *
   * @param patches - All patches.
   * @param patch - Which to fit.
   * @param out - Receives {@link PatchFit.size} numbers at `size * patch`.
   */
  fit(patches: Patches, patch: number, out: Float64Array): void {
    this.#collect(patches, patch);
    const count = this.#list.length * this.#perElement;
    const node = patches.nodes[patch];
    const x0 = this.#mesh.coordinates[2 * node];
    const y0 = this.#mesh.coordinates[2 * node + 1];
    const scale = 1 / this.#measureReach(x0, y0);
    const offset = PatchFit.size * patch;
    out[offset] = x0;
    out[offset + 1] = y0;
    out[offset + 2] = scale;
    const full = this.#mesh.order === 1 ? 3 : terms;
    const used = count > full ? full : count >= 3 ? 3 : 1;
    this.#assemble(used, x0, y0, scale);
    if (!this.#solveNormal(used)) this.#solveOrthogonal(used, x0, y0, scale);
    for (let t = 0; t < used; t++) {
      out[offset + 3 + t] = this.#right[2 * t];
      out[offset + 3 + terms + t] = this.#right[2 * t + 1];
    }
  }

  /**
   * Evaluates a fitted patch.
   *
   * @param coefficients - As filled by `fit`.
   * @param patch - Which patch.
   * @param x - Metres.
   * @param y - Metres.
   * @param out - Receives ∂h/∂x, ∂h/∂y.
   */
  static evaluate(coefficients: Float64Array, patch: number, x: number, y: number, out: Float64Array): void {
    const o = PatchFit.size * patch;
    const c = coefficients;
    const u = (x - c[o]) * c[o + 2];
    const v = (y - c[o + 1]) * c[o + 2];
    const first = o + 3;
    const second = first + terms;
    out[0] =
      c[first] +
      u * (c[first + 1] + u * c[first + 3] + v * c[first + 4]) +
      v * (c[first + 2] + v * c[first + 5]);
    out[1] =
      c[second] +
      u * (c[second + 1] + u * c[second + 3] + v * c[second + 4]) +
      v * (c[second + 2] + v * c[second + 5]);
  }

  // Elements of the patch, with rings added through open sides of the same class until a quadratic is well posed.
  #collect({ starts, members, classes }: Patches, patch: number): void {
    const list: number[] = [];
    for (let m = starts[patch]; m < starts[patch + 1]; m++) {
      list.push(members[m]);
      this.#marks[members[m]] = patch;
    }
    for (let ring = 0, from = 0; ring < mostRings && list.length < wantedElements; ring++) {
      const to = list.length;
      for (let i = from; i < to; i++) {
        for (let s = 0; s < 3; s++) {
          const n = this.#mesh.neighbours[3 * list[i] + s];
          if (n < 0 || this.#marks[n] === patch || classes[n] !== classes[list[0]]) continue;
          this.#marks[n] = patch;
          list.push(n);
        }
      }
      from = to;
      if (list.length === to) break;
    }
    this.#list = list;
  }

  #measureReach(x0: number, y0: number): number {
    let reach = 0;
    for (const e of this.#list) {
      for (let s = 0; s < this.#perElement; s++) {
        const at = 2 * (this.#perElement * e + s);
        reach = Math.max(reach, Math.abs(this.#points[at] - x0), Math.abs(this.#points[at + 1] - y0));
      }
    }
    return reach;
  }

  #fillBasis(u: number, v: number): void {
    this.#basis[0] = 1;
    this.#basis[1] = u;
    this.#basis[2] = v;
    this.#basis[3] = u * u;
    this.#basis[4] = u * v;
    this.#basis[5] = v * v;
  }

  #assemble(used: number, x0: number, y0: number, scale: number): void {
    const [normal, right, basis, points, values] = [
      this.#normal,
      this.#right,
      this.#basis,
      this.#points,
      this.#values,
    ];
    normal.fill(0);
    right.fill(0);
    for (const e of this.#list) {
      for (let s = 0; s < this.#perElement; s++) {
        const at = 2 * (this.#perElement * e + s);
        this.#fillBasis((points[at] - x0) * scale, (points[at + 1] - y0) * scale);
        for (let i = 0; i < used; i++) {
          const b = basis[i];
          for (let j = 0; j <= i; j++) normal[terms * i + j] += b * basis[j];
          right[2 * i] += b * values[at];
          right[2 * i + 1] += b * values[at + 1];
        }
      }
    }
  }

  // Cholesky in place; false where a pivot says that half the digits are gone.
  #solveNormal(used: number): boolean {
    const a = this.#normal;
    const b = this.#right;
    const largest = a[0];
    for (let i = 0; i < used; i++) {
      for (let j = 0; j <= i; j++) {
        let sum = a[terms * i + j];
        for (let k = 0; k < j; k++) sum -= a[terms * i + k] * a[terms * j + k];
        if (i > j) a[terms * i + j] = sum / a[terms * j + j];
        else if (sum > pivotRatio * largest) a[terms * i + i] = Math.sqrt(sum);
        else return false;
      }
    }
    for (let r = 0; r < 2; r++) {
      for (let i = 0; i < used; i++) {
        let sum = b[2 * i + r];
        for (let k = 0; k < i; k++) sum -= a[terms * i + k] * b[2 * k + r];
        b[2 * i + r] = sum / a[terms * i + i];
      }
      for (let i = used - 1; i >= 0; i--) {
        let sum = b[2 * i + r];
        for (let k = i + 1; k < used; k++) sum -= a[terms * k + i] * b[2 * k + r];
        b[2 * i + r] = sum / a[terms * i + i];
      }
    }
    return true;
  }

  // Least norm by singular values: terms that the samples cannot tell apart stay small.
  #solveOrthogonal(used: number, x0: number, y0: number, scale: number): void {
    const rows: number[][] = [];
    const wanted: number[][] = [];
    for (const e of this.#list) {
      for (let s = 0; s < this.#perElement; s++) {
        const at = 2 * (this.#perElement * e + s);
        this.#fillBasis((this.#points[at] - x0) * scale, (this.#points[at + 1] - y0) * scale);
        rows.push(Array.from(this.#basis.subarray(0, used)));
        wanted.push([this.#values[at], this.#values[at + 1]]);
      }
    }
    const { diagonal, leftSingularVectors, rightSingularVectors } = new SVD(new Matrix(rows), {
      autoTranspose: true,
    });
    const along = leftSingularVectors.transpose().mmul(new Matrix(wanted));
    for (let k = 0; k < along.rows; k++) {
      along.mulRow(k, diagonal[k] > singularRatio * diagonal[0] ? 1 / diagonal[k] : 0);
    }
    const solution = rightSingularVectors.mmul(along);
    for (let t = 0; t < used; t++) {
      this.#right[2 * t] = solution.get(t, 0);
      this.#right[2 * t + 1] = solution.get(t, 1);
    }
  }
}
