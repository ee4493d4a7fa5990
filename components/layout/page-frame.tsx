import type { ReactNode } from 'react';
import { cn } from '@/lib/cn';
import { Skeleton } from '@/components/ui/skeleton';

/** The measure every page but the score keeps: one column, with room in the left margin for its titles. */
export function PageFrame({ children, className }: { children: ReactNode; className?: string }) {
  return (
    <div className={cn('mx-auto w-full max-w-page px-4 pt-8 pb-20 sm:px-8 sm:pt-12', className)}>
      {children}
    </div>
  );
}

interface PageHeadProps {
  title: ReactNode;
  /** A short line above the title: where this page belongs. */
  over?: ReactNode;
  lead?: ReactNode;
  /** What can be done here; right of the title where there is room. */
  actions?: ReactNode;
}

/** The head of a page. */
export function PageHead({ title, over, lead, actions }: PageHeadProps) {
  return (
    <header className="mb-8 flex flex-wrap items-end justify-between gap-x-8 gap-y-5 sm:mb-10">
      <div className="grid max-w-[46rem] min-w-0 gap-2">
        {over && <div className="text-[0.9375rem] text-secondary">{over}</div>}
        <h1 className="font-serif text-[2rem] leading-[1.15] font-medium tracking-[-0.012em] break-words sm:text-[2.5rem]">
          {title}
        </h1>
        {lead && <div className="max-w-[60ch] text-lg text-secondary">{lead}</div>}
      </div>
      {actions && (
        <div className="flex flex-wrap gap-3" data-print="hide">
          {actions}
        </div>
      )}
    </header>
  );
}

interface PassageProps {
  title: ReactNode;
  /** A sentence under the title, in the margin. */
  aside?: ReactNode;
  id?: string;
  children: ReactNode;
}

/** One part of a page: a thin rule, its title in the margin, its matter beside it. */
export function Passage({ title, aside, id, children }: PassageProps) {
  return (
    <section
      id={id}
      className="grid gap-x-10 gap-y-4 border-t border-rule py-6 lg:grid-cols-[13rem_minmax(0,1fr)] lg:py-8"
    >
      <div className="grid content-start gap-1.5">
        <h2 className="text-lg leading-snug font-semibold">{title}</h2>
        {aside && <div className="max-w-[48ch] text-[0.9375rem] text-secondary">{aside}</div>}
      </div>
      <div className="min-w-0">{children}</div>
    </section>
  );
}

/** The shape of a page while its matter is on the way. */
export function PageSkeleton({ passages = 2 }: { passages?: number }) {
  return (
    <PageFrame>
      <p role="status" className="sr-only">
        Loading
      </p>
      <div aria-hidden className="mb-10 h-10 w-2/3 max-w-md animate-pulse bg-rule/60" />
      {Array.from({ length: passages }, (_, passage) => (
        <div
          key={passage}
          className="grid gap-x-10 gap-y-4 border-t border-rule py-8 lg:grid-cols-[13rem_minmax(0,1fr)]"
        >
          <div aria-hidden className="h-5 w-32 animate-pulse bg-rule/60" />
          <Skeleton lines={4} />
        </div>
      ))}
    </PageFrame>
  );
}
