import Link from 'next/link';
import { Wordmark } from '@/components/layout/mark';
import { NothingHere } from '@/components/layout/nothing-here';
import { paths } from '@/lib/paths';

export default function NotFound() {
  return (
    <>
      <header className="mx-auto max-w-page px-4 pt-4 sm:px-8">
        <Link href={paths.home()} className="inline-block">
          <Wordmark />
        </Link>
      </header>
      <main>
        <NothingHere back={{ href: paths.home(), label: 'To the front page' }} />
      </main>
    </>
  );
}
