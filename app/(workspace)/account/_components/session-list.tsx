'use client';

import { useRouter } from 'next/navigation';
import { ConfirmButton } from '@/components/form/confirm-button';
import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import type { SessionSummary } from '@/lib/domain/dto';
import { formatMoment } from '@/lib/format/dates';
import { paths } from '@/lib/paths';
import { endSession, signOutEverywhere } from '../actions';

/** Where a person is signed in. */
export function SessionList({ sessions }: { sessions: SessionSummary[] }) {
  const router = useRouter();
  return (
    <div className="grid gap-6">
      <Table caption="Sessions">
        <thead>
          <tr>
            <HeadCell>Browser</HeadCell>
            <HeadCell className="hidden sm:table-cell">From</HeadCell>
            <HeadCell>Last seen</HeadCell>
            <HeadCell>
              <span className="sr-only">Change</span>
            </HeadCell>
          </tr>
        </thead>
        <tbody>
          {sessions.map(({ id, device, address, lastSeenAt, current }) => (
            <tr key={id}>
              <RowHead>
                {device}
                {current && <span className="font-normal text-secondary"> (this one)</span>}
              </RowHead>
              <Cell className="hidden sm:table-cell">{address}</Cell>
              <Cell>
                <time dateTime={lastSeenAt}>{formatMoment(lastSeenAt)}</time>
              </Cell>
              <Cell className="pr-0 text-right">
                {!current && (
                  <ConfirmButton
                    label="End"
                    accessibleLabel={`End the session in ${device}`}
                    title="End this session?"
                    consequence={`${device} is signed out at its next request. Changes already kept stay.`}
                    confirmLabel="End the session"
                    action={() => endSession({ id })}
                  />
                )}
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
      <div>
        <ConfirmButton
          label="Sign out everywhere"
          look="attention"
          title="Sign out everywhere?"
          consequence="Every session of yours ends at once, this one too."
          confirmLabel="Sign out everywhere"
          action={() => signOutEverywhere({})}
          onDone={() => router.push(paths.signIn())}
        />
      </div>
    </div>
  );
}
