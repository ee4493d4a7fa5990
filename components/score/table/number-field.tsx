'use client';
import { useId, useState } from 'react';
import { useScore } from '@/components/editor/state/score-context';
import { cn } from '@/lib/cn';
import { parseNumber, type Quantity, toShown, unitName, writeShort } from '@/lib/domain/units';

interface NumberFieldProps {
  /** Read by screen readers; shown above the field when `isLabelled`. */
  readonly label: string;
  readonly value: number | undefined;
  readonly quantity: Quantity;
  /** Called with the SI value; undefined where an optional field was emptied. */
  readonly onCommit: (value: number | undefined) => void;
  readonly isOptional?: boolean;
  readonly isLabelled?: boolean;
  readonly className?: string;
}

/** A number edited in place: takes `12 ft`, `3e-5`, `0,5`, `10+2.4`, says what it understood, and keeps what it did not. */
export function NumberField({
  label,
  value,
  quantity,
  onCommit,
  isOptional = false,
  isLabelled = false,
  className,
}: NumberFieldProps) {
  const units = useScore((state) => state.units);
  const mayChange = useScore((state) => state.detail.mayChange);
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [message, setMessage] = useState('');
  const [understood, setUnderstood] = useState('');
  const shown = value === undefined ? '' : writeShort(toShown(value, quantity, units));
  const unit = unitName(quantity, units);
  if (!mayChange) {
    return (
      <span className={cn('figures', className)}>
        {isLabelled && <span className="text-secondary">{label} </span>}
        {shown.replace('-', '−') || '—'}
      </span>
    );
  }

  const commit = (): void => {
    if (typed === null || typed === shown) return reset();
    if (typed.trim() === '' && isOptional) {
      onCommit(undefined);
      return reset();
    }
    const parsed = parseNumber(typed, quantity, units);
    if (!parsed.ok) {
      setMessage(parsed.message);
      return;
    }
    onCommit(parsed.value);
    reset();
    setUnderstood(parsed.understood);
  };
  const reset = (): void => {
    setTyped(null);
    setMessage('');
    setUnderstood('');
  };
  return (
    <span className={cn('relative inline-grid justify-items-start', className)}>
      {isLabelled && (
        <label htmlFor={id} className="text-[0.8125rem] text-secondary">
          {label}
          {unit && `, ${unit}`}
        </label>
      )}
      <input
        id={id}
        inputMode="text"
        autoComplete="off"
        spellCheck={false}
        aria-label={isLabelled ? undefined : `${label}${unit && `, ${unit}`}`}
        aria-invalid={message ? true : undefined}
        aria-describedby={message || understood ? `${id}-note` : undefined}
        className="figures min-h-7 w-[5.5rem] rounded-control border border-rule bg-paper px-1.5 py-0.5 text-[0.9375rem] hover:border-field focus:border-action aria-invalid:border-2 aria-invalid:border-attention"
        value={typed ?? shown}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={commit}
        onKeyDown={(event) => {
          if (event.key === 'Enter') commit();
          if (event.key === 'Escape') reset();
        }}
      />
      {(message || understood) && (
        <span
          id={`${id}-note`}
          role={message ? 'alert' : undefined}
          className={cn(
            'absolute top-full left-0 z-20 mt-0.5 w-max max-w-56 rounded-control border border-rule bg-paper px-1.5 py-0.5 text-[0.8125rem] leading-snug',
            message ? 'text-attention' : 'text-secondary',
          )}
        >
          {message || `= ${understood}`}
        </span>
      )}
    </span>
  );
}
