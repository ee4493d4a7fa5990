// Sends one mail of the outbox. At least once: the row is marked in the transaction that locked it, so a failure leaves it
// open for the next try, and its Message-ID lets a receiver see a second copy for what it is.
import { render } from '@react-email/components';
import type { Transporter } from 'nodemailer';
import { withPractice } from '@/db/client';
import { findMail, markMailFailed, markMailSent } from '@/db/queries/library';
import { mailContentSchema } from './content';
import { writeLetter } from './letters';

export interface MailJob {
  readonly practiceId: string;
  readonly mailId: string;
}

export interface Sender {
  readonly transport: Pick<Transporter, 'sendMail'>;
  /** The address every mail comes from. */
  readonly address: string;
}

/** Sends the mail of a job; true where there was one to send. Throws where the mail server did not take it. */
export async function deliverMail({ practiceId, mailId }: MailJob, sender: Sender): Promise<boolean> {
  try {
    return await withPractice(practiceId, async (tx) => {
      const row = await findMail(tx, { practiceId, mailId });
      if (!row) return false;
      const { from, subject, body } = writeLetter(
        mailContentSchema.parse({ template: row.template, payload: row.payload }),
      );
      await sender.transport.sendMail({
        from: { name: from, address: sender.address },
        to: row.recipient,
        subject,
        text: await render(body, { plainText: true }),
        html: await render(body),
        messageId: `<${mailId}@${sender.address.split('@')[1]}>`,
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
      await markMailSent(tx, { practiceId, mailId });
      return true;
    });
  } catch (error) {
    const reason = error instanceof Error ? error.message : 'unknown';
    await withPractice(practiceId, (tx) => markMailFailed(tx, { practiceId, mailId, error: reason }));
    throw error;
  }
}
