// The words a person reads for the values of the domain's closed lists.
import type { CriterionQuantity } from '@/lib/domain/criteria';
import type { TokenScope } from '@/lib/domain/dto';
import type { Material } from '@/lib/domain/section';

/** What each criterion is set on, in the words of the trade. */
export const quantityWords: Record<CriterionQuantity, string> = {
  'exit-gradient-factor': 'Exit gradient: critical over greatest',
  'exit-gradient-averaged-factor': 'Exit gradient: critical over averaged',
  'heave-prism-effective': 'Heave of the prism: submerged weight over seepage force',
  'heave-prism-total': 'Heave of the prism: total weight over water force on its base',
  flotation: 'Flotation: weight over uplift',
  'creep-lane': 'Creep: weighted path over head',
};

/** Where a permeability comes from. */
export const sourceWords: Record<NonNullable<Material['kSource']>, string> = {
  'pumping-test': 'pumping test',
  'borehole-test': 'borehole test',
  laboratory: 'laboratory',
  grading: 'grading curve',
  'published-range': 'published range',
  judgement: 'judgement',
  borrowed: 'borrowed from elsewhere',
};

/** What a token may do. */
export const scopeWords: Record<TokenScope, string> = {
  'sections:read': 'read sections',
  'sections:write': 'create, replace and delete sections',
  solve: 'solve sections',
};

const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A permeability as `2 × 10⁻⁴`: two figures, never more than a soil can promise. */
export function formatPowerOfTen(value: number): string {
  const [mantissa = '', exponent = '0'] = value.toExponential(1).split('e');
  const digits = [...String(Math.abs(Number(exponent)))].map((digit) => superscripts[Number(digit)]).join('');
  return `${mantissa.replace(/\.0$/, '')} × 10${Number(exponent) < 0 ? '⁻' : ''}${digits}`;
}
