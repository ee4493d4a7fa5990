// Numbers as engineers type them, and units as they read them. Stored values are SI; conversions happen here and nowhere else.

/** What a number is of; decides the units understood and shown. */
export type Quantity =
  'length' | 'permeability' | 'conductance' | 'unit-weight' | 'force' | 'angle' | 'number';

/** A unit by its factor to SI. */
interface Unit {
  readonly names: readonly string[];
  /** SI value of one. */
  readonly factor: number;
}

// Conversion factors: BIPM (2019), The International System of Units; NIST SP 811 (2008), appendix B.
const units: Record<Quantity, readonly Unit[]> = {
  length: [
    { names: ['m'], factor: 1 },
    { names: ['cm'], factor: 0.01 },
    { names: ['mm'], factor: 0.001 },
    { names: ['km'], factor: 1000 },
    { names: ['ft', "'", 'feet', 'foot'], factor: 0.3048 },
    { names: ['in', '"', 'inch', 'inches'], factor: 0.0254 },
  ],
  permeability: [
    { names: ['m/s'], factor: 1 },
    { names: ['cm/s'], factor: 0.01 },
    { names: ['mm/s'], factor: 0.001 },
    { names: ['m/day', 'm/d'], factor: 1 / 86_400 },
    { names: ['m/year', 'm/a', 'm/yr'], factor: 1 / 31_557_600 },
    { names: ['ft/day', 'ft/d'], factor: 0.3048 / 86_400 },
    { names: ['ft/s'], factor: 0.3048 },
    { names: ['ft/min'], factor: 0.3048 / 60 },
  ],
  conductance: [
    { names: ['1/s', '/s'], factor: 1 },
    { names: ['1/day', '/day'], factor: 1 / 86_400 },
  ],
  'unit-weight': [
    { names: ['kn/m3', 'kn/m³'], factor: 1 },
    { names: ['pcf', 'lb/ft3', 'lbf/ft3'], factor: 0.157_087_46 },
  ],
  force: [
    { names: ['kn/m', 'kn'], factor: 1 },
    { names: ['mn/m', 'mn'], factor: 1000 },
    { names: ['lb/ft', 'lbf/ft', 'plf'], factor: 0.014_593_903 },
    { names: ['kip/ft'], factor: 14.593_903 },
  ],
  angle: [{ names: ['°', 'deg', 'degrees'], factor: 1 }],
  number: [],
};

/** What was understood, or why nothing was. */
export type ParsedNumber =
  | {
      readonly ok: true;
      readonly value: number;
      /** For instance `3.658 m`; empty where the text says it already. */ readonly understood: string;
    }
  | { readonly ok: false; readonly message: string };

const siNames: Record<Quantity, string> = {
  length: 'm',
  permeability: 'm/s',
  conductance: '1/s',
  'unit-weight': 'kN/m³',
  force: 'kN/m',
  angle: '°',
  number: '',
};

/**
 * Reads a number as typed: `12 ft`, `3e-5`, `0,5`, `10+2.4`, `6'`, `3 m/day`.
 *
 * @param text - What was typed; a decimal comma or point; sums and differences of plain numbers; a unit at the end.
 * @param quantity - Decides which units are understood; without a unit the number is in `system`'s own.
 * @param system - SI, or US customary for numbers typed without a unit.
 * @returns The SI value and what was understood, or one sentence on what to type.
 */
