import { and, asc, desc, eq, gt, isNull, lt, sql } from 'drizzle-orm';
import type { PracticeRole } from '@/lib/domain/dto';
import type { Database, Transaction } from '../client';
import { invitations, memberships, passwordResets, practices, rateLimits, sessions, users } from '../schema';

type Runner = Database | Transaction;

export async function findUserByEmail(db: Runner, { email }: { email: string }) {
  const [row] = await db.select().from(users).where(eq(users.email, email.toLowerCase()));
  return row ?? null;
}

export async function findUser(db: Runner, { userId }: { userId: string }) {
  const [row] = await db
    .select({ id: users.id, name: users.name, email: users.email, units: users.units })
    .from(users)
    .where(eq(users.id, userId));
  return row ?? null;
}

export async function insertUser(
  db: Runner,
  values: { id: string; name: string; email: string; passwordHash: string },
) {
  const [row] = await db
    .insert(users)
    .values({ ...values, email: values.email.toLowerCase() })
    .onConflictDoNothing()
    .returning({ id: users.id });
  return row ?? null;
}

export async function updateUser(
  db: Runner,
  userId: string,
  values: { passwordHash?: string; units?: 'si' | 'us' },
) {
  await db.update(users).set(values).where(eq(users.id, userId));
}

export async function insertPractice(tx: Transaction, values: { id: string; name: string }) {
  await tx.insert(practices).values(values);
}

export async function findPractice(tx: Transaction, { practiceId }: { practiceId: string }) {
  const [row] = await tx.select({ name: practices.name }).from(practices).where(eq(practices.id, practiceId));
  return row ?? null;
}

export async function insertMembership(
  tx: Transaction,
  values: { practiceId: string; userId: string; role: PracticeRole },
) {
  await tx.insert(memberships).values(values).onConflictDoNothing();
}

export async function findMembership(
  tx: Transaction,
  { practiceId, userId }: { practiceId: string; userId: string },
) {
  const [row] = await tx
    .select({ role: memberships.role, practiceName: practices.name })
    .from(memberships)
    .innerJoin(practices, eq(practices.id, memberships.practiceId))
    .where(and(eq(memberships.practiceId, practiceId), eq(memberships.userId, userId)));
  return row ?? null;
}

/** Practices of a person, first joined first; needs the scope of that person. */
export function listPracticesOf(tx: Transaction, { userId }: { userId: string }) {
  return tx
    .select({ practiceId: memberships.practiceId })
    .from(memberships)
    .where(eq(memberships.userId, userId))
    .orderBy(asc(memberships.joinedAt));
}

export function selectMembers(tx: Transaction, { practiceId }: { practiceId: string }) {
  return tx
    .select({
      userId: users.id,
      name: users.name,
      email: users.email,
      role: memberships.role,
      joinedAt: memberships.joinedAt,
    })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .where(eq(memberships.practiceId, practiceId))
    .orderBy(asc(users.name));
}

/** Holds a practice's members as they are until the transaction ends, so that two changes at once see each other. */
export async function lockPractice(tx: Transaction, { practiceId }: { practiceId: string }) {
  await tx.select({ id: practices.id }).from(practices).where(eq(practices.id, practiceId)).for('update');
}

export async function countAdministrators(
  tx: Transaction,
  { practiceId }: { practiceId: string },
): Promise<number> {
  const [row] = await tx
    .select({ count: sql<number>`count(*)::int` })
    .from(memberships)
    .where(and(eq(memberships.practiceId, practiceId), eq(memberships.role, 'administrator')));
  return row!.count;
}

export async function updateMembership(
  tx: Transaction,
  { practiceId, userId, role }: { practiceId: string; userId: string; role: PracticeRole },
) {
  const [row] = await tx
    .update(memberships)
    .set({ role })
    .where(and(eq(memberships.practiceId, practiceId), eq(memberships.userId, userId)))
    .returning({ userId: memberships.userId });
  return row ?? null;
}

export async function deleteMembership(
  tx: Transaction,
  { practiceId, userId }: { practiceId: string; userId: string },
) {
  const [row] = await tx
    .delete(memberships)
    .where(and(eq(memberships.practiceId, practiceId), eq(memberships.userId, userId)))
    .returning({ userId: memberships.userId });
  return row ?? null;
}

export async function insertInvitation(
  tx: Transaction,
  values: {
    practiceId: string;
    email: string;
    role: PracticeRole;
    tokenHash: string;
    invitedBy: string;
    expiresAt: Date;
  },
) {
  const [row] = await tx.insert(invitations).values(values).returning({ id: invitations.id });
  return row!;
}

