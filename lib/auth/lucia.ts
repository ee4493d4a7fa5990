import 'server-only';
import { DrizzlePostgreSQLAdapter } from '@lucia-auth/adapter-drizzle';
import { Lucia, TimeSpan } from 'lucia';
import { database } from '@/db/client';
import { sessions, users } from '@/db/schema';

function build() {
  return new Lucia(new DrizzlePostgreSQLAdapter(database(), sessions, users), {
    sessionExpiresIn: new TimeSpan(30, 'd'),
    sessionCookie: {
      name: 'underfall_session',
      expires: false, // a page render cannot renew a cookie; the row decides when a session ends
      attributes: { secure: process.env.COOKIE_SECURE !== '0', sameSite: 'lax', path: '/' },
    },
    getUserAttributes: ({ name, email, units }) => ({ name, email, units }),
    getSessionAttributes: ({ practiceId, publicId }) => ({ practiceId, publicId }),
  });
}

let instance: ReturnType<typeof build> | undefined;

function lucia(): ReturnType<typeof build> {
  instance ??= build();
  return instance;
}

declare module 'lucia' {
  interface Register {
    Lucia: ReturnType<typeof build>;
    DatabaseUserAttributes: { name: string; email: string; units: 'si' | 'us' };
    DatabaseSessionAttributes: { practiceId: string; publicId: string; userAgent: string; address: string };
  }
}

/** A session as the rest of the product knows it. */
export interface SignInSession {
  readonly id: string;
  readonly publicId: string;
  readonly userId: string;
  readonly practiceId: string;
  readonly name: string;
  readonly email: string;
  readonly units: 'si' | 'us';
}

export interface CookieToSet {
  readonly name: string;
  readonly value: string;
  readonly attributes: {
    secure?: boolean;
    httpOnly?: boolean;
    sameSite?: 'lax' | 'strict' | 'none';
    path?: string;
  };
}

export function sessionCookieName(): string {
  return lucia().sessionCookieName;
}

/** Opens a session for a person in a practice. */
export async function openSession(
  userId: string,
  attributes: { practiceId: string; userAgent: string; address: string },
): Promise<CookieToSet> {
  const session = await lucia().createSession(userId, { ...attributes, publicId: crypto.randomUUID() });
  return lucia().createSessionCookie(session.id) as CookieToSet;
}

/** Reads a session by the cookie's value; null once it has ended. */
export async function readSession(id: string): Promise<SignInSession | null> {
  const { session, user } = await lucia().validateSession(id);
  if (!session) return null;
  const { practiceId, publicId } = session;
  return {
    id: session.id,
    publicId,
    userId: user.id,
    practiceId,
    name: user.name,
    email: user.email,
    units: user.units,
  };
}

export async function closeSession(id: string): Promise<void> {
  await lucia().invalidateSession(id);
}

export async function closeAllSessions(userId: string): Promise<void> {
  await lucia().invalidateUserSessions(userId);
}

export function blankCookie(): CookieToSet {
  return lucia().createBlankSessionCookie() as CookieToSet;
}
