import { computeFlatFloor } from '@/lib/hand-methods/flat-floor';
import { computeFragments } from '@/lib/hand-methods/fragments';
import type { RecognisedSection } from '@/lib/hand-methods/layout';
import { recogniseSection } from '@/lib/hand-methods/recognise';
import type { CheckResult, WorkingLine } from '@/lib/domain/result';
import { type CheckInput, workingLine } from './check';

const method =
  'Method of fragments: Pavlovsky (1935); Harr (1962), Groundwater and Seepage, ch. 6 (section from memory). A difference of up to 10 % is common practice for this comparison';

/** Relative difference of the discharges beyond which the comparison asks for attention; common practice. */
const agreement = 0.1;

/**
 * Compares the numerical discharge with the method of fragments, where the section is one the method covers.
 *
 * @param input - Document, situation and result.
 * @returns One check; `not-applicable` with the reason where the section is not covered.
 * @source Pavlovsky (1935); Harr (1962), ch. 6.
 */
export function checkFragments(input: CheckInput): CheckResult[] {
  const recognition = recogniseSection(input.document, input.situation);
  const base = {
    id: 'fragments',
    title: 'Discharge by hand, method of fragments',
    subject:
      recognition.status === 'covered' ? recognition.section.exitEdge : (input.result.exit[0]?.edge ?? ''),
    quantity: 'numerical discharge over that of the method of fragments',
    required: null,
    source: method,
  };
  if (recognition.status === 'not-covered')
    return [{ ...base, value: null, verdict: 'not-applicable', remark: recognition.reason, working: [] }];
  const hand = computeByHand(recognition.section);
  const value = input.result.discharge.value / hand.discharge;
  const percent = Math.abs(value - 1) * 100;
  const rounded = percent < 0.1 ? 'to 0.1 %' : `within ${(Math.ceil(percent * 10) / 10).toFixed(1)} %`;
  const differs = Math.abs(value - 1) > agreement;
  return [
    {
      ...base,
      value,
      verdict: differs ? 'attention' : 'meets',
      remark: differs
        ? `The discharges differ by ${percent.toFixed(0)} %. Look for a slip in the drawing, or for what the method leaves out.`
        : `The discharges agree ${rounded}. ${expectation[recognition.section.kind]}`,
      working: [...hand.working, ...compare(input, recognition.section, hand)],
    },
  ];
}

/** What the method is known to do on each kind of section. */
const expectation: Record<RecognisedSection['kind'], string> = {
  'single-wall': 'For one wall between level beds the method is exact.',
  'flat-floor': 'For a flat floor the hand formula is exact.',
  'floor-with-cutoffs':
    'The method is commonly a few per cent high in discharge, and up to a tenth high in exit gradient, where cutoffs differ.',
  'symmetric-pit': 'For a pit the method is commonly about 1 % high.',
};

interface ByHand {
  readonly discharge: number;
  readonly exitGradient: number | null;
  readonly working: readonly WorkingLine[];
}

function computeByHand({
  floor,
  fragments,
  head,
  permeability,
  horizontalScale,
  flows,
}: RecognisedSection): ByHand {
  const scaling =
    Math.abs(horizontalScale - 1) < 1e-12
      ? []
      : [
          workingLine(
            'r',
            'horizontal lengths are multiplied by this (transformed section)',
            horizontalScale,
            '',
            '√(k_v / k_h)',
          ),
        ];
  if (floor) {
    const { values, working } = computeFlatFloor({ ...floor, head, permeability });
    return { discharge: values.discharge, exitGradient: null, working: [...scaling, ...working] };
  }
  const { values, working } = computeFragments({ fragments, head, permeability });
  const discharge = flows * values.discharge;
  const both =
    flows === 2 ? [workingLine('Q', 'inflow past both walls', discharge, 'm³/s per m', '2 q')] : [];
  return { discharge, exitGradient: values.exitGradient, working: [...scaling, ...working, ...both] };
}

function compare({ result }: CheckInput, { exitEdge }: RecognisedSection, hand: ByHand): WorkingLine[] {
  const lines = [
    workingLine('q_n', 'numerical discharge', result.discharge.value, 'm³/s per m'),
    workingLine('q_n/q', 'ratio', result.discharge.value / hand.discharge, ''),
  ];
  const numerical = result.exit.find(({ edge }) => edge === exitEdge)?.max.gradient ?? null;
  if (hand.exitGradient === null || numerical === null) return lines;
  return [
    ...lines,
    workingLine('i_n', 'numerical exit gradient', numerical, ''),
    workingLine('i_n/i_E', 'ratio', numerical / hand.exitGradient, ''),
  ];
}
