import type { CheckResult, ExitResult } from '@/lib/domain/result';
import type { Edge, Material, Point } from '@/lib/domain/section';
import { distanceToSegment, pathSegments } from '@/lib/domain/ground';
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
  'Harza (1935), Uplift and seepage under dams on sand, Trans. ASCE 100; Harr (1962), Groundwater and Seepage, ch. 5; critical gradient Terzaghi (1922, 1943)';

/** A face whose outward normal rises less than this is no ground surface that water lifts (a far end, a steep slope). */
const leastRise = 0.2;

/**
 * Compares the critical gradient with the steepest outward gradient of every face from which water leaves upward.
 *
 * Where theory makes the gradient infinite no factor on a point value exists: the average over the stated length is compared with the
 * criterion set for that quantity, and the verdict is left to judgement.
 *
 * @param input - Document, result and criteria.
 * @returns One check per face.
 * @source Harza (1935); Harr (1962), ch. 5; Terzaghi (1943), Theoretical Soil Mechanics, art. 94.
 */
export function checkExitGradients(input: CheckInput): CheckResult[] {
  return input.result.exit.flatMap((face) => {
    const edge = input.document.edges.find(({ id }) => id === face.edge);
    if (!edge || riseAt(edge, face.max.at) < leastRise) return [];
    return [checkFace(input, face, edge)];
  });
}

/** Vertical component of the face's normal at a point. */
function riseAt(edge: Edge, [x, y]: readonly [number, number]): number {
  const [a, b] = nearestSegment(edge.path, x, y);
  return Math.abs(b[0] - a[0]) / Math.hypot(b[0] - a[0], b[1] - a[1]);
}

function nearestSegment(path: readonly Point[], x: number, y: number): [Point, Point] {
  return pathSegments(path).reduce((best, segment) =>
    distanceToSegment(x, y, ...segment) < distanceToSegment(x, y, ...best) ? segment : best,
  );
}

/** The material just under the surface: a little to either side of the point and below it. */
function soilUnder(input: CheckInput, edge: Edge, at: readonly [number, number]): Material | null {
  const [a, b] = nearestSegment(edge.path, at[0], at[1]);
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const step = 1e-4 * length;
  for (const along of [0, step, -step]) {
    for (const side of [1, -1]) {
      const x = at[0] + (along * (b[0] - a[0])) / length - (side * step * (b[1] - a[1])) / length;
      const y = at[1] + (along * (b[1] - a[1])) / length + (side * step * (b[0] - a[0])) / length;
      const soil = materialAt(input.document, x, y);
      if (soil) return soil;
    }
  }
  return null;
}

function checkFace(input: CheckInput, face: ExitResult, edge: Edge): CheckResult {
  const { max } = face;
  const isBounded = !max.unbounded && max.gradient !== null;
  const criterion = chooseCriterion(
    input.criteria,
    isBounded ? 'exit-gradient-factor' : 'exit-gradient-averaged-factor',
  );
  const soil = soilUnder(input, edge, max.at);
  const length = max.averagingLength;
  const base = {
    id: 'exit-gradient',
    title: 'Gradient at the exit',
    subject: edge.id,
    quantity: isBounded
      ? 'critical gradient over the steepest outward gradient at the surface'
      : `critical gradient over the gradient averaged over ${length} m from the surface`,
    source: citeBoth(method, criterion),
  };
  const gradient = isBounded ? max.gradient! : max.averaged;
  const gradientLine = isBounded
    ? workingLine('i', 'steepest outward gradient at the surface', gradient, '')
    : workingLine('i_av', `outward gradient averaged over ${length} m along the inward normal`, gradient, '');
  if (soil?.saturatedUnitWeight === undefined) {
    const name = soil ? `“${soil.name}”` : 'the ground at the exit';
    return incomplete(base, `Enter the saturated unit weight of ${name} to form the critical gradient.`, [
      gradientLine,
    ]);
  }
  const critical = (soil.saturatedUnitWeight - waterUnitWeight) / waterUnitWeight;
  const value = critical / gradient;
  const required = criterion?.required ?? null;
  const working = [
    workingLine('γsat', `saturated unit weight of ${soil.name}`, soil.saturatedUnitWeight, 'kN/m³'),
    workingLine('γw', 'unit weight of water', waterUnitWeight, 'kN/m³'),
    workingLine('i_c', 'critical gradient', critical, '', '(γsat − γw) / γw'),
    gradientLine,
    workingLine('F', 'factor', value, '', isBounded ? 'i_c / i' : 'i_c / i_av'),
  ];
  if (!isBounded) {
    const remark =
      'At this point theory gives an infinite gradient, so no point value is stated; the average over a length stands in its place. An end cutoff or a filter removes the question.';
    const verdict =
      judge(value, required) === 'falls-short' ? ('falls-short' as const) : ('attention' as const);
    return { ...base, value, required, verdict, remark, working };
  }
  const slopes = riseAt(edge, max.at) < 0.98;
  const remark = slopes
    ? 'The face slopes: the gradient is taken normal to it, and the ground’s own stability on the slope is not part of this check.'
    : undefined;
  return {
    ...base,
    value,
    required,
    verdict: judge(value, required),
    ...(remark === undefined ? {} : { remark }),
    working,
  };
}
