// Permeabilities and unit weights that look like slips.
import { describeNumber, describeObject, pointerTo } from '../describe';
import type { Issue } from '../issue';
import type { Material, SectionDocument } from '../section';
import { materialSettings as settings } from './settings';
import { verticalPermeability } from './tensor';

/**
 * Asks about numbers of materials that lie outside what soils have.
 *
 * @param document - Of the right shape.
 * @returns Checks, each with the number seen and what to look for.
 */
export function lintMaterials(document: SectionDocument): Issue[] {
  return document.materials.flatMap((material, index) => {
    const who = describeObject('materials', index, material);
    const make = (code: string, field: string, words: string): Issue => ({
      code,
      severity: 'check',
      pointer: pointerTo('materials', index, field),
      message: `${who}: ${words}`,
      subject: material.id,
    });
    return [...askPermeability(material, make), ...askRatio(material, make), ...askWeight(material, make)];
  });
}

type Make = (code: string, field: string, words: string) => Issue;

function askPermeability(material: Material, make: Make): Issue[] {
  const { low, high } = settings.permeability;
  return (['kMajor', 'kMinor'] as const).flatMap((field) => {
    const k = material[field];
    if (k >= low && k <= high) return [];
    const side = k > high ? 'more than open gravel passes' : 'less than intact clay passes';
    const words = `${field} is ${writeScientific(k)} m/s, ${side}. Was it typed in another unit? 1 cm/s is 0.01 m/s, 1 m/day is 1.16 × 10⁻⁵ m/s.`;
    return [make('permeability-unusual', field, words)];
  });
}

function askRatio(material: Material, make: Make): Issue[] {
  const { kMajor, kMinor } = material;
  const ratio = kMajor / kMinor;
  const issues: Issue[] = [];
  if (Math.max(ratio, 1 / ratio) > settings.anisotropy * (1 + 1e-9)) {
    const words = `its permeabilities differ by a factor of ${describeNumber(Math.round(Math.max(ratio, 1 / ratio)))} between the two axes; bedded soils seldom pass ${settings.anisotropy}. Check both values.`;
    issues.push(make('anisotropy-unusual', 'kMinor', words));
  }
  // kMinor above kMajor is asked about where the ids are checked
  const { horizontal, vertical } = verticalPermeability(material);
  if (ratio > 1 && vertical > horizontal * (1 + 1e-9)) {
    const words = `it is more permeable upright than level (${describeNumber(Math.round((100 * vertical) / horizontal) / 100)} times). Bedding makes it the other way round; under a floor the swap can hide most of the flow and of the exit gradient. Check the angle of ${describeNumber(material.angle)}°.`;
    issues.push(make('upright-more-permeable', 'angle', words));
  }
  return issues;
}

function askWeight({ saturatedUnitWeight: weight }: Material, make: Make): Issue[] {
  const { low, high } = settings.unitWeight;
  if (weight === undefined || (weight >= low && weight <= high)) return [];
  const isBuoyant = weight >= settings.buoyant.low && weight <= settings.buoyant.high;
  const guess = isBuoyant
    ? `That looks like a buoyant unit weight; the saturated one would be ${describeNumber(Math.round(10 * (weight + 9.81)) / 10)}.`
    : 'Heave, flotation and the critical gradient hang on it: check the value and its unit.';
  const words = `its saturated unit weight is ${describeNumber(weight)} kN/m³; soils have ${low} to ${high}. ${guess}`;
  return [make('unit-weight-unusual', 'saturatedUnitWeight', words)];
}

function writeScientific(value: number): string {
  const [mantissa, exponent] = value.toExponential(1).split('e') as [string, string];
  const digits = exponent
    .replace('+', '')
    .replace('-', '⁻')
    .replace(/\d/g, (d) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(d)]!);
  return `${mantissa} × 10${digits}`;
}
