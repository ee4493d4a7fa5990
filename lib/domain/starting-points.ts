// Five complete sections to begin from. Every number is invented; each is solved as it stands and yours to replace.
import { type SectionDocument, type SectionInput, sectionSchema } from './section';

/** A section to begin from. */
export interface StartingPoint {
  readonly id: string;
  readonly title: string;
  readonly summary: string;
  readonly document: SectionDocument;
}

const sand = {
  id: 'sand',
  name: 'Medium sand',
  kMajor: 2e-4,
  kMinor: 1e-4,
  angle: 0,
  kRange: { low: 0.3, high: 3 },
  kSource: 'grading',
  saturatedUnitWeight: 20,
  porosity: 0.36,
  grading: { d10: 0.16, d15: 0.19, d50: 0.42, d60: 0.5, d85: 1.1, fines: 3 },
  hatch: 'sand',
} as const;

const wallInGround: SectionInput = {
  format: 'underfall-section/1',
  title: 'Wall in ground',
  question: 'Is a 6 m sheet pile deep enough against heave of the bed at the design flood?',
  geometry: 'plane',
  datum: 'Site datum',
  materials: [
    { ...sand },
    {
      id: 'gravelly-sand',
      name: 'Gravelly sand',
      kMajor: 6e-4,
      kMinor: 3e-4,
      angle: 0,
      kRange: { low: 0.5, high: 2 },
      kSource: 'pumping-test',
      saturatedUnitWeight: 20.5,
      porosity: 0.33,
      grading: { d10: 0.3, d50: 1.4, d60: 2, d85: 6, fines: 1 },
      hatch: 'gravel',
    },
  ],
  zones: [
    {
      id: 'upper',
      name: 'Upper sand',
      material: 'sand',
      outline: [
        [-36, -5],
        [36, -5],
        [36, 0],
        [-36, 0],
      ],
    },
    {
      id: 'lower',
      name: 'Lower gravelly sand',
      material: 'gravelly-sand',
      outline: [
        [-36, -12],
        [36, -12],
        [36, -5],
        [-36, -5],
      ],
    },
  ],
  barriers: [
    {
      id: 'pile',
      name: 'Sheet pile',
      path: [
        [0, 0],
        [0, -6],
      ],
      conductance: 0,
    },
  ],
  edges: [
    {
      id: 'riverbed',
      name: 'River bed',
      path: [
        [-36, 0],
        [0, 0],
      ],
      condition: { type: 'water', level: 'river' },
    },
    {
      id: 'bed',
      name: 'Dredged bed',
      path: [
        [0, 0],
        [36, 0],
      ],
      condition: { type: 'water', level: 'basin' },
    },
  ],
  situations: [
    { id: 'normal', name: 'Mean water', kind: 'persistent', levels: { river: 2.2, basin: 0.6 } },
    { id: 'flood', name: 'Design flood', kind: 'persistent', levels: { river: 4.5, basin: 0.6 } },
  ],
  piezometers: [
    { id: 'P1', name: 'P1', at: [2, -4], observed: { normal: 0.98 } },
    { id: 'P2', name: 'P2', at: [-3, -8], observed: { normal: 1.71 } },
  ],
};

