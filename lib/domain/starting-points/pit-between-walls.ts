import type { SectionInput } from '../section';
import { sand } from './sand';

/** An invented section. */
export const pitBetweenWalls: SectionInput = {
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
        [-64, -9],
        [64, -9],
        [64, 0],
        [7, 0],
        [7, -4],
        [-7, -4],
        [-7, 0],
        [-64, 0],
      ],
    },
    {
      id: 'dense',
      name: 'Dense sand',
      material: 'dense-sand',
      outline: [
        [-64, -16],
        [64, -16],
        [64, -9],
        [-64, -9],
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
        [-64, 0],
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
        [64, 0],
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
