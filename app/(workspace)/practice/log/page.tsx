import type { Metadata } from 'next';
import { orNotFound } from '@/app/_lib/or-not-found';
import { PageHead } from '@/components/layout/page-frame';
import { Cell, HeadCell, Table } from '@/components/ui/table';
import { formatMoment } from '@/lib/format/dates';
import { listAuditEvents } from '@/lib/server/audit';
import { requireActor } from '@/lib/server/session';

export const metadata: Metadata = { title: 'Log' };

export default async function LogPage() {
  const actor = await requireActor();
  const events = await orNotFound(listAuditEvents(actor));
  return (
    <>
      <PageHead
        over={actor.practiceName}
        title="Log"
        lead="Who did what, and when. Lines are only ever added; the database refuses to change one."
      />
      <Table caption="Log">
        <thead>
          <tr>
            <HeadCell>When</HeadCell>
            <HeadCell>Who</HeadCell>
            <HeadCell>What</HeadCell>
            <HeadCell>On</HeadCell>
          </tr>
        </thead>
        <tbody>
          {events.map(({ id, at, actor: who, action, subject, detail }) => (
            <tr key={id}>
              <Cell className="sm:whitespace-nowrap">
                <time dateTime={at}>{formatMoment(at)}</time>
              </Cell>
              <Cell>{who}</Cell>
              <Cell>{action.replaceAll('.', ' ').replaceAll('-', ' ')}</Cell>
              <Cell>
                {subject}
                {detail && <span className="block text-sm text-secondary">{detail}</span>}
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
      {events.length === 0 && <p className="mt-4 text-secondary">Nothing yet.</p>}
    </>
  );
}
