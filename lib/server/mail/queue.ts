// Mail goes out through a table: written in the transaction of its event, sent by the worker, tried again until it is taken.
import type { Transaction } from '@/db/client';
import { enqueueMail } from '@/db/queries/library';
import type { MailContent } from './content';

/** Queues a mail within the transaction of the event it tells of. */
export async function queueMail(
  tx: Transaction,
  { practiceId, recipient, template, payload }: { practiceId: string; recipient: string } & MailContent,
): Promise<void> {
  await enqueueMail(tx, { practiceId, template, recipient, payload });
}
