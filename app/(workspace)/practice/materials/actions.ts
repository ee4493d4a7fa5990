'use server';

import { revalidatePath } from 'next/cache';
import { identifierForm, materialForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { defineAction } from '@/lib/server/define-action';
import { removeMaterial as remove, saveMaterial as save } from '@/lib/server/materials';

export const saveMaterial = defineAction(materialForm, async ({ input, actor }) => {
  await save(actor, input);
  revalidatePath(paths.materials());
});

export const removeMaterial = defineAction(identifierForm, async ({ input, actor }) => {
  await remove(actor, input.id);
  revalidatePath(paths.materials());
});
