'use client';
import type { ReactNode } from 'react';
import { useId, useState } from 'react';
import { useScore } from '@/components/editor/state/score-context';
import { Button } from '@/components/ui/button';

const control =
  'min-h-7 rounded-control border border-rule bg-paper px-1.5 py-0.5 text-[0.9375rem] hover:border-field focus:border-action';

interface TextCellProps {
  readonly label: string;
  readonly value: string;
  readonly onCommit: (value: string) => void;
  readonly isRequired?: boolean;
  readonly className?: string;
}

/** A text edited in place; kept on Enter or on leaving, restored by Escape. */
export function TextCell({ label, value, onCommit, isRequired = false, className = 'w-44' }: TextCellProps) {
  const mayChange = useScore((state) => state.detail.mayChange);
  const [typed, setTyped] = useState<string | null>(null);
  if (!mayChange) return <span>{value || '—'}</span>;
  const commit = (): void => {
    if (typed !== null && typed !== value && !(isRequired && typed.trim() === '')) onCommit(typed.trim());
    setTyped(null);
  };
  return (
    <input
      aria-label={label}
      autoComplete="off"
      maxLength={200}
      className={`${control} ${className}`}
      value={typed ?? value}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === 'Enter') commit();
        if (event.key === 'Escape') setTyped(null);
      }}
    />
  );
}

interface ChoiceCellProps {
  readonly label: string;
  readonly value: string;
  readonly options: readonly (readonly [value: string, words: string])[];
  readonly onCommit: (value: string) => void;
}

/** One of a few. */
export function ChoiceCell({ label, value, options, onCommit }: ChoiceCellProps) {
  const mayChange = useScore((state) => state.detail.mayChange);
  if (!mayChange) return <span>{options.find(([v]) => v === value)?.[1] ?? value}</span>;
  return (
    <select
      aria-label={label}
      className={control}
      value={value}
      onChange={(event) => onCommit(event.target.value)}
    >
      {options.map(([v, words]) => (
        <option key={v} value={v}>
          {words}
        </option>
      ))}
    </select>
  );
}

interface PartProps {
  readonly title: string;
  readonly columns: readonly string[];
  /** Adds a row; absent where nothing can be added. */
  readonly onAdd?: () => void;
  readonly addWords?: string;
  readonly children: ReactNode;
}

/** One part of the document as a table of its own. */
export function Part({ title, columns, onAdd, addWords, children }: PartProps) {
  const mayChange = useScore((state) => state.detail.mayChange);
  const id = useId();
  return (
    <section aria-labelledby={id} className="border-t border-rule py-4">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h2 id={id} className="text-base font-semibold">
          {title}
        </h2>
        {onAdd && mayChange && (
          <Button look="quiet" onClick={onAdd}>
            {addWords}
          </Button>
        )}
      </div>
      <div className="relative mt-1 overflow-x-auto pb-1" role="region" aria-labelledby={id} tabIndex={0}>
        <table className="border-collapse text-[0.9375rem]">
          <thead>
            <tr>
              {columns.map((column) => (
                <th
                  key={column}
                  scope="col"
                  className="py-1 pr-4 text-left text-[0.8125rem] font-medium whitespace-nowrap text-secondary"
                >
                  {column}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>{children}</tbody>
        </table>
      </div>
    </section>
  );
}

/** A cell of a part. */
export function Cell({ children }: { children: ReactNode }) {
  return <td className="border-t border-rule/60 py-1.5 pr-4 align-top">{children}</td>;
}

/** Takes a row away. */
export function RemoveCell({ label, onRemove }: { label: string; onRemove: () => void }) {
  const mayChange = useScore((state) => state.detail.mayChange);
  return (
    <Cell>
      {mayChange ? (
        <Button look="quiet" aria-label={`Remove ${label}`} onClick={onRemove}>
          Remove
        </Button>
      ) : (
        '—'
      )}
    </Cell>
  );
}
