'use client';

import { useRouter } from 'next/navigation';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { TextInput } from '@/components/ui/input';
import { signUpForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { signUp } from '../actions';

/** A new practice and its first administrator. */
export function SignUpForm() {
  const router = useRouter();
  const form = useActionForm({
    schema: signUpForm,
    defaultValues: { practiceName: '', name: '', email: '', password: '' },
    action: signUp,
    onDone: () => router.push(paths.desk()),
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="Set up a practice"
      submitLabel="Set up the practice"
      sendingLabel="Setting up…"
    >
      <Field
        label="Practice"
        hint="The firm or department that answers for the work."
        error={errors.practiceName?.message}
      >
        <TextInput autoComplete="organization" {...form.register('practiceName')} />
      </Field>
      <Field label="Your name" hint="As it should stand on a record." error={errors.name?.message}>
        <TextInput autoComplete="name" {...form.register('name')} />
      </Field>
      <Field label="E-mail" error={errors.email?.message}>
        <TextInput type="email" autoComplete="username" {...form.register('email')} />
      </Field>
      <Field label="Password" hint="At least 12 characters; no other rules." error={errors.password?.message}>
        <TextInput type="password" autoComplete="new-password" {...form.register('password')} />
      </Field>
    </ActionForm>
  );
}
