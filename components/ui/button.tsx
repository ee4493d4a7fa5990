import type { ComponentProps } from 'react';
import { cn } from '@/lib/cn';

const looks = {
  /** The one thing a page or form is for. */
  solid:
    'border-action bg-action text-paper hover:bg-action-deep hover:border-action-deep disabled:bg-field disabled:border-field',
  /** Everything else. */
  plain: 'border-field bg-transparent text-ink hover:border-ink hover:bg-paper disabled:text-secondary',
  /** Takes something away. */
  attention: 'border-attention bg-transparent text-attention hover:bg-attention-pale disabled:text-secondary',
  /** Reads as a link; for actions inside a row of text or a table. */
  quiet:
    'border-transparent bg-transparent text-action underline underline-offset-[0.2em] decoration-action/40 hover:decoration-action disabled:text-secondary',
} as const;

export type ButtonLook = keyof typeof looks;

/** The class names of a button, for links that look like one. */
export function buttonClass(look: ButtonLook = 'plain', className?: string): string {
  const padding = look === 'quiet' ? 'min-h-6 px-0 py-0.5' : 'min-h-10 px-4 py-1.5';
  return cn(
    'rounded-control inline-flex items-center justify-center border text-center text-[0.9375rem] leading-tight font-medium transition-colors disabled:cursor-not-allowed',
    padding,
    looks[look],
    className,
  );
}

/** An owned button; `type` is `button` unless said otherwise. */
export function Button({
  look = 'plain',
  className,
  type = 'button',
  ...rest
}: ComponentProps<'button'> & { look?: ButtonLook }) {
  return <button type={type} className={buttonClass(look, className)} {...rest} />;
}
