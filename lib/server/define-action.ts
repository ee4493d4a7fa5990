// The one wrapper of server actions: session, schema, call, and every failure as an answer that keeps what was typed.
import 'server-only';
import type { z } from 'zod';
import type { ActionResult, Actor } from '@/lib/domain/dto';
import { AppError, errorRow } from '@/lib/errors';
import { toAppError } from './problem-response';
import { currentActor } from './session';

/** An action for signed-in people. */
export function defineAction<Schema extends z.ZodType, Value>(
  schema: Schema,
  handler: (call: { input: z.output<Schema>; actor: Actor }) => Promise<Value>,
): (input: z.input<Schema>) => Promise<ActionResult<Value>> {
  return (raw) =>
    answer(async () => {
      const actor = await currentActor();
      if (!actor) throw new AppError('unauthenticated');
      return handler({ input: parse(schema, raw), actor });
    });
}

/** An action that needs no session: signing in or up, a reset, an invitation. */
export function definePublicAction<Schema extends z.ZodType, Value>(
  schema: Schema,
  handler: (call: { input: z.output<Schema> }) => Promise<Value>,
): (input: z.input<Schema>) => Promise<ActionResult<Value>> {
  return (raw) => answer(async () => handler({ input: parse(schema, raw) }));
}

function parse<Schema extends z.ZodType>(schema: Schema, raw: unknown): z.output<Schema> {
  const parsed = schema.safeParse(raw);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const { path, message } of parsed.error.issues) fields[path.join('.')] ??= message;
  throw new AppError('invalid-input', undefined, { fields });
}

async function answer<Value>(run: () => Promise<Value>): Promise<ActionResult<Value>> {
  try {
    return { ok: true, value: await run() };
  } catch (thrown) {
    if (isRedirect(thrown)) throw thrown;
    const { code, details } = toAppError(thrown);
    const message = details.sentence ?? errorRow(code).sentence;
    return { ok: false, code, message, ...(details.fields ? { fields: details.fields } : {}) };
  }
}

/** Next.js carries redirects and not-found as thrown values with a digest; they are its, not ours. */
function isRedirect(thrown: unknown): boolean {
  return thrown instanceof Error && 'digest' in thrown && String(thrown.digest).startsWith('NEXT_');
}
