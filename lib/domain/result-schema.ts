// The result document as a schema, for the published JSON Schema, the API description and the tests. result.ts is the type the
// code writes; the compiler holds the two together below.
import { z } from 'zod';
import type { ResultDocument } from './result';

const point = z.tuple([z.number(), z.number()]).meta({ description: 'Chainage x and elevation y, metres.' });
const number = z.number();
const text = z.string();

const dischargeSchema = z
  .object({
    value: number,
    lower: number,
    upper: number,
    unit: z.enum(['m3/s/m', 'm3/s']),
    balance: number.meta({ description: 'Net of all flows over the inflow.' }),
    byEdge: z.record(text, number).meta({ description: 'By edge and drain, positive into the ground.' }),
    kind: z.enum(['bound', 'estimate']).meta({
      description:
        'bound: lower and upper are a mathematical bracket; estimate: from the last change of mesh.',
    }),
  })
  .meta({ id: 'Discharge', description: 'For the drawn section and these permeabilities.' });

const piezometerSchema = z
  .object({
    id: text,
    head: number.nullable(),
    pressure: number.nullable().meta({ description: 'kPa' }),
    observed: number.nullable(),
    difference: number.nullable().meta({ description: 'Head less observed, m.' }),
  })
  .meta({ id: 'PiezometerResult' });

const exitSchema = z
  .object({
    edge: text,
    max: z.object({
      gradient: number.nullable().meta({ description: 'null where unbounded' }),
      averaged: number,
      averagingLength: number,
      at: point,
      unbounded: z.boolean().meta({ description: 'True where theory gives an infinite gradient.' }),
    }),
    profile: z.array(
      z.object({
        at: point,
        gradient: number.nullable(),
        averaged: number,
        flux: number.nullable(),
        averagingLength: number.exactOptional(),
      }),
    ),
  })
  .meta({ id: 'ExitResult' });

const structureSchema = z
  .object({
    id: text,
    upliftForce: number.meta({
      description: 'Upward positive, kN per metre; kN over the circle when axisymmetric.',
    }),
    horizontalForce: number,
    upliftMoment: number.meta({ description: 'About the first point of the base, anticlockwise positive.' }),
    profile: z.array(z.object({ at: point, pressure: number })),
    creepPath: z.object({
      vertical: number,
      horizontal: number,
      weighted: number.meta({ description: 'Vertical plus a third of the horizontal (Lane 1935).' }),
      points: z.array(point),
    }),
  })
  .meta({ id: 'StructureResult' });

const checkSchema = z
  .object({
    id: text,
    title: text,
    subject: text,
    quantity: text,
    value: number.nullable(),
    required: number.nullable(),
    verdict: z.enum(['meets', 'falls-short', 'attention', 'not-applicable']),
    remark: text.exactOptional(),
    source: text,
    working: z.array(
      z.object({ symbol: text, meaning: text, value: number, unit: text, formula: text.exactOptional() }),
    ),
  })
  .meta({
    id: 'Check',
    description:
      'A calculation for a drawn section. Local codes and the judgement of a licensed engineer decide; where water is emerging or boiling on a real site, the site’s emergency plan comes first.',
  });

const situationSchema = z
  .object({
    id: text,
    regime: z.enum(['confined', 'free-surface']),
    mesh: z.object({ nodes: number, elements: number, unknowns: number, order: number, minAngle: number }),
    discharge: dischargeSchema,
    piezometers: z.array(piezometerSchema),
    exit: z.array(exitSchema),
    structures: z.array(structureSchema),
    flowNet: z.object({
      drops: number,
      channels: number,
      shapeFactor: number,
      referencePermeability: number.exactOptional(),
    }),
    phreatic: z.array(point).nullable(),
    checks: z.array(checkSchema),
    convergence: z.object({
      dischargeError: number,
      exitGradientError: number.nullable(),
      levels: z.array(
        z.object({
          unknowns: number,
          discharge: number,
          lower: number,
          upper: number,
          exitGradient: number.nullable(),
        }),
      ),
    }),
    timings: z
      .object({ mesh: number, assemble: number, factorize: number, solve: number, total: number })
      .meta({ description: 'Milliseconds.' }),
  })
  .meta({ id: 'SituationResult' });

const noteSchema = z
  .object({
    code: text,
    severity: z.enum(['stop', 'check', 'note']),
    message: text,
    at: point.exactOptional(),
    subject: text.exactOptional(),
    pointer: text.exactOptional(),
  })
  .meta({ id: 'Note', description: 'A finding about the section.' });

export const resultSchema = z
  .object({
    format: z.literal('underfall-result/1'),
    solver: z.object({ name: z.literal('underfall'), version: text }),
    section: z.object({
      sha256: text.meta({ description: 'Of the canonical form (RFC 8785) of the section document.' }),
    }),
    situations: z.array(situationSchema),
    notes: z.array(noteSchema),
  })
  .meta({ id: 'Result', title: 'Underfall result document', description: 'SI units throughout.' });

type Schema = z.output<typeof resultSchema>;
// fails to compile where the schema and the type part
const agreement: [
  Schema extends ResultDocument ? true : never,
  ResultDocument extends Schema ? true : never,
] = [true, true];
void agreement;
