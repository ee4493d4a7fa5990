'use client';

import { useRouter } from 'next/navigation';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { TextInput } from '@/components/ui/input';
import { acceptInvitationForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { acceptInvitation } from '../../actions';

/** Takes up an invitation; opening the page alone never does. */
export function InvitationForm({ token, practiceName }: { token: string; practiceName: string }) {
  const router = useRouter();
  const form = useActionForm({
    schema: acceptInvitationForm,
    defaultValues: { token, name: '', password: '' },
    action: acceptInvitation,
    onDone: () => router.push(paths.desk()),
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="Accept the invitation"
      submitLabel={`Join ${practiceName}`}
      sendingLabel="Joining…"
    >
      <Field label="Your name" hint="As it should stand on a record." error={errors.name?.message}>
        <TextInput autoComplete="name" {...form.register('name')} />
      </Field>
      <Field label="Password" hint="At least 12 characters; no other rules." error={errors.password?.message}>
        <TextInput type="password" autoComplete="new-password" {...form.register('password')} />
      </Field>
    </ActionForm>
  );
}
