// Verifications of a solved situation against the practice's criteria. Pure; one file per check.
import type { CheckResult } from '@/lib/domain/result';
import type { CheckInput } from './check';
import { checkCreep } from './creep';
import { checkExitGradients } from './exit-gradient';
import { checkFragments } from './fragments';
import { checkFlotation } from './flotation';
import { checkHeavePrisms } from './heave-prism';

export { cautions } from './cautions';
export type { CheckInput } from './check';
export { exampleCriteria } from './example-criteria';

/**
 * Runs every check that a situation calls for.
 *
 * @param input - Document, situation, result and criteria.
 * @returns The checks in a fixed order: exit gradient, heave, flotation, creep, the comparison by hand.
 */
export function runChecks(input: CheckInput): CheckResult[] {
  return [checkExitGradients, checkHeavePrisms, checkFlotation, checkCreep, checkFragments].flatMap((check) =>
    check(input),
  );
}
