import type { Metadata } from 'next';
import Link from 'next/link';
import { PageFrame, PageHead } from '@/components/layout/page-frame';
import { buttonClass } from '@/components/ui/button';
import { paths } from '@/lib/paths';
import { listProjects } from '@/lib/server/projects';
import { requireActor } from '@/lib/server/session';
import { ProjectTable } from './_components/project-table';

export const metadata: Metadata = { title: 'Projects' };

export default async function ProjectsPage() {
  const actor = await requireActor();
  const projects = await listProjects(actor);
  const isClient = actor.role === 'client';
  return (
    <PageFrame>
      <PageHead
        title="Projects"
        over={actor.practiceName}
        actions={
          !isClient && (
            <Link href={paths.newProject()} className={buttonClass('solid')}>
              New project
            </Link>
          )
        }
      />
      {projects.length > 0 ? (
        <ProjectTable projects={projects} />
      ) : (
        <p className="max-w-[60ch] text-secondary">
          {isClient
            ? 'You are not on a project yet. The practice names you on one when there is something for you to read.'
            : 'No projects yet. A project is a job with a number; its sections, people and records stand under it.'}
        </p>
      )}
    </PageFrame>
  );
}
