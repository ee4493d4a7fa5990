import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import type { AppointmentRole } from '@/lib/domain/dto';
import type { SectionDocument } from '@/lib/domain/section';
import type { Transaction } from '../client';
import { appointments, projects, sections, sectionVersions, users } from '../schema';

interface InPractice {
  readonly practiceId: string;
}

export function selectProjects(tx: Transaction, { practiceId }: InPractice) {
  return tx
    .select({
      id: projects.id,
      number: projects.number,
      name: projects.name,
      client: projects.client,
      description: projects.description,
      updatedAt: projects.updatedAt,
      sectionCount: sql<number>`(select count(*)::int from sections where sections.project_id = projects.id)`,
    })
    .from(projects)
    .where(eq(projects.practiceId, practiceId))
    .orderBy(desc(projects.updatedAt));
}

export async function findProject(
  tx: Transaction,
  { practiceId, projectId }: InPractice & { projectId: string },
) {
  const [row] = await tx
    .select()
    .from(projects)
    .where(and(eq(projects.practiceId, practiceId), eq(projects.id, projectId)));
  return row ?? null;
}

export interface ProjectValues {
  readonly number: string;
  readonly name: string;
  readonly client: string;
  readonly description: string;
}

/** Null where the number is taken. */
export async function insertProject(tx: Transaction, values: InPractice & ProjectValues) {
  const [row] = await tx.insert(projects).values(values).onConflictDoNothing().returning({ id: projects.id });
  return row ?? null;
}

export async function updateProject(
  tx: Transaction,
  { practiceId, projectId, ...values }: InPractice & ProjectValues & { projectId: string },
) {
  const [row] = await tx
    .update(projects)
    .set({ ...values, updatedAt: sql`now()` })
    .where(and(eq(projects.practiceId, practiceId), eq(projects.id, projectId)))
    .returning({ id: projects.id });
  return row ?? null;
}

export async function isNumberTaken(
  tx: Transaction,
  { practiceId, number }: InPractice & { number: string },
): Promise<string | null> {
  const [row] = await tx
    .select({ id: projects.id })
    .from(projects)
    .where(and(eq(projects.practiceId, practiceId), eq(projects.number, number)));
  return row?.id ?? null;
}

async function touchProject(tx: Transaction, { practiceId, projectId }: InPractice & { projectId: string }) {
  await tx
    .update(projects)
    .set({ updatedAt: sql`now()` })
    .where(and(eq(projects.practiceId, practiceId), eq(projects.id, projectId)));
}

export function selectAppointments(tx: Transaction, { practiceId }: InPractice) {
  return tx
    .select({
      projectId: appointments.projectId,
      userId: appointments.userId,
      role: appointments.role,
      name: users.name,
      email: users.email,
    })
    .from(appointments)
    .innerJoin(users, eq(users.id, appointments.userId))
    .where(eq(appointments.practiceId, practiceId))
    .orderBy(asc(users.name), asc(appointments.role));
}

export async function rolesOn(
  tx: Transaction,
  { practiceId, projectId, userId }: InPractice & { projectId: string; userId: string },
): Promise<AppointmentRole[]> {
  const rows = await tx
    .select({ role: appointments.role })
    .from(appointments)
    .where(
      and(
        eq(appointments.practiceId, practiceId),
        eq(appointments.projectId, projectId),
        eq(appointments.userId, userId),
      ),
    );
  return rows.map(({ role }) => role);
}

type Appointment = InPractice & { projectId: string; userId: string; role: AppointmentRole };

export async function insertAppointment(tx: Transaction, values: Appointment) {
  await tx.insert(appointments).values(values).onConflictDoNothing();
}

export async function deleteAppointment(
  tx: Transaction,
  { practiceId, projectId, userId, role }: Appointment,
) {
  const [row] = await tx
    .delete(appointments)
    .where(
      and(
        eq(appointments.practiceId, practiceId),
        eq(appointments.projectId, projectId),
        eq(appointments.userId, userId),
        eq(appointments.role, role),
      ),
    )
    .returning({ userId: appointments.userId });
  return row ?? null;
}

