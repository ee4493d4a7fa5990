import type { ReactNode } from 'react';
import { PublicFooter, PublicHeader } from '@/components/layout/public-chrome';
import { readActorQuietly } from '../_lib/read-actor-quietly';

export default async function PublicLayout({ children }: { children: ReactNode }) {
  const actor = await readActorQuietly();
  return (
    <div className="flex min-h-dvh flex-col">
      <PublicHeader isSignedIn={actor !== null} />
      <main className="grow">{children}</main>
      <PublicFooter />
    </div>
  );
}
