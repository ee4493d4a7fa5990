'use client';

import { createContext, type ReactNode, useContext, useId, useMemo } from 'react';
import { cn } from '@/lib/cn';

interface FieldIds {
  id: string;
  describedBy: string | undefined;
  isInvalid: boolean;
}

const FieldContext = createContext<FieldIds | null>(null);

/** The attributes that tie a control to its label, hint and error. */
export function useFieldProps(): { id?: string; 'aria-describedby'?: string; 'aria-invalid'?: true } {
  const field = useContext(FieldContext);
  if (!field) return {};
  return {
    id: field.id,
    ...(field.describedBy ? { 'aria-describedby': field.describedBy } : {}),
    ...(field.isInvalid ? { 'aria-invalid': true as const } : {}),
  };
}

interface FieldProps {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  className?: string;
  /** Shown after the label, for what may be left empty. */
  isOptional?: boolean;
  children: ReactNode;
}

/** A label, a control, a hint and, where something is wrong, the sentence that says what. */
export function Field({ label, hint, error, className, isOptional = false, children }: FieldProps) {
  const id = useId();
  const value = useMemo<FieldIds>(() => {
    const describedBy = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ');
    return { id, describedBy: describedBy || undefined, isInvalid: Boolean(error) };
  }, [id, hint, error]);
  return (
    <FieldContext value={value}>
      <div className={cn('grid content-start gap-1', className)}>
        <label htmlFor={id} className="text-[0.9375rem] font-medium">
          {label}
          {isOptional && <span className="font-normal text-secondary"> (may be left empty)</span>}
        </label>
        {children}
        {hint && (
          <p id={`${id}-hint`} className="text-sm text-secondary">
            {hint}
          </p>
        )}
        {error && (
          <p id={`${id}-error`} role="alert" className="text-sm font-medium text-attention">
            {error}
          </p>
        )}
      </div>
    </FieldContext>
  );
}
