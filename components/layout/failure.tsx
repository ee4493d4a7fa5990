'use client';

import { useEffect, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { PageFrame, PageHead } from './page-frame';

interface FailureProps {
  error: Error & { digest?: string };
  reset: () => void;
  title?: string;
  children?: ReactNode;
}

/** What an `error.tsx` shows: what happened, what is kept, what to do; the reference finds the log line. */
export function Failure({
  error,
  reset,
  title = 'This page could not be put together',
  children,
}: FailureProps) {
  useEffect(() => {
    // The browser's own log, for whoever is asked to look; the screen shows no stack.
    console.error(error);
  }, [error]);
  return (
    <PageFrame>
      <PageHead
        title={title}
        lead={
          children ??
          'The server or its database did not answer. Nothing that was kept is lost. Try again in a moment.'
        }
      />
      <div className="grid justify-items-start gap-4">
        <Button look="solid" onClick={reset}>
          Try again
        </Button>
        {error.digest && (
          <p className="text-sm text-secondary">
            If it stays like this, say this reference to whoever runs the service:{' '}
            <span className="figures">{error.digest}</span>
          </p>
        )}
      </div>
    </PageFrame>
  );
}