const apronWithCutoffs: SectionInput = {
  format: 'underfall-section/1',
  title: 'Apron with cutoffs',
  question: 'Does the stilling basin stay down with a 3 m upstream and a 4.5 m downstream cutoff?',
  geometry: 'plane',
  datum: 'River datum',
  materials: [
    {
      id: 'alluvium',
      name: 'Sandy alluvium',
      kMajor: 3e-4,
      kMinor: 6e-5,
      angle: 0,
      kRange: { low: 0.3, high: 3 },
      kSource: 'borehole-test',
      saturatedUnitWeight: 20,
      porosity: 0.35,
      grading: { d10: 0.12, d15: 0.15, d50: 0.4, d60: 0.5, d85: 1.1, fines: 4 },
      hatch: 'sand',
    },
    {
      id: 'silt',
      name: 'Silty fine sand',
      kMajor: 2e-5,
      kMinor: 4e-6,
      angle: 0,
      kRange: { low: 0.3, high: 3 },
      kSource: 'grading',
      saturatedUnitWeight: 19.2,
      porosity: 0.4,
      grading: { d10: 0.02, d50: 0.11, d60: 0.14, d85: 0.25, fines: 28 },
      hatch: 'silt',
    },
  ],
  zones: [
    {
      id: 'alluvium',
      name: 'Alluvium',
      material: 'alluvium',
      outline: [
        [-60, -18],
        [84, -18],
        [84, 0],
        [24, 0],
        [24, -1],
        [0, -1],
        [0, 0],
        [-60, 0],
      ],
    },
    {
      id: 'lens',
      name: 'Silt lens',
      material: 'silt',
      outline: [
        [6, -8],
        [34, -9],
        [36, -10.5],
        [10, -10],
      ],
    },
  ],
  barriers: [
    {
      id: 'upstream-cutoff',
      name: 'Upstream cutoff',
      path: [
        [0, -1],
        [0, -4],
      ],
      conductance: 0,
    },
    {
      id: 'downstream-cutoff',
      name: 'Downstream cutoff',
      path: [
        [24, -1],
        [24, -5.5],
      ],
      conductance: 0,
    },
  ],
  edges: [
    {
      id: 'upstream',
      name: 'Reservoir bed',
      path: [
        [-60, 0],
        [0, 0],
      ],
      condition: { type: 'water', level: 'headwater' },
    },
    {
      id: 'downstream',
      name: 'River bed',
      path: [
        [24, 0],
        [84, 0],
      ],
      condition: { type: 'water', level: 'tailwater' },
    },
  ],
  structures: [
    {
      id: 'basin',
      name: 'Stilling basin',
      base: [
        [0, 0],
        [0, -1],
        [24, -1],
        [24, 0],
      ],
      barriers: ['upstream-cutoff', 'downstream-cutoff'],
      weight: 760,
      weightSource: 'slab 1.3 m at 24 kN/m³ over 24 m, dry',
    },
  ],
  situations: [
    { id: 'normal', name: 'Normal pool', kind: 'persistent', levels: { headwater: 4.2, tailwater: 1.2 } },
    { id: 'flood', name: 'Design flood', kind: 'persistent', levels: { headwater: 6.4, tailwater: 2.6 } },
    {
      id: 'maintenance',
      name: 'Basin pumped out',
      kind: 'transient',
      levels: { headwater: 3.6, tailwater: 0.1 },
    },
  ],
  piezometers: [
    { id: 'B1', name: 'B1', at: [5, -2], observed: { normal: 2.95 } },
    { id: 'B2', name: 'B2', at: [19, -2], observed: { normal: 2.21 } },
  ],
};

const leveeWithBlanket: SectionInput = {
  format: 'underfall-section/1',
  title: 'Levee with blanket',
  question: 'How high does the pressure under the landside blanket rise at the design flood?',
  geometry: 'plane',
  datum: 'Site datum',
  materials: [
    {
      id: 'aquifer',
      name: 'Sand aquifer',
      kMajor: 5e-4,
      kMinor: 1.2e-4,
      angle: 0,
      kRange: { low: 0.5, high: 2 },
      kSource: 'pumping-test',
      saturatedUnitWeight: 20,
      porosity: 0.35,
      grading: { d10: 0.2, d50: 0.5, d60: 0.6, d85: 1.4, fines: 2 },
      hatch: 'sand',
    },
    {
      id: 'blanket',
      name: 'Clayey silt blanket',
      kMajor: 2e-6,
      kMinor: 1e-6,
      angle: 0,
      kRange: { low: 0.2, high: 5 },
      kSource: 'laboratory',
      saturatedUnitWeight: 18.4,
      porosity: 0.45,
      grading: { d10: 0.003, d50: 0.03, d60: 0.045, d85: 0.1, fines: 84 },
      hatch: 'silt',
    },
  ],
  zones: [
    {
      id: 'aquifer',
      name: 'Aquifer',
      material: 'aquifer',
      outline: [
        [-90, -16],
        [170, -16],
        [170, -2.5],
        [-90, -2.5],
      ],
    },
    {
      id: 'blanket',
      name: 'Blanket',
      material: 'blanket',
      outline: [
        [-60, -2.5],
        [170, -2.5],
        [170, 0],
        [-60, 0],
      ],
    },
  ],
  edges: [
    {
      id: 'channel',
      name: 'River channel',
      path: [
        [-90, -2.5],
        [-60, -2.5],
        [-60, 0],
      ],
      condition: { type: 'water', level: 'river' },
    },
    {
      id: 'foreland',
      name: 'Foreland',
      path: [
        [-60, 0],
        [-20, 0],
      ],
      condition: { type: 'water', level: 'river' },
    },
    {
      id: 'landside',
      name: 'Landside ground',
      path: [
        [20, 0],
        [170, 0],
      ],
      condition: { type: 'water', level: 'landside' },
    },
  ],
  structures: [
    {
      id: 'levee',
      name: 'Clay levee',
      base: [
        [-20, 0],
        [20, 0],
      ],
      weight: 1900,
      weightSource: 'levee 5 m high, crest 6 m, 18 kN/m³',
    },
  ],
  situations: [
    { id: 'high', name: 'Yearly high water', kind: 'persistent', levels: { river: 1.6, landside: 0.05 } },
    { id: 'flood', name: 'Design flood', kind: 'persistent', levels: { river: 4.2, landside: 0.05 } },
  ],
  piezometers: [
    { id: 'L1', name: 'L1', at: [22, -4], observed: { high: 0.86 } },
    { id: 'L2', name: 'L2', at: [60, -4], observed: { high: 0.63 } },
  ],
};

