import type { CheckResult, WorkingLine } from '@/lib/domain/result';
import { waterUnitWeight } from '@/solver';
import { type CheckInput, chooseCriterion, citeBoth, incomplete, judge, workingLine } from './check';
import { averageHead, findPrisms, type PrismWeight, type SoilPrism, weighPrism } from './soil-prism';

const method =
  'Terzaghi (1943), Theoretical Soil Mechanics, art. 94; Terzaghi & Peck (1948), Soil Mechanics in Engineering Practice';

const caution =
  'Two forms of one equilibrium, both in use, with different margins: the total form also carries the water at rest in weight and pressure. A factor for one does not apply to the other.';

/**
 * Checks heave of the soil prism in front of every wall with an outflow bed beside it, in total and in effective form.
 *
 * Effective: F = W′ / (γw h_a), with the average excess head h_a over the prism's base; total: F = (W + w) / u. Both are
 * allowed by practice and give different margins, so both stand.
 *
 * @param input - Document, result and criteria.
 * @returns Two checks per prism.
 * @source Terzaghi (1943), art. 94; Terzaghi & Peck (1948).
 */
export function checkHeavePrisms(input: CheckInput): CheckResult[] {
  return findPrisms(input).flatMap((prism) => checkPrism(input, prism));
}

function checkPrism(input: CheckInput, prism: SoilPrism): CheckResult[] {
  const effective = chooseCriterion(input.criteria, 'heave-prism-effective');
  const total = chooseCriterion(input.criteria, 'heave-prism-total');
  const subject = prism.wall.id;
  const bases = [
    {
      id: 'heave-prism-effective',
      title: 'Heave of the prism in front of the wall, effective form',
      subject,
      quantity: 'submerged weight over the excess water force on the base of the prism',
      source: citeBoth(method, effective),
    },
    {
      id: 'heave-prism-total',
      title: 'Heave of the prism in front of the wall, total form',
      subject,
      quantity: 'total weight with the water above over the water force on the base of the prism',
      source: citeBoth(method, total),
    },
  ] as const;
  const head = averageHead(prism, input.probe);
  if (head === null)
    return bases.map((base) => incomplete(base, 'The prism reaches beyond the drawn ground.'));
  const weight = weighPrism(input.document, prism);
  if ('missing' in weight) {
    return bases.map((base) =>
      incomplete(base, `Enter the saturated unit weight of “${weight.missing}” to weigh the prism.`),
    );
  }
  const excess = head - prism.bedHead;
  if (excess <= 0) {
    const remark = 'No excess head stands on the base of the prism: nothing lifts it.';
    return bases.map((base) => ({
      ...base,
      value: null,
      required: null,
      verdict: 'not-applicable',
      remark,
      working: [],
    }));
  }
  const pressure = waterUnitWeight * (head - prism.foot[1] + prism.depth);
  const factorEffective = weight.submerged / (waterUnitWeight * excess);
  const factorTotal = (weight.total + weight.water) / pressure;
  const lines = layOut(prism, weight, { head, excess, pressure, factorEffective, factorTotal });
  const values = [factorEffective, factorTotal];
  const remarks = [`${caution}${warnShallower(input, prism, factorEffective)}`, caution];
  return bases.map((base, i) => ({
    ...base,
    value: values[i]!,
    required: [effective, total][i]?.required ?? null,
    verdict: judge(values[i]!, [effective, total][i]?.required ?? null),
    remark: remarks[i]!,
    working: lines,
  }));
}

interface Forces {
  readonly head: number;
  readonly excess: number;
  readonly pressure: number;
  readonly factorEffective: number;
  readonly factorTotal: number;
}

/** Both forms side by side, in either check. */
function layOut({ depth, width, bedHead }: SoilPrism, weight: PrismWeight, forces: Forces): WorkingLine[] {
  return [
    workingLine('D', 'embedment below the bed', depth, 'm'),
    workingLine('b', 'width of the prism', width, 'm', 'D / 2, no wider than the bed'),
    workingLine('W', 'total weight over the base', weight.total, 'kPa', 'Σ γsat t'),
    workingLine('W′', 'submerged weight over the base', weight.submerged, 'kPa', 'Σ (γsat − γw) t'),
    workingLine('w', 'water standing on the bed', weight.water, 'kPa', 'γw (level − bed)'),
    workingLine('γw', 'unit weight of water', waterUnitWeight, 'kN/m³'),
    workingLine('h', 'average head over the base', forces.head, 'm'),
    workingLine('h_b', 'head on the bed', bedHead, 'm'),
    workingLine('h_a', 'average excess head', forces.excess, 'm', 'h − h_b'),
    workingLine(
      'u',
      'average water pressure on the base',
      forces.pressure,
      'kPa',
      'γw (h − elevation of the base)',
    ),
    workingLine('F′', 'factor, effective form', forces.factorEffective, '', 'W′ / (γw h_a)'),
    workingLine('F', 'factor, total form', forces.factorTotal, '', '(W + w) / u'),
  ];
}

/** Parts of the embedment tried as depth of a prism. */
const parts = [0.25, 0.375, 0.5, 0.625, 0.75, 0.875] as const;

/** A shallower prism can be nearer to heave, in layered ground above all; it is named where its factor is less by more than 2 %. */
function warnShallower(input: CheckInput, prism: SoilPrism, factor: number): string {
  let least = { factor, depth: prism.depth };
  for (const part of parts) {
    const shallow = {
      ...prism,
      depth: part * prism.depth,
      width: Math.min(prism.width, (part * prism.depth) / 2),
    };
    const head = averageHead(shallow, input.probe);
    const weight = weighPrism(input.document, shallow);
    if (head === null || 'missing' in weight || head <= prism.bedHead) continue;
    const found = weight.submerged / (waterUnitWeight * (head - prism.bedHead));
    if (found < least.factor) least = { factor: found, depth: shallow.depth };
  }
  if (least.factor >= 0.98 * factor) return '';
  return ` A shallower prism, ${least.depth.toFixed(2)} m deep and half as wide, has the lesser factor of ${least.factor.toFixed(2)} in the effective form.`;
}
