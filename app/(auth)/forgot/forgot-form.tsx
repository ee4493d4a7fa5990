'use client';

import Link from 'next/link';
import { useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { TextInput } from '@/components/ui/input';
import { Notice } from '@/components/ui/notice';
import { requestResetForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { requestReset } from '../actions';

/** Asks for a reset link; the answer is the same whether or not the address is known. */
export function ForgotForm() {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useActionForm({
    schema: requestResetForm,
    defaultValues: { email: '' },
    action: requestReset,
    onDone: (_, { email }) => setSentTo(email),
  });
  if (sentTo) {
    return (
      <Notice tone="done" title="Look in your inbox">
        If {sentTo} has an account here, a link to set a new password is on its way. It works once, for one
        hour.{' '}
        <Link href={paths.signIn()} className="text-link">
          Back to sign-in
        </Link>
      </Notice>
    );
  }
  return (
    <ActionForm state={form} label="Ask for a reset link" submitLabel="Send me a link">
      <Field label="E-mail" error={form.formState.errors.email?.message}>
        <TextInput type="email" autoComplete="username" {...form.register('email')} />
      </Field>
    </ActionForm>
  );
}
