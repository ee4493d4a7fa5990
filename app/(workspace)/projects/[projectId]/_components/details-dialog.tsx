'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Button } from '@/components/ui/button';
import { Dialog, DialogCancel } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { TextArea, TextInput } from '@/components/ui/input';
import type { ProjectDetail } from '@/lib/domain/dto';
import { renameProjectForm } from '@/lib/domain/forms';
import { renameProject } from '../../actions';

type Details = Pick<ProjectDetail, 'id' | 'number' | 'name' | 'client' | 'description'>;

/** Number, name, client and description of a project, changed in one place. */
export function DetailsDialog({ project }: { project: Details }) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <Dialog
      open={isOpen}
      onOpenChange={setIsOpen}
      title="Project details"
      trigger={<Button>Change details</Button>}
    >
      <DetailsForm project={project} onDone={() => setIsOpen(false)} />
    </Dialog>
  );
}

function DetailsForm({ project, onDone }: { project: Details; onDone: () => void }) {
  const router = useRouter();
  const { id, number, name, client, description } = project;
  const form = useActionForm({
    schema: renameProjectForm,
    defaultValues: { projectId: id, number, name, client, description },
    action: renameProject,
    onDone: () => {
      router.refresh();
      onDone();
    },
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="Project details"
      submitLabel="Keep"
      sendingLabel="Keeping…"
      extra={<DialogCancel />}
    >
      <Field label="Number" error={errors.number?.message}>
        <TextInput className="figures" {...form.register('number')} />
      </Field>
      <Field label="Name" error={errors.name?.message}>
        <TextInput {...form.register('name')} />
      </Field>
      <Field label="For" isOptional error={errors.client?.message}>
        <TextInput {...form.register('client')} />
      </Field>
      <Field label="What it is about" isOptional error={errors.description?.message}>
        <TextArea {...form.register('description')} />
      </Field>
    </ActionForm>
  );
}
