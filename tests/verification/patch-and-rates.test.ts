// The finite-element core on structured meshes: what it must reproduce to rounding, and how fast the rest converges.
import { describe, expect, it } from 'vitest';
import { type Conductivity, type Mesh, prepareSteady } from '@/solver';
import { assemble, multiplyCells, scatterCells } from '@/solver/assembly/cells';
import { conductivityTensor, integrateStiffness, type Tensor } from '@/solver/assembly/element-stiffness';
import { elementTypeOf, jacobian, physicalGradients } from '@/solver/element/mapping';
import { triangleRule } from '@/solver/element/quadrature';
import { analyze } from '@/solver/sparse/analyze';
import { factorize } from '@/solver/sparse/factorize';
import { order as orderPattern } from '@/solver/sparse/order';
import { solve } from '@/solver/sparse/solve';
import { orders, solved } from '../fixtures/solve-mesh';
import { buildGrid } from '../fixtures/structured-mesh';

/** Rotated anisotropy with no symmetry to hide behind; kxx = 7.75e-6, kxy = 3.89711e-6, kyy = 3.25e-6 m/s. */
const rotated: Conductivity = { kMajor: 1e-5, kMinor: 1e-6, angle: Math.PI / 6 };

/** Moves inner points of the unit square, smoothly, by up to a tenth of it. */
function distort(s: number, t: number): [number, number] {
  const bump = Math.sin(Math.PI * s) * Math.sin(Math.PI * t);
  return [s + 0.1 * bump * Math.cos(3 * t), t - 0.08 * bump * Math.sin(2 + 2 * s)];
}

describe('patch test', () => {
  it.each(orders)(
    'order %i: h = a·x + c is exact to 1e-12 on a distorted mesh with rotated axes, between a head and three fluxes',
    (order) => {
      // the left side is turned so that it lies along an equipotential; the other three carry n · K∇h
      const a = [0.6, -0.8] as const;
      const place = (s: number, t: number): [number, number] => {
        const [u, v] = distort(s, t);
        return [0.8 * v + u * (3 + v), 0.6 * v + 0.3 * u];
      };
      const mesh = buildGrid({ order, columns: 7, rows: 5, place });
      const [kxx, kxy, kyy] = conductivityTensor(rotated);
      const inflow = [kxx * a[0] + kxy * a[1], kxy * a[0] + kyy * a[1]] as const;
      const corners = [place(0, 0), place(1, 0), place(1, 1), place(0, 1)];
      const fluxes = [0, 1, 2].map((k) => {
        const [p, q] = [corners[k]!, corners[k + 1]!];
        const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
        const rate = (inflow[0] * (q[1] - p[1]) - inflow[1] * (q[0] - p[0])) / length;
        return { length, condition: { type: 'flux', rate } as const };
      });
      const edges = [...fluxes.map(({ condition }) => condition), { type: 'head', head: 5 } as const];
      const medium = { conductivities: [rotated], conductances: [] };
      const solution = solved(prepareSteady(mesh, 'plane'), medium, { edges, drains: [] });
      const largest = Math.max(...solution.heads.map(Math.abs));
      for (let node = 0; node < mesh.nodeCount; node++) {
        const [x, y] = [mesh.coordinates[2 * node]!, mesh.coordinates[2 * node + 1]!];
        const exact = 5 + a[0] * x + a[1] * y; // relative to the heads' own size: rounding follows it
        expect(Math.abs(solution.heads[node]! - exact)).toBeLessThan(1e-12 * largest);
      }
      const scale = Math.max(...fluxes.map(({ length, condition }) => Math.abs(length * condition.rate)));
      fluxes.forEach(({ length, condition }, k) => {
        expect(Math.abs(solution.edgeFlows[k]! - length * condition.rate) / scale).toBeLessThan(1e-12);
      });
      expect(solution.balance).toBeLessThan(1e-12);
    },
  );

  it.each(orders)('order %i: upward flow about an axis is linear in y and exact to 1e-12', (order) => {
    const mesh = buildGrid({
      order,
      columns: 6,
      rows: 6,
      place: (s, t) => distort(s, t).map((v, i) => v * (i ? 3 : 2)) as [number, number],
    });
    const medium = { conductivities: [{ kMajor: 4e-5, kMinor: 1e-5, angle: 0 }], conductances: [] };
    const edges = [
      { type: 'head', head: 7 },
      { type: 'impervious' },
      { type: 'head', head: 1 },
      { type: 'impervious' },
    ] as const;
    const solution = solved(prepareSteady(mesh, 'axisymmetric'), medium, { edges, drains: [] });
    for (let node = 0; node < mesh.nodeCount; node++) {
      expect(Math.abs(solution.heads[node]! - (7 - 2 * mesh.coordinates[2 * node + 1]!))).toBeLessThan(1e-12);
    }
    // Q = π R² k i
    expect(solution.inflow / (Math.PI * 4 * 1e-5 * 2)).toBeCloseTo(1, 12);
  });
});

