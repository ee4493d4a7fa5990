import type { Metadata } from 'next';
import Link from 'next/link';
import { AuthHead } from '@/components/layout/auth-head';
import { formatDay } from '@/lib/format/dates';
import { paths } from '@/lib/paths';
import { readInvitation } from '@/lib/server/people';
import { InvitationForm } from './invitation-form';

export const metadata: Metadata = { title: 'Invitation' };

// Reading never takes the invitation up: mail scanners open links. The button does.
export default async function InvitationPage({ params }: PageProps<'/invitation/[token]'>) {
  const { token } = await params;
  const invitation = await readInvitation(token);
  if (!invitation) {
    return (
      <AuthHead title="This invitation no longer works">
        It has been taken up, revoked, or has run out. Ask whoever invited you for a new one, or{' '}
        <Link href={paths.signIn()} className="text-link">
          sign in
        </Link>{' '}
        if you already joined.
      </AuthHead>
    );
  }
  return (
    <>
      <AuthHead title={`Join ${invitation.practiceName}`}>
        {invitation.invitedBy} invites {invitation.email} as {invitation.role}. The invitation lasts until{' '}
        {formatDay(invitation.expiresAt)}.
      </AuthHead>
      <InvitationForm token={token} practiceName={invitation.practiceName} />
    </>
  );
}
