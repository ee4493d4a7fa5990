import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { SolverError } from '../errors';
import type { LineSides, Mesh } from '../mesh/mesh';
import { assemble, multiplyCells, scatterCells, sumEnergy } from './cells';
import {
  conductivityTensor,
  dualTensor,
  integrateByQuadrature,
  integrateStiffness,
} from './element-stiffness';
import { addFluxLoad, integrateLeak, integrateLeakDual } from './line-integrals';

const none: LineSides = {
  elements: new Int32Array(0),
  sides: new Int32Array(0),
  directions: new Int8Array(0),
  distances: new Float64Array(0),
};

/** One triangle, straight or with moved midsides. */
function oneElement(corners: readonly number[], order: 1 | 2, bend = 0): Mesh {
  const [x0, y0, x1, y1, x2, y2] = corners as [number, number, number, number, number, number];
  const middles = [
    (x0 + x1) / 2,
    (y0 + y1) / 2 - bend,
    (x1 + x2) / 2 + bend,
    (y1 + y2) / 2,
    (x2 + x0) / 2,
    (y2 + y0) / 2,
  ];
  const n = order === 1 ? 3 : 6;
  return {
    order,
    nodeCount: n,
    elementCount: 1,
    coordinates: Float64Array.from(order === 1 ? corners : [...corners, ...middles]),
    elements: Int32Array.from({ length: n }, (_, i) => i),
    elementMaterials: Int32Array.of(0),
    neighbours: Int32Array.of(-1, -1, -1),
    edges: [],
    barriers: [],
    drains: [],
    bases: [],
    outline: none,
    minAngle: 0,
  };
}

const skew = [1.2, 0.3, 3.1, 0.9, 1.7, 2.4];
const rotated = conductivityTensor({ kMajor: 1e-5, kMinor: 1e-6, angle: Math.PI / 6 });

describe('tensor', () => {
  it('turns 1e-5 and 1e-6 by 30°: 7.75e-6, 3.89711e-6, 3.25e-6 (Bear 1972, §5.6)', () => {
    expect(rotated[0] / 7.75e-6).toBeCloseTo(1, 12);
    expect(rotated[1] / 3.89711e-6).toBeCloseTo(1, 5);
    expect(rotated[2] / 3.25e-6).toBeCloseTo(1, 12);
  });

  it('its dual is the inverse turned by a right angle, and the dual of the dual is itself', () => {
    const [a, b, c] = dualTensor(rotated);
    // K⁻¹ = (kyy, −kxy, kxx) / det; Rᵀ K⁻¹ R swaps the diagonal and the sign
    const det = rotated[0] * rotated[2] - rotated[1] ** 2;
    expect(det / 1e-11).toBeCloseTo(1, 12);
    expect([a * det, b * det, c * det].map((v, i) => v / rotated[i]!)).toEqual(
      [1, 1, 1].map((v) => expect.closeTo(v, 12)),
    );
    dualTensor([a, b, c]).forEach((v, i) => expect(v / rotated[i]!).toBeCloseTo(1, 12));
  });
});

