// A local stand-in for the hosted mail service: takes mail by SMTP, keeps the newest in memory, shows it on a page of its own.
// Nothing leaves the machine. Used by npm start, by the browser tests and by the integration tests.
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { type AddressObject, simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export interface InboxMail {
  readonly id: string;
  readonly receivedAt: string;
  readonly from: string;
  readonly to: { address: string }[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly headers: Record<string, string>;
}

export interface Inbox {
  readonly smtpPort: number;
  readonly webPort: number;
  /** Oldest first. */
  readonly mails: readonly InboxMail[];
  close(): Promise<void>;
}

const kept = 500;
const largest = 10 * 1024 * 1024;

/** Opens the inbox on loopback; port 0 takes a free one. */
export async function openInbox(ports: { smtpPort: number; webPort: number }): Promise<Inbox> {
  const mails: InboxMail[] = [];
  let count = 0;
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    size: largest,
    onData(stream, session, done) {
      const recipients = session.envelope.rcptTo.map(({ address }) => ({ address: address.toLowerCase() }));
      simpleParser(stream).then((mail) => {
        mails.push({
          id: String(++count),
          receivedAt: new Date().toISOString(),
          from: (mail.from as AddressObject | undefined)?.text ?? '',
          to: recipients,
          subject: mail.subject ?? '',
          text: mail.text ?? '',
          html: mail.html || '',
          headers: Object.fromEntries(
            mail.headerLines.map(({ key, line }) => [key, line.slice(key.length + 1).trim()]),
          ),
        });
        if (mails.length > kept) mails.shift();
        done();
      }, done);
    },
  });
  smtp.on('error', (error) => console.error(`inbox: ${error.message}`));
  const web = createServer((request, response) => answer(request, response, mails));
  await listen(smtp.server as unknown as Server, ports.smtpPort);
  await listen(web, ports.webPort);
  return {
    smtpPort: portOf(smtp.server as unknown as Server),
    webPort: portOf(web),
    mails,
    close: async () => {
      await new Promise<void>((resolve) => smtp.close(resolve));
      web.closeAllConnections();
      await new Promise<void>((resolve) => web.close(() => resolve()));
    },
  };
}

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
}

function portOf(server: Server): number {
  return (server.address() as AddressInfo).port;
}

function answer(request: IncomingMessage, response: ServerResponse, mails: readonly InboxMail[]): void {
  const { pathname } = new URL(request.url ?? '/', 'http://inbox');
  const mail = mails.find(({ id }) => pathname === `/mails/${id}`);
  if (pathname === '/email') return send(response, 200, 'application/json', JSON.stringify(mails));
  if (pathname === '/') return send(response, 200, 'text/html', page('Mail inbox', listOf(mails)));
  if (mail) return send(response, 200, 'text/html', page(mail.subject, letterOf(mail)));
  send(
    response,
    404,
    'text/html',
    page('Not found', '<p>There is no such mail. <a href="/">All mail</a></p>'),
  );
}

function send(response: ServerResponse, status: number, type: string, body: string): void {
  response.writeHead(status, {
    'content-type': `${type}; charset=utf-8`,
    'content-security-policy':
      "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; base-uri 'none'",
    'x-content-type-options': 'nosniff',
    'cache-control': 'no-store',
  });
  response.end(body);
}

function listOf(mails: readonly InboxMail[]): string {
  if (mails.length === 0)
    return '<p>No mail yet. What Underfall sends from this machine arrives here, and nowhere else.</p>';
  const rows = mails
    .toReversed()
    .map(
      ({ id, subject, to, receivedAt }) =>
        `<tr><td><a href="/mails/${id}">${escape(subject)}</a></td><td>${escape(to.map(({ address }) => address).join(', '))}</td><td>${escape(receivedAt.slice(0, 16).replace('T', ' '))}</td></tr>`,
    );
  return `<table><thead><tr><th>Subject</th><th>To</th><th>Received (UTC)</th></tr></thead><tbody>${rows.join('')}</tbody></table>`;
}

function letterOf({ from, to, text, html }: InboxMail): string {
  const base = '<base target="_blank">';
  return `<p><a href="/">All mail</a></p><dl><dt>From</dt><dd>${escape(from)}</dd><dt>To</dt><dd>${escape(to.map(({ address }) => address).join(', '))}</dd></dl>
<iframe title="The mail as designed" sandbox="allow-popups allow-popups-to-escape-sandbox" srcdoc="${escape(base + html)}"></iframe>
<h2>As plain text</h2><pre>${linked(text)}</pre>`;
}

function linked(text: string): string {
  return escape(text).replace(/https?:\/\/[^\s<>"]+/g, (link) => `<a href="${link}">${link}</a>`);
}

function escape(text: string): string {
  const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
  return text.replace(/[&<>"]/g, (character) => entities[character]!);
}

function page(title: string, body: string): string {
  return `<!doctype html><html lang="en"><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escape(title)}</title>
<style>body{font:16px/1.5 system-ui,sans-serif;max-width:60rem;margin:2rem auto;padding:0 1rem;color:#17263a;background:#f3f5f1}a{color:#0f6b5c}
table{border-collapse:collapse;width:100%}th,td{text-align:left;padding:.5rem .75rem .5rem 0;border-bottom:1px solid #c9d1cc}
iframe{width:100%;height:30rem;border:1px solid #c9d1cc;background:#fff}pre{white-space:pre-wrap;overflow-wrap:anywhere}dt{float:left;width:4rem;color:#55636f}dd{margin:0 0 0 4rem}</style>
<h1>${escape(title)}</h1>${body}</html>`;
}
