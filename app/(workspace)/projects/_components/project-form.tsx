'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { buttonClass } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { TextArea, TextInput } from '@/components/ui/input';
import { projectForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { createProject } from '../actions';

/** A new project: its number and name, whom it is for. */
export function ProjectForm() {
  const router = useRouter();
  const form = useActionForm({
    schema: projectForm,
    defaultValues: { number: '', name: '', client: '', description: '' },
    action: createProject,
    onDone: ({ id }) => router.push(paths.project(id)),
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="New project"
      submitLabel="Create the project"
      sendingLabel="Creating…"
      className="max-w-xl"
      extra={
        <Link href={paths.projects()} className={buttonClass('plain')}>
          Cancel
        </Link>
      }
    >
      <div className="grid gap-5 sm:grid-cols-[10rem_1fr]">
        <Field label="Number" error={errors.number?.message}>
          <TextInput className="figures" {...form.register('number')} />
        </Field>
        <Field label="Name" error={errors.name?.message}>
          <TextInput {...form.register('name')} />
        </Field>
      </div>
      <Field
        label="For"
        isOptional
        hint="The owner or client the work is done for."
        error={errors.client?.message}
      >
        <TextInput {...form.register('client')} />
      </Field>
      <Field label="What it is about" isOptional error={errors.description?.message}>
        <TextArea {...form.register('description')} />
      </Field>
    </ActionForm>
  );
}
