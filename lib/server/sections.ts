import 'server-only';
import { type Transaction, withPractice } from '@/db/client';
import {
  deleteSectionRow,
  findSection,
  insertSection,
  rolesOn,
  selectAppointments,
  selectSections,
  updateSection,
} from '@/db/queries/work';
import type { Actor, SaveOutcome, SectionDetail, SectionSummary } from '@/lib/domain/dto';
import type { SectionDocument } from '@/lib/domain/section';
import { readSection } from '@/lib/domain/validate';
import { AppError } from '@/lib/errors';
import { record, recordOnce } from './audit';
import { authorize, may } from './authorize';
import { readCriteriaInEffect } from './criteria';
import { requireId } from './require-id';
import { requireProject } from './require-project';

type SummaryRow = Awaited<ReturnType<typeof selectSections>>[number];

/** A row as the screens know it. */
export function summarizeSection(row: SummaryRow): SectionSummary {
  const { id, projectId, title, question, version, updatedAt, updatedBy } = row;
  return { id, projectId, title, question, version, updatedAt: updatedAt.toISOString(), updatedBy };
}

/** The sections whose drafts an actor may see, of one project or of all. */
export async function listSections(
  actor: Actor,
  { projectId }: { projectId?: string } = {},
): Promise<SectionSummary[]> {
  const { practiceId, userId } = actor;
  return withPractice(practiceId, async (tx) => {
    if (projectId !== undefined) await requireProject(tx, actor, projectId);
    const rows = await selectSections(tx, {
      practiceId,
      ...(projectId === undefined ? {} : { projectIds: [projectId] }),
    });
    const all = await selectAppointments(tx, { practiceId });
    const own = all.filter((row) => row.userId === userId);
    const rolesOf = (id: string) => own.filter((row) => row.projectId === id).map(({ role }) => role);
    return rows.filter((row) => may(actor, 'drafts.read', rolesOf(row.projectId))).map(summarizeSection);
  });
}

/** A section with its document; one whose drafts the actor may not see is not there. */
export async function getSection(actor: Actor, sectionId: string): Promise<SectionDetail> {
  return withPractice(actor.practiceId, (tx) => readDetail(tx, actor, sectionId));
}

async function readDetail(tx: Transaction, actor: Actor, id: string): Promise<SectionDetail> {
  const { row, own } = await requireSection(tx, actor, id);
  return {
    ...summarizeSection(row),
    projectNumber: row.projectNumber,
    projectName: row.projectName,
    document: row.document,
    mayChange: may(actor, 'sections.change', own),
    criteria: await readCriteriaInEffect(tx, actor.practiceId),
    untouched: row.isUntouched === 1,
  };
}

async function requireSection(tx: Transaction, actor: Actor, id: string) {
  const { practiceId, userId } = actor;
  const row = await findSection(tx, { practiceId, sectionId: requireId(id) });
  if (!row) throw new AppError('not-found');
  const own = await rolesOn(tx, { practiceId, projectId: row.projectId, userId });
  if (!may(actor, 'drafts.read', own)) throw new AppError('not-found');
  return { row, own };
}

/**
 * The document as it may be kept: its shape has to be right. What else is wrong may stay in a draft, since an engineer in the
 * middle of a change must not lose it; no number is shown for it until it is mended.
 */
function requireDraft(value: unknown): SectionDocument {
  const { draft, issues } = readSection(value);
  if (draft) return draft;
  const errors = issues.map(({ pointer, message }) => ({ pointer, detail: message }));
  throw new AppError('invalid-section', undefined, { errors });
}

export interface NewSectionInput {
  readonly projectId: string;
  readonly document: SectionDocument;
  /** True for a starting point as shipped. */
  readonly untouched: boolean;
}

export async function createSection(
  actor: Actor,
  { projectId, document, untouched }: NewSectionInput,
): Promise<{ id: string; version: number }> {
  const { practiceId, userId } = actor;
  const draft = requireDraft(document);
  return withPractice(practiceId, async (tx) => {
    const project = await requireProject(tx, actor, projectId);
    authorize(actor, 'sections.change', project.own);
    const { id, version } = await insertSection(tx, {
      practiceId,
      projectId,
      document: draft,
      isUntouched: untouched,
      userId,
    });
    await record(tx, actor, { action: 'section.created', subject: draft.title, detail: project.number });
    return { id, version };
  });
}

export interface SaveInput {
  readonly sectionId: string;
  readonly document: SectionDocument;
  /** The version the change began from. */
  readonly baseVersion: number;
}

/** Saves over the version the change began from; where somebody saved meanwhile, nothing is written and theirs comes back. */
export async function saveSection(
  actor: Actor,
  { sectionId, document, baseVersion }: SaveInput,
): Promise<SaveOutcome> {
  const { practiceId, userId } = actor;
  const draft = requireDraft(document);
  return withPractice(practiceId, async (tx) => {
    const { own } = await requireSection(tx, actor, sectionId);
    authorize(actor, 'sections.change', own);
    const saved = await updateSection(tx, { practiceId, sectionId, document: draft, baseVersion, userId });
    if (!saved) return { status: 'conflict', current: await readDetail(tx, actor, sectionId) };
    await recordOnce(tx, actor, {
      action: 'section.saved',
      subject: draft.title,
      detail: `from version ${saved.version}`,
    });
    return { status: 'saved', version: saved.version, savedAt: saved.updatedAt.toISOString() };
  });
}

/** Deletes the version named; false where somebody saved meanwhile. */
export async function deleteSection(
  actor: Actor,
  { sectionId, baseVersion }: { sectionId: string; baseVersion: number },
): Promise<boolean> {
  const { practiceId } = actor;
  return withPractice(practiceId, async (tx) => {
    const { own } = await requireSection(tx, actor, sectionId);
    authorize(actor, 'sections.change', own);
    const deleted = await deleteSectionRow(tx, { practiceId, sectionId, baseVersion });
    if (!deleted) return false;
    await record(tx, actor, { action: 'section.deleted', subject: deleted.title });
    return true;
  });
}
