import type { Metadata } from 'next';
import Link from 'next/link';
import { PageFrame, PageHead, Passage } from '@/components/layout/page-frame';
import { buttonClass } from '@/components/ui/button';
import { paths } from '@/lib/paths';
import { readDesk } from '@/lib/server/desk';
import { requireActor } from '@/lib/server/session';
import { DraftList } from './_components/draft-list';
import { EmptyDesk } from './_components/empty-desk';
import { OpenInvitations, RecentProjects } from './_components/desk-lists';

export const metadata: Metadata = { title: 'Desk' };

export default async function DeskPage() {
  const actor = await requireActor();
  const desk = await readDesk(actor);
  const isClient = actor.role === 'client';
  const isEmpty = desk.drafts.length === 0 && desk.projects.length === 0;
  return (
    <PageFrame>
      <PageHead
        over={actor.practiceName}
        title="Desk"
        actions={
          !isClient &&
          !isEmpty && (
            <Link href={paths.newProject()} className={buttonClass('plain')}>
              New project
            </Link>
          )
        }
      />
      {isClient ? (
        <Passage title="For you to read">
          <p className="max-w-[60ch]">
            Nothing has been issued to you yet. Drafts are not shown to clients: what {actor.practiceName}{' '}
            issues to you will stand here, and an e-mail will say so.
          </p>
        </Passage>
      ) : isEmpty ? (
        <EmptyDesk />
      ) : (
        <Passage title="Drafts" aside="Sections you can work on, the latest change first.">
          <DraftList drafts={desk.drafts} projects={desk.projects} />
        </Passage>
      )}
      {desk.projects.length > 0 && (
        <Passage title="Projects">
          <RecentProjects projects={desk.projects} isClient={isClient} />
        </Passage>
      )}
      {desk.invitations.length > 0 && (
        <Passage title="Invitations out" aside="Sent and not yet taken up.">
          <OpenInvitations invitations={desk.invitations} />
        </Passage>
      )}
    </PageFrame>
  );
}
