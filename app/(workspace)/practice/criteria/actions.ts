'use server';

import { revalidatePath } from 'next/cache';
import { criterionForm, identifierForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { removeCriterion as remove, saveCriterion as save } from '@/lib/server/criteria';
import { defineAction } from '@/lib/server/define-action';

export const saveCriterion = defineAction(criterionForm, async ({ input, actor }) => {
  await save(actor, input);
  revalidatePath(paths.criteria());
});

export const removeCriterion = defineAction(identifierForm, async ({ input, actor }) => {
  await remove(actor, input.id);
  revalidatePath(paths.criteria());
});
