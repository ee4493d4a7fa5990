import { describe, expect, it } from 'vitest';
import { lineRule, triangleRule } from './quadrature';
import { tri3 } from './tri3';
import { tri6 } from './tri6';

const nodes = [0, 0, 1, 0, 0, 1, 0.5, 0, 0.5, 0.5, 0, 0.5];

function factorial(n: number): number {
  return n <= 1 ? 1 : n * factorial(n - 1);
}

describe.each([
  ['tri3', tri3],
  ['tri6', tri6],
])('%s', (_name, type) => {
  const N = new Float64Array(type.nodeCount);

  it('is one at its own node and zero at the others', () => {
    for (let i = 0; i < type.nodeCount; i++) {
      type.shapeFunctions(nodes[2 * i]!, nodes[2 * i + 1]!, N);
      for (let j = 0; j < type.nodeCount; j++) expect(N[j]).toBeCloseTo(i === j ? 1 : 0, 14);
    }
  });

  it('adds up to one, its gradients to zero, and gradients agree with differences', () => {
    const dN = new Float64Array(2 * type.nodeCount);
    const plus = new Float64Array(type.nodeCount);
    const minus = new Float64Array(type.nodeCount);
    for (const [xi, eta] of [
      [0.2, 0.3],
      [0.7, 0.1],
    ] as const) {
      type.shapeFunctions(xi, eta, N);
      expect(N.reduce((a, b) => a + b)).toBeCloseTo(1, 14);
      type.shapeGradients(xi, eta, dN);
      const step = 1e-5;
      for (let axis = 0; axis < 2; axis++) {
        type.shapeFunctions(xi + (axis ? 0 : step), eta + (axis ? step : 0), plus);
        type.shapeFunctions(xi - (axis ? 0 : step), eta - (axis ? step : 0), minus);
        let sum = 0;
        for (let a = 0; a < type.nodeCount; a++) {
          expect(dN[2 * a + axis]).toBeCloseTo((plus[a]! - minus[a]!) / (2 * step), 8);
          sum += dN[2 * a + axis]!;
        }
        expect(sum).toBeCloseTo(0, 13);
      }
    }
  });
});

describe('quadrature', () => {
  it.each([1, 2, 3, 4, 5, 6])(
    'on the triangle integrates every monomial up to degree %i: p! q! / (p + q + 2)!',
    (degree) => {
      const { points, weights } = triangleRule(degree);
      for (let p = 0; p <= degree; p++) {
        for (let q = 0; p + q <= degree; q++) {
          let sum = 0;
          weights.forEach((weight, i) => (sum += weight * points[2 * i]! ** p * points[2 * i + 1]! ** q));
          expect(sum).toBeCloseTo((factorial(p) * factorial(q)) / factorial(p + q + 2), 14);
        }
      }
    },
  );

  it.each([1, 3, 5])('on the line integrates every monomial up to degree %i', (degree) => {
    const { points, weights } = lineRule(degree);
    for (let p = 0; p <= degree; p++) {
      let sum = 0;
      weights.forEach((weight, i) => (sum += weight * points[i]! ** p));
      expect(sum).toBeCloseTo(p % 2 ? 0 : 2 / (p + 1), 14);
    }
  });
});
