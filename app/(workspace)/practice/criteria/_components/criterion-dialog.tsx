'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Button } from '@/components/ui/button';
import { Dialog, DialogCancel } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Select, TextArea, TextInput } from '@/components/ui/input';
import { type Criterion, criterionQuantities } from '@/lib/domain/criteria';
import { criterionForm } from '@/lib/domain/forms';
import { quantityWords } from '@/lib/format/words';
import { saveCriterion } from '../actions';

interface CriterionDialogProps {
  criterion?: Criterion;
  trigger: string;
  accessibleTrigger?: string;
  title: string;
  /** The criterion is an example to be taken over. */
  isAdoption?: boolean;
}

/** A criterion to add, edit or adopt. */
export function CriterionDialog({
  criterion,
  trigger,
  accessibleTrigger,
  title,
  isAdoption = false,
}: CriterionDialogProps) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <Dialog
      open={isOpen}
      onOpenChange={setIsOpen}
      isWide
      title={title}
      description={
        isAdoption
          ? 'Read the source and set the value your practice answers for. From then on it stands under your name and today’s date.'
          : 'It stands under your name and today’s date.'
      }
      trigger={
        <Button look={criterion ? 'quiet' : 'solid'} aria-label={accessibleTrigger}>
          {trigger}
        </Button>
      }
    >
      <CriterionFields
        criterion={criterion}
        submitLabel={isAdoption ? 'Adopt' : 'Keep'}
        onDone={() => setIsOpen(false)}
      />
    </Dialog>
  );
}

interface CriterionFieldsProps {
  criterion: Criterion | undefined;
  submitLabel: string;
  onDone: () => void;
}

function CriterionFields({ criterion, submitLabel, onDone }: CriterionFieldsProps) {
  const router = useRouter();
  const form = useActionForm({
    schema: criterionForm,
    defaultValues: {
      id: criterion?.id ?? '',
      quantity: criterion?.quantity ?? 'exit-gradient-factor',
      required: criterion ? String(criterion.required) : '',
      title: criterion?.title ?? '',
      source: criterion?.source ?? '',
      soil: criterion?.soil ?? '',
    },
    action: saveCriterion,
    onDone: () => {
      router.refresh();
      onDone();
    },
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="Criterion"
      submitLabel={submitLabel}
      sendingLabel="Keeping…"
      extra={<DialogCancel />}
    >
      <Field label="On" error={errors.quantity?.message}>
        <Select {...form.register('quantity')}>
          {criterionQuantities.map((quantity) => (
            <option key={quantity} value={quantity}>
              {quantityWords[quantity]}
            </option>
          ))}
        </Select>
      </Field>
      <div className="grid gap-5 sm:grid-cols-[9rem_1fr]">
        <Field label="At least" error={errors.required?.message}>
          <TextInput className="figures" inputMode="decimal" {...form.register('required')} />
        </Field>
        <Field label="Title" error={errors.title?.message}>
          <TextInput {...form.register('title')} />
        </Field>
      </div>
      <Field
        label="Source"
        hint="The standard or office rule, its clause, its year."
        error={errors.source?.message}
      >
        <TextArea rows={3} {...form.register('source')} />
      </Field>
      <Field
        label="Soil"
        isOptional
        hint="Where the source gives the value for one soil only."
        error={errors.soil?.message}
      >
        <TextInput {...form.register('soil')} />
      </Field>
    </ActionForm>
  );
}
