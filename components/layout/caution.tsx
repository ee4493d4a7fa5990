import { cn } from '@/lib/cn';

/** The caution that stands wherever results are spoken of. */
export function Caution({ className }: { className?: string }) {
  return (
    <aside
      aria-label="Caution"
      className={cn('max-w-[66ch] border-l-[3px] border-attention pl-4 text-[0.9375rem]', className)}
    >
      <p>
        A result is a calculation for a drawn section and the permeabilities given with it. Local codes and
        the judgement of a licensed engineer decide what may be built. Where water is emerging or boiling on a
        real site, the site’s emergency plan comes first.
      </p>
    </aside>
  );
}
