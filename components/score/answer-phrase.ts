// The answer in one phrase: what passes, what lifts, how the exit stands. Composed from a result document, nothing else.
import type { SituationResult } from '@/lib/domain/result';
import { writeSignificant } from './write-number';

/** One part of the phrase. */
export interface AnswerPart {
  readonly key: string;
  readonly value: string;
  readonly unit: string;
  /** Said after the unit, smaller. */
  readonly remark?: string;
}

const liters = 1000;

/** Composes the parts of the phrase for one situation. */
export function composeAnswer(result: SituationResult, units: 'si' | 'us'): AnswerPart[] {
  return [
    dischargePart(result, units),
    ...upliftPart(result, units),
    ...exitPart(result),
    ...heavePart(result),
  ];
}

function dischargePart({ discharge }: SituationResult, units: 'si' | 'us'): AnswerPart {
  const isMetric = units === 'si';
  const perRun = discharge.unit === 'm3/s/m';
  // US gallons a minute, per foot run: 1 m³/s = 15 850.3 gpm
  const factor = isMetric ? liters : 15_850.323 * (perRun ? 0.3048 : 1);
  const [low, high] = [discharge.lower * factor, discharge.upper * factor];
  const small = isMetric && perRun && high < 0.01;
  const scale = small ? 86_400 : 1;
  const unit = isMetric ? (small ? 'l/day' : 'l/s') : 'gal/min';
  return {
    key: 'discharge',
    value: writeRange(low * scale, high * scale),
    unit: `${unit}${perRun ? (isMetric ? ' per metre' : ' per foot') : ''}`,
    ...(discharge.kind === 'estimate' ? { remark: 'estimated' } : {}),
  };
}

/** Lower and upper with as many digits as it takes to tell them apart, at least three, at most five. */
function writeRange(low: number, high: number): string {
  if (!(high > 0)) return '0';
  for (let digits = 3; digits <= 5; digits++) {
    const [a, b] = [writeSignificant(low, digits), writeSignificant(high, digits)];
    if (a !== b) return `${a}–${b}`;
  }
  return writeSignificant((low + high) / 2, 4);
}

function upliftPart({ structures, discharge }: SituationResult, units: 'si' | 'us'): AnswerPart[] {
  if (structures.length === 0) return [];
  const total = structures.reduce((sum, { upliftForce }) => sum + upliftForce, 0);
  const perRun = discharge.unit === 'm3/s/m';
  const value = units === 'si' ? total : total / (perRun ? 14.593903 : 4.448222);
  const unit = units === 'si' ? (perRun ? 'kN/m' : 'kN') : perRun ? 'kip/ft' : 'kip';
  return [{ key: 'uplift', value: writeSignificant(value, 3), unit: `${unit} uplift` }];
}

function exitPart({ exit, checks }: SituationResult): AnswerPart[] {
  const faces = exit.filter(({ edge }) =>
    checks.some(
      (check) => check.id.startsWith('exit-gradient') && check.subject === edge && check.value !== null,
    ),
  );
  const shown = faces.length > 0 ? faces : exit;
  const steepest = shown.reduce<(typeof exit)[number] | null>((most, face) => {
    const size = (f: (typeof exit)[number]): number =>
      f.max.unbounded ? f.max.averaged : (f.max.gradient ?? 0);
    return !most || size(face) > size(most) ? face : most;
  }, null);
  if (!steepest) return [];
  const { max } = steepest;
  if (max.unbounded || max.gradient === null) {
    return [
      {
        key: 'exit',
        value: writeSignificant(max.averaged, 2),
        unit: 'exit gradient',
        remark: `averaged over ${writeSignificant(max.averagingLength, 2)} m; unbounded at a point`,
      },
    ];
  }
  return [{ key: 'exit', value: writeSignificant(max.gradient, 2), unit: 'exit gradient' }];
}

function heavePart({ checks }: SituationResult): AnswerPart[] {
  const heave = checks
    .filter((check) => check.id === 'heave-prism-effective' && check.value !== null)
    .reduce<(typeof checks)[number] | null>(
      (least, check) => (least && least.value! <= check.value! ? least : check),
      null,
    );
  if (!heave) return [];
  const against = heave.required === null ? '' : ` against ${writeSignificant(heave.required, 2)}`;
  return [{ key: 'heave', value: writeSignificant(heave.value!, 2), unit: `heave${against}` }];
}
