'use client';

import type { FormEventHandler, ReactNode } from 'react';
import { cn } from '@/lib/cn';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';

interface ActionFormProps {
  /** What `useActionForm` returned, as far as the frame needs it. */
  state: {
    submit: FormEventHandler<HTMLFormElement>;
    failure: { code: string; message: string } | null;
    isReady: boolean;
    isSending: boolean;
  };
  label: string;
  submitLabel: string;
  sendingLabel?: string;
  children: ReactNode;
  /** Beside the submit button. */
  extra?: ReactNode;
  className?: string;
}

const retryCodes = new Set(['unreachable', 'unavailable', 'busy', 'internal', 'timeout', 'too-many']);

/** The frame of a form: its fields, what the server said, and the button. */
export function ActionForm({
  state,
  label,
  submitLabel,
  sendingLabel = 'Sending…',
  children,
  extra,
  className,
}: ActionFormProps) {
  const { submit, failure, isReady, isSending } = state;
  const mayRetry = failure && retryCodes.has(failure.code);
  return (
    // method="post": pressed before the script is there, a password must not end up in the address
    <form
      onSubmit={submit}
      method="post"
      noValidate
      aria-label={label}
      className={cn('grid gap-5', className)}
    >
      <fieldset disabled={!isReady} className="contents">
        {children}
        {failure && <Notice tone="attention">{failure.message}</Notice>}
        <div className="flex flex-wrap items-center gap-3">
          <Button type="submit" look="solid" disabled={!isReady || isSending}>
            {isSending ? sendingLabel : mayRetry ? 'Try again' : submitLabel}
          </Button>
          {extra}
        </div>
      </fieldset>
    </form>
  );
}
