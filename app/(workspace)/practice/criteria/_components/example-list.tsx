'use client';

import type { Criterion } from '@/lib/domain/criteria';
import { CriterionDialog } from './criterion-dialog';
import { CriterionRow } from './criterion-list';

/** Published values, marked as examples until the practice adopts one under its own name. */
export function ExampleList({
  examples,
  isAdministrator,
}: {
  examples: Criterion[];
  isAdministrator: boolean;
}) {
  if (examples.length === 0) return <p className="text-secondary">Every example is adopted.</p>;
  return (
    <ul className="-mt-4 lg:-mt-5">
      {examples.map((criterion) => (
        <CriterionRow key={criterion.id} criterion={criterion}>
          {isAdministrator && (
            <CriterionDialog
              criterion={criterion}
              trigger="Adopt…"
              accessibleTrigger={`Adopt ${criterion.title}`}
              title="Adopt this example"
              isAdoption
            />
          )}
        </CriterionRow>
      ))}
    </ul>
  );
}
