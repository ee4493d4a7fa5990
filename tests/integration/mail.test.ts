import { createTransport } from 'nodemailer';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { withPractice } from '@/db/client';
import { type Inbox, type InboxMail, openInbox } from '@/scripts/inbox-server';
import { requestReset } from '@/lib/server/accounts';
import { deliverMail } from '@/lib/server/mail/deliver';
import { queueMail } from '@/lib/server/mail/queue';
import { invite } from '@/lib/server/people';
import { startWorker } from '@/lib/server/worker/run-worker';
import { asSuperuser } from './support/connect';
import { makePractice, type TestPractice, unique } from './support/practice';

let practice: TestPractice;
let inbox: Inbox;

beforeAll(async () => {
  practice = await makePractice();
  inbox = await openInbox({ smtpPort: 0, webPort: 0 });
  process.env.SMTP_URL = `smtp://127.0.0.1:${inbox.smtpPort}`;
});

afterAll(() => inbox.close());

function startTestWorker() {
  return startWorker({ queueUrl: process.env.DATABASE_OWNER_URL!, smtpUrl: process.env.SMTP_URL! });
}

function mailsTo(address: string): InboxMail[] {
  return inbox.mails.filter(({ to }) => to.some((one) => one.address === address));
}

async function outboxRow(recipient: string) {
  const { rows } = await asSuperuser((client) =>
    client.query(
      `select id, payload, sent_at as "sentAt", attempts, last_error as "lastError" from outbox_mails where recipient = $1`,
      [recipient],
    ),
  );
  return rows[0] as { id: string; payload: object; sentAt: Date | null; attempts: number; lastError: string };
}

async function deliver(recipient: string): Promise<boolean> {
  const { id: mailId } = await outboxRow(recipient);
  const transport = createTransport(process.env.SMTP_URL);
  try {
    return await deliverMail(
      { practiceId: practice.id, mailId },
      { transport, address: 'post@underfall.example' },
    );
  } finally {
    transport.close();
  }
}

describe('the outbox', () => {
  test('an invitation arrives with text and HTML, one link in both, and is forgotten after', async () => {
    const email = `${unique('guest')}@else.example`;
    await invite(practice.administrator, { email, role: 'client' });
    const worker = await startTestWorker();
    await expect.poll(() => mailsTo(email).length, { timeout: 20_000 }).toBe(1);
    await expect.poll(async () => (await outboxRow(email)).sentAt, { timeout: 5000 }).not.toBeNull();
    await worker.stop();
    const [mail] = mailsTo(email);
    expect(mail!.subject).toBe(`${practice.administrator.practiceName} – Head invites you to Underfall`);
    expect(mail!.from).toContain('Head via Underfall');
    const [link] = /http:\/\/underfall\.example\/invitation\/[\w-]{43}/.exec(mail!.text)!;
    expect(mail!.html).toContain(link);
    expect(mail!.text).toContain('no drafts');
    expect(mail!.headers['auto-submitted']).toBe('auto-generated');
    expect(await outboxRow(email)).toMatchObject({ payload: {} });
  });

  test('a password reset says how long and how often its link works', async () => {
    const { email } = practice.checker;
    await requestReset({ email });
    expect(await deliver(email)).toBe(true);
    const [mail] = mailsTo(email);
    expect(mail!.subject).toContain('new password');
    expect(mail!.text).toMatch(/works once, for one hour/);
    expect(mail!.text).toMatch(/http:\/\/underfall\.example\/reset\/[\w-]{43}/);
    expect(mail!.text.split('\n').every((line) => line.length < 300)).toBe(true);
  });

  test('a name cannot carry HTML or headers into a mail', async () => {
    const recipient = `${unique('marked')}@else.example`;
    const name = '<img src=x onerror=alert(1)>\r\nBcc: everyone@else.example';
    const payload = {
      invitedBy: name,
      practiceName: 'P',
      role: 'member',
      link: 'http://underfall.example/x',
      until: '1 May',
    };
    await withPractice(practice.id, (tx) =>
      queueMail(tx, { practiceId: practice.id, recipient, template: 'invitation', payload }),
    );
    expect(await deliver(recipient)).toBe(true);
    const [mail] = mailsTo(recipient);
    expect(mail!.html).not.toContain('<img src=x');
    expect(mail!.headers).not.toHaveProperty('bcc');
    expect(mailsTo('everyone@else.example')).toEqual([]);
  });

  test('a mail is sent once, however many workers try', async () => {
    const email = `${unique('once')}@else.example`;
    await invite(practice.administrator, { email, role: 'member' });
    const tries = await Promise.all([deliver(email), deliver(email), deliver(email)]);
    expect(tries.filter(Boolean)).toHaveLength(1);
    expect(await deliver(email)).toBe(false);
    expect(mailsTo(email)).toHaveLength(1);
  });

  test('a mail server that is away leaves the mail open, says why, and the next try sends it', async () => {
    const email = `${unique('later')}@else.example`;
    await invite(practice.administrator, { email, role: 'member' });
    const address = process.env.SMTP_URL;
    process.env.SMTP_URL = 'smtp://127.0.0.1:1';
    await expect(deliver(email)).rejects.toThrow();
    process.env.SMTP_URL = address;
    expect(await outboxRow(email)).toMatchObject({
      sentAt: null,
      attempts: 1,
      lastError: expect.stringContaining('ECONNREFUSED'),
    });
    expect(await deliver(email)).toBe(true);
    expect(mailsTo(email)).toHaveLength(1);
  });

  test('an event that is rolled back sends nothing', async () => {
    const recipient = `${unique('never')}@else.example`;
    const payload = { name: 'N', practiceName: 'P', link: 'http://underfall.example/desk' };
    const undone = withPractice(practice.id, async (tx) => {
      await queueMail(tx, { practiceId: practice.id, recipient, template: 'welcome', payload });
      throw new RangeError('rolled back');
    });
    await expect(undone).rejects.toThrow('rolled back');
    expect(await outboxRow(recipient)).toBeUndefined();
  });

  test('a job of a worker that was killed is taken up by the next one', async () => {
    const email = `${unique('killed')}@else.example`;
    await invite(practice.administrator, { email, role: 'member' });
    const { id } = await outboxRow(email);
    await asSuperuser((client) =>
      client.query(
        `update graphile_worker._private_jobs set locked_at = now(), locked_by = 'worker-that-died' where payload->>'mailId' = $1`,
        [id],
      ),
    );
    const worker = await startTestWorker();
    await expect.poll(() => mailsTo(email).length, { timeout: 20_000 }).toBe(1);
    await worker.stop();
  });
});

describe('the local inbox', () => {
  test('shows mails on a page and lists them as JSON', async () => {
    const address = `http://127.0.0.1:${inbox.webPort}`;
    const list = (await (await fetch(`${address}/email`)).json()) as InboxMail[];
    expect(list.length).toBe(inbox.mails.length);
    const page = await (await fetch(`${address}/`)).text();
    expect(page).toContain('invites you to Underfall');
    const letter = await fetch(`${address}/mails/${list[0]!.id}`);
    expect(letter.status).toBe(200);
    expect(letter.headers.get('content-security-policy')).toContain("default-src 'none'");
  });
});
