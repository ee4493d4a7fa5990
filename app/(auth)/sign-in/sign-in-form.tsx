'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { TextInput } from '@/components/ui/input';
import { signInForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { signIn } from '../actions';

/** Sign-in, then on to where the person wanted to go. */
export function SignInForm({ next }: { next: string }) {
  const router = useRouter();
  const form = useActionForm({
    schema: signInForm,
    defaultValues: { email: '', password: '' },
    action: signIn,
    onDone: () => router.push(next),
  });
  const { errors } = form.formState;
  return (
    <ActionForm
      state={form}
      label="Sign in"
      submitLabel="Sign in"
      sendingLabel="Signing in…"
      extra={
        <Link href={paths.forgot()} className="text-link">
          Forgot the password?
        </Link>
      }
    >
      <Field label="E-mail" error={errors.email?.message}>
        <TextInput type="email" autoComplete="username" {...form.register('email')} />
      </Field>
      <Field label="Password" error={errors.password?.message}>
        <TextInput type="password" autoComplete="current-password" {...form.register('password')} />
      </Field>
    </ActionForm>
  );
}
