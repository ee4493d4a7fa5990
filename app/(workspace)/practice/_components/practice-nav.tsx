'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { cn } from '@/lib/cn';
import { paths } from '@/lib/paths';

const everyone = [
  { href: paths.people(), label: 'People' },
  { href: paths.criteria(), label: 'Criteria' },
  { href: paths.materials(), label: 'Materials' },
];
const administrators = [
  { href: paths.tokens(), label: 'Tokens' },
  { href: paths.auditLog(), label: 'Log' },
];

/** The parts of the practice, one line of words. */
export function PracticeNav({ isAdministrator }: { isAdministrator: boolean }) {
  const pathname = usePathname();
  const places = isAdministrator ? [...everyone, ...administrators] : everyone;
  return (
    <nav aria-label="Practice" className="mx-auto w-full max-w-page px-4 pt-4 sm:px-8" data-print="hide">
      <ul className="flex flex-wrap gap-x-5 gap-y-1 text-[0.9375rem]">
        {places.map(({ href, label }) => (
          <li key={href}>
            <Link
              href={href}
              aria-current={pathname === href ? 'page' : undefined}
              className={cn(
                'inline-block py-1',
                pathname === href
                  ? 'font-medium underline decoration-ink underline-offset-4'
                  : 'text-secondary hover:text-ink',
              )}
            >
              {label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
