import type { CheckResult, ExitPoint, ExitResult } from '@/lib/domain/result';
import type { Edge } from '@/lib/domain/section';
import { waterUnitWeight } from '@/solver';
import { type CheckInput, chooseCriterion, citeBoth, incomplete, judge, workingLine } from './check';
import { describeFace, type FacePlace } from './ground-face';

const method =
  'Harza (1935), Uplift and seepage under dams on sand, Trans. ASCE 100; Harr (1962), Groundwater and Seepage, ch. 5; critical gradient Terzaghi (1922, 1943)';

/** A face whose outward normal rises less than this is no ground surface that water lifts: a far end, a wall of a trench. */
const leastRise = 0.2;
/** Below this rise a face counts as sloping: about 11°. */
const levelRise = 0.98;

/**
 * Compares the critical gradient with the steepest outward gradient of every face from which water leaves upward.
 *
 * Where theory makes the gradient infinite no factor on a point value exists: the average over the stated length is compared with the
 * criterion set for that quantity, and the verdict is left to judgement.
 *
 * @param input - Document, result and criteria.
 * @returns One check per face, and one more on the average where the practice adopted a criterion for it.
 * @source Harza (1935); Harr (1962), ch. 5; Terzaghi (1943), Theoretical Soil Mechanics, art. 94.
 */
export function checkExitGradients(input: CheckInput): CheckResult[] {
  return input.result.exit.flatMap((face): CheckResult[] => {
    const edge = input.document.edges.find(({ id }) => id === face.edge);
    if (!edge) return [];
    const steepest = findSteepest(input, face, edge);
    if (!steepest) return [notASurface(edge)];
    const checks = [checkPlace(input, edge, steepest)];
    const adopted = chooseCriterion(input.criteria, 'exit-gradient-averaged-factor');
    if (steepest.gradient !== null && adopted && !adopted.example)
      checks.push({
        ...checkPlace(input, edge, { ...steepest, gradient: null }, true),
        id: 'exit-gradient-averaged',
        title: 'Averaged gradient at the exit',
      });
    return checks;
  });
}

/** The steepest place of the part of a face that is ground surface. */
interface Steepest {
  /** Null where theory gives an infinite one. */
  readonly gradient: number | null;
  readonly averaged: number;
  readonly averagingLength: number;
  readonly at: readonly [number, number];
  readonly place: FacePlace;
}

function findSteepest(input: CheckInput, { max, profile }: ExitResult, edge: Edge): Steepest | null {
  const place = describeFace(input.document, edge, max.at);
  if (place.rise >= leastRise) {
    const gradient = max.unbounded ? null : max.gradient;
    return { gradient, averaged: max.averaged, averagingLength: max.averagingLength, at: max.at, place };
  }
  // the steepest place lies on an upright part: only the rest of the face is ground surface
  const rest = profile
    .map((point) => ({ point, place: describeFace(input.document, edge, point.at) }))
    .filter((one) => one.place.rise >= leastRise);
  if (rest.length === 0) return null;
  const steepness = ({ gradient }: ExitPoint): number => gradient ?? Number.POSITIVE_INFINITY;
  const worst = rest.reduce((most, one) => (steepness(one.point) > steepness(most.point) ? one : most));
  const averaged = rest.reduce(
    (most, one) => (one.point.averaged > most.averaged ? one.point : most),
    rest[0]!.point,
  );
  return {
    gradient: worst.point.gradient,
    averaged: averaged.averaged,
    averagingLength: averaged.averagingLength ?? max.averagingLength,
    at: worst.point.at,
    place: worst.place,
  };
}

function notASurface(edge: Edge): CheckResult {
  return {
    id: 'exit-gradient',
    title: 'Gradient at the exit',
    subject: edge.id,
    quantity: 'critical gradient over the steepest outward gradient at the surface',
    value: null,
    required: null,
    verdict: 'not-applicable',
    remark:
      'Water leaves here through an upright or overhanging face, a far end of the section for instance. The critical gradient is defined for water that rises through a ground surface, so no factor is formed.',
    source: method,
    working: [],
  };
}

function checkPlace(input: CheckInput, edge: Edge, steepest: Steepest, isChosen = false): CheckResult {
  const { gradient, averaged, averagingLength: length, place } = steepest;
  const isBounded = gradient !== null;
  const criterion = chooseCriterion(
    input.criteria,
    isBounded ? 'exit-gradient-factor' : 'exit-gradient-averaged-factor',
  );
  const base = {
    id: 'exit-gradient',
    title: 'Gradient at the exit',
    subject: edge.id,
    quantity: isBounded
      ? 'critical gradient over the steepest outward gradient at the surface'
      : `critical gradient over the gradient averaged over ${length} m from the surface`,
    source: citeBoth(method, criterion),
  };
  const used = gradient ?? averaged;
  const averageLine = workingLine(
    'i_av',
    `outward gradient averaged over ${length} m along the inward normal`,
    averaged,
    '',
  );
  const gradientLine = isBounded
    ? workingLine('i', 'steepest outward gradient at the surface', gradient, '')
    : averageLine;
  const { soil } = place;
  if (soil?.saturatedUnitWeight === undefined) {
    const name = soil ? `“${soil.name}”` : 'the ground at the exit';
    return incomplete(base, `Enter the saturated unit weight of ${name} to form the critical gradient.`, [
      gradientLine,
    ]);
  }
  const critical = (soil.saturatedUnitWeight - waterUnitWeight) / waterUnitWeight;
  const value = critical / used;
  const required = criterion?.required ?? null;
  const working = [
    workingLine('γsat', `saturated unit weight of ${soil.name}`, soil.saturatedUnitWeight, 'kN/m³'),
    workingLine('γw', 'unit weight of water', waterUnitWeight, 'kN/m³'),
    workingLine('i_c', 'critical gradient', critical, '', '(γsat − γw) / γw'),
    gradientLine,
    workingLine('F', 'factor', value, '', isBounded ? 'i_c / i' : 'i_c / i_av'),
    ...(isBounded ? [averageLine] : []),
  ];
  if (critical <= 0)
    return incomplete(
      base,
      `The saturated unit weight of “${soil.name}” is no more than that of water; a total, saturated weight is asked for.`,
      working,
    );
  const slope =
    place.rise < levelRise
      ? 'The face slopes: the gradient is taken normal to it, the critical gradient is that of level ground, and the stability of the slope is not part of this check.'
      : null;
  if (isBounded || isChosen) {
    const verdict = judge(value, required);
    return { ...base, value, required, verdict, ...(slope === null ? {} : { remark: slope }), working };
  }
  const unbounded =
    'At this point theory gives an infinite gradient, so no point value is stated; the average over a length stands in its place and depends on that length. An end cutoff or a filter removes the question.';
  // an average that falls short is bad news whatever the length; one that meets its criterion still needs judgement
  const verdict =
    judge(value, required) === 'falls-short' ? ('falls-short' as const) : ('attention' as const);
  const remark = slope === null ? unbounded : `${unbounded} ${slope}`;
  return { ...base, value, required, verdict, remark, working };
}
