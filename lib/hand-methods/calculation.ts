// What every hand method returns: its numbers, its calculation laid out line by line, where it comes from and where it holds.
import type { WorkingLine } from '@/lib/domain/result';

/** A hand calculation, laid out. */
export interface HandCalculation<Values> {
  readonly title: string;
  readonly values: Values;
  readonly working: readonly WorkingLine[];
  /** Author, year, section; says “from memory” where the document was not opened. */
  readonly source: string;
  /** Range of validity, in words. */
  readonly range: string;
  /** Whether the inputs lie inside that range. */
  readonly isInRange: boolean;
}

/** What was asked of a hand method that it has no answer for. */
export type HandMethodErrorCode = 'outside-definition';

/** An input for which the formula is not defined (a wall through the whole layer, a negative length). */
export class HandMethodError extends Error {
  override readonly name = 'HandMethodError';

  constructor(
    readonly code: HandMethodErrorCode,
    message: string,
  ) {
    super(message);
  }
}

/**
 * Refuses inputs for which a formula is not defined.
 *
 * @param holds - The condition that must hold.
 * @param message - What was wrong.
 * @throws {HandMethodError} `outside-definition` unless it holds.
 */
export function demand(holds: boolean, message: string): void {
  if (!holds) throw new HandMethodError('outside-definition', message);
}

/**
 * Writes an input line of a working.
 *
 * @param symbol - As printed.
 * @param meaning - In words.
 * @param value - In `unit`.
 * @param unit - SI; empty for a ratio.
 * @returns The line.
 */
export function given(symbol: string, meaning: string, value: number, unit: string): WorkingLine {
  return { symbol, meaning, value, unit };
}

/**
 * Writes a computed line of a working.
 *
 * @param symbol - As printed.
 * @param meaning - In words.
 * @param formula - What the line evaluates.
 * @param value - In `unit`.
 * @param unit - SI; empty for a ratio.
 * @returns The line.
 */
export function computed(
  symbol: string,
  meaning: string,
  formula: string,
  value: number,
  unit: string,
): WorkingLine {
  return { symbol, meaning, value, unit, formula };
}
