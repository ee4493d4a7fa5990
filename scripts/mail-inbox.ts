// The local mail inbox as a process: MAIL_SMTP_PORT takes mail, MAIL_WEB_PORT shows it.
import { openInbox } from './inbox-server';

const inbox = await openInbox({
  smtpPort: Number(process.env.MAIL_SMTP_PORT ?? 1025),
  webPort: Number(process.env.MAIL_WEB_PORT ?? 1080),
});
console.log(`mail by SMTP on 127.0.0.1:${inbox.smtpPort}, to be read at http://127.0.0.1:${inbox.webPort}`);
for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => void inbox.close().then(() => process.exit(0)));
}
