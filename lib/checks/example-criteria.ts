// Published values, shipped as examples. Each is marked so until a practice adopts it; values stated “from memory” have to be compared with the
// cited document before that.
import type { Criterion, CriterionQuantity } from '@/lib/domain/criteria';

function example(
  id: string,
  quantity: CriterionQuantity,
  required: number,
  title: string,
  source: string,
  soil?: string,
): Criterion {
  return { id, quantity, required, title, source, example: true, ...(soil === undefined ? {} : { soil }) };
}

const fromMemory = 'value from memory; open the document before use.';
const lane = `Lane (1935), Security from under-seepage, Trans. ASCE 100; ${fromMemory}`;

/** Seeds of a practice's criteria library. */
export const exampleCriteria: readonly Criterion[] = [
  example(
    'example-exit-gradient',
    'exit-gradient-factor',
    4,
    'Factor on the exit gradient, 4 to 5',
    `Harr (1962), Groundwater and Seepage; ${fromMemory}`,
  ),
  example(
    'example-exit-gradient-cedergren',
    'exit-gradient-factor',
    2.5,
    'Factor on the exit gradient, 2.5 to 3',
    `Cedergren (1989), Seepage, Drainage, and Flow Nets; ${fromMemory}`,
  ),
  example(
    'example-exit-gradient-sheet-pile',
    'exit-gradient-factor',
    3,
    'Factor on the exit gradient beside sheet piles without a filter, 3',
    `EM 1110-2-2504, Design of Sheet Pile Walls; ${fromMemory}`,
  ),
  example(
    'example-exit-gradient-excavation',
    'exit-gradient-factor',
    1.5,
    'Factor on piping in sheeted excavations, 1.5 to 2',
    `NAVFAC DM-7.1, ch. 6, as quoted in Bond & Harris (2008), Decoding Eurocode 7; attribution from memory.`,
  ),
  example(
    'example-exit-averaged',
    'exit-gradient-averaged-factor',
    3,
    'Factor on the averaged exit gradient, 3',
    `EM 1110-2-1901, Seepage Analysis and Control for Dams (range quoted 2.5 to 5 for the exit gradient); ${fromMemory}`,
  ),
  example(
    'example-heave-effective',
    'heave-prism-effective',
    1.5,
    'Heave of the prism, effective form, 1.5 to 2',
    `NAVFAC DM-7.1, ch. 6, as quoted in Bond & Harris (2008), Decoding Eurocode 7; attribution from memory.`,
  ),
  example(
    'example-heave-effective-ec7',
    'heave-prism-effective',
    1.5,
    'Heave of the prism, effective form, partial factors as one',
    `EN 1997-1:2004, 2.4.7.5 (HYD), equation 2.9b and table A.17: γG;dst/γG;stb = 1.35/0.90 = 1.5 as one factor, as in Bond & Harris (2008), Decoding Eurocode 7; table ${fromMemory}`,
  ),
  example(
    'example-heave-total',
    'heave-prism-total',
    1.1,
    'Heave of the prism, total form',
    'Common practice for the ratio of total weight to water force; set the office’s own value.',
  ),
  example(
    'example-flotation',
    'flotation',
    1.1,
    'Flotation, weight over uplift',
    `EN 1997-1:2004, table A.15: γG;dst/γG;stb = 1.0/0.9 ≈ 1.1 as one factor; ${fromMemory}`,
  ),
  example(
    'example-flotation-usual',
    'flotation',
    1.3,
    'Flotation, usual loading, 1.3',
    `EM 1110-2-2100 (2005), Stability Analysis of Concrete Structures (1.2 unusual, 1.1 extreme); ${fromMemory}`,
  ),
  ...(
    [
      ['silt', 'Very fine sand or silt', 8.5],
      ['fine-sand', 'Fine sand', 7],
      ['medium-sand', 'Medium sand', 6],
      ['coarse-sand', 'Coarse sand', 5],
      ['fine-gravel', 'Fine gravel', 4],
      ['medium-gravel', 'Medium gravel', 3.5],
      ['coarse-gravel', 'Coarse gravel including cobbles', 3],
      ['boulders', 'Boulders with some cobbles and gravel', 2.5],
      ['soft-clay', 'Soft clay', 3],
      ['medium-clay', 'Medium clay', 2],
      ['hard-clay', 'Hard clay', 1.8],
      ['hardpan', 'Very hard clay or hardpan', 1.6],
    ] as const
  ).map(([id, soil, ratio]) =>
    example(
      `example-creep-${id}`,
      'creep-lane',
      ratio,
      `Weighted creep ratio, ${soil.toLowerCase()}`,
      lane,
      soil,
    ),
  ),
];
