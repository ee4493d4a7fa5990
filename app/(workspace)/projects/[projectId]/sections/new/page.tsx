import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { orNotFound } from '@/app/_lib/or-not-found';
import { SectionFigure } from '@/components/figures/section-figure';
import { PageFrame, PageHead, Passage } from '@/components/layout/page-frame';
import { startingPoints } from '@/lib/domain/starting-points';
import { paths } from '@/lib/paths';
import { getProject } from '@/lib/server/projects';
import { requireActor } from '@/lib/server/session';
import { PasteForm } from './_components/paste-form';
import { StartingPointList } from './_components/starting-point-list';

export const metadata: Metadata = { title: 'New section' };

export default async function NewSectionPage({ params }: PageProps<'/projects/[projectId]/sections/new'>) {
  const [{ projectId }, actor] = await Promise.all([params, requireActor()]);
  const project = await orNotFound(getProject(actor, projectId));
  if (!project.may.changeSections) notFound();
  const choices = startingPoints.map(({ id, title, summary, document }) => ({
    id,
    title,
    summary,
    figure: <SectionFigure document={document} width={360} maxHeight={190} />,
  }));
  return (
    <PageFrame>
      <PageHead
        over={
          <Link href={paths.project(project.id)} className="text-link figures">
            {project.number} {project.name}
          </Link>
        }
        title="New section"
      />
      <Passage
        title="Starting points"
        aside="Each is complete and already solved. Its numbers are yours to replace."
      >
        <StartingPointList projectId={project.id} choices={choices} />
      </Passage>
      <Passage
        title="Your own document"
        aside="A section in the underfall-section/1 format, from a file or another program."
      >
        <PasteForm projectId={project.id} />
      </Passage>
    </PageFrame>
  );
}
