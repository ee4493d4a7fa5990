import type { Metadata } from 'next';
import Link from 'next/link';
import { orNotFound } from '@/app/_lib/or-not-found';
import { PageFrame, PageHead, Passage } from '@/components/layout/page-frame';
import { buttonClass } from '@/components/ui/button';
import { paths } from '@/lib/paths';
import { listMembers } from '@/lib/server/people';
import { getProject } from '@/lib/server/projects';
import { requireActor } from '@/lib/server/session';
import { DetailsDialog } from './_components/details-dialog';
import { ProjectPeople } from './_components/project-people';
import { SectionList } from './_components/section-list';

export const metadata: Metadata = { title: 'Project' };

export default async function ProjectPage({ params }: PageProps<'/projects/[projectId]'>) {
  const [{ projectId }, actor] = await Promise.all([params, requireActor()]);
  const project = await orNotFound(getProject(actor, projectId));
  const members = project.may.appoint ? await listMembers(actor) : [];
  const isClient = actor.role === 'client';
  return (
    <PageFrame>
      <title>{`${project.number} ${project.name} · Underfall`}</title>
      <PageHead
        over={
          <span className="figures">
            {[project.number, project.client && `for ${project.client}`].filter(Boolean).join(' · ')}
          </span>
        }
        title={project.name}
        lead={project.description}
        actions={
          <>
            {project.may.rename && <DetailsDialog project={project} />}
            {project.may.changeSections && (
              <Link href={paths.newSection(project.id)} className={buttonClass('solid')}>
                New section
              </Link>
            )}
          </>
        }
      />
      <Passage title="Sections" aside={isClient ? undefined : 'Drafts, until they are checked and issued.'}>
        <SectionList project={project} isClient={isClient} />
      </Passage>
      <Passage title="People" aside="Author, checker and approver of one record are three people.">
        <ProjectPeople project={project} members={members} />
      </Passage>
    </PageFrame>
  );
}
