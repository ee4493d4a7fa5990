import Link from 'next/link';
import type { ProjectDetail } from '@/lib/domain/dto';
import { formatMoment } from '@/lib/format/dates';
import { paths } from '@/lib/paths';

/** The sections of a project: each with the question it answers. */
export function SectionList({ project, isClient }: { project: ProjectDetail; isClient: boolean }) {
  if (isClient) {
    return (
      <p className="max-w-[60ch] text-secondary">
        Drafts are not shown to clients. What is issued to you will stand here; nothing has been issued on
        this project yet.
      </p>
    );
  }
  if (project.sections.length === 0) {
    return (
      <p className="max-w-[60ch] text-secondary">
        No sections yet.{' '}
        {project.may.changeSections ? (
          <Link href={paths.newSection(project.id)} className="text-link">
            Begin with one of five complete, solved starting points
          </Link>
        ) : (
          'The author begins them.'
        )}
      </p>
    );
  }
  return (
    <ul className="-mt-4 border-rule lg:-mt-5">
      {project.sections.map((section) => (
        <li key={section.id} className="border-b border-rule last:border-b-0">
          <Link
            href={paths.section(project.id, section.id)}
            className="group grid gap-x-8 gap-y-1 py-4 sm:grid-cols-[minmax(0,1fr)_auto]"
          >
            <span className="text-lg leading-snug font-medium text-action underline decoration-action/40 decoration-1 underline-offset-[0.2em] group-hover:decoration-action">
              {section.title}
            </span>
            <span className="figures text-sm text-secondary sm:pt-1 sm:text-right">
              {section.updatedBy}, {formatMoment(section.updatedAt)}
            </span>
            {section.question && <span className="max-w-[66ch] font-serif">{section.question}</span>}
          </Link>
        </li>
      ))}
    </ul>
  );
}
