import { expect } from '@playwright/test';

const address = process.env.UNDERFALL_MAIL_WEB ?? 'http://127.0.0.1:1080';

interface Mail {
  id: string;
  subject: string;
  text?: string;
  html?: string;
  to: { address: string }[];
}

/** The latest mail to somebody, once the worker has sent it. */
export async function waitForMail(to: string, subject: RegExp): Promise<Mail> {
  let found: Mail | undefined;
  await expect
    .poll(
      async () => {
        const mails = (await (await fetch(`${address}/email`)).json()) as Mail[];
        found = mails.findLast(
          (mail) => subject.test(mail.subject) && mail.to.some((one) => one.address === to),
        );
        return found?.subject;
      },
      { timeout: 30_000, message: `a mail to ${to}` },
    )
    .toMatch(subject);
  return found!;
}

/** The first link in a mail whose path begins as given. */
export function linkIn(mail: Mail, path: string): string {
  const body = `${mail.text ?? ''} ${mail.html ?? ''}`;
  const link = new RegExp(`https?://[^\\s"'<>]+${path}[^\\s"'<>)]+`).exec(body)?.[0];
  expect(link, `a link to ${path} in the mail “${mail.subject}”`).toBeDefined();
  return new URL(link!).pathname;
}
