import type { ComponentProps, ReactNode } from 'react';
import { cn } from '@/lib/cn';

/** A ruled table that scrolls inside its own frame where the page is too narrow. */
export function Table({
  caption,
  children,
  className,
}: {
  caption: string;
  children: ReactNode;
  className?: string;
}) {
  return (
    <div className="max-w-full overflow-x-auto" role="region" aria-label={caption} tabIndex={0}>
      <table className={cn('w-full border-t border-b border-ink text-[0.9375rem]', className)}>
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </div>
  );
}

/** A column's heading. */
export function HeadCell({ className, children, ...rest }: ComponentProps<'th'>) {
  return (
    <th
      scope="col"
      className={cn(
        'border-b border-ink py-2 pr-5 text-left align-bottom text-sm font-medium text-secondary',
        className,
      )}
      {...rest}
    >
      {children}
    </th>
  );
}

/** A cell; the first of a row is better a `RowHead`. */
export function Cell({ className, ...rest }: ComponentProps<'td'>) {
  return <td className={cn('border-b border-rule py-2.5 pr-5 align-top', className)} {...rest} />;
}

/** The cell that names its row. */
export function RowHead({ className, ...rest }: ComponentProps<'th'>) {
  return (
    <th
      scope="row"
      className={cn('border-b border-rule py-2.5 pr-5 text-left align-top font-medium', className)}
      {...rest}
    />
  );
}
