'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { ConfirmButton } from '@/components/form/confirm-button';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { Select, TextInput } from '@/components/ui/input';
import { Notice } from '@/components/ui/notice';
import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import type { InvitationSummary } from '@/lib/domain/dto';
import { inviteForm } from '@/lib/domain/forms';
import { formatDay } from '@/lib/format/dates';
import { invite, revokeInvitation } from '../actions';

/** Invitations still open. */
export function InvitationList({ invitations }: { invitations: InvitationSummary[] }) {
  return (
    <Table caption="Open invitations">
      <thead>
        <tr>
          <HeadCell>To</HeadCell>
          <HeadCell>As</HeadCell>
          <HeadCell className="hidden sm:table-cell">By</HeadCell>
          <HeadCell>Until</HeadCell>
          <HeadCell>
            <span className="sr-only">Change</span>
          </HeadCell>
        </tr>
      </thead>
      <tbody>
        {invitations.map(({ id, email, role, invitedBy, expiresAt }) => (
          <tr key={id}>
            <RowHead className="break-all">{email}</RowHead>
            <Cell>{role}</Cell>
            <Cell className="hidden sm:table-cell">{invitedBy}</Cell>
            <Cell>
              <time dateTime={expiresAt}>{formatDay(expiresAt)}</time>
            </Cell>
            <Cell className="pr-0 text-right">
              <ConfirmButton
                label="Revoke"
                accessibleLabel={`Revoke the invitation of ${email}`}
                title={`Revoke the invitation of ${email}?`}
                consequence="The link in their e-mail stops working at once."
                confirmLabel="Revoke"
                action={() => revokeInvitation({ id })}
              />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** Asks somebody into the practice by e-mail. */
export function InviteForm() {
  const router = useRouter();
  const [invited, setInvited] = useState('');
  const form = useActionForm({
    schema: inviteForm,
    defaultValues: { email: '', role: 'member' },
    action: (input) => {
      setInvited('');
      return invite(input);
    },
    onDone: (_, { email }) => {
      setInvited(email);
      form.reset();
      router.refresh();
    },
  });
  const { errors } = form.formState;
  return (
    <ActionForm state={form} label="Invite somebody" submitLabel="Send the invitation" className="max-w-2xl">
      <div className="grid gap-4 sm:grid-cols-[1fr_14rem]">
        <Field label="E-mail" error={errors.email?.message}>
          <TextInput type="email" autoComplete="off" {...form.register('email')} />
        </Field>
        <Field label="Role" error={errors.role?.message}>
          <Select {...form.register('role')}>
            <option value="member">member</option>
            <option value="administrator">administrator</option>
            <option value="client">client</option>
          </Select>
        </Field>
      </div>
      {invited && <Notice tone="done">The invitation to {invited} is on its way.</Notice>}
    </ActionForm>
  );
}
