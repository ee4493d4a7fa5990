// What the server hands to the screens: named plain types, never database rows. Dates are ISO strings.
import type { Criterion } from './criteria';
import type { Material, SectionDocument } from './section';

export const practiceRoles = ['administrator', 'member', 'client'] as const;
export type PracticeRole = (typeof practiceRoles)[number];
export const appointmentRoles = ['author', 'checker', 'approver', 'client'] as const;
export type AppointmentRole = (typeof appointmentRoles)[number];

/** The signed-in person, in the practice of this session. */
export interface Actor {
  userId: string;
  name: string;
  email: string;
  practiceId: string;
  practiceName: string;
  role: PracticeRole;
  /** Shown units, chosen per person. */
  units: 'si' | 'us';
}

export interface ProjectSummary {
  id: string;
  number: string;
  name: string;
  client: string;
  sectionCount: number;
  updatedAt: string;
  /** The actor's own appointments on it. */
  appointments: AppointmentRole[];
}

export interface ProjectDetail extends ProjectSummary {
  description: string;
  people: ProjectPerson[];
  sections: SectionSummary[];
  /** What the actor may do here, as decided by lib/server/authorize.ts. */
  may: { changeSections: boolean; appoint: boolean; rename: boolean };
}

export interface ProjectPerson {
  userId: string;
  name: string;
  email: string;
  roles: AppointmentRole[];
}

export interface SectionSummary {
  id: string;
  projectId: string;
  title: string;
  question: string;
  version: number;
  updatedAt: string;
  updatedBy: string;
}

export interface SectionDetail extends SectionSummary {
  projectNumber: string;
  projectName: string;
  document: SectionDocument;
  /** False for a reader: checker, approver, administrator who is not the author. */
  mayChange: boolean;
  criteria: Criterion[];
  /** The starting point it came from, until the first change: "yours to replace". */
  untouched: boolean;
}

export type SaveOutcome =
  { status: 'saved'; version: number; savedAt: string } | { status: 'conflict'; current: SectionDetail };

export interface Member {
  userId: string;
  name: string;
  email: string;
  role: PracticeRole;
  joinedAt: string;
}

export interface InvitationSummary {
  id: string;
  email: string;
  role: PracticeRole;
  invitedBy: string;
  createdAt: string;
  expiresAt: string;
}

export interface SessionSummary {
  id: string;
  /** Browser and system in words, from the user agent. */
  device: string;
  address: string;
  createdAt: string;
  lastSeenAt: string;
  current: boolean;
}

export const tokenScopes = ['sections:read', 'sections:write', 'solve'] as const;
export type TokenScope = (typeof tokenScopes)[number];

export interface TokenSummary {
  id: string;
  name: string;
  /** First characters, to tell tokens apart. */
  prefix: string;
  scopes: TokenScope[];
  createdBy: string;
  createdAt: string;
  expiresAt: string;
  lastUsedAt: string | null;
}

export interface AuditEvent {
  id: string;
  at: string;
  actor: string;
  /** Dotted word: `section.saved`, `member.invited`. */
  action: string;
  subject: string;
  detail: string;
}

export interface LibraryMaterial {
  id: string;
  material: Material;
  note: string;
}

/** What the desk shows: everything that waits for the actor, most urgent first. */
export interface Desk {
  drafts: SectionSummary[];
  projects: ProjectSummary[];
  invitations: InvitationSummary[];
}

/** What an action answers: done, or what to mend, field by field. Nothing typed is lost. */
export type ActionResult<T = undefined> =
  { ok: true; value: T } | { ok: false; code: string; message: string; fields?: Record<string, string> };
