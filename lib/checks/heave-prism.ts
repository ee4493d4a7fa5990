import { distanceToPath } from '@/lib/domain/ground';
import type { CheckResult, WorkingLine } from '@/lib/domain/result';
import type { Barrier, Edge, Point } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { waterUnitWeight } from '@/solver';
import {
  type CheckInput,
  chooseCriterion,
  citeBoth,
  incomplete,
  judge,
  materialAt,
  workingLine,
} from './check';

const method =
  'Terzaghi (1943), Theoretical Soil Mechanics, art. 94; Terzaghi & Peck (1948), Soil Mechanics in Engineering Practice';

/** The soil prism in front of a wall: embedded depth D below the bed, width D/2. */
interface Prism {
  readonly wall: Barrier;
  readonly edge: Edge;
  /** Where the wall meets the bed. */
  readonly foot: Point;
  /** +1 where the bed lies to the right of the wall. */
  readonly direction: 1 | -1;
  readonly depth: number;
  readonly width: number;
  /** Head on the bed, m. */
  readonly bedHead: number;
}

/**
 * Checks heave of the soil prism in front of every wall with an outflow bed beside it, in total and in effective form.
 *
 * Effective: F = W′ / (γw h_a), with the average excess head h_a over the prism's base; total: F = (W + water above) / u. Both are
 * allowed by practice and give different margins, so both stand.
 *
 * @param input - Document, result and criteria.
 * @returns Two checks per prism.
 * @source Terzaghi (1943), art. 94.
 */
export function checkHeavePrisms(input: CheckInput): CheckResult[] {
  return findPrisms(input).flatMap((prism) => checkPrism(input, prism));
}

function findPrisms({ document, situation, result }: CheckInput): Prism[] {
  return document.barriers.flatMap((wall) => {
    const tip = wall.path.reduce((low, p) => (p[1] < low[1] ? p : low));
    return result.exit.flatMap((face): Prism[] => {
      const edge = document.edges.find(({ id }) => id === face.edge)!;
      const bedHead = levelOf(edge.condition, situation);
      const scale = 1e-6 * Math.max(...edge.path.map(([x, y]) => Math.abs(x) + Math.abs(y)), 1);
      const end = [edge.path[0]!, edge.path.at(-1)!].find(
        ([x, y]) => distanceToPath(x, y, wall.path) <= scale,
      );
      if (!end || bedHead === null) return [];
      const isFirst = end === edge.path[0];
      const next = isFirst ? edge.path[1]! : edge.path.at(-2)!;
      // a bed rises or falls gently away from the wall; anything steeper is another shape of failure
      if (Math.abs(next[1] - end[1]) > 0.2 * Math.abs(next[0] - end[0])) return [];
      const depth = end[1] - tip[1];
      if (depth <= scale || Math.abs(tip[0] - end[0]) > 0.05 * depth) return [];
      const width = Math.min(depth / 2, Math.abs(next[0] - end[0]));
      const direction = next[0] > end[0] ? 1 : -1;
      return [{ wall, edge, foot: end, direction, depth, width, bedHead }];
    });
  });
}

/** Average head over the prism's base; points gather towards the wall, where the head changes as the root of the distance. */
function averageHead({ probe }: CheckInput, { foot, direction, depth, width }: Prism): number | null {
  const steps = 64;
  let sum = 0;
  for (let i = 0; i < steps; i++) {
    const t = (i + 0.5) / steps;
    const head = probe.headAt(foot[0] + direction * width * t * t, foot[1] - depth);
    if (head === null) return null;
    sum += (head * 2 * t) / steps;
  }
  return sum;
}

/** Average total weight over the prism, kPa at its base; the name of a material without unit weight instead. */
function averageWeight(
  { document }: CheckInput,
  { foot, direction, depth, width }: Prism,
): number | { missing: string } {
  const columns = 8;
  const rows = 64;
  let sum = 0;
  for (let i = 0; i < columns; i++) {
    for (let j = 0; j < rows; j++) {
      const x = foot[0] + (direction * width * (i + 0.5)) / columns;
      const soil = materialAt(document, x, foot[1] - (depth * (j + 0.5)) / rows);
      if (soil?.saturatedUnitWeight === undefined)
        return { missing: soil?.name ?? 'the ground in front of the wall' };
      sum += soil.saturatedUnitWeight;
    }
  }
  return (sum * depth) / (columns * rows);
}

function checkPrism(input: CheckInput, prism: Prism): CheckResult[] {
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
  const head = averageHead(input, prism);
  if (head === null)
    return bases.map((base) => incomplete(base, 'The prism reaches beyond the drawn ground.'));
  const weight = averageWeight(input, prism);
  if (typeof weight !== 'number') {
    return bases.map((base) =>
      incomplete(base, `Enter the saturated unit weight of “${weight.missing}” to weigh the prism.`),
    );
  }
  const excess = head - prism.bedHead;
  const water = Math.max(0, prism.bedHead - prism.foot[1]) * waterUnitWeight;
  const pressure = waterUnitWeight * (head - prism.foot[1] + prism.depth);
  const submerged = weight - waterUnitWeight * prism.depth;
  const shared = sharedLines(prism, weight);
  const factorEffective = excess > 0 ? submerged / (waterUnitWeight * excess) : Number.POSITIVE_INFINITY;
  const factorTotal = (weight + water) / pressure;
  const remark =
    'The prism of half the embedment in width is the customary one; narrower or shallower prisms can be more critical. Both forms are allowed and differ; the effective form is the more telling one.';
  return [
    {
      ...bases[0],
      value: Number.isFinite(factorEffective) ? factorEffective : null,
      required: effective?.required ?? null,
      verdict: judge(factorEffective, effective?.required ?? null),
      remark,
      working: [
        ...shared,
        workingLine('W′', 'submerged weight over the base', submerged, 'kPa', 'W − γw D'),
        workingLine('h_a', 'average excess head over the base, above the bed’s head', excess, 'm'),
        workingLine('F', 'factor', factorEffective, '', 'W′ / (γw h_a)'),
      ],
    },
    {
      ...bases[1],
      value: factorTotal,
      required: total?.required ?? null,
      verdict: judge(factorTotal, total?.required ?? null),
      remark,
      working: [
        ...shared,
        workingLine('w', 'water standing on the bed', water, 'kPa', 'γw (level − bed)'),
        workingLine('u', 'average water pressure on the base', pressure, 'kPa'),
        workingLine('F', 'factor', factorTotal, '', '(W + w) / u'),
      ],
    },
  ];
}

function sharedLines({ depth, width }: Prism, weight: number): WorkingLine[] {
  return [
    workingLine('D', 'embedment below the bed', depth, 'm'),
    workingLine('b', 'width of the prism', width, 'm', 'D / 2, no wider than the bed'),
    workingLine('W', 'total weight over the base', weight, 'kPa', 'Σ γsat t'),
    workingLine('γw', 'unit weight of water', waterUnitWeight, 'kN/m³'),
  ];
}
