import { computeFlatFloor } from '@/lib/hand-methods/flat-floor';
import { computeFragments } from '@/lib/hand-methods/fragments';
import type { RecognisedSection } from '@/lib/hand-methods/layout';
import { recogniseBounds, recogniseSection } from '@/lib/hand-methods/recognise';
import type { CheckResult, WorkingLine } from '@/lib/domain/result';
import { type CheckInput, workingLine } from './check';

const method =
  'Method of fragments: Pavlovsky (1935); Harr (1962), Groundwater and Seepage, ch. 6 (section from memory). A difference of up to 10 % is common practice for this comparison';

/** Relative difference of the discharges beyond which the comparison asks for attention; common practice. */
const agreement = 0.1;

/**
 * Compares the numerical discharge with the method of fragments, where the section is one the method covers; mixed ground is enclosed by two.
 *
 * @param input - Document, situation and result.
 * @returns One check; `not-applicable` with the reason where the section is not covered.
 * @source Pavlovsky (1935); Harr (1962), ch. 6.
 */
export function checkFragments(input: CheckInput): CheckResult[] {
  const recognition = recogniseSection(input.document, input.situation);
  if (recognition.status === 'covered') return [compareUniform(input, recognition.section)];
  const bounds = recogniseBounds(input.document, input.situation);
  if (bounds.status === 'covered') return [compareEnclosed(input, bounds.low, bounds.high)];
  const subject = input.result.exit[0]?.edge ?? '';
  const reason = bounds.reason;
  return [{ ...base, subject, value: null, verdict: 'not-applicable', remark: reason, working: [] }];
}

const base = {
  id: 'fragments',
  title: 'Discharge by hand, method of fragments',
  quantity: 'numerical discharge over that of the method of fragments',
  required: null,
  source: method,
} as const;

function compareUniform(input: CheckInput, section: RecognisedSection): CheckResult {
  const hand = computeByHand(section);
  const value = input.result.discharge.value / hand.discharge;
  const percent = Math.abs(value - 1) * 100;
  const rounded = percent < 0.1 ? 'to 0.1 %' : `within ${(Math.ceil(percent * 10) / 10).toFixed(1)} %`;
  const differs = Math.abs(value - 1) > agreement;
  return {
    ...base,
    subject: section.exitEdge,
    value,
    verdict: differs ? 'attention' : 'meets',
    remark: differs
      ? `The discharges differ by ${percent.toFixed(0)} %. Look for a slip in the drawing, or for what the method leaves out.`
      : `The discharges agree ${rounded}. ${expectation[section.kind]}`,
    working: [...hand.working, ...compare(input, section, hand)],
  };
}

/** Mixed ground: the discharge must lie between those of uniform ground as tight as its tightest and as loose as its loosest part. */
function compareEnclosed(input: CheckInput, low: RecognisedSection, high: RecognisedSection): CheckResult {
  const [least, most] = [computeByHand(low), computeByHand(high)];
  const discharge = input.result.discharge.value;
  const isBetween =
    discharge >= (1 - agreement) * least.discharge && discharge <= (1 + agreement) * most.discharge;
  return {
    ...base,
    subject: low.exitEdge,
    quantity: 'numerical discharge over that by hand of uniform ground as loose as its loosest part',
    value: discharge / most.discharge,
    verdict: isBetween ? 'meets' : 'attention',
    remark: isBetween
      ? 'The ground has more than one permeability, so the method is used twice: with the least and with the greatest. The numerical discharge lies between the two, as it must; more than that the comparison cannot say.'
      : 'The ground has more than one permeability, so the method is used twice: with the least and with the greatest. The numerical discharge lies outside the two by more than 10 %. Look for a slip in the drawing.',
    source: `${method}. Enclosure: Rayleigh’s monotonicity, Pólya & Szegő (1951), ch. 2 (from memory)`,
    working: [
      ...most.working,
      workingLine('k_min', 'the same with the least permeability, √(k_h k_v)', low.permeability, 'm/s'),
      workingLine('q_min', 'discharge with the least permeability', least.discharge, 'm³/s per m'),
      workingLine('q_max', 'discharge with the greatest permeability', most.discharge, 'm³/s per m'),
      workingLine('q_n', 'numerical discharge', discharge, 'm³/s per m'),
    ],
  };
}

/** What the method is known to do on each kind of section. */
const expectation: Record<RecognisedSection['kind'], string> = {
  'single-wall': 'For one wall in ground at one level the method is exact.',
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
