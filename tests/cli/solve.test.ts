// npm run solve, as a script would call it: one process a case for what only a process can show (exit code, streams).
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import canonicalize from 'canonicalize';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Problem } from '@/lib/domain/problem';
import type { ResultDocument } from '@/lib/domain/result';
import type { SectionInput } from '@/lib/domain/section';

/** A wall in one layer: T = 16, s = 12, H = 4, k = 1e-6; the ground reaches 5 T to each side. */
const wall: SectionInput = {
  format: 'underfall-section/1',
  title: 'Wall in a layer',
  geometry: 'plane',
  materials: [{ id: 'sand', name: 'Sand', kMajor: 1e-6, kMinor: 1e-6, angle: 0, saturatedUnitWeight: 20 }],
  zones: [
    {
      id: 'layer',
      material: 'sand',
      outline: [
        [-80, -16],
        [80, -16],
        [80, 0],
        [-80, 0],
      ],
    },
  ],
  barriers: [
    {
      id: 'pile',
      path: [
        [0, 0],
        [0, -12],
      ],
    },
  ],
  edges: [
    {
      id: 'up',
      path: [
        [-80, 0],
        [0, 0],
      ],
      condition: { type: 'water', level: 'high' },
    },
    {
      id: 'down',
      path: [
        [0, 0],
        [80, 0],
      ],
      condition: { type: 'water', level: 'low' },
    },
  ],
  situations: [{ id: 'only', levels: { high: 4, low: 0 } }],
  piezometers: [{ id: 'P', at: [0.0001, -6] }],
};

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'underfall-cli-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

interface Outcome {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

function solve(...args: string[]): Outcome {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['node_modules/tsx/dist/cli.mjs', 'scripts/solve.ts', ...args],
    {
      encoding: 'utf8',
    },
  );
  return { status, stdout, stderr };
}

function write(name: string, content: unknown): string {
  const file = join(folder, name);
  writeFileSync(file, typeof content === 'string' ? content : JSON.stringify(content));
  return file;
}

function problemOf(outcome: Outcome): Problem {
  expect(outcome.status).toBe(2);
  expect(outcome.stdout).toBe('');
  const problem = JSON.parse(outcome.stderr) as Problem;
  expect(problem.type).toMatch(/^\/problems\//);
  expect(problem.title).not.toBe('');
  expect(problem.detail).toMatch(/\.$/);
  return problem;
}

describe('npm run solve', { timeout: 30_000 }, () => {
  it('answers a wall in a layer as the closed form does: q = kHK′/2K, i_E (Harr 1962, §5–6)', () => {
    const { status, stdout, stderr } = solve(
      write('wall.json', wall),
      '--fields',
      join(folder, 'fields.json'),
    );
    expect([status, stderr]).toEqual([0, '']);
    const result = JSON.parse(stdout) as ResultDocument;
    const situation = result.situations[0]!;
    expect(result.format).toBe('underfall-result/1');
    // of the file as written, where defaults are left out
    expect(result.section.sha256).toBe(createHash('sha256').update(canonicalize(wall)!).digest('hex'));
    expect(situation.discharge.value / 1.36127e-6).toBeCloseTo(1, 2);
    expect(situation.discharge.lower).toBeLessThanOrEqual(situation.discharge.value);
    expect(situation.discharge.upper).toBeGreaterThanOrEqual(situation.discharge.value);
    expect(Math.abs(situation.exit[0]!.max.gradient! / 0.0885495 - 1)).toBeLessThan(0.02);
    expect(situation.exit[0]!.profile.length).toBeGreaterThanOrEqual(40);
    expect(Math.abs(situation.piezometers[0]!.head! - 0.572087)).toBeLessThan(0.04);
    const fields = JSON.parse(readFileSync(join(folder, 'fields.json'), 'utf8')) as {
      situations: { heads: number[] }[];
    };
    expect(fields.situations[0]!.heads.length).toBe(situation.mesh.nodes);
  });

  it('says line and column where a file is not JSON', () => {
    const problem = problemOf(solve(write('broken.json', '{\n  "format": nope\n}')));
    expect(problem.type).toBe('/problems/invalid-input');
    expect(problem.detail).toContain('line 2, column 13');
  });

  it('names a missing file, a folder, an unknown option and an unknown situation', () => {
    expect(problemOf(solve(join(folder, 'none.json'))).detail).toContain('no such file');
    expect(problemOf(solve(folder)).detail).toContain('folder');
    expect(problemOf(solve('--hurry', write('wall2.json', wall))).detail).toContain('--hurry');
    expect(problemOf(solve(write('wall3.json', wall), '--situation', 'storm')).detail).toContain('“storm”');
  });

  it('lists every error of a document with its pointer', () => {
    const broken = structuredClone(wall) as unknown as Record<string, unknown[]>;
    (broken.materials![0] as { kMajor: number }).kMajor = 0;
    (broken.zones![0] as { outline?: unknown }).outline = undefined;
    const { errors } = problemOf(solve(write('two.json', broken)));
    expect(errors!.map(({ pointer }) => pointer).sort()).toEqual(['/materials/0/kMajor', '/zones/0/outline']);
  });

  it('says that a section with a seepage face needs a free surface', () => {
    const open = structuredClone(wall);
    open.edges![1]!.condition = { type: 'seepage' };
    const problem = problemOf(solve(write('open.json', open)));
    expect(problem.type).toBe('/problems/needs-free-surface');
    expect(problem.errors![0]!.pointer).toBe('/edges/1/condition');
  });
});
