import { Matrix, QrDecomposition } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { buildMesh } from '../mesh/build-mesh';
import type { Mesh } from '../mesh/mesh';
import type { SectionGeometry } from '../problem';
import { estimateError, proposeRefinement } from './error-indicator';
import { gradientAt } from './gradients';
import { findPatches } from './patches';
import { recoverGradients, recoverNodeGradients } from './recover';

const sand = { kMajor: 1, kMinor: 1, angle: 0 };

function build(order: 1 | 2, sizeFactor: number, part: Partial<SectionGeometry> = {}): Mesh {
  const outcome = buildMesh(
    {
      kind: 'plane',
      regions: [
        {
          outline: [
            [0, 0],
            [3, 0],
            [3, 2],
            [0, 2],
          ],
          holes: [],
          material: 0,
        },
      ],
      barriers: [],
      drains: [],
      edges: [],
      bases: [],
      ...part,
    },
    { order, sizeFactor, maxElements: 40_000 },
  );
  if (outcome.status !== 'meshed') throw new TypeError('the section must mesh');
  return outcome.mesh;
}

type Field = (x: number, y: number) => number;

function sample(mesh: Mesh, f: Field): Float64Array {
  return Float64Array.from({ length: mesh.nodeCount }, (_, n) =>
    f(mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]),
  );
}

/** Largest difference between recovered corner gradients and a given gradient. */
function worstError(
  mesh: Mesh,
  corners: Float64Array,
  gx: Field,
  gy: Field,
  inside: (x: number, y: number) => boolean,
): number {
  const stride = mesh.order === 1 ? 3 : 6;
  let worst = 0;
  for (let e = 0; e < mesh.elementCount; e++) {
    for (let c = 0; c < 3; c++) {
      const n = mesh.elements[stride * e + c];
      const [x, y] = [mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]];
      if (!inside(x, y)) continue;
      worst = Math.max(
        worst,
        Math.hypot(corners[6 * e + 2 * c] - gx(x, y), corners[6 * e + 2 * c + 1] - gy(x, y)),
      );
    }
  }
  return worst;
}

/** Root mean square difference between corner gradients and a given gradient. */
function meanError(
  mesh: Mesh,
  corners: Float64Array,
  g: readonly [Field, Field],
  inside: (x: number, y: number) => boolean,
): number {
  let [sum, count] = [0, 0];
  for (let e = 0; e < mesh.elementCount; e++) {
    for (let c = 0; c < 3; c++) {
      const n = mesh.elements[6 * e + c];
      const [x, y] = [mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]];
      if (!inside(x, y)) continue;
      sum += (corners[6 * e + 2 * c] - g[0](x, y)) ** 2 + (corners[6 * e + 2 * c + 1] - g[1](x, y)) ** 2;
      count++;
    }
  }
  return Math.sqrt(sum / count);
}

const everywhere = (): boolean => true;

