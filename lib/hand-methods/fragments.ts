// The method of fragments: confined types I to VI, put in series between two levels.
import { computed, demand, given, type HandCalculation } from './calculation';
import { cofferdamInner } from './cofferdam';
import { completeK, completeKPrime, type Modulus } from './elliptic';
import { wallModulus } from './single-wall';
import type { WorkingLine } from '@/lib/domain/result';

const source =
  'Pavlovsky (1935); Harr (1962), Groundwater and Seepage, ch. 6; Harr (1977), Mechanics of Particulate Media; EM 1110-2-1901, app. B (form factors; sections from memory)';

/** A fragment, by its type in Harr's numbering; lengths in metres, measured on the transformed section. */
export type Fragment =
  | { readonly type: 'I'; readonly length: number; readonly thickness: number }
  /** Entrance or exit beside a wall; `width` up to a vertical impervious end or symmetry line, where it is not remote. */
  | { readonly type: 'II'; readonly embedment: number; readonly thickness: number; readonly width?: number }
  /** Entrance or exit: a floor with a wall at its inner end. */
  | { readonly type: 'III'; readonly floor: number; readonly embedment: number; readonly thickness: number }
  /** A floor with a wall at one end. */
  | { readonly type: 'IV'; readonly floor: number; readonly embedment: number; readonly thickness: number }
  /** A floor between two equal walls. */
  | { readonly type: 'V'; readonly floor: number; readonly embedment: number; readonly thickness: number }
  /** A floor between two walls. */
  | {
      readonly type: 'VI';
      readonly floor: number;
      readonly first: number;
      readonly second: number;
      readonly thickness: number;
    };

/** Width over thickness from which the end of a type II fragment is as good as remote: the form factor is then right to 1e-8. */
const remote = 6;

/**
 * Computes the form factor of a fragment.
 *
 * @param fragment - Type and lengths.
 * @returns Φ.
 * @throws {HandMethodError} `outside-definition` where a wall does not end inside its layer.
 * @source Harr (1962), ch. 6; type II with a near end: exact rectangle of {@link cofferdamInner}.
 */
export function formFactor(fragment: Fragment): number {
  switch (fragment.type) {
    case 'I':
      return fragment.length / fragment.thickness;
    case 'II': {
      const { embedment, thickness, width } = fragment;
      if (width !== undefined && width < remote * thickness)
        return cofferdamInner(embedment, thickness, width).formFactor;
      return ratio(wallModulus(embedment, thickness));
    }
    case 'III':
      return ratio(floorWithWallModulus(fragment));
    case 'IV':
      return formFactorIV(fragment.floor, fragment.embedment, fragment.thickness);
    case 'V':
      return formFactorVI(fragment.floor, fragment.embedment, fragment.embedment, fragment.thickness);
    case 'VI':
      return formFactorVI(fragment.floor, fragment.first, fragment.second, fragment.thickness);
  }
}

const ratio = (modulus: Modulus): number => completeK(modulus) / completeKPrime(modulus);

/** m = cos(πs/2T) √(tanh²(πb/2T) + tan²(πs/2T)), whose complement is cos(πs/2T)/cosh(πb/2T). */
function floorWithWallModulus(fragment: { floor: number; embedment: number; thickness: number }): Modulus {
  const { floor, embedment, thickness } = fragment;
  demand(embedment >= 0 && embedment < thickness && floor >= 0, 'the wall must end inside the layer');
  const s = (Math.PI * embedment) / (2 * thickness);
  const b = (Math.PI * floor) / (2 * thickness);
  return { m: Math.hypot(Math.cos(s) * Math.tanh(b), Math.sin(s)), complement: Math.cos(s) / Math.cosh(b) };
}

function formFactorIV(floor: number, embedment: number, thickness: number): number {
  const a = thickness - embedment;
  demand(a > 0, 'the wall must end inside the layer');
  return floor <= embedment
    ? Math.log(1 + floor / a)
    : Math.log(1 + embedment / a) + (floor - embedment) / thickness;
}

function formFactorVI(floor: number, first: number, second: number, thickness: number): number {
  const a1 = thickness - first;
  const a2 = thickness - second;
  demand(a1 > 0 && a2 > 0, 'the walls must end inside the layer');
  if (floor >= first + second)
    return Math.log((1 + first / a1) * (1 + second / a2)) + (floor - first - second) / thickness;
  const b1 = (floor + first - second) / 2;
  const b2 = (floor - first + second) / 2;
  demand(b1 >= 0 && b2 >= 0, 'the walls are too unequal for so short a floor');
  return Math.log((1 + b1 / a1) * (1 + b2 / a2));
}

/** Fragments in series, in the direction of flow. */
export interface FragmentChain {
  readonly fragments: readonly Fragment[];
  /** Head lost over all, m. */
  readonly head: number;
  /** k, or √(k_h k_v) on the transformed section, m/s. */
  readonly permeability: number;
}

/** Answers of the method. */
export interface FragmentValues {
  /** Φ of each fragment. */
  readonly formFactors: readonly number[];
  /** Head lost in each, m. */
  readonly losses: readonly number[];
  /** m³/s per metre */
  readonly discharge: number;
  /** At the wall of the last fragment if that is a type II; null otherwise, where theory gives no finite one. */
  readonly exitGradient: number | null;
}

