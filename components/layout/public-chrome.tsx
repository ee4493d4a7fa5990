import Link from 'next/link';
import { buttonClass } from '@/components/ui/button';
import { paths } from '@/lib/paths';
import { Wordmark } from './mark';

/** The head line of the public pages. */
export function PublicHeader({ isSignedIn }: { isSignedIn: boolean }) {
  return (
    <header
      className="mx-auto flex w-full max-w-page flex-wrap items-center gap-x-6 gap-y-2 px-4 py-4 sm:px-8"
      data-print="hide"
    >
      <Link href={paths.home()} className="mr-auto">
        <Wordmark />
      </Link>
      <nav aria-label="Main" className="flex flex-wrap items-center gap-x-4 gap-y-2 sm:gap-x-6">
        <Link href={paths.apiReference()} className="text-link hidden sm:inline">
          API reference
        </Link>
        {isSignedIn ? (
          <Link href={paths.desk()} className={buttonClass('plain')}>
            To your desk
          </Link>
        ) : (
          <>
            <Link href={paths.signIn()} className="text-link">
              Sign in
            </Link>
            <Link href={paths.signUp()} className={buttonClass('plain', 'max-sm:hidden')}>
              Set up a practice
            </Link>
          </>
        )}
      </nav>
    </header>
  );
}

/** The foot of the public pages. */
export function PublicFooter() {
  return (
    <footer className="mx-auto w-full max-w-page px-4 sm:px-8">
      <div className="flex flex-wrap gap-x-6 gap-y-1 border-t border-rule py-6 text-[0.9375rem] text-secondary">
        <p className="mr-auto">Underfall, seepage under and through hydraulic structures.</p>
        <Link href={paths.apiReference()} className="text-link">
          API reference
        </Link>
        <Link href={paths.signIn()} className="text-link">
          Sign in
        </Link>
      </div>
    </footer>
  );
}
