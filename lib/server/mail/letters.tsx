// The mails themselves. Their links open a page with a button; opening one never uses it up, since mail scanners open links.
import type { ReactElement } from 'react';
import type { MailContent } from './content';
import { Letter, Paragraph } from './layout';

export interface WrittenLetter {
  readonly subject: string;
  /** The person or the service it comes from. */
  readonly from: string;
  readonly body: ReactElement;
}

type PayloadOf<Template extends MailContent['template']> = Extract<
  MailContent,
  { template: Template }
>['payload'];

/** Writes a mail. */
export function writeLetter(content: MailContent): WrittenLetter {
  switch (content.template) {
    case 'invitation':
      return writeInvitation(content.payload);
    case 'password-reset':
      return writeReset(content.payload);
    case 'welcome':
      return writeWelcome(content.payload);
  }
}

function writeInvitation({
  invitedBy,
  practiceName,
  role,
  link,
  until,
}: PayloadOf<'invitation'>): WrittenLetter {
  const sight: Record<string, string> = {
    administrator: 'As administrator you see every project, and look after people, criteria and keys.',
    member: 'As a member you see the projects you are appointed to.',
    client: 'As a client you see what is issued to you, and no drafts.',
  };
  return {
    subject: `${practiceName} – ${invitedBy} invites you to Underfall`,
    from: `${invitedBy} via Underfall`,
    body: (
      <Letter
        preview={`${invitedBy} invites you to join ${practiceName}.`}
        button={{ label: 'Read the invitation', link }}
        reason={`You get this because ${invitedBy} wrote this address into an invitation. If that makes no sense, do nothing: the invitation runs out by itself.`}
      >
        <Paragraph>
          {invitedBy} invites you to join {practiceName} on Underfall, where it keeps its seepage sections and
          their checks.
        </Paragraph>
        <Paragraph>{sight[role] ?? `You would join as ${role}.`}</Paragraph>
        <Paragraph>The invitation works once, until {until}.</Paragraph>
      </Letter>
    ),
  };
}

function writeReset({ name, link }: PayloadOf<'password-reset'>): WrittenLetter {
  return {
    subject: 'Underfall – set a new password – within one hour',
    from: 'Underfall',
    body: (
      <Letter
        preview="The link to set a new password works once, for one hour."
        button={{ label: 'Set a new password', link }}
        reason="You get this because somebody asked for a new password for this address. If it was not you, do nothing: the old password stays. If it happens again, tell your practice’s administrator."
      >
        <Paragraph>{name}, here is the link to set a new password. It works once, for one hour.</Paragraph>
        <Paragraph>Setting it signs you out everywhere.</Paragraph>
      </Letter>
    ),
  };
}

function writeWelcome({ name, practiceName, link }: PayloadOf<'welcome'>): WrittenLetter {
  return {
    subject: `${practiceName} – your practice on Underfall is ready`,
    from: 'Underfall',
    body: (
      <Letter
        preview={`${practiceName} is ready, with you as its administrator.`}
        button={{ label: 'Open the desk', link }}
        reason="You get this because you signed up with this address. If it was not you, somebody mistyped their own; tell them, or set a new password to take the account over."
      >
        <Paragraph>
          {name}, {practiceName} is ready, with you as its administrator. Open a project, choose a starting
          point, and replace it with your own ground; invite whoever checks your work.
        </Paragraph>
        <Paragraph>
          What Underfall computes is a calculation for a drawn section. Local codes and the judgement of a
          licensed engineer decide; where water is emerging or boiling on a real site, the site’s emergency
          plan comes first.
        </Paragraph>
      </Letter>
    ),
  };
}