describe('recoverGradients', () => {
  it('is exact for quadratic heads on quadratic elements and for linear heads on linear ones, at every corner', () => {
    const quadratic = build(2, 1);
    const heads = sample(quadratic, (x, y) => 1 - 2 * x + y + x * x + 3 * x * y - 2 * y * y);
    const { corners, midsides } = recoverNodeGradients(quadratic, [sand], heads);
    expect(
      worstError(
        quadratic,
        corners,
        (x, y) => -2 + 2 * x + 3 * y,
        (x, y) => 1 + 3 * x - 4 * y,
        everywhere,
      ),
    ).toBeLessThan(1e-9);
    for (let e = 0; e < quadratic.elementCount; e++) {
      const n = quadratic.elements[6 * e + 3];
      const [x, y] = [quadratic.coordinates[2 * n], quadratic.coordinates[2 * n + 1]];
      expect(midsides[6 * e]).toBeCloseTo(-2 + 2 * x + 3 * y, 8);
    }
    const linear = build(1, 1);
    const plane = recoverGradients(
      linear,
      [sand],
      sample(linear, (x, y) => 5 * x - 7 * y),
    );
    expect(
      worstError(
        linear,
        plane,
        () => 5,
        () => -7,
        everywhere,
      ),
    ).toBeLessThan(1e-10);
  });

  it('is several times nearer to the truth than raw gradients, with errors of third order, one above theirs: e^x sin y sampled on two meshes', () => {
    const inside = (x: number, y: number): boolean => x > 0.4 && x < 2.6 && y > 0.4 && y < 1.6;
    const gx: Field = (x, y) => Math.exp(x) * Math.sin(y);
    const gy: Field = (x, y) => Math.exp(x) * Math.cos(y);
    // Root mean squares: the worst corner of an irregular mesh is a matter of luck. Three halvings show the order.
    const [coarse, fine] = [0.8, 0.1].map((factor) => {
      const mesh = build(2, factor);
      const heads = sample(mesh, (x, y) => Math.exp(x) * Math.sin(y));
      const raw = new Float64Array(6 * mesh.elementCount);
      for (let element = 0; element < mesh.elementCount; element++) {
        for (const [c, xi, eta] of [
          [0, 0, 0],
          [1, 1, 0],
          [2, 0, 1],
        ] as const) {
          raw.set(gradientAt(mesh, heads, { element, xi, eta }), 6 * element + 2 * c);
        }
      }
      const recovered = meanError(mesh, recoverGradients(mesh, [sand], heads), [gx, gy], inside);
      return { nodes: mesh.nodeCount, recovered, raw: meanError(mesh, raw, [gx, gy], inside) };
    });
    expect(coarse.raw / coarse.recovered).toBeGreaterThan(4);
    expect(fine.raw / fine.recovered).toBeGreaterThan(4);
    const rate = Math.log(coarse.recovered / fine.recovered) / Math.log(Math.sqrt(fine.nodes / coarse.nodes));
    expect(rate).toBeGreaterThan(2.7);
  });

  it('keeps the jump of the gradient where permeability changes', () => {
    const mesh = build(2, 1, {
      regions: [
        {
          outline: [
            [0, 0],
            [3, 0],
            [3, 2],
            [0, 2],
          ],
          holes: [],
          material: 0,
        },
        {
          outline: [
            [0, 0],
            [3, 0],
            [3, 0.7],
            [0, 0.7],
          ],
          holes: [],
          material: 1,
        },
      ],
    });
    const clay = { kMajor: 0.1, kMinor: 0.1, angle: 0 };
    // Vertical flow through two layers: gradients as 1 to 10.
    const heads = sample(mesh, (_x, y) => (y < 0.7 ? 10 * y : 7 + (y - 0.7)));
    const corners = recoverGradients(mesh, [sand, clay], heads);
    for (let e = 0; e < mesh.elementCount; e++) {
      for (let c = 0; c < 3; c++)
        expect(corners[6 * e + 2 * c + 1]).toBeCloseTo(mesh.elementMaterials[e] === 1 ? 10 : 1, 8);
    }
    // Two names for one material are no boundary.
    const patches = findPatches(mesh, [sand, sand]);
    expect(new Set(patches.classes).size).toBe(1);
  });

  it('never looks across a barrier', () => {
    const mesh = build(2, 1, {
      barriers: [
        {
          path: [
            [1.5, 0],
            [1.5, 2],
          ],
          conductance: 0,
        },
      ],
    });
    const stride = 6;
    const heads = new Float64Array(mesh.nodeCount);
    for (let e = 0; e < mesh.elementCount; e++) {
      const centre =
        [0, 1, 2].reduce((sum, c) => sum + mesh.coordinates[2 * mesh.elements[stride * e + c]], 0) / 3;
      for (let a = 0; a < stride; a++) heads[mesh.elements[stride * e + a]] = centre > 1.5 ? 9 : 4;
    }
    expect(Math.max(...recoverGradients(mesh, [sand], heads).map(Math.abs))).toBeLessThan(1e-10);
  });

  it('solves each patch as an orthogonal factorization of the same samples does', () => {
    const mesh = build(2, 0.5);
    const heads = sample(mesh, (x, y) => Math.exp(0.5 * x) * Math.cos(0.5 * y) + 0.1 * x ** 3);
    const patches = findPatches(mesh, [sand]);
    const corners = recoverGradients(mesh, [sand], heads);
    let compared = 0;
    for (let corner = 0; corner < 3 * mesh.elementCount; corner += 7) {
      const p = patches.cornerPatches[corner];
      const elements = patches.members.slice(patches.starts[p], patches.starts[p + 1]);
      if (elements.length < 4) continue;
      const n = patches.nodes[p];
      const [x0, y0] = [mesh.coordinates[2 * n], mesh.coordinates[2 * n + 1]];
      const rows: number[][] = [];
      const right: number[][] = [];
      for (const element of elements) {
        for (const [xi, eta] of [
          [1 / 6, 1 / 6],
          [2 / 3, 1 / 6],
          [1 / 6, 2 / 3],
        ] as const) {
          const [a, b, c] = [0, 1, 2].map((k) => 2 * mesh.elements[6 * element + k]);
          const u =
            (1 - xi - eta) * mesh.coordinates[a] + xi * mesh.coordinates[b] + eta * mesh.coordinates[c] - x0;
          const v =
            (1 - xi - eta) * mesh.coordinates[a + 1] +
            xi * mesh.coordinates[b + 1] +
            eta * mesh.coordinates[c + 1] -
            y0;
          rows.push([1, u, v, u * u, u * v, v * v]);
          right.push(gradientAt(mesh, heads, { element, xi, eta }));
        }
      }
      const [[gx, gy]] = new QrDecomposition(new Matrix(rows)).solve(new Matrix(right)).to2DArray();
      const at = 2 * corner;
      expect(corners[at]).toBeCloseTo(gx, 8);
      expect(corners[at + 1]).toBeCloseTo(gy, 8);
      compared++;
    }
    expect(compared).toBeGreaterThan(20);
  });
});

