// What each kind of mail needs. The table keeps it as text until the mail is sent, then forgets it.
import { z } from 'zod';

const text = z.string();

export const mailContentSchema = z.discriminatedUnion('template', [
  z.object({
    template: z.literal('invitation'),
    payload: z.object({ invitedBy: text, practiceName: text, role: text, link: z.url(), until: text }),
  }),
  z.object({
    template: z.literal('password-reset'),
    payload: z.object({ name: text, link: z.url() }),
  }),
  z.object({
    template: z.literal('welcome'),
    payload: z.object({ name: text, practiceName: text, link: z.url() }),
  }),
]);

export type MailContent = z.output<typeof mailContentSchema>;
