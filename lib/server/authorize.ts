// Who may do what: the one table (README, "People and appointments") as data, and the one function that reads it.
import type { Actor, AppointmentRole } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';

/** What a person is, in the practice and on the project concerned. */
type Standing = 'administrator' | 'member' | AppointmentRole;

const table = {
  'members.list': ['administrator', 'member'],
  'members.manage': ['administrator'],
  'criteria.list': ['administrator', 'member'],
  'criteria.manage': ['administrator'],
  'materials.list': ['administrator', 'member'],
  'materials.manage': ['administrator', 'member'],
  'audit.read': ['administrator'],
  'tokens.manage': ['administrator'],
  'projects.create': ['administrator', 'member'],
  'project.read': ['administrator', 'author', 'checker', 'approver', 'client'],
  'project.rename': ['administrator', 'author'],
  'project.appoint': ['administrator'],
  'drafts.read': ['administrator', 'author', 'checker', 'approver'],
  'sections.change': ['author'],
} as const satisfies Record<string, readonly Standing[]>;

export type Action = keyof typeof table;

/** True where the actor may; `appointments` are the actor's own on the project concerned. */
export function may(actor: Actor, action: Action, appointments: readonly AppointmentRole[] = []): boolean {
  const allowed: readonly Standing[] = table[action];
  return standingsOf(actor, appointments).some((standing) => allowed.includes(standing));
}

/** Refuses what the table does not allow. */
export function authorize(actor: Actor, action: Action, appointments: readonly AppointmentRole[] = []): void {
  if (!may(actor, action, appointments))
    throw new AppError('forbidden', `${action} refused to ${actor.role}`);
}

/** A client of the practice stays one on every project, whatever else a row may say. */
function standingsOf({ role }: Actor, appointments: readonly AppointmentRole[]): Standing[] {
  if (role === 'client') return appointments.includes('client') ? ['client'] : [];
  return [role, ...appointments];
}
