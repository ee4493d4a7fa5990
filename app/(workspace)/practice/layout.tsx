import type { ReactNode } from 'react';
import { PracticeNav } from './_components/practice-nav';
import { PageFrame } from '@/components/layout/page-frame';
import { requireActor } from '@/lib/server/session';
import { notFound } from 'next/navigation';

export default async function PracticeLayout({ children }: { children: ReactNode }) {
  const actor = await requireActor();
  if (actor.role === 'client') notFound();
  return (
    <>
      <PracticeNav isAdministrator={actor.role === 'administrator'} />
      <PageFrame className="sm:pt-10">{children}</PageFrame>
    </>
  );
}
