import Link from 'next/link';
import type { InvitationSummary, ProjectSummary } from '@/lib/domain/dto';
import { formatDay } from '@/lib/format/dates';
import { paths } from '@/lib/paths';

/** The actor's projects, one line each. */
export function RecentProjects({ projects, isClient }: { projects: ProjectSummary[]; isClient: boolean }) {
  return (
    <ul className="grid gap-2.5">
      {projects.map(({ id, number, name, client, sectionCount, appointments }) => {
        const counted = sectionCount === 1 ? '1 section' : `${sectionCount} sections`;
        return (
          <li key={id} className="grid gap-x-6 sm:grid-cols-[6rem_minmax(0,1fr)_auto]">
            <span className="figures text-secondary">{number}</span>
            <span>
              <Link href={paths.project(id)} className="text-link font-medium">
                {name}
              </Link>
              {client && <span className="text-secondary"> for {client}</span>}
            </span>
            <span className="text-sm text-secondary sm:pt-0.5 sm:text-right">
              {[appointments.join(', '), isClient ? '' : counted].filter(Boolean).join('; ')}
            </span>
          </li>
        );
      })}
    </ul>
  );
}

/** Invitations that wait for somebody to take them up. */
export function OpenInvitations({ invitations }: { invitations: InvitationSummary[] }) {
  return (
    <ul className="grid gap-2">
      {invitations.map(({ id, email, role, expiresAt }) => (
        <li key={id}>
          <span className="break-all">{email}</span>{' '}
          <span className="text-secondary">
            as {role}, until {formatDay(expiresAt)}
          </span>
        </li>
      ))}
      <li>
        <Link href={paths.people()} className="text-link">
          All people and invitations
        </Link>
      </li>
    </ul>
  );
}
