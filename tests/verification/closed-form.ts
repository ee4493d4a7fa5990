// One closed form through the whole path, section document to result document: the claim, its source, the exact value, the tolerance
// allowed to the solver. Heads are in metres; k = 1 m/s and H = 1 m unless the case says otherwise, so q reads as q/kH.
import { expect } from 'vitest';
import type { SituationResult } from '@/lib/domain/result';
import type { SectionInput } from '@/lib/domain/section';
import { solveSection } from '../fixtures/solve-section';

export interface ClosedForm {
  readonly title: string;
  readonly source: string;
  readonly section: SectionInput;
  /** Discharge and relative tolerance. */
  readonly q?: readonly [value: number, tolerance: number];
  /** The bracket must hold the exact discharge of the drawn, finite section. */
  readonly bracketed?: number;
  /** Greatest outward gradient and relative tolerance; `unbounded` where theory has none. */
  readonly exit?: readonly [value: number, tolerance: number] | 'unbounded';
  /** Outward gradient at x along the outflow bed, relative tolerance. */
  readonly along?: readonly (readonly [x: number, value: number, tolerance: number])[];
  /** Head at P1, P2, … and absolute tolerance. */
  readonly heads?: readonly (readonly [value: number, tolerance: number])[];
}

/** Solves the section and compares whatever the case states. */
export function expectClosedForm(one: ClosedForm): void {
  const result = solveSection(one.section);
  const { discharge } = result;
  expect(Math.abs(discharge.balance)).toBeLessThan(1e-9);
  if (one.q) expect(Math.abs(discharge.value / one.q[0] - 1)).toBeLessThan(one.q[1]);
  if (one.bracketed !== undefined) {
    // exact values are printed with six digits
    expect(discharge.kind).toBe('bound');
    expect(discharge.lower).toBeLessThanOrEqual(one.bracketed * (1 + 3e-6));
    expect(discharge.upper).toBeGreaterThanOrEqual(one.bracketed * (1 - 3e-6));
  }
  checkExit(one, result);
  one.heads?.forEach(([head, tolerance], i) => {
    const found = result.piezometers[i]!.head!;
    expect(Math.abs(found - head), `head at P${i + 1}: ${found}, not ${head}`).toBeLessThan(tolerance);
  });
}

function checkExit(one: ClosedForm, result: SituationResult): void {
  if (one.exit === undefined) return;
  expect(result.exit).toHaveLength(1);
  const { max, profile } = result.exit[0]!;
  if (one.exit === 'unbounded') {
    expect(max).toMatchObject({ unbounded: true, gradient: null });
    expect(max.averaged).toBeGreaterThan(0);
  } else {
    expect(max.unbounded).toBe(false);
    expect(Math.abs(max.gradient! / one.exit[0] - 1), `exit ${max.gradient}`).toBeLessThan(one.exit[1]);
  }
  one.along?.forEach(([x, value, tolerance]) => {
    const i = profile.findIndex(({ at }) => at[0] >= x);
    const [a, b] = [profile[i - 1]!, profile[i]!];
    const part = (x - a.at[0]) / (b.at[0] - a.at[0]);
    const found = a.gradient! + part * (b.gradient! - a.gradient!);
    expect(Math.abs(found / value - 1), `gradient at ${x}: ${found}`).toBeLessThan(tolerance);
  });
}
