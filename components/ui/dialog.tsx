'use client';

import { Dialog as Primitive } from 'radix-ui';
import type { ReactNode } from 'react';
import { cn } from '@/lib/cn';
import { buttonClass } from './button';

interface DialogProps {
  trigger?: ReactNode;
  title: string;
  description?: ReactNode;
  children: ReactNode;
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
  isWide?: boolean;
}

/** A sheet of paper over the page: focus stays inside, Escape leaves, focus returns to where it was. */
export function Dialog({
  trigger,
  title,
  description,
  children,
  open,
  onOpenChange,
  isWide = false,
}: DialogProps) {
  return (
    <Primitive.Root {...(open === undefined ? {} : { open })} {...(onOpenChange ? { onOpenChange } : {})}>
      {trigger && <Primitive.Trigger asChild>{trigger}</Primitive.Trigger>}
      <Primitive.Portal>
        <Primitive.Overlay className="fixed inset-0 z-40 bg-ink/35" />
        <Primitive.Content
          {...(description ? {} : { 'aria-describedby': undefined })}
          className={cn(
            'fixed top-1/2 left-1/2 z-50 grid max-h-[calc(100dvh-2rem)] w-[calc(100vw-2rem)] -translate-x-1/2 -translate-y-1/2 gap-5 overflow-y-auto border border-ink bg-paper p-6',
            isWide ? 'max-w-2xl' : 'max-w-lg',
          )}
        >
          <div className="grid gap-1">
            <Primitive.Title className="font-serif text-xl font-medium">{title}</Primitive.Title>
            {description && (
              <Primitive.Description className="text-[0.9375rem] text-secondary">
                {description}
              </Primitive.Description>
            )}
          </div>
          {children}
        </Primitive.Content>
      </Primitive.Portal>
    </Primitive.Root>
  );
}

/** A button that leaves the dialog without doing anything. */
export function DialogCancel({ children = 'Cancel' }: { children?: ReactNode }) {
  return <Primitive.Close className={buttonClass('plain')}>{children}</Primitive.Close>;
}
