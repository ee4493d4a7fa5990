import { cn } from '@/lib/cn';

/** Pale lines where text will stand. */
export function Skeleton({ lines = 3, className }: { lines?: number; className?: string }) {
  return (
    <div aria-hidden className={cn('grid gap-3', className)}>
      {Array.from({ length: lines }, (_, line) => (
        <div
          key={line}
          className="h-4 animate-pulse bg-rule/60"
          style={{ width: `${[92, 78, 85, 64][line % 4]}%` }}
        />
      ))}
    </div>
  );
}
