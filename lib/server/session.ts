import 'server-only';
import { cookies, headers } from 'next/headers';
import { redirect } from 'next/navigation';
import { cache } from 'react';
import { database, withPractice } from '@/db/client';
import { findMembership, touchSession } from '@/db/queries/people';
import {
  blankCookie,
  closeSession,
  type CookieToSet,
  openSession,
  readSession,
  sessionCookieName,
} from '@/lib/auth';
import type { Actor } from '@/lib/domain/dto';
import { paths } from '@/lib/paths';

/** The signed-in person with their role in the session's practice; null without a session or a membership. */
export const currentActor = cache(async (): Promise<Actor | null> => {
  const id = (await cookies()).get(sessionCookieName())?.value;
  return id ? actorOfSession(id) : null;
});

/** The actor of a session id. */
export async function actorOfSession(id: string): Promise<Actor | null> {
  const session = await readSession(id);
  if (!session) return null;
  const { userId, practiceId, name, email, units } = session;
  const membership = await withPractice(practiceId, (tx) => findMembership(tx, { practiceId, userId }));
  if (!membership) return null;
  await touchSession(database(), { id });
  return {
    userId,
    name,
    email,
    units,
    practiceId,
    practiceName: membership.practiceName,
    role: membership.role,
  };
}

/** The signed-in person; others are sent to sign in and come back. */
export async function requireActor(): Promise<Actor> {
  const actor = await currentActor();
  if (actor) return actor;
  const at = (await headers()).get('x-pathname');
  redirect(paths.signIn(at ?? undefined));
}

/** Where a request comes from, for the session list and the throttle. */
export async function caller(): Promise<{ userAgent: string; address: string }> {
  const all = await headers();
  const forwarded = all.get('x-forwarded-for')?.split(',')[0]?.trim();
  return { userAgent: (all.get('user-agent') ?? '').slice(0, 400), address: forwarded ?? 'local' };
}

async function setCookie({ name, value, attributes }: CookieToSet): Promise<void> {
  (await cookies()).set(name, value, attributes);
}

/** Opens a session and puts its cookie on the answer. */
export async function beginSession(userId: string, practiceId: string): Promise<void> {
  await setCookie(await openSession(userId, { practiceId, ...(await caller()) }));
}

/** Ends this browser's session. */
export async function leaveSession(): Promise<void> {
  const id = (await cookies()).get(sessionCookieName())?.value;
  if (id) await closeSession(id);
  await setCookie(blankCookie());
}

/** The public id of this browser's session, to mark it in the list. */
export async function currentSessionId(): Promise<string | null> {
  const id = (await cookies()).get(sessionCookieName())?.value;
  return id ? ((await readSession(id))?.publicId ?? null) : null;
}
