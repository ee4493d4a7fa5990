'use server';

import { revalidatePath } from 'next/cache';
import { identifierForm, inviteForm, personForm, roleForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { defineAction } from '@/lib/server/define-action';
import * as people from '@/lib/server/people';

export const changeRole = defineAction(roleForm, async ({ input, actor }) => {
  await people.changeRole(actor, input);
  revalidatePath(paths.people());
});

export const removeMember = defineAction(personForm, async ({ input, actor }) => {
  await people.removeMember(actor, input);
  revalidatePath(paths.people());
});

export const invite = defineAction(inviteForm, async ({ input, actor }) => {
  await people.invite(actor, input);
  revalidatePath(paths.people());
});

export const revokeInvitation = defineAction(identifierForm, async ({ input, actor }) => {
  await people.revokeInvitation(actor, input.id);
  revalidatePath(paths.people());
});
