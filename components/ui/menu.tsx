'use client';

import { DropdownMenu } from 'radix-ui';
import type { ComponentProps, ReactNode } from 'react';

const itemClass =
  'block w-full cursor-pointer px-3 py-1.5 text-left text-[0.9375rem] outline-none data-[highlighted]:bg-action-pale';

/** A short list of places or actions under a button. */
export function Menu({
  trigger,
  label,
  children,
}: {
  trigger: ReactNode;
  label: string;
  children: ReactNode;
}) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          aria-label={label}
          align="end"
          sideOffset={6}
          className="z-50 min-w-52 border border-ink bg-paper py-1.5"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

/** One line of a menu. */
export function MenuItem(props: ComponentProps<typeof DropdownMenu.Item>) {
  return <DropdownMenu.Item className={itemClass} {...props} />;
}

/** A line that is read, not chosen. */
export function MenuLabel({ children }: { children: ReactNode }) {
  return (
    <DropdownMenu.Label className="mb-1 border-b border-rule px-3 pb-1.5 text-sm text-secondary">
      {children}
    </DropdownMenu.Label>
  );
}