/**
 * Computes discharge, head losses and exit gradient of fragments in series, `q = kH/ΣΦ`.
 *
 * @param chain - Fragments in the direction of flow, head and permeability.
 * @returns The calculation laid out, three lines a fragment.
 * @throws {HandMethodError} `outside-definition` where a wall does not end inside its layer.
 * @source Pavlovsky (1935); Harr (1962), ch. 6.
 */
export function computeFragments(chain: FragmentChain): HandCalculation<FragmentValues> {
  const { fragments, head, permeability } = chain;
  demand(fragments.length > 0, 'there must be a fragment');
  const formFactors = fragments.map(formFactor);
  const sum = formFactors.reduce((total, phi) => total + phi, 0);
  const losses = formFactors.map((phi) => (head * phi) / sum);
  const discharge = (permeability * head) / sum;
  const last = fragments.at(-1)!;
  const exitGradient = last.type === 'II' ? exitOf(last, losses.at(-1)!) : null;
  const working: WorkingLine[] = [
    given('H', 'head lost', head, 'm'),
    given('k', 'permeability', permeability, 'm/s'),
    ...fragments.flatMap((fragment, i) => layOut(fragment, i + 1, formFactors[i]!)),
    computed('ΣΦ', 'sum of the form factors', fragments.map((_, i) => `Φ${i + 1}`).join(' + '), sum, ''),
    ...losses.map((loss, i) =>
      computed(`h${i + 1}`, `head lost in fragment ${i + 1}`, `H Φ${i + 1} / ΣΦ`, loss, 'm'),
    ),
    computed('q', 'discharge', 'k H / ΣΦ', discharge, 'm³/s per m'),
  ];
  if (exitGradient !== null) {
    const n = fragments.length;
    const formula = isRemote(last) ? `π h${n} / (2 K T m)` : 'exact rectangle, see the form factor';
    working.push(computed('i_E', 'exit gradient at the wall', formula, exitGradient, ''));
  }
  return {
    title: 'Method of fragments',
    values: { formFactors, losses, discharge, exitGradient },
    working,
    source,
    range:
      'Confined flow in one uniform layer on a level impervious base. The vertical below every wall tip is taken as an equipotential; discharge is commonly within 5 %, exit gradients within 10 %, heads at wall tips within 5 % of the head lost.',
    isInRange: true,
  };
}

const isRemote = (fragment: Fragment): boolean =>
  fragment.type === 'II' && (fragment.width === undefined || fragment.width >= remote * fragment.thickness);

function exitOf(fragment: Extract<Fragment, { type: 'II' }>, loss: number): number {
  const { embedment, thickness, width } = fragment;
  if (!isRemote(fragment)) return (cofferdamInner(embedment, thickness, width!).exitRatio * loss) / thickness;
  const modulus = wallModulus(embedment, thickness);
  return (loss * Math.PI) / (2 * completeK(modulus) * thickness * modulus.m);
}

/** Words and formulas of each type. */
function layOut(fragment: Fragment, n: number, phi: number): WorkingLine[] {
  const T = given(`T${n}`, `fragment ${n}, type ${fragment.type}: thickness`, fragment.thickness, 'm');
  const at = (symbol: string, meaning: string, value: number): WorkingLine =>
    given(`${symbol}${n}`, `fragment ${n}: ${meaning}`, value, 'm');
  const end = (formula: string): WorkingLine =>
    computed(`Φ${n}`, `form factor of fragment ${n}`, formula, phi, '');
  switch (fragment.type) {
    case 'I':
      return [T, at('L', 'length', fragment.length), end('L / T')];
    case 'II':
      return isRemote(fragment)
        ? [T, at('s', 'embedment', fragment.embedment), end('K / K′, m = sin(π s / 2T)')]
        : [
            T,
            at('s', 'embedment', fragment.embedment),
            at('b', 'width to the impervious end or symmetry line', fragment.width!),
            end('exact rectangle: K(κ) / K′(κ)'),
          ];
    case 'III':
      return [
        T,
        at('b', 'floor', fragment.floor),
        at('s', 'wall below the floor', fragment.embedment),
        end('K / K′, m = cos(π s / 2T) √(tanh²(π b / 2T) + tan²(π s / 2T))'),
      ];
    case 'IV':
      return [
        T,
        at('b', 'floor', fragment.floor),
        at('s', 'wall below the floor', fragment.embedment),
        end(
          fragment.floor <= fragment.embedment ? 'ln(1 + b / (T − s))' : 'ln(1 + s / (T − s)) + (b − s) / T',
        ),
      ];
    case 'V':
      return [
        T,
        at('L', 'floor', fragment.floor),
        at('s', 'both walls below the floor', fragment.embedment),
        end(
          fragment.floor >= 2 * fragment.embedment
            ? '2 ln(1 + s / (T − s)) + (L − 2s) / T'
            : '2 ln(1 + L / 2(T − s))',
        ),
      ];
    case 'VI':
      return [
        T,
        at('L', 'floor', fragment.floor),
        at('s′', 'first wall below the floor', fragment.first),
        at('s″', 'second wall below the floor', fragment.second),
        end(
          fragment.floor >= fragment.first + fragment.second
            ? 'ln[(1 + s′/(T − s′)) (1 + s″/(T − s″))] + (L − s′ − s″) / T'
            : 'ln[(1 + b′/(T − s′)) (1 + b″/(T − s″))], b′ = (L + s′ − s″)/2, b″ = (L − s′ + s″)/2',
        ),
      ];
  }
}
