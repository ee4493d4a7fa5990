// Flows along edges and drains, reuse of a prepared mesh, and what is refused.
import { describe, expect, it } from 'vitest';
import { prepareSteady, solveSteady } from '@/solver';
import { head, impervious, isotropic, onEdges, orders, solved } from '../fixtures/solve-mesh';
import { buildGrid } from '../fixtures/structured-mesh';

/** A skewed section with three heads, one of them on a drain, a flux edge, a leaky wall and two soils. */
function mixedSection(order: 1 | 2) {
  const mesh = buildGrid({
    order,
    columns: 8,
    rows: 8,
    place: (s, t) => [10 * s + t, 6 * t + s * s],
    material: (i) => (i < 4 ? 0 : 1),
    slit: { column: 3, from: 4, to: 8 },
    drain: { row: 3, from: 5, to: 7 },
    edges: [
      { side: 'left', from: 0, to: 8 },
      { side: 'right', from: 2, to: 8 },
      { side: 'bottom', from: 2, to: 6 },
      { side: 'top', from: 5, to: 8 },
    ],
  });
  const medium = {
    conductivities: [{ kMajor: 2e-5, kMinor: 4e-6, angle: -0.3 }, isotropic(7e-6)],
    conductances: [5e-7],
  };
  const conditions = {
    edges: [head(12), head(7), { type: 'flux', rate: 3e-7 } as const, head(7)],
    drains: [head(6)],
  };
  return { mesh, medium, conditions };
}

describe('flows', () => {
  it.each(['plane', 'axisymmetric'] as const)(
    '%s: edges and drains add up to nothing, to 1e-9 of the inflow',
    (kind) => {
      for (const order of orders) {
        const { mesh, medium, conditions } = mixedSection(order);
        const solution = solved(prepareSteady(mesh, kind), medium, conditions);
        const all = [...solution.edgeFlows, ...solution.drainFlows];
        const sum = all.reduce((a, b) => a + b);
        expect(Math.abs(sum) / solution.inflow).toBeLessThan(1e-9);
        expect(solution.balance).toBeLessThan(1e-9);
        const gained = all.filter((flow) => flow > 0).reduce((a, b) => a + b);
        expect(Math.abs(gained / solution.inflow - 1)).toBeLessThan(1e-12);
        expect(solution.edgeFlows[0]).toBeGreaterThan(0);
        expect(solution.drainFlows[0]).toBeLessThan(0);
      }
    },
  );

  it('energy is heads times flows when no flux is given', () => {
    const { mesh, medium, conditions } = mixedSection(2);
    const edges = conditions.edges.map((c) => (c.type === 'flux' ? impervious : c));
    const solution = solved(prepareSteady(mesh, 'plane'), medium, { ...conditions, edges });
    const [a, b, , c] = solution.edgeFlows;
    const power = 12 * a! + 7 * (b! + c!) + 6 * solution.drainFlows[0]!;
    expect(Math.abs(power / solution.energy - 1)).toBeLessThan(1e-10);
  });

  it('permeabilities times a constant: the same heads, flows times the constant', () => {
    const { mesh, medium, conditions } = mixedSection(2);
    const times = 1e3;
    const scaled = {
      conductivities: medium.conductivities.map((k) => ({
        ...k,
        kMajor: times * k.kMajor,
        kMinor: times * k.kMinor,
      })),
      conductances: [times * medium.conductances[0]!],
    };
    const edges = conditions.edges.map((c) => (c.type === 'flux' ? impervious : c));
    const model = prepareSteady(mesh, 'plane');
    const one = solved(model, medium, { ...conditions, edges });
    const other = solved(model, scaled, { ...conditions, edges });
    for (let node = 0; node < mesh.nodeCount; node++) {
      expect(Math.abs(one.heads[node]! - other.heads[node]!)).toBeLessThan(1e-11);
    }
    expect(Math.abs(other.inflow / one.inflow / times - 1)).toBeLessThan(1e-11);
  });

  it('a model used again gives the bits of a fresh one, whatever was solved between', () => {
    const { mesh, medium, conditions } = mixedSection(2);
    const model = prepareSteady(mesh, 'plane');
    const first = solved(model, medium, conditions);
    const heads = first.heads.slice();
    solved(model, { ...medium, conductivities: [isotropic(1), isotropic(2)] }, conditions);
    solved(model, { ...medium, conductances: [0] }, conditions);
    solved(model, medium, { edges: [impervious, head(1), impervious, impervious], drains: [impervious] });
    expect(solved(model, medium, conditions).heads).toEqual(heads);
    expect(first.heads).toEqual(heads);
  });

  it('a corner between two edges of one head is divided so that the sum stays whole', () => {
    const mesh = buildGrid({
      order: 2,
      columns: 6,
      rows: 6,
      place: (s, t) => [s, t],
      edges: [
        { side: 'left', from: 0, to: 6 },
        { side: 'top', from: 3, to: 6 },
        { side: 'right', from: 3, to: 6 },
      ],
    });
    const solution = solved(
      prepareSteady(mesh, 'plane'),
      { conductivities: [isotropic(1)], conductances: [] },
      onEdges(head(1), head(0), head(0)),
    );
    const total = solution.reactions.reduce((sum, flow) => (flow < 0 ? sum + flow : sum), 0);
    expect(solution.edgeFlows[1]! + solution.edgeFlows[2]!).toBeCloseTo(total, 12);
    expect(solution.edgeFlows[1]).toBeLessThan(0);
    expect(solution.edgeFlows[2]).toBeLessThan(0);
  });
});

describe('refusals', () => {
  const square = {
    order: 2,
    columns: 4,
    rows: 4,
    place: (s: number, t: number): [number, number] => [s, t],
  } as const;
  const medium = { conductivities: [isotropic(1e-4)], conductances: [0] };

  it('two heads at one point, with its place; equal ones are fine', () => {
    const model = prepareSteady(buildGrid(square), 'plane');
    const outcome = solveSteady(model, medium, onEdges(impervious, head(1), head(2), impervious));
    expect(outcome).toMatchObject({ status: 'refused', reason: 'conflicting-heads', at: [1, 1] });
    expect(solveSteady(model, medium, onEdges(head(3), head(1), head(1), impervious)).status).toBe('refused');
    expect(solveSteady(model, medium, onEdges(impervious, head(1), head(1), impervious)).status).toBe(
      'solved',
    );
  });

  it('ground that no head reaches; a leaky wall lets the head through', () => {
    const cut = prepareSteady(buildGrid({ ...square, slit: { column: 2, from: 0, to: 4 } }), 'plane');
    const conditions = onEdges(impervious, impervious, impervious, head(1));
    const outcome = solveSteady(cut, medium, conditions);
    expect(outcome).toMatchObject({ status: 'refused', reason: 'unconstrained' });
    expect(outcome.status === 'refused' && outcome.at[0]).toBeGreaterThanOrEqual(0.5);
    expect(solveSteady(cut, { ...medium, conductances: [1e-6] }, conditions).status).toBe('solved');
    expect(solveSteady(cut, medium, onEdges(impervious, impervious, impervious, impervious)).status).toBe(
      'refused',
    );
  });

  it('a negative permeability is not positive definite', () => {
    const model = prepareSteady(buildGrid(square), 'plane');
    const outcome = solveSteady(
      model,
      { conductivities: [isotropic(-1)], conductances: [] },
      onEdges(impervious, head(1), impervious, head(2)),
    );
    expect(outcome).toMatchObject({ status: 'refused', reason: 'not-positive-definite' });
  });
});
