import type { Metadata } from 'next';
import { PageHead, Passage } from '@/components/layout/page-frame';
import { listInvitations, listMembers } from '@/lib/server/people';
import { requireActor } from '@/lib/server/session';
import { InvitationList, InviteForm } from './_components/invitations';
import { MemberTable } from './_components/member-table';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const actor = await requireActor();
  const isAdministrator = actor.role === 'administrator';
  const [members, invitations] = await Promise.all([
    listMembers(actor),
    isAdministrator ? listInvitations(actor) : [],
  ]);
  return (
    <>
      <PageHead over={actor.practiceName} title="People" />
      <Passage title="Members" aside="A client sees only what is issued to them.">
        <MemberTable members={members} ownId={actor.userId} isAdministrator={isAdministrator} />
      </Passage>
      {isAdministrator && (
        <Passage title="Invitations" aside="An invitation goes out by e-mail, works once and runs out.">
          <div className="grid gap-8">
            {invitations.length > 0 && <InvitationList invitations={invitations} />}
            <InviteForm />
          </div>
        </Passage>
      )}
    </>
  );
}
