'use client';

import type { ReactNode } from 'react';
import { ConfirmButton } from '@/components/form/confirm-button';
import type { Criterion } from '@/lib/domain/criteria';
import { formatDay } from '@/lib/format/dates';
import { quantityWords } from '@/lib/format/words';
import { removeCriterion } from '../actions';
import { CriterionDialog } from './criterion-dialog';

interface CriterionListProps {
  criteria: Criterion[];
  isAdministrator: boolean;
}

/** The criteria the practice adopted. */
export function CriterionList({ criteria, isAdministrator }: CriterionListProps) {
  if (criteria.length === 0) {
    return (
      <p className="max-w-[60ch] text-secondary">
        None adopted yet.{' '}
        {isAdministrator
          ? 'Add your own, or adopt an example after reading its source.'
          : 'The administrator adopts them.'}
      </p>
    );
  }
  return (
    <ul className="-mt-4 lg:-mt-5">
      {criteria.map((criterion) => (
        <CriterionRow key={criterion.id} criterion={criterion}>
          {isAdministrator && (
            <>
              <CriterionDialog
                criterion={criterion}
                trigger="Edit"
                accessibleTrigger={`Edit ${criterion.title}`}
                title="Edit the criterion"
              />
              <ConfirmButton
                label="Remove"
                accessibleLabel={`Remove ${criterion.title}`}
                title="Remove this criterion?"
                consequence="Sections are no longer held against it from now on. The log keeps who removed it and when."
                confirmLabel="Remove"
                action={() => removeCriterion({ id: criterion.id })}
              />
            </>
          )}
        </CriterionRow>
      ))}
    </ul>
  );
}

/** One criterion: its value large, what it is on, its source beneath. */
export function CriterionRow({ criterion, children }: { criterion: Criterion; children?: ReactNode }) {
  const { required, title, quantity, source, soil, adopted, approvedBy, example } = criterion;
  const adoption = [adopted && `adopted ${formatDay(adopted)}`, approvedBy && `by ${approvedBy}`]
    .filter(Boolean)
    .join(' ');
  return (
    <li className="grid grid-cols-[4.5rem_minmax(0,1fr)] gap-x-4 border-b border-rule py-4 last:border-b-0">
      <p className="figures text-3xl leading-none font-light">
        <span className="block pb-1 text-sm leading-none font-normal text-secondary">at least </span>
        {required}
      </p>
      <div className="grid gap-1">
        <h3 className="font-semibold">
          {title}
          {soil && <span className="font-normal"> ({soil})</span>}
        </h3>
        <p className="text-[0.9375rem]">{quantityWords[quantity]}</p>
        <p className="max-w-[66ch] text-[0.9375rem] text-secondary">
          {example ? 'Example. ' : ''}
          {source}
        </p>
        {adoption && <p className="text-sm text-secondary">{adoption}</p>}
        {children && <div className="flex flex-wrap gap-x-5">{children}</div>}
      </div>
    </li>
  );
}
