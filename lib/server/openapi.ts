// The description of the API (OpenAPI 3.1), made from the schemas the routes themselves read with.
import { OpenApiGeneratorV31, OpenAPIRegistry, type RouteConfig } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';
import { engineVersion } from '@/lib/analysis/version';
import { sectionLimits } from '@/lib/domain/limits';
import { resultSchema } from '@/lib/domain/result-schema';
import { sectionSchema } from '@/lib/domain/section';
import { publicAddress } from './env';
import { tryLimits } from './throttle';

const problemSchema = z
  .object({
    type: z.string().meta({ description: 'The kind, such as /problems/invalid-section.' }),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    errors: z
      .array(
        z.object({
          pointer: z.string().meta({ description: 'JSON Pointer (RFC 6901).' }),
          detail: z.string(),
        }),
      )
      .optional(),
  })
  .meta({ id: 'Problem', description: 'A problem document (RFC 9457).' });

const sectionSummary = z
  .object({
    id: z.uuid(),
    projectId: z.uuid(),
    title: z.string(),
    question: z.string(),
    version: z.number().int(),
    updatedAt: z.iso.datetime(),
    updatedBy: z.string(),
  })
  .meta({ id: 'SectionSummary' });

const projectSummary = z
  .object({
    id: z.uuid(),
    number: z.string(),
    name: z.string(),
    client: z.string(),
    sectionCount: z.number().int(),
    updatedAt: z.iso.datetime(),
  })
  .meta({ id: 'ProjectSummary' });

const problems: Record<number, string> = {
  400: 'Something sent needs mending; not JSON, for one.',
  401: 'No valid token.',
  403: 'The token lacks the scope, or its maker the right.',
  404: 'Not there, or not yours to see.',
  412: 'Changed meanwhile: If-Match names an older version.',
  413: `The body is larger than ${sectionLimits.bytes.toLocaleString('en')} bytes.`,
  415: 'The body is not application/json.',
  422: 'The section needs mending, or has no answer; each place is given as a JSON Pointer.',
  428: 'If-Match is missing.',
  429: 'Too many requests; Retry-After says how many seconds to wait.',
  503: 'Busy, or the database is out of reach; try again shortly.',
  504: 'The solve ran into its time limit.',
};

function jsonOf(schema: z.ZodType) {
  return { 'application/json': { schema } };
}

function refusals(...codes: number[]): RouteConfig['responses'] {
  const all = [401, 403, 429, 503, ...codes].sort((a, b) => a - b);
  return Object.fromEntries(
    all.map((code) => [
      code,
      { description: problems[code]!, content: { 'application/problem+json': { schema: problemSchema } } },
    ]),
  );
}

const sectionBody = { body: { required: true, content: jsonOf(sectionSchema) } };
const sectionId = z.object({ id: z.uuid().meta({ description: 'The section.' }) });
const ifMatch = z.object({ 'If-Match': z.string().meta({ description: 'The ETag you read, such as "3".' }) });
const etag = { ETag: { description: 'The version, in quotes.', schema: { type: 'string' as const } } };
const bearer = [{ token: [] }];

const operations: RouteConfig[] = [
  {
    method: 'get',
    path: '/api/v1/projects',
    summary: 'List projects',
    description: 'The projects the token’s maker may see. Scope sections:read.',
    responses: {
      200: { description: 'Projects.', content: jsonOf(z.object({ projects: z.array(projectSummary) })) },
      ...refusals(),
    },
  },
  {
    method: 'get',
    path: '/api/v1/sections',
    summary: 'List sections',
    description: 'The sections the token’s maker may see. Scope sections:read.',
    request: {
      query: z.object({ project: z.uuid().optional().meta({ description: 'Of one project only.' }) }),
    },
    responses: {
      200: {
        description: 'Sections, the latest change first.',
        content: jsonOf(z.object({ sections: z.array(sectionSummary) })),
      },
      ...refusals(404),
    },
  },
  {
    method: 'post',
    path: '/api/v1/sections',
    summary: 'Keep a new section',
    description: 'The maker of the token has to be an author of the project. Scope sections:write.',
    request: {
      query: z.object({ project: z.uuid().meta({ description: 'The project it belongs to.' }) }),
      ...sectionBody,
    },
    responses: {
      201: { description: 'Kept; Location names it.', headers: etag, content: jsonOf(sectionSummary) },
      ...refusals(400, 404, 413, 415, 422),
    },
  },
  {
    method: 'get',
    path: '/api/v1/sections/{id}',
    summary: 'Read a section',
    description: 'The section document itself; If-None-Match is honoured. Scope sections:read.',
    request: { params: sectionId },
    responses: {
      200: { description: 'The document.', headers: etag, content: jsonOf(sectionSchema) },
      304: { description: 'Unchanged.' },
      ...refusals(404),
    },
  },
  {
    method: 'put',
    path: '/api/v1/sections/{id}',
    summary: 'Change a section',
    description: 'Replaces the document, where nobody changed it since you read it. Scope sections:write.',
    request: { params: sectionId, headers: ifMatch, ...sectionBody },
    responses: {
      200: { description: 'Kept.', headers: etag, content: jsonOf(sectionSummary) },
      ...refusals(400, 404, 412, 413, 415, 422, 428),
    },
  },
  {
    method: 'delete',
    path: '/api/v1/sections/{id}',
    summary: 'Delete a section',
    description: 'Where nobody changed it since you read it. Scope sections:write.',
    request: { params: sectionId, headers: ifMatch },
    responses: { 204: { description: 'Deleted.' }, ...refusals(404, 412, 428) },
  },
  {
    method: 'post',
    path: '/api/v1/solve',
    summary: 'Solve a section',
    description: `Solves a document, kept or not, to the stated tolerances and holds it against the practice’s criteria. At most ${tryLimits.solve.tries} a minute. Scope solve.`,
    request: {
      query: z.object({
        situation: z
          .array(z.string())
          .optional()
          .meta({ description: 'Of these situations only; may be given several times.' }),
      }),
      ...sectionBody,
    },
    responses: {
      200: { description: 'The result document.', content: jsonOf(resultSchema) },
      ...refusals(400, 413, 415, 422, 504),
    },
  },
];

/** The OpenAPI document. */
export function openApiDocument(): object {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'token', {
    type: 'http',
    scheme: 'bearer',
    description: 'A token of the practice; it begins with uf_.',
  });
  for (const operation of operations) registry.registerPath({ security: bearer, ...operation });
  for (const name of ['section', 'result']) {
    registry.registerPath({
      method: 'get',
      path: `/api/v1/schemas/${name}.json`,
      summary: `The JSON Schema of the ${name} document`,
      responses: { 200: { description: 'A JSON Schema (draft 2020-12).' } },
    });
  }
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Underfall',
      version: engineVersion,
      description:
        'Section documents in, result documents out. Every number is SI, and holds for the drawn section only: local codes and the judgement of a licensed engineer decide.',
    },
    servers: [{ url: publicAddress() }],
  });
}
