import { describe, expect, it } from 'vitest';
import { exampleCriteria } from '@/lib/checks';
import { resultSchema } from '@/lib/domain/result-schema';
import type { SectionDocument } from '@/lib/domain/section';
import { startingPoints } from '@/lib/domain/starting-points';
import { AnalysisMemory } from './analysis-memory';
import { analyzeSection, type AnalysisOutcome, type AnalyzeOptions } from './analyze';
import { packFields } from './pack-fields';

const options: AnalyzeOptions = {
  criteria: exampleCriteria,
  effort: 'live',
  withFields: false,
  now: () => 0,
};

function starting(id: string, change: (draft: SectionDocument) => void = () => undefined): SectionDocument {
  const document = structuredClone(startingPoints.find((point) => point.id === id)!.document);
  change(document);
  return document;
}

function solved(outcome: AnalysisOutcome) {
  if (outcome.status !== 'solved') throw new RangeError(JSON.stringify(outcome));
  return outcome;
}

describe('an answer', () => {
  it('has the published shape, one entry a situation, notes of reading and meshing', () => {
    const document = { ...starting('apron-with-cutoffs'), colour: 'blue' };
    const { result, fields } = solved(analyzeSection(document, options));
    expect(resultSchema.parse(result)).toEqual(result);
    expect(result.situations.map(({ id }) => id)).toEqual(document.situations.map(({ id }) => id));
    expect(result.notes.map(({ code }) => code)).toEqual(['unknown-field', 'small-angle']);
    expect(fields).toEqual([]);
  });

  it('is the same, to the bit, whenever it is asked for', () => {
    const document = starting('pit-between-walls');
    expect(analyzeSection(document, options)).toEqual(analyzeSection(structuredClone(document), options));
  });

  it('leaves the document as it was', () => {
    const document = starting('levee-with-blanket');
    const before = structuredClone(document);
    analyzeSection(document, options);
    expect(document).toEqual(before);
  });

  it('solves the situations asked for, in the order of the document', () => {
    const document = starting('wall-in-ground');
    const ids = (situations: string[]) =>
      solved(analyzeSection(document, { ...options, situations })).result.situations.map(({ id }) => id);
    expect(ids(['flood'])).toEqual(['flood']);
    expect(ids(['flood', 'normal'])).toEqual(['normal', 'flood']);
  });

  it('carries fields of the mesh for drawing, and as plain JSON for scripts', () => {
    const { fields, result } = solved(
      analyzeSection(starting('wall-in-ground'), { ...options, withFields: true, situations: ['flood'] }),
    );
    const field = fields[0]!;
    expect(field.heads).toHaveLength(result.situations[0]!.mesh.nodes);
    expect(field.coordinates).toHaveLength(2 * result.situations[0]!.mesh.nodes);
    for (const level of field.equipotentials.values) {
      expect(level).toBeGreaterThan(0.6);
      expect(level).toBeLessThan(4.5);
    }
    const packed = JSON.parse(JSON.stringify(packFields(fields))) as { situations: { heads: number[] }[] };
    expect(packed.situations[0]!.heads).toEqual([...field.heads]);
  });

  it('at full effort keeps its levels and says how far it came', () => {
    const { convergence, discharge } = solved(
      analyzeSection(starting('wall-in-ground'), { ...options, effort: 'full', situations: ['flood'] }),
    ).result.situations[0]!;
    expect(convergence.levels.length).toBeGreaterThanOrEqual(2);
    const unknowns = convergence.levels.map((level) => level.unknowns);
    expect([...unknowns].sort((a, b) => a - b)).toEqual(unknowns);
    expect(convergence.dischargeError).toBeLessThanOrEqual(0.002);
    expect(convergence.exitGradientError).toBeLessThanOrEqual(0.01);
    const widths = convergence.levels.map(({ lower, upper }) => upper - lower);
    expect(widths.at(-1)).toBeLessThan(widths[0]!);
    expect(discharge).toMatchObject({
      kind: 'bound',
      unit: 'm3/s/m',
      value: convergence.levels.at(-1)!.discharge,
    });
  });
});

describe('memory between answers', () => {
  const fresh = (document: SectionDocument) => solved(analyzeSection(document, options)).result.situations;

  it('never changes a number, whatever changed in between', () => {
    const memory = new AnalysisMemory();
    const changes: ((draft: SectionDocument) => void)[] = [
      () => undefined,
      (d) => (d.situations[0]!.levels.river = 3),
      (d) => (d.materials[0]!.kMajor *= 3),
      (d) => (d.barriers[0]!.path[1] = [0, -8]),
      () => undefined,
      (d) => (d.barriers[0]!.conductance = 1e-6),
    ];
    for (const change of changes) {
      const document = starting('wall-in-ground', change);
      const remembered = solved(analyzeSection(document, { ...options, memory })).result.situations;
      expect(remembered).toEqual(fresh(document));
    }
  });
});

