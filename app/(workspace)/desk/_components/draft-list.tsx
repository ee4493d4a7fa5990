import Link from 'next/link';
import type { ProjectSummary, SectionSummary } from '@/lib/domain/dto';
import { formatMoment } from '@/lib/format/dates';
import { paths } from '@/lib/paths';

/** Drafts, each under its question. */
export function DraftList({ drafts, projects }: { drafts: SectionSummary[]; projects: ProjectSummary[] }) {
  if (drafts.length === 0) return <p className="text-secondary">No drafts wait for you.</p>;
  const byId = new Map(projects.map((project) => [project.id, project]));
  return (
    <ul className="-mt-4 lg:-mt-5">
      {drafts.map((section) => {
        const project = byId.get(section.projectId);
        return (
          <li key={section.id} className="border-b border-rule last:border-b-0">
            <Link href={paths.section(section.projectId, section.id)} className="group grid gap-1 py-4">
              <span className="figures flex flex-wrap justify-between gap-x-8 text-sm text-secondary">
                <span>{project ? `${project.number} ${project.name}` : ''}</span>
                <span>
                  {section.updatedBy}, {formatMoment(section.updatedAt)}
                </span>
              </span>
              <span className="text-lg leading-snug font-medium text-action underline decoration-action/40 decoration-1 underline-offset-[0.2em] group-hover:decoration-action">
                {section.title}
              </span>
              {section.question && <span className="max-w-[66ch] font-serif">{section.question}</span>}
            </Link>
          </li>
        );
      })}
    </ul>
  );
}