const pitBetweenWalls: SectionInput = {
  format: 'underfall-section/1',
  title: 'Pit between walls',
  question: 'How deep must the walls go to keep the base of the pit from heaving?',
  geometry: 'plane',
  datum: 'Site datum',
  materials: [
    {
      ...sand,
      id: 'fine-sand',
      name: 'Fine sand',
      kMajor: 8e-5,
      kMinor: 4e-5,
      saturatedUnitWeight: 19.6,
      grading: { d10: 0.09, d50: 0.18, d60: 0.21, d85: 0.35, fines: 6 },
    },
    {
      ...sand,
      id: 'dense-sand',
      name: 'Dense sand',
      kMajor: 1.5e-4,
      kMinor: 7e-5,
      saturatedUnitWeight: 20.6,
    },
  ],
  zones: [
    {
      id: 'fine',
      name: 'Fine sand',
      material: 'fine-sand',
      outline: [
        [-40, -9],
        [40, -9],
        [40, 0],
        [7, 0],
        [7, -4],
        [-7, -4],
        [-7, 0],
        [-40, 0],
      ],
    },
    {
      id: 'dense',
      name: 'Dense sand',
      material: 'dense-sand',
      outline: [
        [-40, -16],
        [40, -16],
        [40, -9],
        [-40, -9],
      ],
    },
  ],
  barriers: [
    {
      id: 'left-wall',
      name: 'Left wall',
      path: [
        [-7, 0],
        [-7, -9.5],
      ],
      conductance: 0,
    },
    {
      id: 'right-wall',
      name: 'Right wall',
      path: [
        [7, 0],
        [7, -9.5],
      ],
      conductance: 0,
    },
  ],
  edges: [
    {
      id: 'left-ground',
      name: 'River bed, left',
      path: [
        [-40, 0],
        [-7, 0],
      ],
      condition: { type: 'water', level: 'river' },
    },
    {
      id: 'pit',
      name: 'Base of the pit',
      path: [
        [-7, -4],
        [7, -4],
      ],
      condition: { type: 'water', level: 'pit' },
    },
    {
      id: 'right-ground',
      name: 'River bed, right',
      path: [
        [7, 0],
        [40, 0],
      ],
      condition: { type: 'water', level: 'river' },
    },
  ],
  situations: [
    { id: 'pumped', name: 'Pumped out', kind: 'transient', levels: { river: 1.5, pit: -4 } },
    { id: 'flooded', name: 'High river', kind: 'accidental', levels: { river: 2.4, pit: -4 } },
  ],
  piezometers: [
    { id: 'W1', name: 'W1', at: [-5.5, -8], observed: { pumped: -2.05 } },
    { id: 'W2', name: 'W2', at: [0, -11], observed: { pumped: -1.9 } },
  ],
};

