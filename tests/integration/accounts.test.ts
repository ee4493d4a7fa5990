import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { sweepExpired } from '@/db/queries/people';
import type { Actor } from '@/lib/domain/dto';
import { signInForm } from '@/lib/domain/forms';
import { AppError } from '@/lib/errors';
import {
  endSession,
  listSessions,
  readReset,
  requestReset,
  resetPassword,
  setUnits,
  signIn,
  signOut,
  signOutEverywhere,
  signUp,
} from '@/lib/server/accounts';
import { defineAction, definePublicAction } from '@/lib/server/define-action';
import {
  acceptInvitation,
  changeRole,
  invite,
  listInvitations,
  listMembers,
  readInvitation,
  removeMember,
  revokeInvitation,
} from '@/lib/server/people';
import { actorOfSession, currentActor } from '@/lib/server/session';
import { tryLimits } from '@/lib/server/throttle';
import { Browser, inBrowser } from './support/browser';
import { asOwner, asSuperuser } from './support/connect';
import { addMember, makePractice, password, type TestPractice, unique } from './support/practice';

const cookieName = 'underfall_session';
let practice: TestPractice;

beforeAll(async () => {
  practice = await makePractice();
});

async function codeOf(call: Promise<unknown>): Promise<string> {
  try {
    await call;
    return 'done';
  } catch (error) {
    if (error instanceof AppError) return error.code;
    throw error;
  }
}

let addressCount = 0;
/** A browser at an address of its own, so that the counts per address do not meet. */
function freshBrowser(): Browser {
  addressCount += 1;
  return new Browser(`192.0.2.${addressCount}`);
}

function signedIn(email: string): Promise<Browser> {
  const browser = freshBrowser();
  return inBrowser(browser, async () => {
    await signIn({ email, password });
    return browser;
  });
}

/** The link of the newest mail to somebody, out of the table it waits in. */
async function linkTo(recipient: string): Promise<string> {
  const [row] = await asSuperuser(
    async (client) =>
      (
        await client.query<{ link: string }>(
          `select payload->>'link' as link from outbox_mails where recipient = $1 order by created_at desc limit 1`,
          [recipient],
        )
      ).rows,
  );
  return decodeURIComponent(new URL(row!.link).pathname.split('/').at(-1)!);
}

