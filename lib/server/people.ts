// The people of a practice: members, their roles, invitations.
import 'server-only';
import { database, type Transaction, withPractice, withScope } from '@/db/client';
import {
  countAdministrators,
  deleteInvitation,
  deleteMembership,
  deleteOpenInvitationsTo,
  deleteSessionsInPractice,
  findInvitation,
  findMembership,
  findPractice,
  findUser,
  findUserByEmail,
  insertInvitation,
  insertMembership,
  insertUser,
  lockPractice,
  selectInvitations,
  selectMembers,
  updateMembership,
  useInvitation as consumeInvitation,
} from '@/db/queries/people';
import { deleteAppointmentsOf } from '@/db/queries/work';
import { hashPassword, hashSecret, makeSecret, verifyPassword } from '@/lib/auth';
import type { Actor, InvitationSummary, Member, PracticeRole } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { formatDay } from '@/lib/format/dates';
import { paths } from '@/lib/paths';
import { record } from './audit';
import { authorize } from './authorize';
import { publicAddress } from './env';
import { queueMail } from './mail/queue';
import { requireId } from './require-id';
import { beginSession } from './session';
import { limitTries } from './throttle';

const invitationLife = 7 * 24 * 3600 * 1000;

export async function listMembers(actor: Actor): Promise<Member[]> {
  authorize(actor, 'members.list');
  const { practiceId } = actor;
  const rows = await withPractice(practiceId, (tx) => selectMembers(tx, { practiceId }));
  return rows.map(({ joinedAt, ...row }) => ({ ...row, joinedAt: joinedAt.toISOString() }));
}

/** Gives a member another role; somebody made a client loses every appointment, since clients see no drafts. */
export async function changeRole(
  actor: Actor,
  { userId, role }: { userId: string; role: PracticeRole },
): Promise<void> {
  authorize(actor, 'members.manage');
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    await lockPractice(tx, { practiceId });
    const member = await requireMember(tx, { practiceId, userId });
    if (member.role === role) return;
    await updateMembership(tx, { practiceId, userId, role });
    await keepAdministrator(tx, practiceId);
    if (role === 'client') await deleteAppointmentsOf(tx, { practiceId, userId });
    await record(tx, actor, {
      action: 'member.role-changed',
      subject: member.name,
      detail: `${member.role} → ${role}`,
    });
  });
}

/** Takes a member out of the practice; their sessions in it end at once. */
export async function removeMember(actor: Actor, { userId }: { userId: string }): Promise<void> {
  authorize(actor, 'members.manage');
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    await lockPractice(tx, { practiceId });
    const member = await requireMember(tx, { practiceId, userId });
    await deleteMembership(tx, { practiceId, userId });
    await keepAdministrator(tx, practiceId);
    await deleteSessionsInPractice(tx, { userId, practiceId });
    await record(tx, actor, { action: 'member.removed', subject: member.name, detail: member.email });
  });
}

async function requireMember(
  tx: Transaction,
  { practiceId, userId }: { practiceId: string; userId: string },
) {
  const membership = await findMembership(tx, { practiceId, userId });
  const user = membership && (await findUser(tx, { userId }));
  if (!membership || !user) throw new AppError('not-found');
  return { role: membership.role, name: user.name, email: user.email };
}

async function keepAdministrator(tx: Transaction, practiceId: string): Promise<void> {
  if ((await countAdministrators(tx, { practiceId })) > 0) return;
  const sentence = 'A practice keeps at least one administrator. Make somebody else administrator first.';
  throw new AppError('invalid-input', undefined, { sentence });
}

export async function listInvitations(actor: Actor): Promise<InvitationSummary[]> {
  authorize(actor, 'members.manage');
  const { practiceId } = actor;
  const rows = await withPractice(practiceId, (tx) => selectInvitations(tx, { practiceId }));
  return rows.map(({ createdAt, expiresAt, ...row }) => ({
    ...row,
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
  }));
}

