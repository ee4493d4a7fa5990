import type { ReactNode } from 'react';
import { TopLine } from '@/components/layout/top-line';
import { requireActor } from '@/lib/server/session';
import { signOut } from '../(auth)/actions';

export default async function WorkspaceLayout({ children }: { children: ReactNode }) {
  const { name, email, practiceName, role } = await requireActor();
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#main"
        className="sr-only z-50 border border-ink bg-paper p-2 focus:not-sr-only focus:absolute focus:top-1 focus:left-1"
      >
        Skip to the matter
      </a>
      <TopLine actor={{ name, email, practiceName, role }} signOut={signOut} />
      <main id="main" tabIndex={-1} className="grow outline-none">
        {children}
      </main>
    </div>
  );
}