describe('estimateError', () => {
  it('agrees with the true error of a smooth interpolated field within a third, and asks for refinement where it is large', () => {
    const mesh = build(2, 1);
    const heads = sample(mesh, (x, y) => Math.exp(x) * Math.sin(y));
    let [truth, energy] = [0, 0];
    // One-point-per-subtriangle sum over 16 equal parts of each element: fine enough for a norm to 2 %.
    for (let element = 0; element < mesh.elementCount; element++) {
      const [a, b, c] = [0, 1, 2].map((k) => 2 * mesh.elements[6 * element + k]);
      const q = mesh.coordinates;
      const area = ((q[b] - q[a]) * (q[c + 1] - q[a + 1]) - (q[c] - q[a]) * (q[b + 1] - q[a + 1])) / 2;
      for (let i = 0; i < 4; i++) {
        for (let j = 0; j < 7 - 2 * i; j++) {
          const up = j % 2 === 0;
          const xi = ((j >> 1) + (up ? 1 / 3 : 2 / 3)) / 4;
          const eta = (i + (up ? 1 / 3 : 2 / 3)) / 4;
          const x = (1 - xi - eta) * q[a] + xi * q[b] + eta * q[c];
          const y = (1 - xi - eta) * q[a + 1] + xi * q[b + 1] + eta * q[c + 1];
          const [gx, gy] = gradientAt(mesh, heads, { element, xi, eta });
          truth +=
            (area / 16) * ((Math.exp(x) * Math.sin(y) - gx) ** 2 + (Math.exp(x) * Math.cos(y) - gy) ** 2);
          energy += (area / 16) * Math.exp(2 * x);
        }
      }
    }
    const { relative, elements } = estimateError(mesh, 'plane', [sand], heads);
    const ratio = relative / Math.sqrt(truth / energy);
    expect(ratio).toBeGreaterThan(0.67);
    expect(ratio).toBeLessThan(1.5);
    expect(elements.length).toBe(mesh.elementCount);
    expect(proposeRefinement(mesh, { elements, relative }, 2 * relative)).toEqual([]);
    const places = proposeRefinement(mesh, { elements, relative }, relative / 2);
    expect(places.length).toBeGreaterThan(0);
    for (const { size } of places) expect(size).toBeGreaterThan(0);
  });
});