/** Invites somebody by e-mail; an earlier open invitation to the same address ends. */
export async function invite(
  actor: Actor,
  { email, role }: { email: string; role: PracticeRole },
): Promise<void> {
  authorize(actor, 'members.manage');
  const { practiceId, userId, name: invitedBy, practiceName } = actor;
  await limitTries('invite', practiceId);
  const token = makeSecret();
  const expiresAt = new Date(Date.now() + invitationLife);
  await withPractice(practiceId, async (tx) => {
    const members = await selectMembers(tx, { practiceId });
    if (members.some((member) => member.email === email)) {
      throw new AppError('invalid-input', undefined, { fields: { email: 'They are a member already.' } });
    }
    await deleteOpenInvitationsTo(tx, { practiceId, email });
    await insertInvitation(tx, {
      practiceId,
      email,
      role,
      tokenHash: hashSecret(token),
      invitedBy: userId,
      expiresAt,
    });
    const link = publicAddress() + paths.invitation(token);
    const payload = { invitedBy, practiceName, role, link, until: formatDay(expiresAt.toISOString()) };
    await queueMail(tx, { practiceId, recipient: email, template: 'invitation', payload });
    await record(tx, actor, { action: 'member.invited', subject: email, detail: role });
  });
}

export async function revokeInvitation(actor: Actor, id: string): Promise<void> {
  authorize(actor, 'members.manage');
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const revoked = await deleteInvitation(tx, { practiceId, id: requireId(id) });
    if (!revoked) throw new AppError('not-found');
    await record(tx, actor, { action: 'invitation.revoked', subject: revoked.email });
  });
}

export interface OpenInvitation {
  readonly practiceName: string;
  readonly invitedBy: string;
  readonly email: string;
  readonly role: PracticeRole;
  readonly expiresAt: string;
}

function findOpenInvitation(token: string) {
  const tokenHash = hashSecret(token);
  return withScope({ tokenHash }, (tx) => findInvitation(tx, { tokenHash }));
}

/** What a link invites to; reading never takes the invitation up, since mail scanners open links. */
export async function readInvitation(token: string): Promise<OpenInvitation | null> {
  const found = await findOpenInvitation(token);
  if (!found) return null;
  const { practiceId, email, role, expiresAt } = found;
  return withPractice(practiceId, async (tx) => {
    const practice = await findPractice(tx, { practiceId });
    const inviter = await findUser(tx, { userId: found.invitedBy });
    if (!practice || !inviter) return null;
    return {
      practiceName: practice.name,
      invitedBy: inviter.name,
      email,
      role,
      expiresAt: expiresAt.toISOString(),
    };
  });
}

/** Takes an invitation up and signs in. Whoever has an account gives its password; others set one. */
export async function acceptInvitation({
  token,
  name,
  password,
}: {
  token: string;
  name: string;
  password: string;
}): Promise<void> {
  const found = await findOpenInvitation(token);
  if (!found) throw gone();
  const { practiceId, email, role, id } = found;
  const known = await findUserByEmail(database(), { email });
  if (known) await checkOwnPassword(known, password);
  const passwordHash = known ? null : await hashPassword(password);
  const userId = known?.id ?? crypto.randomUUID();
  await withPractice(practiceId, async (tx) => {
    if (!(await consumeInvitation(tx, { practiceId, id }))) throw gone();
    if (passwordHash && !(await insertUser(tx, { id: userId, name, email, passwordHash })))
      throw new AppError('conflict');
    await insertMembership(tx, { practiceId, userId, role });
    await record(
      tx,
      { practiceId, userId, name: known?.name ?? name },
      { action: 'member.joined', subject: email, detail: role },
    );
  });
  await beginSession(userId, practiceId);
}

async function checkOwnPassword(
  known: { email: string; passwordHash: string },
  password: string,
): Promise<void> {
  await limitTries('sign-in-account', known.email);
  if (await verifyPassword(known.passwordHash, password)) return;
  const sentence = `There is an account for ${known.email} already. Give its password to join with it.`;
  throw new AppError('invalid-input', undefined, { fields: { password: sentence } });
}

function gone(): AppError {
  const sentence = 'This invitation has been taken up, revoked, or has run out. Ask for a new one.';
  return new AppError('not-found', undefined, { sentence });
}
