import type { SectionInput } from '../section';

/** An invented section. */
export const leveeWithBlanket: SectionInput = {
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
