import 'server-only';
import { withPractice } from '@/db/client';
import { findMembership, findUser } from '@/db/queries/people';
import {
  deleteAppointment,
  insertAppointment,
  insertProject,
  isNumberTaken,
  type ProjectValues,
  selectAppointments,
  selectProjects,
  selectSections,
  updateProject,
} from '@/db/queries/work';
import type { Actor, AppointmentRole, ProjectDetail, ProjectPerson, ProjectSummary } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { record } from './audit';
import { authorize, may } from './authorize';
import { requireProject } from './require-project';
import { summarizeSection } from './sections';

/** The projects an actor may see; a client sees no count of drafts. */
export async function listProjects(actor: Actor): Promise<ProjectSummary[]> {
  const { practiceId, userId } = actor;
  return withPractice(practiceId, async (tx) => {
    const rows = await selectProjects(tx, { practiceId });
    const all = await selectAppointments(tx, { practiceId });
    return rows.flatMap(({ id, number, name, client, updatedAt, sectionCount }) => {
      const own = all.filter((row) => row.projectId === id && row.userId === userId).map(({ role }) => role);
      if (!may(actor, 'project.read', own)) return [];
      const count = may(actor, 'drafts.read', own) ? sectionCount : 0;
      return {
        id,
        number,
        name,
        client,
        updatedAt: updatedAt.toISOString(),
        sectionCount: count,
        appointments: own,
      };
    });
  });
}

/** A project with its people and sections; one the actor may not see is not there. */
export async function getProject(actor: Actor, id: string): Promise<ProjectDetail> {
  const { practiceId } = actor;
  return withPractice(practiceId, async (tx) => {
    const { own, ...project } = await requireProject(tx, actor, id);
    const projectId = project.id;
    const seesDrafts = may(actor, 'drafts.read', own);
    const sections = seesDrafts ? await selectSections(tx, { practiceId, projectIds: [projectId] }) : [];
    const all = await selectAppointments(tx, { practiceId });
    const { number, name, client, description, updatedAt } = project;
    return {
      id: projectId,
      number,
      name,
      client,
      description,
      updatedAt: updatedAt.toISOString(),
      sectionCount: sections.length,
      appointments: own,
      people: groupPeople(all.filter((row) => row.projectId === projectId)),
      sections: sections.map(summarizeSection),
      may: {
        changeSections: may(actor, 'sections.change', own),
        appoint: may(actor, 'project.appoint', own),
        rename: may(actor, 'project.rename', own),
      },
    };
  });
}

function groupPeople(rows: Awaited<ReturnType<typeof selectAppointments>>): ProjectPerson[] {
  const people = new Map<string, ProjectPerson>();
  for (const { userId, name, email, role } of rows) {
    const person = people.get(userId) ?? { userId, name, email, roles: [] };
    person.roles.push(role);
    people.set(userId, person);
  }
  return [...people.values()];
}

/** Opens a project; whoever opens it is its first author. */
export async function createProject(actor: Actor, values: ProjectValues): Promise<{ id: string }> {
  authorize(actor, 'projects.create');
  const { practiceId, userId } = actor;
  return withPractice(practiceId, async (tx) => {
    const project = await insertProject(tx, { practiceId, ...values });
    if (!project) throw numberTaken();
    await insertAppointment(tx, { practiceId, projectId: project.id, userId, role: 'author' });
    await record(tx, actor, { action: 'project.opened', subject: `${values.number} ${values.name}` });
    return project;
  });
}

export async function renameProject(
  actor: Actor,
  { projectId, ...values }: ProjectValues & { projectId: string },
): Promise<void> {
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const project = await requireProject(tx, actor, projectId);
    authorize(actor, 'project.rename', project.own);
    const holder = await isNumberTaken(tx, { practiceId, number: values.number });
    if (holder && holder !== projectId) throw numberTaken();
    await updateProject(tx, { practiceId, projectId, ...values });
    const detail = `before: ${project.number} ${project.name}`;
    await record(tx, actor, {
      action: 'project.changed',
      subject: `${values.number} ${values.name}`,
      detail,
    });
  });
}

function numberTaken(): AppError {
  const sentence = 'Another project of the practice has this number.';
  return new AppError('invalid-input', undefined, { fields: { number: sentence } });
}

interface AppointmentInput {
  readonly projectId: string;
  readonly userId: string;
  readonly role: AppointmentRole;
}

/** Appoints a member; clients of the practice can only be appointed as client. */
export async function appoint(actor: Actor, { projectId, userId, role }: AppointmentInput): Promise<void> {
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const project = await requireProject(tx, actor, projectId);
    authorize(actor, 'project.appoint', project.own);
    const membership = await findMembership(tx, { practiceId, userId });
    const person = membership && (await findUser(tx, { userId }));
    if (!person)
      throw new AppError('invalid-input', undefined, {
        fields: { userId: 'Choose a member of the practice.' },
      });
    if (membership.role === 'client' && role !== 'client') {
      const sentence = `${person.name} is a client of the practice and can only be appointed as client.`;
      throw new AppError('invalid-input', undefined, { fields: { role: sentence } });
    }
    await insertAppointment(tx, { practiceId, projectId, userId, role });
    await record(tx, actor, {
      action: 'person.appointed',
      subject: project.number,
      detail: `${person.name}: ${role}`,
    });
  });
}

export async function removeAppointment(
  actor: Actor,
  { projectId, userId, role }: AppointmentInput,
): Promise<void> {
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const project = await requireProject(tx, actor, projectId);
    authorize(actor, 'project.appoint', project.own);
    const removed = await deleteAppointment(tx, { practiceId, projectId, userId, role });
    if (!removed) throw new AppError('not-found');
    const person = await findUser(tx, { userId });
    await record(tx, actor, {
      action: 'appointment.ended',
      subject: project.number,
      detail: `${person?.name ?? ''}: ${role}`,
    });
  });
}
