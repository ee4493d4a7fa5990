'use client';

import type { ComponentProps } from 'react';
import { cn } from '@/lib/cn';
import { useFieldProps } from './field';

/** The look all controls share. */
export const controlClass =
  'w-full min-w-0 rounded-control border border-field bg-paper px-3 py-2 text-base leading-snug text-ink placeholder:text-secondary aria-invalid:border-attention aria-invalid:border-2 disabled:opacity-70';

/** A line of text; inside a `Field` it carries the field's label, hint and error. */
export function TextInput({ className, ...rest }: ComponentProps<'input'>) {
  return <input {...useFieldProps()} className={cn(controlClass, className)} {...rest} />;
}

/** Several lines of text. */
export function TextArea({ className, rows = 4, ...rest }: ComponentProps<'textarea'>) {
  return <textarea {...useFieldProps()} rows={rows} className={cn(controlClass, className)} {...rest} />;
}

/** A choice among a few; the browser's own list, which every keyboard and phone knows. */
export function Select({ className, children, ...rest }: ComponentProps<'select'>) {
  return (
    <select {...useFieldProps()} className={cn(controlClass, 'pr-8', className)} {...rest}>
      {children}
    </select>
  );
}

/** A choice of one file. */
export function FileInput({ className, ...rest }: ComponentProps<'input'>) {
  return (
    <input
      {...useFieldProps()}
      type="file"
      className={cn(
        'max-w-full text-[0.9375rem] file:mr-4 file:min-h-10 file:rounded-control file:border file:border-field file:bg-transparent file:px-4 file:font-medium',
        className,
      )}
      {...rest}
    />
  );
}
