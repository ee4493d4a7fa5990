'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState, useSyncExternalStore } from 'react';
import { type DefaultValues, type FieldValues, type Path, useForm } from 'react-hook-form';
import type { z } from 'zod';
import type { ActionResult } from '@/lib/domain/dto';

const unreachable = {
  code: 'unreachable',
  message:
    'The server cannot be reached. Everything you typed is still here; send it again when the connection is back.',
};

interface ActionFormOptions<Input extends FieldValues, Output, Value> {
  // the core type: the API description extends ZodType, which would blur what is inferred of the input
  schema: z.core.$ZodType<Output, Input>;
  defaultValues: NoInfer<DefaultValues<Input>>;
  /** Takes what was typed, not what the schema made of it: the server reads the same words with the same schema. */
  action: (input: NoInfer<Input>) => Promise<ActionResult<Value>>;
  /** Called once the server said yes. */
  onDone: (value: Value, input: Output) => void;
}

/**
 * A form that sends a server action: checks with the schema the server uses, puts each sentence beside its field, and
 * keeps everything typed whatever becomes of the request.
 */
export function useActionForm<Input extends FieldValues, Output, Value>(
  options: ActionFormOptions<Input, Output, Value>,
) {
  const { schema, defaultValues, action, onDone } = options;
  const [failure, setFailure] = useState<{ code: string; message: string } | null>(null);
  const isReady = useIsHydrated();
  const form = useForm<Input, unknown, Output>({
    resolver: zodResolver(schema),
    defaultValues,
    shouldFocusError: true,
  });

  const submit = form.handleSubmit(async (values) => {
    setFailure(null);
    let result: ActionResult<Value>;
    try {
      result = await action(form.getValues());
    } catch {
      setFailure(unreachable);
      return;
    }
    if (result.ok) {
      onDone(result.value, values);
      return;
    }
    const fields = Object.entries(result.fields ?? {});
    fields.forEach(([name, message], index) =>
      form.setError(name as Path<Input>, { message }, { shouldFocus: index === 0 }),
    );
    setFailure({ code: result.code, message: result.message });
  });

  return { ...form, submit, failure, isReady, isSending: form.formState.isSubmitting };
}

const subscribeToNothing = () => () => {};

/** False until the page's script has taken over; a form is locked till then, so that nothing typed early is thrown away. */
export function useIsHydrated(): boolean {
  return useSyncExternalStore(
    subscribeToNothing,
    () => true,
    () => false,
  );
}