describe('signing up, in and out', () => {
  test('a sign-up founds a practice, signs in, and sets a cookie no script can read', async () => {
    const browser = freshBrowser();
    const email = `${unique('founder')}@new.example`;
    const practiceName = unique('Founded');
    await inBrowser(browser, async () => {
      await signUp({ practiceName, name: 'Founder', email, password });
      expect(await currentActor()).toMatchObject({ email, practiceName, role: 'administrator', units: 'si' });
    });
    const { value, attributes } = browser.cookies.get(cookieName)!;
    expect(value.length).toBeGreaterThanOrEqual(40);
    expect(attributes).toMatchObject({ httpOnly: true, secure: true, sameSite: 'lax', path: '/' });
  });

  test('the password is kept as argon2id and nowhere else', async () => {
    const [row] = await asOwner(
      async (client) =>
        (
          await client.query<{ password_hash: string }>('select password_hash from users where email = $1', [
            practice.author.email,
          ])
        ).rows,
    );
    expect(row!.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  test('an address signs up once', async () => {
    const again = {
      practiceName: 'Again',
      name: 'Again',
      email: practice.author.email.toUpperCase(),
      password,
    };
    expect(await codeOf(inBrowser(freshBrowser(), () => signUp(again)))).toBe('invalid-input');
  });

  test('a wrong password and an unknown address get the same words', async () => {
    const words: string[] = [];
    for (const email of [practice.author.email, 'nobody@nowhere.example']) {
      await inBrowser(freshBrowser(), () => signIn({ email, password: 'not the sentence' })).catch(
        (error: AppError) => words.push(error.details.sentence ?? ''),
      );
    }
    expect(words).toHaveLength(2);
    expect(words[0]).toBe(words[1]);
  });

  test('a session ends at sign-out, and its cookie with it', async () => {
    const browser = await signedIn(practice.checker.email);
    const id = browser.cookies.get(cookieName)!.value;
    expect(await actorOfSession(id)).not.toBeNull();
    await inBrowser(browser, () => signOut(practice.checker));
    expect(browser.cookies.get(cookieName)!.value).toBe('');
    expect(await actorOfSession(id)).toBeNull();
  });

  test('an expired session is none', async () => {
    const browser = await signedIn(practice.checker.email);
    const id = browser.cookies.get(cookieName)!.value;
    await asOwner((client) =>
      client.query(`update sessions set expires_at = now() - interval '1 second' where id = $1`, [id]),
    );
    expect(await actorOfSession(id)).toBeNull();
  });

  test('a made-up cookie is nobody’s', async () => {
    expect(await actorOfSession('a'.repeat(40))).toBeNull();
    expect(await actorOfSession(`' or 1=1 --`)).toBeNull();
  });

  test('too many tries for one account are refused from any address, with the time to wait', async () => {
    const email = `${unique('target')}@nowhere.example`;
    const { tries } = tryLimits['sign-in-account'];
    const guess = () => inBrowser(freshBrowser(), () => signIn({ email, password: 'guess' }));
    for (let i = 0; i < tries; i++) expect(await codeOf(guess())).toBe('invalid-input');
    const refused = await guess().catch((error: AppError) => error);
    expect(refused).toMatchObject({ code: 'too-many' });
    expect((refused as AppError).details.retryAfter).toBeGreaterThan(60);
  });

  test('too many tries from one address are refused for every account', async () => {
    const browser = freshBrowser();
    const { tries } = tryLimits['sign-in-address'];
    const guess = () =>
      inBrowser(browser, () => signIn({ email: `${unique('any')}@nowhere.example`, password: 'guess' }));
    for (let i = 0; i < tries; i++) expect(await codeOf(guess())).toBe('invalid-input');
    expect(await codeOf(guess())).toBe('too-many');
  });
});

describe('sessions', () => {
  test('a person sees their own, with device and address, and never the secret', async () => {
    const person = await addMember(practice.administrator, 'member');
    const first = await signedIn(person.email);
    await signedIn(person.email);
    const sessions = await inBrowser(first, () => listSessions(person));
    expect(sessions).toHaveLength(2);
    expect(sessions.filter(({ current }) => current)).toHaveLength(1);
    expect(sessions[0]).toMatchObject({ device: 'Firefox on Linux' });
    expect(JSON.stringify(sessions)).not.toContain(first.cookies.get(cookieName)!.value);
  });

  test('one session ends, and only a person’s own', async () => {
    const person = await addMember(practice.administrator, 'member');
    const [first, second] = [await signedIn(person.email), await signedIn(person.email)];
    const sessions = await inBrowser(first, () => listSessions(person));
    const other = sessions.find(({ current }) => !current)!;
    expect(await codeOf(endSession(practice.author, other.id))).toBe('not-found');
    await endSession(person, other.id);
    expect(await actorOfSession(second.cookies.get(cookieName)!.value)).toBeNull();
    expect(await actorOfSession(first.cookies.get(cookieName)!.value)).not.toBeNull();
  });

  test('signing out everywhere ends them all', async () => {
    const person = await addMember(practice.administrator, 'member');
    const browsers = [await signedIn(person.email), await signedIn(person.email)];
    const ids = browsers.map((browser) => browser.cookies.get(cookieName)!.value);
    await inBrowser(browsers[0]!, () => signOutEverywhere(person));
    for (const id of ids) expect(await actorOfSession(id)).toBeNull();
  });

  test('units stay with the person', async () => {
    const person = await addMember(practice.administrator, 'member');
    await setUnits(person, 'us');
    const browser = await signedIn(person.email);
    expect(await inBrowser(browser, () => currentActor())).toMatchObject({ units: 'us' });
  });
});

test('the sweep forgets what has run out, and nothing else', async () => {
  const person = await addMember(practice.administrator, 'member');
  const [living, expired] = [await signedIn(person.email), await signedIn(person.email)].map(
    (browser) => browser.cookies.get(cookieName)!.value,
  );
  await asOwner((client) =>
    client.query(`update sessions set expires_at = now() - interval '1 second' where id = $1`, [expired]),
  );
  await sweepExpired(database());
  const { rows } = await asOwner((client) =>
    client.query('select id from sessions where user_id = $1', [person.userId]),
  );
  expect(rows).toEqual([{ id: living }]);
});

describe('resetting a password', () => {
  async function askFor(person: Actor): Promise<string> {
    await requestReset({ email: person.email });
    return linkTo(person.email);
  }

  test('reading the link uses nothing up; setting the password does, once', async () => {
    const person = await addMember(practice.administrator, 'member');
    const session = (await signedIn(person.email)).cookies.get(cookieName)!.value;
    const token = await askFor(person);
    for (let i = 0; i < 3; i++) expect(await readReset(token)).toEqual({ email: person.email });
    await resetPassword({ token, password: 'an entirely new sentence' });
    expect(await readReset(token)).toBeNull();
    expect(await codeOf(resetPassword({ token, password: 'and yet another one' }))).toBe('not-found');
    expect(await actorOfSession(session)).toBeNull();
    await inBrowser(freshBrowser(), () =>
      signIn({ email: person.email, password: 'an entirely new sentence' }),
    );
    expect(await codeOf(signedIn(person.email))).toBe('invalid-input');
  });

  test('of two who press the button at once, one sets the password', async () => {
    const person = await addMember(practice.administrator, 'member');
    const token = await askFor(person);
    const both = ['the first of two sentences', 'the second of two sentences'];
    const codes = await Promise.all(both.map((chosen) => codeOf(resetPassword({ token, password: chosen }))));
    expect(codes.toSorted()).toEqual(['done', 'not-found']);
  });

  test('a link runs out', async () => {
    const person = await addMember(practice.administrator, 'member');
    const token = await askFor(person);
    await asOwner((client) =>
      client.query(`update password_resets set expires_at = now() - interval '1 second' where user_id = $1`, [
        person.userId,
      ]),
    );
    expect(await readReset(token)).toBeNull();
    expect(await codeOf(resetPassword({ token, password: 'much too late a sentence' }))).toBe('not-found');
  });

  test('an unknown address gets the same answer, and no mail', async () => {
    const email = `${unique('unknown')}@nowhere.example`;
    expect(await codeOf(requestReset({ email }))).toBe('done');
    const { rowCount } = await asSuperuser((client) =>
      client.query('select 1 from outbox_mails where recipient = $1', [email]),
    );
    expect(rowCount).toBe(0);
  });

  test('the token itself is nowhere in the table', async () => {
    const person = await addMember(practice.administrator, 'member');
    const token = await askFor(person);
    const { rowCount } = await asOwner((client) =>
      client.query('select 1 from password_resets where token_hash = $1', [token]),
    );
    expect(rowCount).toBe(0);
  });

  test('links are asked for a few times an hour', async () => {
    const email = `${unique('often')}@nowhere.example`;
    for (let i = 0; i < tryLimits.reset.tries; i++) await requestReset({ email });
    expect(await codeOf(requestReset({ email }))).toBe('too-many');
  });
});

describe('invitations', () => {
  async function inviteSomebody(role: 'member' | 'client' = 'member') {
    const email = `${unique('guest')}@else.example`;
    await invite(practice.administrator, { email, role });
    return { email, token: await linkTo(email) };
  }

  test('reading uses nothing up; accepting joins, signs in, and works once', async () => {
    const { email, token } = await inviteSomebody('client');
    for (let i = 0; i < 3; i++) {
      expect(await readInvitation(token)).toMatchObject({ email, role: 'client', invitedBy: 'Head' });
    }
    const browser = freshBrowser();
    await inBrowser(browser, () => acceptInvitation({ token, name: 'Guest', password }));
    expect(await inBrowser(browser, () => currentActor())).toMatchObject({
      email,
      name: 'Guest',
      role: 'client',
      practiceId: practice.id,
    });
    expect(await readInvitation(token)).toBeNull();
    expect(await codeOf(acceptInvitation({ token, name: 'Twice', password }))).toBe('not-found');
  });

  test('a revoked, an expired and a made-up invitation open nothing', async () => {
    const revoked = await inviteSomebody();
    const [open] = (await listInvitations(practice.administrator)).filter(
      ({ email }) => email === revoked.email,
    );
    await revokeInvitation(practice.administrator, open!.id);
    const expired = await inviteSomebody();
    await asSuperuser((client) =>
      client.query(`update invitations set expires_at = now() - interval '1 second' where email = $1`, [
        expired.email,
      ]),
    );
    for (const token of [revoked.token, expired.token, 'made-up']) {
      expect(await readInvitation(token)).toBeNull();
      expect(await codeOf(acceptInvitation({ token, name: 'Late', password }))).toBe('not-found');
    }
  });

  test('whoever has an account joins with its own password, and keeps it', async () => {
    const other = await makePractice();
    const { email } = other.author;
    await invite(practice.administrator, { email, role: 'member' });
    const token = await linkTo(email);
    expect(await codeOf(acceptInvitation({ token, name: 'X', password: 'somebody else’s sentence' }))).toBe(
      'invalid-input',
    );
    expect(await readInvitation(token)).not.toBeNull();
    await inBrowser(freshBrowser(), () => acceptInvitation({ token, name: 'X', password }));
    const names = (await listMembers(practice.administrator)).map(({ name }) => name);
    expect(names).toContain(other.author.name);
  });

  test('a second invitation to an address ends the first', async () => {
    const { email, token } = await inviteSomebody();
    await invite(practice.administrator, { email, role: 'member' });
    expect(await readInvitation(token)).toBeNull();
    expect(await readInvitation(await linkTo(email))).toMatchObject({ email });
  });

  test('a member is not invited again', async () => {
    expect(
      await codeOf(invite(practice.administrator, { email: practice.author.email, role: 'member' })),
    ).toBe('invalid-input');
  });
});

describe('members', () => {
  test('a removed member is out at once', async () => {
    const person = await addMember(practice.administrator, 'member');
    const id = (await signedIn(person.email)).cookies.get(cookieName)!.value;
    await removeMember(practice.administrator, { userId: person.userId });
    expect(await actorOfSession(id)).toBeNull();
    expect(await codeOf(signedIn(person.email))).toBe('forbidden');
  });

  test('two administrators who put each other down at once leave one', async () => {
    const own = await makePractice();
    const second = await addMember(own.administrator, 'administrator');
    const codes = await Promise.all([
      codeOf(changeRole(own.administrator, { userId: second.userId, role: 'member' })),
      codeOf(changeRole(second, { userId: own.administrator.userId, role: 'member' })),
    ]);
    expect(codes.toSorted()).toEqual(['done', 'invalid-input']);
  });

  test('the last administrator neither leaves nor steps down', async () => {
    const { administrator } = practice;
    const { userId } = administrator;
    expect(await codeOf(changeRole(administrator, { userId, role: 'member' }))).toBe('invalid-input');
    expect(await codeOf(removeMember(administrator, { userId }))).toBe('invalid-input');
    const [still] = (await listMembers(administrator)).filter((member) => member.userId === userId);
    expect(still!.role).toBe('administrator');
  });
});

describe('the wrapper of actions', () => {
  const greet = defineAction(signInForm, async ({ actor, input }) => `${actor.name} ${input.email}`);
  const echo = definePublicAction(signInForm, async ({ input }) => input.email);

  test('no session', async () => {
    const answer = await inBrowser(freshBrowser(), () => greet({ email: 'a@b.example', password: 'x' }));
    expect(answer).toMatchObject({ ok: false, code: 'unauthenticated' });
  });

  test.each([
    [null],
    ['text'],
    [{}],
    [{ email: 5, password: [] }],
    [{ email: 'not-an-address', password: '' }],
  ])('malformed input: %j', async (input) => {
    const answer = await echo(input as never);
    expect(answer).toMatchObject({ ok: false, code: 'invalid-input' });
  });

  test('each field gets its sentence', async () => {
    const answer = await echo({ email: 'not-an-address', password: '' });
    expect(answer).toMatchObject({
      fields: { email: expect.stringContaining('whole e-mail address'), password: 'Write your password.' },
    });
  });

  test('an unexpected failure says a number and nothing of itself', async () => {
    const fail = definePublicAction(signInForm, async () => {
      throw new TypeError('secret inner words');
    });
    const answer = await fail({ email: 'a@b.example', password: 'x' });
    expect(answer).toMatchObject({
      ok: false,
      code: 'internal',
      message: expect.stringMatching(/number is [0-9a-f]{8}/),
    });
    expect(JSON.stringify(answer)).not.toContain('secret');
  });
});
