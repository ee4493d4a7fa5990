'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Select, TextInput } from '@/components/ui/input';
import { Notice } from '@/components/ui/notice';
import { tokenScopes } from '@/lib/domain/dto';
import { tokenForm } from '@/lib/domain/forms';
import { scopeWords } from '@/lib/format/words';
import { createToken } from '../actions';

/** Makes a token and shows it, this once. */
export function TokenForm() {
  const router = useRouter();
  const [secret, setSecret] = useState('');
  const form = useActionForm({
    schema: tokenForm,
    defaultValues: { name: '', scopes: ['sections:read'], days: '90' },
    action: createToken,
    onDone: ({ token }) => {
      setSecret(token);
      form.reset();
      router.refresh();
    },
  });
  const { errors } = form.formState;
  return (
    <div className="grid gap-6">
      {secret && <ShownOnce secret={secret} onDone={() => setSecret('')} />}
      <ActionForm
        state={form}
        label="New token"
        submitLabel="Make the token"
        sendingLabel="Making…"
        className="max-w-xl"
      >
        <Field
          label="What for"
          hint="So that it can be told apart later, such as “nightly comparison”."
          error={errors.name?.message}
        >
          <TextInput autoComplete="off" {...form.register('name')} />
        </Field>
        <fieldset className="grid gap-1.5" aria-describedby={errors.scopes ? 'scopes-error' : undefined}>
          <legend className="mb-1 text-[0.9375rem] font-medium">It may</legend>
          {tokenScopes.map((scope) => (
            <label key={scope} className="flex min-h-6 items-center gap-2.5">
              <input
                type="checkbox"
                value={scope}
                className="size-4 accent-action"
                {...form.register('scopes')}
              />
              {scopeWords[scope]}
            </label>
          ))}
          {errors.scopes && (
            <p id="scopes-error" role="alert" className="text-sm font-medium text-attention">
              {errors.scopes.message}
            </p>
          )}
        </fieldset>
        <Field label="It lasts" error={errors.days?.message} className="max-w-48">
          <Select {...form.register('days')}>
            <option value="7">7 days</option>
            <option value="30">30 days</option>
            <option value="90">90 days</option>
            <option value="365">a year</option>
          </Select>
        </Field>
      </ActionForm>
    </div>
  );
}

function ShownOnce({ secret, onDone }: { secret: string; onDone: () => void }) {
  const [said, setSaid] = useState('');
  const copy = () =>
    navigator.clipboard.writeText(secret).then(
      () => setSaid('Copied.'),
      () => setSaid('The browser did not allow copying; select it by hand.'),
    );
  return (
    <Notice tone="done" title="Copy the token now; it is not shown again">
      <p className="my-2">
        <code
          data-testid="token"
          className="block border border-rule bg-paper px-3 py-2 text-sm break-all select-all"
        >
          {secret}
        </code>
      </p>
      <div className="flex flex-wrap items-center gap-3">
        <Button onClick={() => void copy()}>Copy</Button>
        <Button onClick={onDone}>I have kept it</Button>
        <span className="text-secondary">{said}</span>
      </div>
    </Notice>
  );
}
