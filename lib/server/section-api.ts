// Sections over HTTP: the document is the resource, its version the ETag (RFC 9110, 8.8.3 and 13.1.1).
import 'server-only';
import type { Actor, SectionDetail } from '@/lib/domain/dto';
import { sectionLimits } from '@/lib/domain/limits';
import type { SectionDocument } from '@/lib/domain/section';
import { parseSectionText } from '@/lib/domain/validate';
import { AppError } from '@/lib/errors';
import { listCriteriaInEffect } from './criteria';
import { json, type RouteCall } from './define-route';
import { listProjects } from './projects';
import { readJsonText } from './read-body';
import { createSection, deleteSection, getSection, listSections, saveSection } from './sections';
import { solveInPool } from './solver-pool';
import { problemResponse } from './problem-response';

export function etagOf(version: number): string {
  return `"${version}"`;
}

/** The version named by If-Match; `*` takes the current one. */
function requireVersion(request: Request, current: () => Promise<number>): Promise<number> | number {
  const header = request.headers.get('if-match');
  if (header === null) throw new AppError('precondition-required');
  if (header.trim() === '*') return current();
  const [, version] = /^"(\d{1,9})"$/.exec(header.trim()) ?? [];
  if (version === undefined) throw new AppError('precondition-failed');
  return Number(version);
}

/** A document that stands: the API keeps and solves nothing that has a stop in it. */
async function readDocument(request: Request): Promise<SectionDocument> {
  return (await readBody(request)).document;
}

/** The document and, for its hash, the same as it was sent. */
async function readBody(request: Request): Promise<{ document: SectionDocument; source: unknown }> {
  const { document, issues, source } = parseSectionText(await readJsonText(request, sectionLimits.bytes));
  if (document) return { document, source };
  const stops = issues.filter(({ severity }) => severity === 'stop');
  const errors = stops.map(({ pointer, message }) => ({ pointer, detail: message }));
  if (stops[0]?.code === 'not-json')
    throw new AppError('invalid-input', undefined, { sentence: stops[0].message, errors });
  const sentence = stops.length === 1 ? stops[0]!.message : undefined;
  throw new AppError('invalid-section', undefined, { errors, ...(sentence ? { sentence } : {}) });
}

function describeSection({
  id,
  projectId,
  title,
  question,
  version,
  updatedAt,
  updatedBy,
}: Omit<SectionDetail, 'document'>) {
  return { id, projectId, title, question, version, updatedAt, updatedBy };
}

export async function getSections({ actor, query }: RouteCall): Promise<Response> {
  const projectId = query.get('project');
  return json({ sections: await listSections(actor, projectId === null ? {} : { projectId }) });
}

export async function postSection({ request, actor, query }: RouteCall): Promise<Response> {
  const projectId = query.get('project');
  if (projectId === null) {
    const sentence = 'Name the project: /api/v1/sections?project=…';
    throw new AppError('invalid-input', undefined, { sentence });
  }
  const document = await readDocument(request);
  const { id } = await createSection(actor, { projectId, document, untouched: false });
  return answerSaved(actor, id, { status: 201, headers: { location: `/api/v1/sections/${id}` } });
}

async function answerSaved(actor: Actor, id: string, { status = 200, headers = {} } = {}): Promise<Response> {
  const section = await getSection(actor, id);
  return json(describeSection(section), { status, headers: { ...headers, etag: etagOf(section.version) } });
}

export async function getSectionDocument({ request, actor, params }: RouteCall): Promise<Response> {
  const { document, version, updatedAt } = await getSection(actor, params.id!);
  const headers = { etag: etagOf(version), 'last-modified': new Date(updatedAt).toUTCString() };
  const known = (request.headers.get('if-none-match') ?? '')
    .split(',')
    .map((tag) => tag.trim().replace(/^W\//, ''));
  if (known.includes(etagOf(version)) || known.includes('*'))
    return new Response(null, { status: 304, headers });
  return json(document, { headers });
}

export async function putSectionDocument({ request, actor, params }: RouteCall): Promise<Response> {
  const sectionId = params.id!;
  const baseVersion = await requireVersion(request, async () => (await getSection(actor, sectionId)).version);
  const document = await readDocument(request);
  const outcome = await saveSection(actor, { sectionId, document, baseVersion });
  if (outcome.status === 'conflict') throw new AppError('precondition-failed');
  return answerSaved(actor, sectionId);
}

export async function removeSection({ request, actor, params }: RouteCall): Promise<Response> {
  const sectionId = params.id!;
  const baseVersion = await requireVersion(request, async () => (await getSection(actor, sectionId)).version);
  if (!(await deleteSection(actor, { sectionId, baseVersion }))) throw new AppError('precondition-failed');
  return new Response(null, { status: 204 });
}

export async function getProjects({ actor }: RouteCall): Promise<Response> {
  const projects = await listProjects(actor);
  return json({
    projects: projects.map(({ id, number, name, client, sectionCount, updatedAt }) => ({
      id,
      number,
      name,
      client,
      sectionCount,
      updatedAt,
    })),
  });
}

/** Solves a document that need not be kept; the answer is held against the practice's criteria. */
export async function postSolve({ request, actor, query }: RouteCall): Promise<Response> {
  const { source } = await readBody(request);
  const situations = query.getAll('situation');
  const outcome = await solveInPool(
    {
      document: source,
      criteria: await listCriteriaInEffect(actor),
      effort: 'full',
      ...(situations.length > 0 ? { situations } : {}),
    },
    { signal: request.signal },
  );
  return outcome.status === 'solved' ? json(outcome.result) : problemResponse(outcome.problem);
}