describe('what cannot be answered', () => {
  const refused = (value: unknown, more: Partial<AnalyzeOptions> = {}) => {
    const outcome = analyzeSection(value, { ...options, ...more });
    if (outcome.status !== 'refused') throw new RangeError(outcome.status);
    return outcome.problem;
  };

  it('is a problem document with every place', () => {
    const problem = refused(
      starting('wall-in-ground', (d) => {
        d.zones[0]!.material = 'peat';
        d.barriers[0]!.path[1] = [0, -20];
      }),
    );
    expect(problem.type).toBe('/problems/invalid-section');
    expect(problem.errors!.map(({ pointer }) => pointer)).toEqual(['/zones/0/material', '/barriers/0/path']);
  });

  it('an unknown situation, by its name', () => {
    expect(refused(starting('wall-in-ground'), { situations: ['storm'] }).detail).toContain('“storm”');
  });

  it.each([
    [
      'a bed above its water',
      (d: SectionDocument) => (d.situations[0]!.levels.basin = -0.2),
      '/edges/1/condition',
    ],
    [
      'a seepage face',
      (d: SectionDocument) => (d.edges[1]!.condition = { type: 'seepage' }),
      '/edges/1/condition',
    ],
    [
      'a drain above its head',
      (d: SectionDocument) =>
        d.drains.push({
          id: 'toe',
          path: [
            [4, -1],
            [6, -1],
          ],
          condition: { type: 'head', level: -2 },
        }),
      '/drains/0/condition',
    ],
  ])('%s needs a free surface', (_what, change, pointer) => {
    const problem = refused(starting('wall-in-ground', change));
    expect(problem.type).toBe('/problems/needs-free-surface');
    expect(problem.errors!.map((error) => error.pointer)).toContain(pointer);
  });

  it('ground that no water reaches, with its place', () => {
    const island = starting('wall-in-ground', (d) =>
      d.zones.push({
        id: 'island',
        material: 'sand',
        outline: [
          [60, -5],
          [70, -5],
          [70, 0],
        ],
      }),
    );
    const problem = refused(island);
    expect(problem.type).toBe('/problems/unsolvable');
    expect(problem.detail).toContain('cut off from every water level');
  });

  it('stops when asked to', () => {
    const outcome = analyzeSection(starting('wall-in-ground'), { ...options, shouldStop: () => true });
    expect(outcome.status).toBe('cancelled');
  });
});

describe('marks on an answer', () => {
  it('equal levels: nothing flows, every head is the level, no exit', () => {
    const still = starting('wall-in-ground', (d) =>
      d.situations.forEach(({ levels }) => (levels.basin = levels.river!)),
    );
    const { discharge, exit, piezometers } = solved(analyzeSection(still, options)).result.situations[0]!;
    expect(discharge.value).toBe(0);
    expect(exit).toEqual([]);
    for (const { head } of piezometers) expect(head).toBeCloseTo(2.2, 10);
  });

  it('suction is told with its depth and place', () => {
    // an aquifer between two heads below its upper cover: the cover is taken as saturated though it hangs above its water
    const confined = starting('wall-in-ground', (d) => {
      d.edges = [
        {
          id: 'left',
          path: [
            [-52, -12],
            [-52, -9],
          ],
          condition: { type: 'head', level: -4 },
        },
        {
          id: 'right',
          path: [
            [52, -12],
            [52, -9],
          ],
          condition: { type: 'head', level: -5 },
        },
      ];
    });
    const { result } = solved(analyzeSection(confined, options));
    const note = result.notes.find(({ code }) => code === 'suction')!;
    expect(note.severity).toBe('check');
    // at the top of the right end the head is −5 and a little more, the ground at 0
    expect(Number(/([\d.]+) m of suction/.exec(note.message)![1])).toBeCloseTo(5, 0);
    expect(note.at![1]).toBe(0);
  });

  it('measured heads: difference where observed, null where not', () => {
    const { situations } = solved(analyzeSection(starting('wall-in-ground'), options)).result;
    const [normal, flood] = situations.map(({ piezometers }) => piezometers[0]!);
    expect(normal!.observed).toBe(0.98);
    expect(normal!.difference).toBeCloseTo(normal!.head! - 0.98, 12);
    expect(normal!.pressure).toBeCloseTo(9.81 * (normal!.head! + 4), 9);
    expect(flood).toMatchObject({ observed: null, difference: null });
  });

  it('flows are named by edge and drain and add up to nothing', () => {
    const drained = starting('wall-in-ground', (d) => {
      d.drains.push({
        id: 'relief',
        path: [
          [8, -6],
          [12, -6],
        ],
        condition: { type: 'head', level: 0.7 },
      });
    });
    const { discharge } = solved(analyzeSection(drained, options)).result.situations[1]!;
    expect(Object.keys(discharge.byEdge)).toEqual(['riverbed', 'bed', 'relief']);
    expect(discharge.byEdge.relief).toBeLessThan(0);
    const net = Object.values(discharge.byEdge).reduce((sum, flow) => sum + flow, 0);
    expect(Math.abs(net) / discharge.value).toBeLessThan(1e-9);
    expect(discharge.kind).toBe('estimate');
  });
});
