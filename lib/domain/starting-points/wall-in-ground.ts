import type { SectionInput } from '../section';
import { sand } from './sand';

/** An invented section. */
export const wallInGround: SectionInput = {
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
        [-52, -5],
        [52, -5],
        [52, 0],
        [-52, 0],
      ],
    },
    {
      id: 'lower',
      name: 'Lower gravelly sand',
      material: 'gravelly-sand',
      outline: [
        [-52, -12],
        [52, -12],
        [52, -5],
        [-52, -5],
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
        [-52, 0],
        [0, 0],
      ],
      condition: { type: 'water', level: 'river' },
    },
    {
      id: 'bed',
      name: 'Dredged bed',
      path: [
        [0, 0],
        [52, 0],
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
