'use client';
import { useScore } from '@/components/editor/state/score-context';
import { cn } from '@/lib/cn';
import { cautions } from '@/lib/checks';
import type { CheckResult, Verdict } from '@/lib/domain/result';
import type { SectionDocument } from '@/lib/domain/section';
import { writeSignificant } from './write-number';

const verdictWords: Record<Verdict, string> = {
  meets: 'meets',
  'falls-short': 'falls short',
  attention: 'attention',
  'not-applicable': 'not applicable',
};

/** Every check with its value, what is required of it, and its working on demand. */
export function ChecksList() {
  const result = useScore(({ answer, situationId }) =>
    answer?.result.situations.find(({ id }) => id === situationId),
  );
  const document = useScore((state) => state.document);
  const isRefused = useScore((state) => state.refusal?.document === state.document);
  if (!result || isRefused) return null;
  return (
    <section aria-labelledby="checks-heading">
      <h2 id="checks-heading" className="text-base font-semibold">
        Checks
      </h2>
      {result.checks.length === 0 && (
        <p className="mt-1 text-[0.9375rem] text-secondary">Nothing in this section calls for a check yet.</p>
      )}
      <ul className="mt-1 divide-y divide-rule border-y border-rule">
        {result.checks.map((check, i) => (
          <li key={`${check.id}-${check.subject}-${i}`}>
            <CheckRow check={check} document={document} />
          </li>
        ))}
      </ul>
      <ul className="mt-3 grid gap-1 border-l-2 border-attention pl-3 text-[0.875rem] leading-snug text-secondary">
        {cautions.map((caution) => (
          <li key={caution}>{caution}</li>
        ))}
      </ul>
    </section>
  );
}

function subjectName(document: SectionDocument, id: string): string {
  const all = [...document.edges, ...document.barriers, ...document.structures, ...document.zones];
  const found = all.find((object) => object.id === id);
  return found?.name ?? id;
}

function CheckRow({ check, document }: { check: CheckResult; document: SectionDocument }) {
  const { title, subject, quantity, value, required, verdict, remark, source, working } = check;
  return (
    <details className="group py-2">
      <summary className="grid cursor-pointer list-none grid-cols-[1fr_auto] gap-x-3 [&::-webkit-details-marker]:hidden">
        <span className="font-medium underline decoration-rule underline-offset-4 group-open:decoration-action">
          {title}
        </span>
        <span
          className={cn(
            'text-right font-medium',
            verdict === 'falls-short' || verdict === 'attention' ? 'text-attention' : 'text-ink',
          )}
        >
          {verdictWords[verdict]}
        </span>
        <span className="text-[0.875rem] text-secondary">{subjectName(document, subject)}</span>
        <span className="figures text-right text-[0.875rem]">
          {value === null ? '—' : writeSignificant(value, 3)}
          {required !== null && (
            <span className="text-secondary"> against {writeSignificant(required, 3)}</span>
          )}
        </span>
      </summary>
      <div className="mt-2 grid gap-2 text-[0.875rem] leading-snug">
        <p>Value: {quantity}.</p>
        {remark && <p>{remark}</p>}
        {working.length > 0 && (
          <div className="overflow-x-auto" tabIndex={0} role="region" aria-label={`Working of ${title}`}>
            <table className="w-full border-collapse">
              <caption className="sr-only">Working</caption>
              <thead className="sr-only">
                <tr>
                  <th scope="col">Symbol</th>
                  <th scope="col">Meaning</th>
                  <th scope="col">Value</th>
                </tr>
              </thead>
              <tbody>
                {working.map((line, i) => (
                  <tr key={i} className="border-t border-rule align-baseline">
                    <th scope="row" className="py-0.5 pr-3 text-left font-medium whitespace-nowrap">
                      {line.symbol}
                    </th>
                    <td className="py-0.5 pr-3">
                      {line.meaning}
                      {line.formula && <span className="block text-secondary">= {line.formula}</span>}
                    </td>
                    <td className="py-0.5 text-right whitespace-nowrap">
                      {writeSignificant(line.value, 4)} {line.unit}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
        <p className="text-secondary">{source}</p>
      </div>
    </details>
  );
}
