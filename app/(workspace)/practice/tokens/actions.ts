'use server';

import { revalidatePath } from 'next/cache';
import { identifierForm, tokenForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { defineAction } from '@/lib/server/define-action';
import * as tokens from '@/lib/server/tokens';

/** The only time the token itself leaves the server. */
export const createToken = defineAction(tokenForm, async ({ input, actor }) => {
  const { token } = await tokens.createToken(actor, input);
  revalidatePath(paths.tokens());
  return { token };
});

export const revokeToken = defineAction(identifierForm, async ({ input, actor }) => {
  await tokens.revokeToken(actor, input.id);
  revalidatePath(paths.tokens());
});
