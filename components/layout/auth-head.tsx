import type { ReactNode } from 'react';

/** The head of a page with a single form. */
export function AuthHead({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <div className="mb-7 grid gap-2">
      <h1 className="font-serif text-[2rem] leading-tight font-medium tracking-[-0.012em]">{title}</h1>
      {children && <div className="text-secondary">{children}</div>}
    </div>
  );
}
