// Closed forms, bracket and stream function of the finite-element core on structured meshes.
import { describe, expect, it } from 'vitest';
import { prepareSteady } from '@/solver';
import { validateMesh } from '@/solver/mesh/validate-mesh';
import { cofferdamInner } from '@/lib/hand-methods/cofferdam';
import { bracketOf, head, impervious, isotropic, onEdges, orders } from '../fixtures/solve-mesh';
import { buildGrid, type GridShape } from '../fixtures/structured-mesh';

/** A wall to half depth in a layer of 1 m, 3 m of ground either side: edges upstream, downstream. */
function wallInBox(order: 1 | 2, n: number, change: Partial<GridShape> = {}): GridShape {
  return {
    order,
    columns: 6 * n,
    rows: n,
    place: (s, t) => [6 * s - 3, t - 1],
    slit: { column: 3 * n, from: n / 2, to: n },
    edges: [
      { side: 'top', from: 0, to: 3 * n },
      { side: 'top', from: 3 * n, to: 6 * n },
    ],
    ...change,
  };
}

/** Exact discharge of that box, q/kH = 0.499926 (conformal map of the rectangle; Muskat 1937, Harr 1962). */
const exactBox = 1 / (2 * cofferdamInner(0.5, 1, 3).formFactor);

it.each(orders)('the grids used here are sound meshes, order %i', (order) => {
  expect(validateMesh(buildGrid(wallInBox(order, 4)))).toEqual([]);
  const inner = { columns: 6, rows: 6, place: (s: number, t: number): [number, number] => [s, t] };
  expect(validateMesh(buildGrid({ order, ...inner, slit: { column: 2, from: 1, to: 4 } }))).toEqual([]);
  expect(validateMesh(buildGrid({ order, ...inner, drain: { row: 3, from: 1, to: 4 } }))).toEqual([]);
});

describe('closed forms that the elements hold exactly', () => {
  it.each(orders)(
    'order %i: 2 m at 1e-5 over 3 m at 1e-6 under 1 m: q = 3.125e-7, head 0.9375 between (series law)',
    (order) => {
      const mesh = buildGrid({
        order,
        columns: 3,
        rows: 5,
        place: (s, t) => [s, 5 * t - 5],
        material: (_, row) => (row < 3 ? 1 : 0),
      });
      const model = prepareSteady(mesh, 'plane');
      const medium = { conductivities: [isotropic(1e-5), isotropic(1e-6)], conductances: [] };
      const conditions = onEdges(head(0), impervious, head(1), impervious);
      const { solution, stream } = bracketOf(model, medium, conditions);
      expect(Math.abs(solution.inflow / 3.125e-7 - 1)).toBeLessThan(1e-9);
      expect(Math.abs(stream.lower! / 3.125e-7 - 1)).toBeLessThan(2e-9);
      expect(Math.abs(stream.upper! / 3.125e-7 - 1)).toBeLessThan(2e-9);
      for (let node = 0; node < mesh.nodeCount; node++) {
        if (mesh.coordinates[2 * node + 1] === -2)
          expect(Math.abs(solution.heads[node]! - 0.9375)).toBeLessThan(1e-9);
      }
    },
  );

  it.each(orders)(
    'order %i: a leaky wall across a column: q = H / (L/k + 1/C) a metre, its head jump q/C',
    (order) => {
      const [k, conductance] = [2e-5, 3e-6];
      const mesh = buildGrid({
        order,
        columns: 6,
        rows: 4,
        place: (s, t) => [4 * s, t],
        slit: { column: 2, from: 0, to: 4 },
      });
      const model = prepareSteady(mesh, 'plane');
      const medium = { conductivities: [isotropic(k)], conductances: [conductance] };
      const { solution, stream } = bracketOf(
        model,
        medium,
        onEdges(impervious, head(1), impervious, head(3)),
      );
      const q = 2 / (4 / k + 1 / conductance);
      expect(Math.abs(solution.edgeFlows[3]! / q - 1)).toBeLessThan(1e-11);
      expect(Math.abs(stream.lower! / q - 1)).toBeLessThan(2e-9);
      expect(Math.abs(stream.upper! / q - 1)).toBeLessThan(2e-9);
      const { left, right } = mesh.barriers[0]!;
      const stride = order === 1 ? 3 : 6;
      left.elements.forEach((element, i) => {
        const onLeft = mesh.elements[stride * element + left.sides[i]!]!;
        const onRight = mesh.elements[stride * right.elements[i]! + ((right.sides[i]! + 1) % 3)]!;
        expect(
          Math.abs((solution.heads[onLeft]! - solution.heads[onRight]!) / (q / conductance) - 1),
        ).toBeLessThan(1e-11);
      });
    },
  );

  it.each(orders)('order %i: the stream function of uniform flow is linear across it, 0 to q', (order) => {
    const mesh = buildGrid({
      order,
      columns: 5,
      rows: 4,
      place: (s, t) => [3 * s, 2 * t + 0.1 * s * (1 - s) * t * (1 - t)],
    });
    const model = prepareSteady(mesh, 'plane');
    const medium = { conductivities: [isotropic(1e-4)], conductances: [] };
    const { stream } = bracketOf(model, medium, onEdges(impervious, head(1), impervious, head(4)));
    // v = 1e-4 along +x; vx = ∂ψ/∂y
    for (let node = 0; node < mesh.nodeCount; node++) {
      expect(stream.values![node]! / 1e-4).toBeCloseTo(mesh.coordinates[2 * node + 1]!, 11);
    }
  });
});

