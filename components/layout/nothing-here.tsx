import Link from 'next/link';
import type { ReactNode } from 'react';
import { PageFrame, PageHead } from './page-frame';

interface NothingHereProps {
  title?: string;
  children?: ReactNode;
  back: { href: string; label: string };
}

/** What a `not-found.tsx` shows; the same words whether a thing is missing or not the reader's to see. */
export function NothingHere({ title = 'There is nothing here', children, back }: NothingHereProps) {
  return (
    <PageFrame>
      <PageHead
        title={title}
        lead={
          children ??
          'Either it was never here, or it is not yours to see. Check the address, or ask the administrator of your practice.'
        }
      />
      <Link className="text-link" href={back.href}>
        {back.label}
      </Link>
    </PageFrame>
  );
}