export async function deleteAppointmentsOf(
  tx: Transaction,
  { practiceId, userId }: InPractice & { userId: string },
) {
  await tx
    .delete(appointments)
    .where(and(eq(appointments.practiceId, practiceId), eq(appointments.userId, userId)));
}

const summary = {
  id: sections.id,
  projectId: sections.projectId,
  title: sections.title,
  question: sections.question,
  version: sections.version,
  updatedAt: sections.updatedAt,
  updatedBy: sql<string>`coalesce(${users.name}, '')`,
};

export function selectSections(
  tx: Transaction,
  { practiceId, projectIds }: InPractice & { projectIds?: readonly string[] },
) {
  const scope = projectIds
    ? and(eq(sections.practiceId, practiceId), inArray(sections.projectId, [...projectIds]))
    : eq(sections.practiceId, practiceId);
  return tx
    .select(summary)
    .from(sections)
    .leftJoin(users, eq(users.id, sections.updatedBy))
    .where(scope)
    .orderBy(desc(sections.updatedAt), asc(sections.title));
}

export async function findSection(
  tx: Transaction,
  { practiceId, sectionId }: InPractice & { sectionId: string },
) {
  const [row] = await tx
    .select({
      ...summary,
      document: sections.document,
      isUntouched: sections.isUntouched,
      projectNumber: projects.number,
      projectName: projects.name,
    })
    .from(sections)
    .innerJoin(projects, eq(projects.id, sections.projectId))
    .leftJoin(users, eq(users.id, sections.updatedBy))
    .where(and(eq(sections.practiceId, practiceId), eq(sections.id, sectionId)));
  return row ?? null;
}

export interface NewSection extends InPractice {
  readonly projectId: string;
  readonly document: SectionDocument;
  readonly isUntouched: boolean;
  readonly userId: string;
}

export async function insertSection(
  tx: Transaction,
  { practiceId, projectId, document, isUntouched, userId }: NewSection,
) {
  const { title, question = '' } = document;
  const [row] = await tx
    .insert(sections)
    .values({
      practiceId,
      projectId,
      title,
      question,
      document,
      isUntouched: isUntouched ? 1 : 0,
      updatedBy: userId,
    })
    .returning({ id: sections.id, version: sections.version, updatedAt: sections.updatedAt });
  await tx
    .insert(sectionVersions)
    .values({ practiceId, sectionId: row!.id, version: 1, document, savedBy: userId });
  await touchProject(tx, { practiceId, projectId });
  return row!;
}

export interface SectionSave extends InPractice {
  readonly sectionId: string;
  readonly document: SectionDocument;
  readonly baseVersion: number;
  readonly userId: string;
}

/** Saves over the version it began from; null where that is no longer the latest, or there is no such section. */
export async function updateSection(
  tx: Transaction,
  { practiceId, sectionId, document, baseVersion, userId }: SectionSave,
) {
  const { title, question = '' } = document;
  const [row] = await tx
    .update(sections)
    .set({
      title,
      question,
      document,
      version: baseVersion + 1,
      isUntouched: 0,
      updatedAt: sql`now()`,
      updatedBy: userId,
    })
    .where(
      and(eq(sections.practiceId, practiceId), eq(sections.id, sectionId), eq(sections.version, baseVersion)),
    )
    .returning({ projectId: sections.projectId, version: sections.version, updatedAt: sections.updatedAt });
  if (!row) return null;
  await tx
    .insert(sectionVersions)
    .values({ practiceId, sectionId, version: row.version, document, savedBy: userId });
  await touchProject(tx, { practiceId, projectId: row.projectId });
  return row;
}

/** Deletes the version named; null where it is no longer the latest, or there is no such section. */
export async function deleteSectionRow(
  tx: Transaction,
  { practiceId, sectionId, baseVersion }: InPractice & { sectionId: string; baseVersion: number },
) {
  const [row] = await tx
    .delete(sections)
    .where(
      and(eq(sections.practiceId, practiceId), eq(sections.id, sectionId), eq(sections.version, baseVersion)),
    )
    .returning({ title: sections.title });
  return row ?? null;
}
