'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Button } from '@/components/ui/button';
import { Dialog, DialogCancel } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Select, TextArea, TextInput } from '@/components/ui/input';
import type { LibraryMaterial } from '@/lib/domain/dto';
import { materialForm } from '@/lib/domain/forms';
import { sourceWords } from '@/lib/format/words';
import { saveMaterial } from '../actions';

interface MaterialDialogProps {
  entry?: LibraryMaterial;
  trigger: string;
  accessibleTrigger?: string;
  title: string;
}

/** A material to add or edit. */
export function MaterialDialog({ entry, trigger, accessibleTrigger, title }: MaterialDialogProps) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <Dialog
      open={isOpen}
      onOpenChange={setIsOpen}
      title={title}
      trigger={
        <Button look={entry ? 'quiet' : 'solid'} aria-label={accessibleTrigger}>
          {trigger}
        </Button>
      }
    >
      <MaterialFields entry={entry} onDone={() => setIsOpen(false)} />
    </Dialog>
  );
}

function MaterialFields({ entry, onDone }: { entry: LibraryMaterial | undefined; onDone: () => void }) {
  const router = useRouter();
  const material = entry?.material;
  const form = useActionForm({
    schema: materialForm,
    defaultValues: {
      id: entry?.id ?? '',
      name: material?.name ?? '',
      kMajor: material ? material.kMajor.toExponential() : '',
      kMinor: material ? material.kMinor.toExponential() : '',
      kSource: material?.kSource ?? 'judgement',
      saturatedUnitWeight:
        material?.saturatedUnitWeight === undefined ? '' : String(material.saturatedUnitWeight),
      note: entry?.note ?? '',
    },
    action: saveMaterial,
    onDone: () => {
      router.refresh();
      onDone();
    },
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="Material"
      submitLabel="Keep"
      sendingLabel="Keeping…"
      extra={<DialogCancel />}
    >
      <Field label="Name" error={errors.name?.message}>
        <TextInput {...form.register('name')} />
      </Field>
      <div className="grid gap-5 sm:grid-cols-2">
        <Field
          label="Permeability along, m/s"
          hint="Along the bedding, such as 2e-4."
          error={errors.kMajor?.message}
        >
          <TextInput className="figures" {...form.register('kMajor')} />
        </Field>
        <Field
          label="Permeability across, m/s"
          hint="The same, where the soil is even."
          error={errors.kMinor?.message}
        >
          <TextInput className="figures" {...form.register('kMinor')} />
        </Field>
        <Field label="Where it comes from" error={errors.kSource?.message}>
          <Select {...form.register('kSource')}>
            {Object.entries(sourceWords).map(([source, words]) => (
              <option key={source} value={source}>
                {words}
              </option>
            ))}
          </Select>
        </Field>
        <Field label="Saturated unit weight, kN/m³" isOptional error={errors.saturatedUnitWeight?.message}>
          <TextInput className="figures" inputMode="decimal" {...form.register('saturatedUnitWeight')} />
        </Field>
      </div>
      <Field label="Note" isOptional error={errors.note?.message}>
        <TextArea rows={2} {...form.register('note')} />
      </Field>
    </ActionForm>
  );
}
