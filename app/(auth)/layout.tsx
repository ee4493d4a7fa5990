import Link from 'next/link';
import type { ReactNode } from 'react';
import { Wordmark } from '@/components/layout/mark';
import { paths } from '@/lib/paths';

export default function AuthLayout({ children }: { children: ReactNode }) {
  return (
    <div className="mx-auto grid min-h-dvh w-full max-w-[30rem] grid-rows-[auto_1fr] px-4 sm:px-6">
      <header className="pt-6 sm:pt-10">
        <Link href={paths.home()} className="inline-block">
          <Wordmark />
        </Link>
      </header>
      <main className="pt-10 pb-20 sm:pt-16">{children}</main>
    </div>
  );
}
