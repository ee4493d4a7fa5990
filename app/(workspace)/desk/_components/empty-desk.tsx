import Link from 'next/link';
import { SectionFigure } from '@/components/figures/section-figure';
import { Passage } from '@/components/layout/page-frame';
import { buttonClass } from '@/components/ui/button';
import { startingPoints } from '@/lib/domain/starting-points';
import { paths } from '@/lib/paths';

/** The desk of a new practice: what to begin with, shown rather than told. */
export function EmptyDesk() {
  return (
    <Passage title="To begin" aside="A section belongs to a project, so the project comes first.">
      <div className="grid gap-8">
        <p className="max-w-[60ch]">
          Open a project with its job number, then begin its first section from one of these. Each is complete
          and already solved; its numbers are yours to replace.
        </p>
        <ul className="grid grid-cols-2 gap-x-8 gap-y-8 md:grid-cols-3">
          {startingPoints.map(({ id, title, document }) => (
            <li key={id} className="grid content-start gap-2">
              <div className="flex min-h-24 items-end">
                <SectionFigure document={document} width={240} maxHeight={150} />
              </div>
              <h3 className="text-[0.9375rem] font-medium">{title}</h3>
            </li>
          ))}
        </ul>
        <p>
          <Link href={paths.newProject()} className={buttonClass('solid')}>
            Open the first project
          </Link>
        </p>
      </div>
    </Passage>
  );
}