interface Manufactured {
  head(x: number, y: number): number;
  gradient(x: number, y: number): readonly [number, number];
  /** −∇·(K∇h) */
  source(x: number, y: number): number;
}

const p = 2.1;
const q = 1.3;
const tensor: Tensor = conductivityTensor({ kMajor: 3, kMinor: 1, angle: 0.4 });
const manufactured: Manufactured = {
  head: (x, y) => Math.sin(p * x + 0.3) * Math.cos(q * y),
  gradient: (x, y) => [
    p * Math.cos(p * x + 0.3) * Math.cos(q * y),
    -q * Math.sin(p * x + 0.3) * Math.sin(q * y),
  ],
  source: (x, y) =>
    (tensor[0] * p * p + tensor[2] * q * q) * Math.sin(p * x + 0.3) * Math.cos(q * y) +
    2 * tensor[1] * p * q * Math.cos(p * x + 0.3) * Math.sin(q * y),
};

/** Visits the quadrature points of every element with shape functions, gradients, place and weight. */
function integrate(
  mesh: Mesh,
  visit: (at: {
    element: number;
    N: Float64Array;
    dN: Float64Array;
    x: number;
    y: number;
    weight: number;
  }) => void,
): void {
  const type = elementTypeOf(mesh);
  const n = type.nodeCount;
  const [N, dN, tangent] = [new Float64Array(n), new Float64Array(2 * n), new Float64Array(5)];
  const rule = triangleRule(6);
  for (let element = 0; element < mesh.elementCount; element++) {
    for (let k = 0; k < rule.weights.length; k++) {
      type.shapeFunctions(rule.points[2 * k]!, rule.points[2 * k + 1]!, N);
      type.shapeGradients(rule.points[2 * k]!, rule.points[2 * k + 1]!, dN);
      jacobian(mesh, element, dN, tangent);
      physicalGradients(dN, tangent, dN);
      let x = 0;
      let y = 0;
      for (let a = 0; a < n; a++) {
        x += N[a]! * mesh.coordinates[2 * mesh.elements[n * element + a]!]!;
        y += N[a]! * mesh.coordinates[2 * mesh.elements[n * element + a]! + 1]!;
      }
      visit({ element, N, dN, x, y, weight: rule.weights[k]! * tangent[4]! });
    }
  }
}

