// A practice of one test: people of every kind, a project, a section. Names are distinct, so that tests do not meet.
import { database, withPractice } from '@/db/client';
import { findUserByEmail, insertMembership, insertUser } from '@/db/queries/people';
import { hashPassword } from '@/lib/auth';
import type { Actor, AppointmentRole, PracticeRole } from '@/lib/domain/dto';
import type { SectionDocument } from '@/lib/domain/section';
import { startingPoints } from '@/lib/domain/starting-points';
import { foundPractice } from '@/lib/server/accounts';
import { appoint, createProject } from '@/lib/server/projects';
import { createSection } from '@/lib/server/sections';

let count = 0;

/** A text no other call gets. */
export function unique(text: string): string {
  count += 1;
  return `${text}-${process.pid.toString(36)}-${count.toString(36)}`;
}

export const password = 'a long enough sentence';

export function sampleSection(): SectionDocument {
  return structuredClone(startingPoints.find(({ id }) => id === 'wall-in-ground')!.document);
}

export interface TestPractice {
  readonly id: string;
  /** Appointed author by opening the project. */
  readonly administrator: Actor;
  /** Appointed author. */
  readonly author: Actor;
  readonly checker: Actor;
  readonly approver: Actor;
  /** A member without an appointment. */
  readonly bystander: Actor;
  /** A client of the practice, appointed as client. */
  readonly client: Actor;
  readonly projectId: string;
  readonly sectionId: string;
}

export async function makePractice(): Promise<TestPractice> {
  const practiceName = unique('Practice');
  const email = `${unique('head')}@practice.example`;
  const { userId, practiceId } = await foundPractice({ practiceName, name: 'Head', email, password });
  const base = { practiceId, practiceName, units: 'si' as const };
  const administrator: Actor = { ...base, userId, name: 'Head', email, role: 'administrator' };
  const author = await addMember(administrator, 'member');
  const checker = await addMember(administrator, 'member');
  const approver = await addMember(administrator, 'member');
  const bystander = await addMember(administrator, 'member');
  const client = await addMember(administrator, 'client');
  const values = { number: unique('26'), name: 'Weir', client: 'Town', description: '' };
  const { id: projectId } = await createProject(administrator, values);
  const appointments: [Actor, AppointmentRole][] = [
    [author, 'author'],
    [checker, 'checker'],
    [approver, 'approver'],
    [client, 'client'],
  ];
  for (const [person, role] of appointments)
    await appoint(administrator, { projectId, userId: person.userId, role });
  const { id: sectionId } = await createSection(author, {
    projectId,
    document: sampleSection(),
    untouched: true,
  });
  return {
    id: practiceId,
    administrator,
    author,
    checker,
    approver,
    bystander,
    client,
    projectId,
    sectionId,
  };
}

/** Adds a person to a practice, past the invitation. */
export async function addMember({ practiceId, practiceName }: Actor, role: PracticeRole): Promise<Actor> {
  const name = unique(role);
  const email = `${name}@practice.example`;
  await insertUser(database(), { id: name, name, email, passwordHash: await hashPassword(password) });
  const user = await findUserByEmail(database(), { email });
  await withPractice(practiceId, (tx) => insertMembership(tx, { practiceId, userId: user!.id, role }));
  return { userId: user!.id, name, email, practiceId, practiceName, role, units: 'si' };
}
