'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ConfirmButton } from '@/components/form/confirm-button';
import { Select } from '@/components/ui/input';
import { Notice } from '@/components/ui/notice';
import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import { type Member, type PracticeRole, practiceRoles } from '@/lib/domain/dto';
import { formatDay } from '@/lib/format/dates';
import { changeRole, removeMember } from '../actions';

interface MemberTableProps {
  members: Member[];
  ownId: string;
  isAdministrator: boolean;
}

/** The members of the practice and their roles. */
export function MemberTable({ members, ownId, isAdministrator }: MemberTableProps) {
  const router = useRouter();
  const [failure, setFailure] = useState('');
  const setRole = async (userId: string, role: PracticeRole) => {
    setFailure('');
    try {
      const result = await changeRole({ userId, role });
      if (!result.ok) setFailure(result.message);
    } catch {
      setFailure('The server cannot be reached. The role was not changed.');
    }
    router.refresh();
  };
  return (
    <div className="grid gap-4">
      {failure && <Notice tone="attention">{failure}</Notice>}
      <Table caption="Members">
        <thead>
          <tr>
            <HeadCell>Name</HeadCell>
            <HeadCell className="hidden md:table-cell">E-mail</HeadCell>
            <HeadCell>Role</HeadCell>
            <HeadCell className="hidden sm:table-cell">Since</HeadCell>
          </tr>
        </thead>
        <tbody>
          {members.map(({ userId, name, email, role, joinedAt }) => (
            <tr key={userId}>
              <RowHead>
                {name}
                {userId === ownId && <span className="font-normal text-secondary"> (you)</span>}
                <span className="block text-sm font-normal break-all text-secondary md:hidden">{email}</span>
              </RowHead>
              <Cell className="hidden md:table-cell">{email}</Cell>
              <Cell className="pr-0 sm:pr-5">
                {isAdministrator && userId !== ownId ? (
                  <div className="flex flex-wrap items-center gap-x-5 gap-y-1">
                    <Select
                      key={role}
                      aria-label={`Role of ${name}`}
                      defaultValue={role}
                      className="max-w-40 py-1"
                      onChange={(event) => void setRole(userId, event.target.value as PracticeRole)}
                    >
                      {practiceRoles.map((choice) => (
                        <option key={choice}>{choice}</option>
                      ))}
                    </Select>
                    <ConfirmButton
                      label="Remove"
                      accessibleLabel={`Remove ${name}`}
                      title={`Remove ${name} from the practice?`}
                      consequence="They are signed out everywhere at once and lose their appointments. What they wrote stays, with their name."
                      confirmLabel="Remove"
                      action={() => removeMember({ userId })}
                    />
                  </div>
                ) : (
                  role
                )}
              </Cell>
              <Cell className="hidden sm:table-cell">
                <time dateTime={joinedAt}>{formatDay(joinedAt)}</time>
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}
