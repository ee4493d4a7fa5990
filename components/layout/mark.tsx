import { cn } from '@/lib/cn';

/** The product's mark: a wall in the ground and one path of the water that passes beneath it. */
export function Mark({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 32 32" aria-hidden className={cn('h-7 w-7', className)} fill="none">
      <path d="M1 12h30" stroke="currentColor" strokeWidth="1.5" />
      <path d="M16 4v16.5" stroke="currentColor" strokeWidth="3.2" />
      <path
        d="M5.5 12.7C5.5 23.4 9.8 28 16 28s10.5-4.6 10.5-15.3"
        className="stroke-action"
        strokeWidth="2"
      />
      <path d="M1 7h13" className="stroke-action" strokeWidth="1.5" />
    </svg>
  );
}

/** The mark with the name beside it. */
export function Wordmark() {
  return (
    <span className="inline-flex items-center gap-2">
      <Mark />
      <span className="font-serif text-xl leading-none font-medium tracking-[-0.01em]">Underfall</span>
    </span>
  );
}