export function parseNumber(text: string, quantity: Quantity, system: 'si' | 'us' = 'si'): ParsedNumber {
  const trimmed = text.trim().replaceAll('−', '-').replaceAll('×10^', 'e').replaceAll(' ', ' ');
  if (trimmed === '') return { ok: false, message: 'Type a number.' };
  const match =
    /^([-+]?[\d.,\s]*\d[.,]?(?:\s*e\s*[-+]?\d+)?(?:\s*[-+]\s*[\d.,]*\d(?:\s*e\s*[-+]?\d+)?)*)\s*([^\d\s].*)?$/i.exec(
      trimmed,
    );
  if (!match)
    return {
      ok: false,
      message: `“${text.trim()}” is not a number; type for instance ${exampleOf(quantity)}.`,
    };
  const sum = addTerms(match[1]!);
  if (sum === null)
    return {
      ok: false,
      message: `“${match[1]}” can be read in more than one way; use one decimal point or comma.`,
    };
  const unit = match[2]?.trim().toLowerCase() ?? '';
  const factor =
    unit === ''
      ? defaultFactor(quantity, system)
      : units[quantity].find(({ names }) => names.includes(unit))?.factor;
  if (factor === undefined) {
    const known = units[quantity].map(({ names }) => names[0]).join(', ');
    return {
      ok: false,
      message:
        known === ''
          ? 'This is a plain number without a unit.'
          : `The unit “${match[2]!.trim()}” is not known here; use ${known}.`,
    };
  }
  const value = Number((sum * factor).toPrecision(12)); // 24 ft is 7.3152 m, not 7.315200000000001
  const isPlain = factor === 1 && /^[-+]?\d+(\.\d+)?$/.test(match[1]!.trim());
  return { ok: true, value, understood: isPlain ? '' : `${writeShort(value)} ${siNames[quantity]}`.trim() };
}

function exampleOf(quantity: Quantity): string {
  return quantity === 'permeability' ? '3e-5 or 2.6 m/day' : quantity === 'length' ? '12.4 or 40 ft' : '12.4';
}

function addTerms(text: string): number | null {
  // a sign after an exponent's e belongs to the exponent
  const terms = text.replaceAll(/\s+/g, '').match(/[-+]?[^-+e]+(?:e[-+]?\d+)?/gi);
  if (!terms) return null;
  let sum = 0;
  for (const term of terms) {
    const value = readPlain(term);
    if (value === null) return null;
    sum += value;
  }
  return Number.isFinite(sum) ? sum : null;
}

/** A comma is a decimal comma unless points stand beside it; `1,234.5` groups thousands. */
function readPlain(term: string): number | null {
  const commas = term.split(',').length - 1;
  const points = term.split('.').length - 1;
  let plain = term;
  if (commas === 1 && points === 0) plain = term.replace(',', '.');
  else if (commas > 0 && points === 1 && term.lastIndexOf(',') < term.indexOf('.'))
    plain = term.replaceAll(',', '');
  else if (points > 0 && commas === 1 && term.lastIndexOf('.') < term.indexOf(','))
    plain = term.replaceAll('.', '').replace(',', '.');
  else if (commas > 0 || points > 1) return null;
  const value = Number(plain);
  return Number.isNaN(value) ? null : value;
}

function defaultFactor(quantity: Quantity, system: 'si' | 'us'): number {
  if (system === 'si') return 1;
  return {
    length: 0.3048,
    permeability: 0.3048 / 86_400,
    conductance: 1,
    'unit-weight': 0.157_087_46,
    force: 0.014_593_903,
    angle: 1,
    number: 1,
  }[quantity];
}

/**
 * Names the unit a quantity is shown in.
 *
 * @param quantity - The quantity.
 * @param system - SI or US customary.
 * @returns For instance `m` or `ft`.
 */
export function unitName(quantity: Quantity, system: 'si' | 'us'): string {
  if (system === 'si') return siNames[quantity];
  return { ...siNames, length: 'ft', permeability: 'ft/day', 'unit-weight': 'pcf', force: 'lb/ft' }[quantity];
}

/**
 * Converts a stored value for showing.
 *
 * @param value - SI.
 * @param quantity - The quantity.
 * @param system - SI or US customary.
 * @returns The value in {@link unitName}'s unit.
 */
export function toShown(value: number, quantity: Quantity, system: 'si' | 'us'): number {
  return value / defaultFactor(quantity, system);
}

/**
 * Writes a number so that an editable field can be read and typed again.
 *
 * @param value - Any finite number.
 * @returns At most seven significant digits, with an exponent where it is shorter.
 */
export function writeShort(value: number): string {
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(7));
  const size = Math.abs(rounded);
  return size < 1e-3 || size >= 1e6 ? rounded.toExponential().replace('e+', 'e') : String(rounded);
}
