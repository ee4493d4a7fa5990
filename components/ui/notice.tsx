import type { ReactNode } from 'react';
import { cn } from '@/lib/cn';

interface NoticeProps {
  /** `attention` is announced at once; `done` politely; `plain` is read in its place. */
  tone?: 'plain' | 'done' | 'attention';
  title?: ReactNode;
  children?: ReactNode;
  className?: string;
}

/** A sentence set apart by a heavy rule at its left: a caution, a failure, a thing done. */
export function Notice({ tone = 'plain', title, children, className }: NoticeProps) {
  const role = tone === 'attention' ? 'alert' : tone === 'done' ? 'status' : undefined;
  return (
    <div
      role={role}
      className={cn(
        'border-l-[3px] py-0.5 pl-4',
        tone === 'attention' ? 'border-attention' : tone === 'done' ? 'border-action' : 'border-secondary',
        className,
      )}
    >
      {title && (
        <p
          className={cn(
            'font-semibold',
            tone === 'attention' && 'text-attention',
            tone === 'done' && 'text-action',
          )}
        >
          {title}
        </p>
      )}
      {children && <div className="max-w-[66ch] text-[0.9375rem]">{children}</div>}
    </div>
  );
}