export function selectInvitations(tx: Transaction, { practiceId }: { practiceId: string }) {
  return tx
    .select({
      id: invitations.id,
      email: invitations.email,
      role: invitations.role,
      invitedBy: users.name,
      createdAt: invitations.createdAt,
      expiresAt: invitations.expiresAt,
    })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(
      and(
        eq(invitations.practiceId, practiceId),
        isNull(invitations.acceptedAt),
        gt(invitations.expiresAt, sql`now()`),
      ),
    )
    .orderBy(desc(invitations.createdAt));
}

export async function deleteInvitation(
  tx: Transaction,
  { practiceId, id }: { practiceId: string; id: string },
) {
  const [row] = await tx
    .delete(invitations)
    .where(
      and(eq(invitations.practiceId, practiceId), eq(invitations.id, id), isNull(invitations.acceptedAt)),
    )
    .returning({ email: invitations.email });
  return row ?? null;
}

/** Takes back what is still open for an address, before it is invited anew. */
export async function deleteOpenInvitationsTo(
  tx: Transaction,
  { practiceId, email }: { practiceId: string; email: string },
) {
  await tx
    .delete(invitations)
    .where(
      and(
        eq(invitations.practiceId, practiceId),
        eq(invitations.email, email),
        isNull(invitations.acceptedAt),
      ),
    );
}

/** An open invitation by its token; needs the scope of that token. */
export async function findInvitation(tx: Transaction, { tokenHash }: { tokenHash: string }) {
  const [row] = await tx
    .select()
    .from(invitations)
    .where(
      and(
        eq(invitations.tokenHash, tokenHash),
        isNull(invitations.acceptedAt),
        gt(invitations.expiresAt, sql`now()`),
      ),
    );
  return row ?? null;
}

/** Marks an invitation as used; null where somebody was faster. */
export async function useInvitation(tx: Transaction, { practiceId, id }: { practiceId: string; id: string }) {
  const [row] = await tx
    .update(invitations)
    .set({ acceptedAt: sql`now()` })
    .where(
      and(eq(invitations.practiceId, practiceId), eq(invitations.id, id), isNull(invitations.acceptedAt)),
    )
    .returning({ id: invitations.id });
  return row ?? null;
}

export async function insertReset(
  db: Runner,
  values: { tokenHash: string; userId: string; expiresAt: Date },
) {
  await db.insert(passwordResets).values(values);
}

export async function findReset(db: Runner, { tokenHash }: { tokenHash: string }) {
  const [row] = await db
    .select({ userId: passwordResets.userId, email: users.email })
    .from(passwordResets)
    .innerJoin(users, eq(users.id, passwordResets.userId))
    .where(
      and(
        eq(passwordResets.tokenHash, tokenHash),
        isNull(passwordResets.usedAt),
        gt(passwordResets.expiresAt, sql`now()`),
      ),
    );
  return row ?? null;
}

/** Uses a reset up; null where it was used or has expired. */
export async function useReset(db: Runner, { tokenHash }: { tokenHash: string }) {
  const [row] = await db
    .update(passwordResets)
    .set({ usedAt: sql`now()` })
    .where(
      and(
        eq(passwordResets.tokenHash, tokenHash),
        isNull(passwordResets.usedAt),
        gt(passwordResets.expiresAt, sql`now()`),
      ),
    )
    .returning({ userId: passwordResets.userId });
  return row ?? null;
}

export function selectSessions(db: Runner, { userId }: { userId: string }) {
  return db
    .select({
      publicId: sessions.publicId,
      userAgent: sessions.userAgent,
      address: sessions.address,
      createdAt: sessions.createdAt,
      lastSeenAt: sessions.lastSeenAt,
    })
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, sql`now()`)))
    .orderBy(desc(sessions.lastSeenAt));
}

/** Notes that a session is in use, at most every five minutes. */
export async function touchSession(db: Runner, { id }: { id: string }) {
  await db
    .update(sessions)
    .set({ lastSeenAt: sql`now()` })
    .where(and(eq(sessions.id, id), lt(sessions.lastSeenAt, sql`now() - interval '5 minutes'`)));
}

export async function deleteSession(db: Runner, { userId, publicId }: { userId: string; publicId: string }) {
  const [row] = await db
    .delete(sessions)
    .where(and(eq(sessions.userId, userId), eq(sessions.publicId, publicId)))
    .returning({ id: sessions.id });
  return row ?? null;
}

/** Forgets what nobody can use any more: sessions and resets that have run out, counts of tries long past. */
export async function sweepExpired(db: Runner) {
  await db.delete(sessions).where(lt(sessions.expiresAt, sql`now()`));
  await db.delete(passwordResets).where(lt(passwordResets.expiresAt, sql`now() - interval '1 day'`));
  await db.delete(rateLimits).where(lt(rateLimits.expire, sql`extract(epoch from now()) * 1000`));
}

export async function deleteSessionsInPractice(
  db: Runner,
  { userId, practiceId }: { userId: string; practiceId: string },
) {
  await db.delete(sessions).where(and(eq(sessions.userId, userId), eq(sessions.practiceId, practiceId)));
}
