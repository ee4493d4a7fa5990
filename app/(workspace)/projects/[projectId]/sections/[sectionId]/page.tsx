import type { Metadata } from 'next';
import { z } from 'zod';
import { orNotFound } from '@/app/_lib/or-not-found';
import { ScoreIsland } from '@/components/score/score-island';
import { requireActor } from '@/lib/server/session';
import { getSection } from '@/lib/server/sections';
import { readSection, saveSection } from './actions';

const parameters = z.object({ projectId: z.string(), sectionId: z.string() });

interface SectionPageProps {
  params: Promise<unknown>;
}

export async function generateMetadata({ params }: SectionPageProps): Promise<Metadata> {
  const { sectionId } = parameters.parse(await params);
  const actor = await requireActor();
  const section = await getSection(actor, sectionId).catch(() => null);
  return { title: section?.title ?? 'Section' };
}

export default async function SectionPage({ params }: SectionPageProps) {
  const { sectionId } = parameters.parse(await params);
  const actor = await requireActor();
  const section = await orNotFound(getSection(actor, sectionId));
  return <ScoreIsland detail={section} units={actor.units} save={saveSection} read={readSection} />;
}
