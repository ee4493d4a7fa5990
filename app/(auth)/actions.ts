'use server';

import {
  acceptInvitationForm,
  emptyForm,
  requestResetForm,
  resetPasswordForm,
  signInForm,
  signUpForm,
} from '@/lib/domain/forms';
import * as accounts from '@/lib/server/accounts';
import { defineAction, definePublicAction } from '@/lib/server/define-action';
import * as people from '@/lib/server/people';

export const signIn = definePublicAction(signInForm, async ({ input }) => {
  await accounts.signIn(input);
});

export const signUp = definePublicAction(signUpForm, async ({ input }) => {
  await accounts.signUp(input);
});

export const signOut = defineAction(emptyForm, async ({ actor }) => {
  await accounts.signOut(actor);
});

export const requestReset = definePublicAction(requestResetForm, async ({ input }) => {
  await accounts.requestReset(input);
});

export const resetPassword = definePublicAction(resetPasswordForm, async ({ input }) => {
  await accounts.resetPassword(input);
});

export const acceptInvitation = definePublicAction(acceptInvitationForm, async ({ input }) => {
  await people.acceptInvitation(input);
});
