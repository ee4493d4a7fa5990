import { describeObject } from '@/lib/domain/describe';
import type { CheckResult } from '@/lib/domain/result';
import { type CheckInput, chooseCriterion, citeBoth, judge, workingLine } from './check';

const method = 'Equilibrium of vertical forces; EN 1997-1:2004, 2.4.7.4 (UPL)';

/**
 * Compares the stated weight of every structure with the uplift on its base.
 *
 * Only the stated weight is counted: no water on top, no friction, no anchors.
 *
 * @param input - Document, result and criteria.
 * @returns One check per structure that is lifted.
 * @source EN 1997-1:2004, 2.4.7.4, equation 2.8; partial factors of table A.15 (values from memory).
 */
export function checkFlotation(input: CheckInput): CheckResult[] {
  const criterion = chooseCriterion(input.criteria, 'flotation');
  return input.document.structures.flatMap((structure, index): CheckResult[] => {
    const forces = input.result.structures.find(({ id }) => id === structure.id);
    if (!forces || forces.upliftForce <= 0) return [];
    const unit = input.document.geometry === 'plane' ? 'kN/m' : 'kN';
    const base = {
      id: 'flotation',
      title: 'Flotation',
      subject: structure.id,
      quantity: 'stated weight over the uplift on the base',
      source: citeBoth(method, criterion),
    };
    const uplift = workingLine('U', 'uplift on the base, suction counted as zero', forces.upliftForce, unit);
    if (structure.weight === undefined) {
      const who = describeObject('structures', index, structure);
      return [
        {
          ...base,
          value: null,
          required: null,
          verdict: 'not-applicable',
          remark: `${who} has no stated weight. Enter the weight per metre run and where it comes from to check flotation.`,
          working: [uplift],
        },
      ];
    }
    const value = structure.weight / forces.upliftForce;
    return [
      {
        ...base,
        value,
        required: criterion?.required ?? null,
        verdict: judge(value, criterion?.required ?? null),
        remark:
          'Only the stated weight is counted; water standing on the structure, friction and anchors are not.',
        working: [
          workingLine(
            'G',
            structure.weightSource ? `weight: ${structure.weightSource}` : 'stated weight',
            structure.weight,
            unit,
          ),
          uplift,
          workingLine('F', 'factor', value, '', 'G / U'),
          workingLine(
            'G_d',
            'stabilising design weight, EN 1997-1 UPL',
            0.9 * structure.weight,
            unit,
            '0.9 G',
          ),
          workingLine('V_d', 'destabilising design uplift, EN 1997-1 UPL', forces.upliftForce, unit, '1.0 U'),
        ],
      },
    ];
  });
}
