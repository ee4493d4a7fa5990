// Good sections with random damage: each is answered or refused in words, none throws, none yields a number that is none.
import fc from 'fast-check';
import { expect, it } from 'vitest';
import { startingPoints } from '@/lib/domain/starting-points';
import { analyzeSection } from './analyze';

type Path = readonly string[];

function listPaths(value: unknown, path: Path = []): Path[] {
  if (typeof value !== 'object' || value === null) return [path];
  const inside = Object.entries(value).flatMap(([key, part]) => listPaths(part, [...path, key]));
  return path.length > 0 ? [path, ...inside] : inside;
}

interface Damage {
  readonly where: number;
  readonly kind: 'shift' | 'remove' | 'repeat' | 'replace';
  readonly amount: number;
  readonly value: unknown;
}

const damages = fc.record<Damage>({
  where: fc.nat(),
  kind: fc.constantFrom('shift', 'shift', 'shift', 'remove', 'repeat', 'replace'),
  amount: fc.double({ min: -8, max: 8, noNaN: true }),
  value: fc.constantFrom(null, '', 'x', -1, 0, 1e-300, 1e300, [], {}, true, [[0, 0]]),
});

function damage(document: unknown, { where, kind, amount, value }: Damage): void {
  const paths = listPaths(document);
  const path = paths[where % paths.length]!;
  const key = path.at(-1)!;
  let holder = document as Record<string, unknown>;
  for (const part of path.slice(0, -1)) holder = holder[part] as Record<string, unknown>;
  const old = holder[key];
  if (kind === 'shift' && typeof old === 'number') holder[key] = old + amount;
  else if (kind === 'remove' && Array.isArray(holder)) holder.splice(Number(key), 1);
  else if (kind === 'remove') delete holder[key];
  else if (kind === 'repeat' && Array.isArray(holder)) holder.splice(Number(key), 0, structuredClone(old));
  else holder[key] = structuredClone(value);
}

const sections = fc.constantFrom(...startingPoints.map(({ document }) => document));

it('damaged sections are answered or refused in words', { timeout: 60_000 }, () => {
  let answered = 0;
  let refused = 0;
  fc.assert(
    fc.property(sections, fc.array(damages, { minLength: 1, maxLength: 2 }), (section, list) => {
      const document: unknown = structuredClone(section);
      list.forEach((one) => damage(document, one));
      const outcome = analyzeSection(document, {
        criteria: [],
        effort: 'live',
        withFields: false,
        now: () => 0,
      });
      if (outcome.status === 'solved') {
        answered++;
        JSON.stringify(outcome.result, (_key, value: unknown) => {
          if (typeof value === 'number') expect(value).toSatisfy(Number.isFinite);
          return value;
        });
        for (const { discharge } of outcome.result.situations) {
          expect(discharge.balance).toBeLessThan(1e-6);
          expect(discharge.lower).toBeLessThanOrEqual(discharge.value);
          expect(discharge.upper).toBeGreaterThanOrEqual(discharge.value);
        }
      } else if (outcome.status === 'refused') {
        refused++;
        expect(outcome.problem.detail).toMatch(/^[A-Z0-9“].*\.$/s);
        for (const { detail } of outcome.problem.errors ?? []) {
          expect(detail).toMatch(/\.$/);
          // no words of the machinery
          expect(detail).not.toMatch(/undefined|NaN|Invalid|expected|\[object/);
        }
      }
    }),
    { seed: 20_261_201, numRuns: 250 },
  );
  // both ways were taken often enough to mean something
  expect(Math.min(answered, refused)).toBeGreaterThan(40);
});
