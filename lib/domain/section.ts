// The section document, `underfall-section/1`: the one schema behind the database, the API, the command line and
// the browser. Shape only; what the shape cannot say (ids that exist, geometry) is in validate.ts.
import { z } from 'zod';
import { sectionLimits as limits } from './limits';

const finite = z.number('must be a number');
const coordinate = finite
  .min(-1e6, 'must lie within ±1 000 km of the datum')
  .max(1e6, 'must lie within ±1 000 km of the datum');
const id = z
  .string('must be text')
  .min(1, 'must not be empty')
  .max(64, 'must be at most 64 characters')
  .regex(
    /^[A-Za-z0-9][A-Za-z0-9_.:-]*$/,
    'must be letters, digits and - _ . : only, and begin with a letter or digit',
  );
const name = z.string('must be text').max(limits.name, `must be at most ${limits.name} characters`);
const text = z.string('must be text').max(limits.text, `must be at most ${limits.text} characters`);

export const pointSchema = z.tuple([coordinate, coordinate], 'must be a point [x, y] in metres').meta({
  description: 'Chainage x and elevation y, metres.',
});
const path = z
  .array(pointSchema, 'must be a list of points')
  .min(2, 'needs at least two points')
  .max(limits.pathPoints, `may have at most ${limits.pathPoints} points`);
const ring = z
  .array(pointSchema, 'must be a list of points')
  .min(3, 'needs at least three points')
  .max(limits.pathPoints, `may have at most ${limits.pathPoints} points`);

const permeability = finite.positive('must be greater than 0 m/s').max(1e3, 'must be at most 1000 m/s');

const level = z.union(
  [z.string().min(1).max(64), finite],
  'must be the name of a level or a number in metres',
);

export const conditionSchema = z
  .discriminatedUnion(
    'type',
    [
      z.object({ type: z.literal('water'), level }),
      z.object({ type: z.literal('head'), level }),
      z.object({ type: z.literal('seepage') }),
      z.object({ type: z.literal('flux'), rate: finite }),
      z.object({ type: z.literal('impervious') }),
    ],
    'must be water, head, seepage, flux or impervious, with its fields',
  )
  .meta({ id: 'Condition', description: 'What holds along an edge or a drain.' });

export const gradingSchema = z.object({
  d10: finite.positive('must be greater than 0 mm').optional(),
  d15: finite.positive('must be greater than 0 mm').optional(),
  d50: finite.positive('must be greater than 0 mm').optional(),
  d60: finite.positive('must be greater than 0 mm').optional(),
  d85: finite.positive('must be greater than 0 mm').optional(),
  fines: finite.min(0, 'must be 0 to 100 %').max(100, 'must be 0 to 100 %').optional(),
});

export const materialSchema = z
  .object({
    id,
    name,
    kMajor: permeability.meta({ description: 'Permeability along the major axis, m/s.' }),
    kMinor: permeability.meta({ description: 'Permeability across the major axis, m/s.' }),
    angle: finite
      .min(-360)
      .max(360)
      .default(0)
      .meta({ description: 'Degrees from +x to the major axis, anticlockwise.' }),
    kRange: z
      .object({
        low: finite.positive('must be greater than 0'),
        high: finite.positive('must be greater than 0'),
      })
      .optional(),
    kSource: z
      .enum([
        'pumping-test',
        'borehole-test',
        'laboratory',
        'grading',
        'published-range',
        'judgement',
        'borrowed',
      ])
      .optional(),
    saturatedUnitWeight: finite
      .positive('must be greater than 0 kN/m³')
      .max(60, 'must be at most 60 kN/m³')
      .optional(),
    porosity: finite.gt(0, 'must lie between 0 and 1').lt(1, 'must lie between 0 and 1').optional(),
    grading: gradingSchema.optional(),
    retention: z
      .object({
        model: z.literal('van-genuchten'),
        alpha: finite.positive('must be greater than 0 1/m'),
        n: finite.gt(1, 'must be greater than 1'),
      })
      .optional(),
    hatch: z.string().max(64).optional(),
  })
  .meta({ id: 'Material' });