const zonedEmbankment: SectionInput = {
  format: 'underfall-section/1',
  title: 'Zoned embankment on alluvium',
  question: 'How much water passes under the core trench, and how much does the slurry wall save?',
  geometry: 'plane',
  datum: 'Dam datum',
  materials: [
    { ...sand, id: 'alluvium', name: 'River alluvium', kMajor: 4e-4, kMinor: 1e-4, hatch: 'gravel' },
    {
      id: 'core',
      name: 'Clay core and trench',
      kMajor: 4e-9,
      kMinor: 1e-9,
      angle: 0,
      kRange: { low: 0.3, high: 5 },
      kSource: 'laboratory',
      saturatedUnitWeight: 20.2,
      porosity: 0.38,
      hatch: 'clay',
    },
    {
      id: 'weathered',
      name: 'Weathered rock',
      kMajor: 3e-6,
      kMinor: 1e-6,
      angle: -8,
      kRange: { low: 0.2, high: 5 },
      kSource: 'borehole-test',
      saturatedUnitWeight: 23,
      porosity: 0.12,
      hatch: 'rock',
    },
  ],
  zones: [
    {
      id: 'rock',
      name: 'Weathered rock',
      material: 'weathered',
      outline: [
        [-110, -28],
        [110, -28],
        [110, -14],
        [30, -15],
        [-40, -12],
        [-110, -13],
      ],
    },
    {
      id: 'alluvium',
      name: 'Alluvium',
      material: 'alluvium',
      outline: [
        [-110, -13],
        [-40, -12],
        [30, -15],
        [110, -14],
        [110, 0],
        [-110, 0],
      ],
    },
    {
      id: 'trench',
      name: 'Core trench',
      material: 'core',
      outline: [
        [-9, 0],
        [-6, -5],
        [6, -5],
        [9, 0],
      ],
    },
  ],
  barriers: [
    {
      id: 'slurry',
      name: 'Slurry wall',
      path: [
        [0, -3],
        [0, -12],
      ],
      conductance: 1e-8,
    },
  ],
  edges: [
    {
      id: 'reservoir',
      name: 'Reservoir floor',
      path: [
        [-110, 0],
        [-48, 0],
      ],
      condition: { type: 'water', level: 'pool' },
    },
    {
      id: 'valley',
      name: 'Valley floor',
      path: [
        [44, 0],
        [110, 0],
      ],
      condition: { type: 'water', level: 'valley' },
    },
  ],
  structures: [
    {
      id: 'dam',
      name: 'Embankment',
      base: [
        [-48, 0],
        [44, 0],
      ],
      weight: 14500,
      weightSource: 'shells and core, 20 kN/m³',
    },
  ],
  situations: [
    { id: 'full', name: 'Full pool', kind: 'persistent', levels: { pool: 18, valley: 0.2 } },
    { id: 'flood', name: 'Flood pool', kind: 'accidental', levels: { pool: 20.5, valley: 0.8 } },
  ],
  piezometers: [
    { id: 'D1', name: 'D1', at: [-14, -8], observed: { full: 13.9 } },
    { id: 'D2', name: 'D2', at: [16, -8], observed: { full: 4.4 } },
  ],
};

function make(id: string, summary: string, input: SectionInput): StartingPoint {
  return { id, title: input.title, summary, document: sectionSchema.parse(input) };
}

/** The starting points, in the order they are offered. */
export const startingPoints: readonly StartingPoint[] = [
  make('wall-in-ground', 'A sheet pile in layered ground under two water levels.', wallInGround),
  make(
    'apron-with-cutoffs',
    'A stilling basin with a cutoff at each end, on anisotropic alluvium with a lens.',
    apronWithCutoffs,
  ),
  make('levee-with-blanket', 'A river levee on a tight blanket over a sand aquifer.', leveeWithBlanket),
  make('pit-between-walls', 'A pumped-out pit between two walls, with water on both sides.', pitBetweenWalls),
  make(
    'zoned-embankment',
    'The foundation of a zoned embankment: core trench, slurry wall, alluvium over weathered rock. The dam itself is taken as its base; flow through it needs a free surface, which is not solved yet.',
    zonedEmbankment,
  ),
];
