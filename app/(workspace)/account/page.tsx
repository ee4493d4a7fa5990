import type { Metadata } from 'next';
import Link from 'next/link';
import { PageFrame, PageHead, Passage } from '@/components/layout/page-frame';
import { paths } from '@/lib/paths';
import { listSessions } from '@/lib/server/accounts';
import { requireActor } from '@/lib/server/session';
import { SessionList } from './_components/session-list';
import { UnitsForm } from './_components/units-form';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  const actor = await requireActor();
  const sessions = await listSessions(actor);
  return (
    <PageFrame>
      <PageHead title={actor.name} over={`${actor.practiceName}, ${actor.role}`} lead={actor.email} />
      <Passage title="Units" aside="Only what is shown and typed. Everything is kept in SI.">
        <UnitsForm units={actor.units} />
      </Passage>
      <Passage title="Password">
        <p className="max-w-[60ch]">
          <Link href={paths.forgot()} className="text-link">
            Ask for a link to set a new password
          </Link>
          . It comes by e-mail, works once, and signs out every session.
        </p>
      </Passage>
      <Passage title="Sessions" aside="Where you are signed in. End any you do not know.">
        <SessionList sessions={sessions} />
      </Passage>
    </PageFrame>
  );
}