/** Solves −∇·(K∇h) = source with h given all round, out of the solver's own parts, and measures the error in L2 and in H1. */
function measureManufactured(mesh: Mesh): { l2: number; h1: number } {
  const n = elementTypeOf(mesh).nodeCount;
  const cells = { stride: n, count: mesh.elementCount, nodes: mesh.elements };
  const matrices = new Float64Array(n * n * mesh.elementCount);
  integrateStiffness(mesh, [tensor], 'plane', matrices);
  const heads = new Float64Array(mesh.nodeCount);
  const nodeDofs = new Int32Array(mesh.nodeCount);
  const { outline } = mesh;
  outline.elements.forEach((element, k) => {
    const side = outline.sides[k]!;
    for (const local of mesh.order === 1 ? [side, (side + 1) % 3] : [side, (side + 1) % 3, 3 + side]) {
      const node = mesh.elements[n * element + local]!;
      nodeDofs[node] = -1;
      heads[node] = manufactured.head(mesh.coordinates[2 * node]!, mesh.coordinates[2 * node + 1]!);
    }
  });
  let dofCount = 0;
  for (let node = 0; node < mesh.nodeCount; node++) if (nodeDofs[node] === 0) nodeDofs[node] = dofCount++;
  const residual = new Float64Array(mesh.nodeCount);
  multiplyCells(cells, matrices, heads, residual);
  integrate(mesh, ({ element, N, x, y, weight }) => {
    for (let a = 0; a < n; a++) {
      residual[mesh.elements[n * element + a]!]! -= weight * N[a]! * manufactured.source(x, y);
    }
  });
  const { pattern, scatters } = scatterCells([cells], nodeDofs, dofCount);
  const values = new Float64Array(pattern.rowIndices.length);
  assemble(scatters[0]!, matrices, values);
  const outcome = factorize(analyze(pattern, orderPattern(pattern)), values);
  if (outcome.status !== 'factorized') throw new Error('not positive definite');
  const rhs = new Float64Array(dofCount);
  nodeDofs.forEach((dof, node) => dof >= 0 && (rhs[dof] = -residual[node]!));
  solve(outcome.factor, rhs, rhs);
  nodeDofs.forEach((dof, node) => dof >= 0 && (heads[node] = rhs[dof]!));
  let [l2, h1] = [0, 0];
  integrate(mesh, ({ element, N, dN, x, y, weight }) => {
    let [h, gx, gy] = [0, 0, 0];
    for (let a = 0; a < n; a++) {
      const value = heads[mesh.elements[n * element + a]!]!;
      h += N[a]! * value;
      gx += dN[2 * a]! * value;
      gy += dN[2 * a + 1]! * value;
    }
    const [ex, ey] = manufactured.gradient(x, y);
    l2 += weight * (h - manufactured.head(x, y)) ** 2;
    h1 += weight * ((gx - ex) ** 2 + (gy - ey) ** 2);
  });
  return { l2: Math.sqrt(l2), h1: Math.sqrt(h1) };
}

/** Rates between meshes, each twice as fine as the one before. */
function observedRates(errors: readonly number[]): number[] {
  return errors.slice(1).map((error, k) => Math.log2(errors[k]! / error));
}

describe('observed rates', () => {
  // Strang & Fix (1973), An Analysis of the Finite Element Method, ch. 3: h^(p+1) in L2, h^p in H1
  it.each([
    [1, 2, 1],
    [2, 3, 2],
  ] as const)(
    'order %i: manufactured head, rotated axes, distorted mesh: %i in L2 and %i in H1, ±0.1',
    (order, l2, h1) => {
      const errors = [8, 16, 32, 64].map((n) =>
        measureManufactured(buildGrid({ order, columns: n, rows: n, place: distort })),
      );
      for (const rate of observedRates(errors.map((e) => e.l2)).slice(-2))
        expect(Math.abs(rate - l2)).toBeLessThan(0.1);
      for (const rate of observedRates(errors.map((e) => e.h1)).slice(-2))
        expect(Math.abs(rate - h1)).toBeLessThan(0.1);
    },
  );

  // Thiem (1906): Q = 2π k b (h₂ − h₁) / ln(r₂ / r₁); energy converges twice as fast as gradients
  it.each([
    [1, 2],
    [2, 4],
  ] as const)(
    'order %i: discharge of a well between r = 1 and 5 converges with rate %i, from above',
    (order, rate) => {
      const exact = (2 * Math.PI * 1e-4 * 10 * 2) / Math.log(5);
      const errors = [4, 8, 16, 32].map((n) => {
        const mesh = buildGrid({
          order,
          columns: n,
          rows: n,
          place: (s, t) => {
            const [u, v] = distort(s, t);
            return [5 ** u, 10 * v];
          },
        });
        const edges = [
          { type: 'impervious' },
          { type: 'head', head: 12 },
          { type: 'impervious' },
          { type: 'head', head: 10 },
        ] as const;
        const medium = { conductivities: [{ kMajor: 1e-4, kMinor: 1e-4, angle: 0 }], conductances: [] };
        const solution = solved(prepareSteady(mesh, 'axisymmetric'), medium, { edges, drains: [] });
        expect(solution.edgeFlows[1]! + solution.edgeFlows[3]!).toBeCloseTo(0, 12);
        return solution.inflow / exact - 1;
      });
      for (const error of errors) expect(error).toBeGreaterThan(0);
      for (const observed of observedRates(errors).slice(-2))
        expect(Math.abs(observed - rate)).toBeLessThan(0.1);
    },
  );
});
