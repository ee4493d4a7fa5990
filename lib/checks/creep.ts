import { materialAt } from '@/lib/domain/ground-column';
import { describeObject } from '@/lib/domain/describe';
import type { Criterion } from '@/lib/domain/criteria';
import type { CheckResult } from '@/lib/domain/result';
import type { Material, Structure } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { type CheckInput, citeBoth, judge, workingLine } from './check';

const method = 'Lane (1935), Security from under-seepage: masonry dams on earth foundations, Trans. ASCE 100';

/** Median sizes of the soil classes, mm; grain sizes of ISO 14688-1:2017, table 1 (from memory). */
const soilBySize: readonly (readonly [upTo: number, soil: string])[] = [
  [0.063, 'Very fine sand or silt'],
  [0.2, 'Fine sand'],
  [0.63, 'Medium sand'],
  [2, 'Coarse sand'],
  [6.3, 'Fine gravel'],
  [20, 'Medium gravel'],
  [63, 'Coarse gravel including cobbles'],
  [Number.POSITIVE_INFINITY, 'Boulders with some cobbles and gravel'],
];

/**
 * Compares the weighted creep ratio of every structure with the ratio for the soil under it.
 *
 * @param input - Document, result and criteria.
 * @returns One check per structure between two levels.
 * @source Lane (1935), Trans. ASCE 100:1235–1351: path = vertical (steeper than 45°) + a third of the horizontal.
 */
export function checkCreep(input: CheckInput): CheckResult[] {
  const heads = input.document.edges.flatMap(({ condition }) => levelOf(condition, input.situation) ?? []);
  const loss = Math.max(...heads) - Math.min(...heads);
  if (!(loss > 0) || input.document.geometry !== 'plane') return [];
  return input.document.structures.map((structure, index) => {
    const { creepPath } = input.result.structures.find(({ id }) => id === structure.id)!;
    const soil = soilUnder(input, structure);
    const criterion = chooseBySoil(input.criteria, soil);
    const value = creepPath.weighted / loss;
    const who = describeObject('structures', index, structure);
    const remark = criterion
      ? `An old rule of thumb; never used alone for a permanent work. The soil class “${criterion.soil ?? 'any'}” ${sayHowChosen(soil, criterion)}. Walls closer together than half the path between their tips need the shorter path across.`
      : `${who}: enter d50 of the soil under the base, or adopt one creep ratio in the criteria library, to compare this value. ${listRatios(input.criteria, value)}`;
    return {
      id: 'creep-lane',
      title: 'Weighted creep ratio',
      subject: structure.id,
      quantity: 'weighted creep path along base and walls over the head lost',
      value,
      required: criterion?.required ?? null,
      verdict: judge(value, criterion?.required ?? null),
      remark,
      source: citeBoth(method, criterion),
      working: [
        workingLine('L_v', 'vertical path, both faces of walls', creepPath.vertical, 'm'),
        workingLine('L_h', 'horizontal path along the base', creepPath.horizontal, 'm'),
        workingLine('L_w', 'weighted path', creepPath.weighted, 'm', 'L_v + L_h / 3'),
        workingLine('H', 'head lost', loss, 'm'),
        workingLine('C', 'weighted creep ratio', value, '', 'L_w / H'),
      ],
    };
  });
}

function soilUnder({ document }: CheckInput, { base }: Structure): Material | null {
  const [a, b] = [base[0]!, base.at(-1)!];
  const span = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const low = Math.min(...base.map(([, y]) => y));
  return materialAt(document, (a[0] + b[0]) / 2, low - 1e-3 * span);
}

/** One adopted ratio speaks for all soils; otherwise the class of the soil's median size decides, or its name. */
function chooseBySoil(criteria: readonly Criterion[], soil: Material | null): Criterion | null {
  const ratios = criteria.filter(({ quantity }) => quantity === 'creep-lane');
  const adopted = ratios.filter(({ example }) => !example);
  if (adopted.length === 1) return adopted[0]!;
  const pool = adopted.length > 0 ? adopted : ratios;
  const d50 = soil?.grading?.d50;
  if (d50 !== undefined) {
    const wanted = soilBySize.find(([upTo]) => d50 <= upTo)![1];
    return pool.find((criterion) => criterion.soil === wanted) ?? null;
  }
  return soil ? chooseByName(pool, soil.name) : null;
}

/** The longest soil class that stands word for word in the material's name, so that “very fine sand” is not “fine sand”. */
function chooseByName(pool: readonly Criterion[], name: string): Criterion | null {
  const words = ` ${name
    .toLowerCase()
    .replace(/[^a-z]+/g, ' ')
    .trim()} `;
  const fits = pool.flatMap((criterion) =>
    (criterion.soil ?? '')
      .toLowerCase()
      .split(/ or | including | with /)
      .slice(0, 2)
      .filter((soil) => soil !== '' && words.includes(` ${soil} `))
      .map((soil) => ({ criterion, length: soil.length })),
  );
  return (
    fits.reduce<(typeof fits)[number] | null>(
      (best, fit) => (best && best.length >= fit.length ? best : fit),
      null,
    )?.criterion ?? null
  );
}

function sayHowChosen(soil: Material | null, criterion: Criterion): string {
  if (!criterion.example) return 'is the practice’s own';
  const d50 = soil?.grading?.d50;
  return d50 === undefined ? `follows from the name “${soil?.name ?? ''}”` : `follows from d50 = ${d50} mm`;
}

/** Which soils of the library the ratio would do for. */
function listRatios(criteria: readonly Criterion[], value: number): string {
  const ratios = criteria.filter(({ quantity, soil }) => quantity === 'creep-lane' && soil !== undefined);
  const least = ratios.filter(({ required }) => value >= required).sort((a, b) => b.required - a.required)[0];
  if (ratios.length === 0) return '';
  return least
    ? `The ratio would do down to “${least.soil}” (${least.required}).`
    : 'The ratio would do for none of the soils in the library.';
}