describe('element stiffness', () => {
  it('of the unit right triangle is the known matrix (Hughes 2000, ch. 3)', () => {
    const out = new Float64Array(9);
    integrateStiffness(oneElement([0, 0, 1, 0, 0, 1], 1), [[1, 0, 1]], 'plane', out);
    expect([...out]).toEqual([1, -0.5, -0.5, -0.5, 0.5, 0, -0.5, 0, 0.5]);
  });

  it.each([
    [1, 'plane'],
    [1, 'circle'],
    [2, 'plane'],
    [2, 'circle'],
  ] as const)(
    'order %i, %s: reference matrices equal quadrature; rows add up to zero; symmetric',
    (order, weight) => {
      const mesh = oneElement(skew, order);
      const n = mesh.nodeCount;
      const [fast, slow] = [new Float64Array(n * n), new Float64Array(n * n)];
      integrateStiffness(mesh, [rotated], weight, fast);
      integrateByQuadrature(mesh, 0, rotated, weight, slow);
      const scale = Math.max(...slow.map(Math.abs));
      for (let a = 0; a < n; a++) {
        let sum = 0;
        for (let b = 0; b < n; b++) {
          expect(Math.abs(fast[a * n + b]! - slow[a * n + b]!) / scale).toBeLessThan(1e-13);
          expect(Math.abs(fast[a * n + b]! - fast[b * n + a]!) / scale).toBeLessThan(1e-15);
          sum += fast[a * n + b]!;
        }
        expect(Math.abs(sum) / scale).toBeLessThan(1e-14);
      }
    },
  );

  it('energy of a linear head is area × ∇h·K∇h, about an axis 2π times the first moment of area, straight or curved', () => {
    const area = 0.5 * Math.abs((3.1 - 1.2) * (2.4 - 0.3) - (1.7 - 1.2) * (0.9 - 0.3));
    const radius = (1.2 + 3.1 + 1.7) / 3;
    const [gx, gy] = [2, -3];
    const power = rotated[0] * gx * gx + 2 * rotated[1] * gx * gy + rotated[2] * gy * gy;
    for (const order of [1, 2] as const) {
      const mesh = oneElement(skew, order);
      const n = mesh.nodeCount;
      const heads = Float64Array.from(
        { length: n },
        (_, a) => gx * mesh.coordinates[2 * a]! + gy * mesh.coordinates[2 * a + 1]!,
      );
      const cells = { stride: n, count: 1, nodes: mesh.elements };
      const matrices = new Float64Array(n * n);
      integrateStiffness(mesh, [rotated], 'plane', matrices);
      expect(sumEnergy(cells, matrices, heads) / (area * power)).toBeCloseTo(1, 12);
      integrateStiffness(mesh, [rotated], 'circle', matrices);
      expect(sumEnergy(cells, matrices, heads) / (2 * Math.PI * radius * area * power)).toBeCloseTo(1, 12);
    }
    // a bent side adds a parabola's segment, 2/3 of chord times height
    const bend = 0.1;
    const curved = oneElement([0, 0, 3, 0, 0, 2], 2);
    curved.coordinates[7]! -= bend;
    const matrices = new Float64Array(36);
    integrateStiffness(curved, [[1, 0, 1]], 'plane', matrices);
    const x = Float64Array.from({ length: 6 }, (_, a) => curved.coordinates[2 * a]!);
    expect(sumEnergy({ stride: 6, count: 1, nodes: curved.elements }, matrices, x)).toBeCloseTo(
      3 + (2 / 3) * 3 * bend,
      12,
    );
  });

  it.each([
    [1, 0],
    [2, 0],
    [2, 2.5],
  ] as const)('order %i: refuses an element without area or folded (bend %d)', (order, bend) => {
    const corners = bend ? [0, 0, 1, 0, 0, 1] : [0, 0, 1, 1, 2, 2];
    const n = order === 1 ? 3 : 6;
    const attempt = (): void =>
      integrateStiffness(oneElement(corners, order, -bend), [[1, 0, 1]], 'plane', new Float64Array(n * n));
    expect(attempt).toThrow(SolverError);
    expect(attempt).toThrow(
      expect.objectContaining({ code: 'invalid-mesh', details: expect.objectContaining({ element: 0 }) }),
    );
  });
});

describe('pattern', () => {
  const cellsOf = (stride: number, nodes: number[]) => ({
    stride,
    count: nodes.length / stride,
    nodes: Int32Array.from(nodes),
  });

  it('holds every entry once, rows ascending from the diagonal, and scatter maps add up to the dense sum', () => {
    const distinct = fc.uniqueArray(fc.nat(9), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(
        fc.array(distinct, { minLength: 1, maxLength: 12 }),
        fc.array(fc.nat(9), { maxLength: 3 }),
        (triples, gone) => {
          const cells = cellsOf(3, triples.flat());
          const nodeDofs = new Int32Array(10).fill(-1);
          let dofCount = 0;
          for (const node of new Set(triples.flat())) if (!gone.includes(node)) nodeDofs[node] = dofCount++;
          const { pattern, scatters } = scatterCells([cells], nodeDofs, dofCount);
          const matrices = Float64Array.from({ length: 9 * cells.count }, (_, k) => {
            const [a, b] = [Math.floor((k % 9) / 3), k % 3];
            return 1 + Math.floor(k / 9) + 10 * (a + b);
          });
          const dense = Array.from({ length: dofCount }, () => new Float64Array(dofCount));
          triples.forEach((nodes, cell) =>
            nodes.forEach((p, a) =>
              nodes.forEach((q, b) => {
                const [row, column] = [nodeDofs[p]!, nodeDofs[q]!];
                if (row >= 0 && column >= 0) dense[row]![column]! += matrices[9 * cell + 3 * a + b]!;
              }),
            ),
          );
          const values = new Float64Array(pattern.rowIndices.length);
          assemble(scatters[0]!, matrices, values);
          let filled = 0;
          for (let column = 0; column < dofCount; column++) {
            expect(pattern.rowIndices[pattern.columnPointers[column]!]).toBe(column);
            for (let p = pattern.columnPointers[column]!; p < pattern.columnPointers[column + 1]!; p++) {
              if (p > pattern.columnPointers[column]!)
                expect(pattern.rowIndices[p]).toBeGreaterThan(pattern.rowIndices[p - 1]!);
              expect(values[p]).toBe(dense[pattern.rowIndices[p]!]![column]);
              filled++;
            }
          }
          const wanted = dense.reduce(
            (sum, row, i) => sum + row.slice(0, i + 1).filter((v) => v !== 0).length,
            0,
          );
          expect(filled).toBe(wanted);
        },
      ),
    );
  });

  it('flows and energy do not feel the level of the heads', () => {
    const mesh = oneElement(skew, 1);
    const matrices = new Float64Array(9);
    integrateStiffness(mesh, [rotated], 'plane', matrices);
    const cells = cellsOf(3, [0, 1, 2]);
    const [low, high] = [new Float64Array(3), new Float64Array(3)];
    multiplyCells(cells, matrices, Float64Array.of(0, 0.5, 0.25), low);
    multiplyCells(cells, matrices, Float64Array.of(4096, 4096.5, 4096.25), high);
    expect(high).toEqual(low);
    const energies = [0, 4096].map((level) =>
      sumEnergy(cells, matrices, Float64Array.of(level, level + 0.5, level + 0.25)),
    );
    expect(energies[1]).toBe(energies[0]);
  });
});

