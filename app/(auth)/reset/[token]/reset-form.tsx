'use client';

import { useRouter } from 'next/navigation';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { TextInput } from '@/components/ui/input';
import { resetPasswordForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { resetPassword } from '../../actions';

/** A new password for the person the link was sent to. */
export function ResetForm({ token }: { token: string }) {
  const router = useRouter();
  const form = useActionForm({
    schema: resetPasswordForm,
    defaultValues: { token, password: '' },
    action: resetPassword,
    onDone: () => router.push(paths.signIn()),
  });
  return (
    <ActionForm state={form} label="New password" submitLabel="Set the new password">
      <Field
        label="New password"
        hint="At least 12 characters; no other rules. Every other session of yours is signed out."
        error={form.formState.errors.password?.message}
      >
        <TextInput type="password" autoComplete="new-password" {...form.register('password')} />
      </Field>
    </ActionForm>
  );
}
