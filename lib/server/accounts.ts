// A person's own account: signing up, in and out, passwords, sessions, units.
import 'server-only';
import { database, withPractice, withScope } from '@/db/client';
import {
  deleteSession,
  findReset,
  findUserByEmail,
  insertMembership,
  insertPractice,
  insertReset,
  insertUser,
  listPracticesOf,
  selectSessions,
  updateUser,
  useReset as consumeReset,
} from '@/db/queries/people';
import {
  closeAllSessions,
  hashPassword,
  hashSecret,
  makeSecret,
  verifyNobody,
  verifyPassword,
} from '@/lib/auth';
import type { Actor, SessionSummary } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { paths } from '@/lib/paths';
import { record } from './audit';
import { describeDevice } from './describe-device';
import { publicAddress } from './env';
import { queueMail } from './mail/queue';
import { requireId } from './require-id';
import { beginSession, caller, currentSessionId, leaveSession } from './session';
import { limitTries } from './throttle';

const resetLife = 3600 * 1000;

export interface SignUp {
  readonly practiceName: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/** Founds a practice with its first administrator, and signs them in. */
export async function signUp(input: SignUp): Promise<void> {
  await limitTries('sign-up', (await caller()).address);
  const { userId, practiceId } = await foundPractice(input);
  await beginSession(userId, practiceId);
}

/** The practice and the person of a sign-up, with the welcome mail, in one transaction. */
export async function foundPractice({ practiceName, name, email, password }: SignUp) {
  const practiceId = crypto.randomUUID();
  const userId = crypto.randomUUID();
  const passwordHash = await hashPassword(password);
  await withPractice(practiceId, async (tx) => {
    if (!(await insertUser(tx, { id: userId, name, email, passwordHash }))) {
      const sentence = 'There is an account with this address already. Sign in, or ask for a new password.';
      throw new AppError('invalid-input', undefined, { fields: { email: sentence } });
    }
    await insertPractice(tx, { id: practiceId, name: practiceName });
    await insertMembership(tx, { practiceId, userId, role: 'administrator' });
    await record(tx, { practiceId, userId, name }, { action: 'practice.founded', subject: practiceName });
    const link = publicAddress() + paths.desk();
    await queueMail(tx, {
      practiceId,
      recipient: email,
      template: 'welcome',
      payload: { name, practiceName, link },
    });
  });
  return { userId, practiceId };
}

export async function signIn({ email, password }: { email: string; password: string }): Promise<void> {
  await limitTries('sign-in-address', (await caller()).address);
  await limitTries('sign-in-account', email);
  const user = await findUserByEmail(database(), { email });
  const isRight = user ? await verifyPassword(user.passwordHash, password) : await verifyNobody(password);
  if (!user || !isRight) {
    const sentence = 'That e-mail address and password do not belong together.';
    throw new AppError('invalid-input', undefined, { sentence });
  }
  const userId = user.id;
  const [first] = await withScope({ userId }, (tx) => listPracticesOf(tx, { userId }));
  if (!first) {
    const sentence = 'You belong to no practice any more. Ask its administrator for an invitation.';
    throw new AppError('forbidden', undefined, { sentence });
  }
  const { practiceId } = first;
  await withPractice(practiceId, (tx) =>
    record(tx, { practiceId, userId, name: user.name }, { action: 'person.signed-in', subject: user.email }),
  );
  await beginSession(userId, practiceId);
}

export async function signOut(_actor: Actor): Promise<void> {
  await leaveSession();
}

/** Sends a link for a new password. The answer is the same whether there is such an account or not. */
export async function requestReset({ email }: { email: string }): Promise<void> {
  await limitTries('reset', email);
  const user = await findUserByEmail(database(), { email });
  if (!user) return;
  const { id: userId, name } = user;
  const [first] = await withScope({ userId }, (tx) => listPracticesOf(tx, { userId }));
  if (!first) return;
  const { practiceId } = first;
  const token = makeSecret();
  await withPractice(practiceId, async (tx) => {
    const expiresAt = new Date(Date.now() + resetLife);
    await insertReset(tx, { tokenHash: hashSecret(token), userId, expiresAt });
    const link = publicAddress() + paths.reset(token);
    await queueMail(tx, {
      practiceId,
      recipient: email,
      template: 'password-reset',
      payload: { name, link },
    });
    await record(tx, { practiceId, userId, name }, { action: 'password.reset-asked', subject: email });
  });
}

/** Whose password a link resets; reading never uses it up. */
export async function readReset(token: string): Promise<{ email: string } | null> {
  const found = await findReset(database(), { tokenHash: hashSecret(token) });
  return found && { email: found.email };
}

/** Sets the new password, uses the link up, and ends every session of the person. */
export async function resetPassword({ token, password }: { token: string; password: string }): Promise<void> {
  const tokenHash = hashSecret(token);
  const isOpen = await findReset(database(), { tokenHash });
  const used = isOpen && { passwordHash: await hashPassword(password) };
  const userId = await database().transaction(async (tx) => {
    const reset = used && (await consumeReset(tx, { tokenHash }));
    if (!reset) {
      const sentence = 'This link has been used or has run out. Ask for a new one.';
      throw new AppError('not-found', undefined, { sentence });
    }
    await updateUser(tx, reset.userId, used);
    return reset.userId;
  });
  await closeAllSessions(userId);
}

export async function listSessions(actor: Actor): Promise<SessionSummary[]> {
  const [rows, current] = await Promise.all([
    selectSessions(database(), { userId: actor.userId }),
    currentSessionId(),
  ]);
  return rows.map(({ publicId, userAgent, address, createdAt, lastSeenAt }) => ({
    id: publicId,
    device: describeDevice(userAgent),
    address,
    createdAt: createdAt.toISOString(),
    lastSeenAt: lastSeenAt.toISOString(),
    current: publicId === current,
  }));
}

export async function endSession(actor: Actor, id: string): Promise<void> {
  const ended = await deleteSession(database(), { userId: actor.userId, publicId: requireId(id) });
  if (!ended) throw new AppError('not-found');
}

export async function signOutEverywhere(actor: Actor): Promise<void> {
  await closeAllSessions(actor.userId);
  await leaveSession();
}

export async function setUnits(actor: Actor, units: Actor['units']): Promise<void> {
  await updateUser(database(), actor.userId, { units });
}