export const zoneSchema = z
  .object({ id, material: id, outline: ring, holes: z.array(ring).max(50).optional(), name: name.optional() })
  .meta({ id: 'Zone' });

export const barrierSchema = z
  .object({
    id,
    name: name.optional(),
    path,
    conductance: finite
      .min(0, 'must be 0 (watertight) or more, 1/s')
      .default(0)
      .meta({ description: '1/s: flux across = conductance × head jump; 0 is watertight.' }),
  })
  .meta({ id: 'Barrier' });

export const drainSchema = z
  .object({ id, name: name.optional(), path, condition: conditionSchema })
  .meta({ id: 'Drain' });
export const edgeSchema = z
  .object({ id, name: name.optional(), path, condition: conditionSchema })
  .meta({ id: 'Edge' });

export const structureSchema = z
  .object({
    id,
    name: name.optional(),
    base: path,
    barriers: z.array(id).max(limits.barriers).optional(),
    weight: finite.min(0, 'must be 0 kN per metre or more').optional(),
    weightSource: text.optional(),
  })
  .meta({ id: 'Structure' });

export const situationSchema = z
  .object({
    id,
    name: name.optional(),
    kind: z.string().max(64).optional(),
    levels: z.record(z.string().min(1).max(64), coordinate).default({}),
  })
  .meta({ id: 'Situation' });

export const piezometerSchema = z
  .object({ id, name: name.optional(), at: pointSchema, observed: z.record(z.string(), finite).optional() })
  .meta({ id: 'Piezometer' });

export const sectionSchema = z
  .object({
    format: z.literal('underfall-section/1', 'must be "underfall-section/1"'),
    title: name.min(1, 'must not be empty'),
    question: text.optional(),
    geometry: z.enum(['plane', 'axisymmetric'], 'must be "plane" or "axisymmetric"'),
    datum: name.optional(),
    materials: z
      .array(materialSchema, 'must be a list of materials')
      .min(1, 'needs at least one material')
      .max(limits.materials),
    zones: z.array(zoneSchema, 'must be a list of zones').min(1, 'needs at least one zone').max(limits.zones),
    barriers: z.array(barrierSchema, 'must be a list of barriers').max(limits.barriers).default([]),
    drains: z.array(drainSchema, 'must be a list of drains').max(limits.drains).default([]),
    edges: z.array(edgeSchema, 'must be a list of edges').max(limits.edges).default([]),
    structures: z.array(structureSchema, 'must be a list of structures').max(limits.structures).default([]),
    situations: z
      .array(situationSchema, 'must be a list of situations')
      .min(1, 'needs at least one situation')
      .max(limits.situations),
    piezometers: z
      .array(piezometerSchema, 'must be a list of piezometers')
      .max(limits.piezometers)
      .default([]),
    assessment: z
      .object({
        averagingLength: finite.positive('must be greater than 0 m').optional(),
        criteria: z.string().max(64).optional(),
      })
      .optional(),
  })
  .meta({
    id: 'Section',
    title: 'Underfall section document',
    description: 'One cross-section; SI units throughout.',
  });

/** A section document as read, with its defaults filled in. */
export type SectionDocument = z.output<typeof sectionSchema>;
/** A section document as written, where defaults may be left out. */
export type SectionInput = z.input<typeof sectionSchema>;
export type Point = z.output<typeof pointSchema>;
export type Material = z.output<typeof materialSchema>;
export type Zone = z.output<typeof zoneSchema>;
export type Barrier = z.output<typeof barrierSchema>;
export type Drain = z.output<typeof drainSchema>;
export type Edge = z.output<typeof edgeSchema>;
export type Structure = z.output<typeof structureSchema>;
export type Situation = z.output<typeof situationSchema>;
export type Piezometer = z.output<typeof piezometerSchema>;
export type Condition = z.output<typeof conditionSchema>;