describe('line integrals', () => {
  const side = {
    elements: Int32Array.of(0),
    sides: Int32Array.of(0),
    directions: Int8Array.of(1),
    distances: Float64Array.of(0, 5),
  };

  it.each([1, 2] as const)(
    'order %i: a uniform flux gives rate × length, about an axis rate × 2π × moment of length',
    (order) => {
      const mesh = oneElement([1, 0, 4, 4, 0, 3], order);
      const plane = new Float64Array(mesh.nodeCount);
      expect(addFluxLoad(mesh, side, 2e-6, 'plane', plane)).toBeCloseTo(1e-5, 17);
      expect(plane.reduce((a, b) => a + b)).toBeCloseTo(1e-5, 17);
      // Simpson's weights for the quadratic line
      const expected = order === 1 ? [0.5, 0.5] : [1 / 6, 1 / 6];
      expected.forEach((share, a) => expect(plane[a]! / 1e-5).toBeCloseTo(share, 12));
      const circle = new Float64Array(mesh.nodeCount);
      expect(addFluxLoad(mesh, side, 2e-6, 'circle', circle) / (2e-6 * 5 * 2 * Math.PI * 2.5)).toBeCloseTo(
        1,
        12,
      );
    },
  );

  it.each([1, 2] as const)(
    'order %i: a leaky face passes C × jump × length, and nothing without a jump',
    (order) => {
      const half = order + 1;
      const mesh = oneElement([1, 0, 4, 4, 0, 3], order);
      const face = order === 1 ? [0, 1] : [0, 1, 3];
      const out = new Float64Array(4 * half * half);
      integrateLeak(mesh, Int32Array.from([...face, ...face]), 3e-7, 'plane', out);
      const nodes = Int32Array.from({ length: 2 * half }, (_, i) => i);
      const cells = { stride: 2 * half, count: 1, nodes };
      const flows = new Float64Array(2 * half);
      multiplyCells(
        cells,
        out,
        Float64Array.from(nodes, (i) => (i < half ? 2 : 0)),
        flows,
      );
      expect(flows.slice(0, half).reduce((a, b) => a + b) / (3e-7 * 2 * 5)).toBeCloseTo(1, 12);
      expect(flows.slice(half).reduce((a, b) => a + b) / (-3e-7 * 2 * 5)).toBeCloseTo(1, 12);
      flows.fill(0);
      multiplyCells(
        cells,
        out,
        Float64Array.from(nodes, (i) => (i % half === 1 ? 4 : 1)),
        flows,
      );
      flows.forEach((flow) => expect(Math.abs(flow)).toBeLessThan(1e-20));
    },
  );

  it.each([1, 2] as const)('order %i: its dual is (Δψ)² / (C × length) for ψ linear along it', (order) => {
    const mesh = oneElement([1, 0, 4, 4, 0, 3], order);
    const face = order === 1 ? [0, 1] : [0, 1, 3];
    const n = order + 1;
    const out = new Float64Array(n * n);
    integrateLeakDual(mesh, Int32Array.from(face), 3e-7, 'plane', out);
    const cells = { stride: n, count: 1, nodes: Int32Array.from({ length: n }, (_, i) => i) };
    const psi = Float64Array.from([0, 6, 3].slice(0, n));
    expect(sumEnergy(cells, out, psi) / (36 / (3e-7 * 5))).toBeCloseTo(1, 12);
  });
});
