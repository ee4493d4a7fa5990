'use server';

import { revalidatePath } from 'next/cache';
import { emptyForm, identifierForm, unitsForm } from '@/lib/domain/forms';
import * as accounts from '@/lib/server/accounts';
import { defineAction } from '@/lib/server/define-action';

export const setUnits = defineAction(unitsForm, async ({ input, actor }) => {
  await accounts.setUnits(actor, input.units);
  revalidatePath('/', 'layout');
});

export const endSession = defineAction(identifierForm, async ({ input, actor }) => {
  await accounts.endSession(actor, input.id);
});

export const signOutEverywhere = defineAction(emptyForm, async ({ actor }) => {
  await accounts.signOutEverywhere(actor);
});
