'use client';
import { useScore } from '@/components/editor/state/score-context';
import { cn } from '@/lib/cn';

const rank = { stop: 0, check: 1, note: 2 } as const;

/** What the section lint found: three open, the rest on demand. */
export function MarginNotes() {
  const answer = useScore((state) => state.answer);
  const refusal = useScore((state) => state.refusal);
  const document = useScore((state) => state.document);
  const isRefused = refusal !== null && refusal.document === document;
  const notes = isRefused ? refusal.issues : (answer?.result.notes ?? []);
  if (notes.length === 0) return null;
  const sorted = [...notes].sort((a, b) => rank[a.severity] - rank[b.severity]);
  return (
    <section aria-labelledby="notes-heading">
      <h2 id="notes-heading" className="text-base font-semibold">
        Margin notes
      </h2>
      <Notes notes={sorted.slice(0, 3)} />
      {sorted.length > 3 && (
        <details>
          <summary className="py-1 text-[0.9375rem] text-action underline">{sorted.length - 3} more</summary>
          <Notes notes={sorted.slice(3)} />
        </details>
      )}
    </section>
  );
}

interface Note {
  readonly severity: keyof typeof rank;
  readonly message: string;
}

function Notes({ notes }: { notes: readonly Note[] }) {
  return (
    <ul className="mt-1 grid gap-2">
      {notes.map(({ severity, message }, i) => (
        <li key={i} className="border-l-2 border-rule pl-3 text-[0.9375rem] leading-snug">
          <span
            className={cn('mr-1.5 font-semibold', severity === 'note' ? 'text-secondary' : 'text-attention')}
          >
            {severity}
          </span>
          {message}
        </li>
      ))}
    </ul>
  );
}
