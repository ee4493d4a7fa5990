import type { SectionInput } from '../section';

/** An invented section. */
export const apronWithCutoffs: SectionInput = {
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
        [-82, -18],
        [106, -18],
        [106, 0],
        [24, 0],
        [24, -1],
        [0, -1],
        [0, 0],
        [-82, 0],
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
        [-82, 0],
        [0, 0],
      ],
      condition: { type: 'water', level: 'headwater' },
    },
    {
      id: 'downstream',
      name: 'River bed',
      path: [
        [24, 0],
        [106, 0],
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
