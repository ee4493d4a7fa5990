import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { PageFrame, PageHead } from '@/components/layout/page-frame';
import { requireActor } from '@/lib/server/session';
import { ProjectForm } from '../_components/project-form';

export const metadata: Metadata = { title: 'New project' };

export default async function NewProjectPage() {
  const actor = await requireActor();
  if (actor.role === 'client') notFound();
  return (
    <PageFrame>
      <PageHead
        title="New project"
        lead="You become its author; others are appointed on the project’s page."
      />
      <ProjectForm />
    </PageFrame>
  );
}
