// What every check shares: its input, the choice of a criterion, the verdict.
import type { Criterion, CriterionQuantity } from '@/lib/domain/criteria';
import type { CheckResult, SituationResult, Verdict, WorkingLine } from '@/lib/domain/result';
import type { SectionDocument, Situation } from '@/lib/domain/section';

/** What checks read. */
export interface CheckInput {
  readonly document: SectionDocument;
  readonly situation: Situation;
  readonly result: Omit<SituationResult, 'checks'>;
  readonly criteria: readonly Criterion[];
  readonly probe: {
    /** Total head at a point, m; null outside the ground. */
    headAt(x: number, y: number): number | null;
  };
}

/**
 * Chooses the criterion for a quantity: what the practice adopted goes before shipped examples, the stricter before the milder.
 *
 * @param criteria - The practice's library.
 * @param quantity - Exactly the quantity the check computes.
 * @returns The criterion, or null.
 */
export function chooseCriterion(
  criteria: readonly Criterion[],
  quantity: CriterionQuantity,
): Criterion | null {
  const fitting = criteria.filter((criterion) => criterion.quantity === quantity);
  const adopted = fitting.filter((criterion) => !criterion.example);
  const pool = adopted.length > 0 ? adopted : fitting;
  return pool.reduce<Criterion | null>((best, c) => (best && best.required >= c.required ? best : c), null);
}

/**
 * Compares a value with what is required of it.
 *
 * @param value - The check's value, or null where it could not be formed.
 * @param required - The least value, or null without a criterion.
 * @returns `meets` or `falls-short`; `attention` where judgement is needed.
 */
export function judge(value: number | null, required: number | null): Verdict {
  if (value === null || required === null || !Number.isFinite(value)) return 'attention';
  return value >= required ? 'meets' : 'falls-short';
}

/**
 * Joins the method's source with the criterion's.
 *
 * @param method - Author, year, section of the method.
 * @param criterion - The criterion applied, or null.
 * @returns One sentence for the result.
 */
export function citeBoth(method: string, criterion: Criterion | null): string {
  if (!criterion) return `${method}. No criterion is set for this quantity.`;
  const standing = criterion.example ? 'Example criterion, not yet adopted' : 'Criterion';
  return `${method}. ${standing}: ${criterion.title}, ${criterion.source}`;
}

/**
 * Writes one line of a working.
 *
 * @param symbol - As printed.
 * @param meaning - In words.
 * @param value - In `unit`.
 * @param unit - SI.
 * @param formula - Where the line is computed.
 * @returns The line.
 */
export function workingLine(
  symbol: string,
  meaning: string,
  value: number,
  unit: string,
  formula?: string,
): WorkingLine {
  return { symbol, meaning, value, unit, ...(formula === undefined ? {} : { formula }) };
}

/**
 * Makes a check that cannot be carried out, with the sentence that says what to enter.
 *
 * @param base - Id, title, subject, quantity and source.
 * @param remark - What is missing and where to enter it.
 * @param working - What is known.
 * @returns The check, for attention.
 */
export function incomplete(
  base: Pick<CheckResult, 'id' | 'title' | 'subject' | 'quantity' | 'source'>,
  remark: string,
  working: WorkingLine[] = [],
): CheckResult {
  return { ...base, value: null, required: null, verdict: 'attention', remark, working };
}