describe('bracket', () => {
  it.each(orders)(
    'order %i: half-depth wall in a box, q/kH = 0.499926: held, and no wider on a nested finer mesh',
    (order) => {
      let [lower, upper] = [0, Infinity];
      for (const n of [4, 8, 16]) {
        const model = prepareSteady(buildGrid(wallInBox(order, n)), 'plane');
        const medium = { conductivities: [isotropic(1)], conductances: [0] };
        const { stream } = bracketOf(model, medium, onEdges(head(3), head(2)));
        expect(stream.kind).toBe('bound');
        expect(stream.lower!).toBeLessThan(exactBox);
        expect(stream.upper!).toBeGreaterThan(exactBox);
        expect(stream.lower!).toBeGreaterThanOrEqual(lower);
        expect(stream.upper!).toBeLessThanOrEqual(upper);
        // the head at the tip grows with the root of the distance, so the gap falls with the first power of the size
        if (lower > 0)
          expect(Math.abs(Math.log2((upper - lower) / (stream.upper! - stream.lower!)) - 1)).toBeLessThan(
            0.1,
          );
        // what flows between the two impervious pieces by ψ is what the lower end says
        expect(Math.abs(Math.max(...stream.values!) / stream.lower! - 1)).toBeLessThan(2e-9);
        [lower, upper] = [stream.lower!, stream.upper!];
      }
      expect(exactBox).toBeCloseTo(0.499926, 6);
    },
  );

  it.each(orders)(
    'order %i: kx = 4, kz = 1 in a box twice as long: 2 × 0.499926 is held (Samsioe 1931)',
    (order) => {
      const model = prepareSteady(
        buildGrid(wallInBox(order, 8, { place: (s, t) => [12 * s - 6, t - 1] })),
        'plane',
      );
      const medium = { conductivities: [{ kMajor: 4, kMinor: 1, angle: 0 }], conductances: [0] };
      const { stream } = bracketOf(model, medium, onEdges(head(1), head(0)));
      expect(stream.lower!).toBeLessThan(2 * exactBox);
      expect(stream.upper!).toBeGreaterThan(2 * exactBox);
    },
  );

  it('a floating wall, a leaky wall and a lens of another soil keep lower below upper, and refinement only narrows', () => {
    let [lower, upper] = [0, Infinity];
    for (const n of [2, 4, 8]) {
      const mesh = buildGrid({
        order: 2,
        columns: 6 * n,
        rows: 4 * n,
        place: (s, t) => [6 * s, 4 * t],
        slit: { column: 2 * n, from: n, to: 3 * n },
        material: (i, j) => (i >= 3 * n && j < n ? 1 : 0),
      });
      const model = prepareSteady(mesh, 'plane');
      const conductivities = [{ kMajor: 1e-4, kMinor: 1e-5, angle: 0.5 }, isotropic(1e-8)];
      const { stream } = bracketOf(
        model,
        { conductivities, conductances: [0] },
        onEdges(impervious, head(1), impervious, head(9)),
      );
      expect(stream.lower!).toBeGreaterThanOrEqual(lower * (1 - 1e-12));
      expect(stream.upper!).toBeLessThanOrEqual(upper * (1 + 1e-12));
      expect(stream.lower!).toBeLessThan(stream.upper!);
      [lower, upper] = [stream.lower!, stream.upper!];
      const leaky = bracketOf(
        model,
        { conductivities, conductances: [1e-5] },
        onEdges(impervious, head(1), impervious, head(9)),
      );
      expect(leaky.stream.lower!).toBeLessThan(leaky.stream.upper!);
      // Rayleigh's monotonicity: opening the wall cannot lower the discharge
      expect(leaky.solution.inflow).toBeGreaterThan(lower);
    }
  });

  it.each([
    [0, 1, 1e6, 1e-8],
    [1000, 1, 1, 1e-11],
    [1000, 0.01, 1e6, 1e-8],
    [4000, 0.001, 1e6, 1e-8],
    [0, 1, 1e10, 1e-6],
  ])(
    'datum %d m, head difference %d m, permeabilities %d apart: the series column stays within, balance below %d',
    (datum, difference, contrast, balance) => {
      for (const order of orders) {
        const mesh = buildGrid({
          order,
          columns: 12,
          rows: 20,
          place: (s, t) => [s, 5 * t - 5],
          material: (_, row) => (row < 12 ? 1 : 0),
        });
        const model = prepareSteady(mesh, 'plane');
        const medium = { conductivities: [isotropic(1e-2), isotropic(1e-2 / contrast)], conductances: [] };
        const top = datum + difference; // rounded as the solver sees it
        const conditions = onEdges(head(datum), impervious, head(top), impervious);
        const { solution, stream } = bracketOf(model, medium, conditions);
        const exact = (top - datum) / (2 / 1e-2 + (3 / 1e-2) * contrast);
        expect(stream.lower!).toBeLessThan(exact);
        expect(stream.upper!).toBeGreaterThan(exact);
        expect(stream.upper! / stream.lower! - 1).toBeLessThan(2.1e-9);
        expect(solution.balance).toBeLessThan(balance);
        expect(Math.abs(solution.inflow / exact - 1)).toBeLessThan(balance);
      }
    },
  );

  it('about an axis it holds the well of Thiem (1906), and is called an estimate', () => {
    const exact = (2 * Math.PI * 1e-4 * 10 * 2) / Math.log(10);
    for (const order of orders) {
      const mesh = buildGrid({ order, columns: 12, rows: 6, place: (s, t) => [5 * 10 ** s, 10 * t] });
      const model = prepareSteady(mesh, 'axisymmetric');
      const medium = { conductivities: [isotropic(1e-4)], conductances: [] };
      const { stream } = bracketOf(model, medium, onEdges(impervious, head(12), impervious, head(10)));
      expect(exact).toBeCloseTo(5.45751e-3, 8);
      expect(stream.kind).toBe('estimate');
      expect(stream.lower!).toBeLessThanOrEqual(exact);
      expect(stream.upper!).toBeGreaterThanOrEqual(exact);
      expect(stream.upper! / stream.lower!).toBeLessThan(order === 1 ? 1.01 : 1.0002);
    }
  });

  it('three levels, a flux edge or a drain that draws water give no bracket', () => {
    const square = {
      order: 2,
      columns: 4,
      rows: 4,
      place: (s: number, t: number): [number, number] => [s, t],
    } as const;
    const medium = { conductivities: [isotropic(1e-4)], conductances: [] };
    const plain = prepareSteady(buildGrid(square), 'plane');
    const parts = [
      { side: 'left', from: 0, to: 4 },
      { side: 'right', from: 0, to: 4 },
      { side: 'top', from: 1, to: 3 },
    ] as const;
    const third = bracketOf(
      prepareSteady(buildGrid({ ...square, edges: parts }), 'plane'),
      medium,
      onEdges(head(3), head(1), head(2.5)),
    );
    expect(third.stream).toMatchObject({ lower: null, upper: null, kind: 'estimate' });
    expect(third.stream.values).not.toBeNull();
    const flux = bracketOf(
      plain,
      medium,
      onEdges({ type: 'flux', rate: 1e-6 }, head(1), impervious, head(3)),
    );
    expect(flux.stream).toEqual({ values: null, lower: null, upper: null, kind: 'estimate' });
    const drained = prepareSteady(buildGrid({ ...square, drain: { row: 2, from: 1, to: 3 } }), 'plane');
    const drain = bracketOf(drained, medium, {
      edges: [impervious, head(1), impervious, head(3)],
      drains: [head(0.5)],
    });
    expect(drain.stream).toEqual({ values: null, lower: null, upper: null, kind: 'estimate' });
  });
});
