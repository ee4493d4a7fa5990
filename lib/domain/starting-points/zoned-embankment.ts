import type { SectionInput } from '../section';
import { sand } from './sand';

/** An invented section. */
export const zonedEmbankment: SectionInput = {
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
