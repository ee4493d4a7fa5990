'use client';

import Link from 'next/link';
import { usePathname, useRouter } from 'next/navigation';
import { Menu, MenuItem, MenuLabel } from '@/components/ui/menu';
import { cn } from '@/lib/cn';
import type { Actor } from '@/lib/domain/dto';
import { paths } from '@/lib/paths';
import { Mark } from './mark';

interface TopLineProps {
  actor: Pick<Actor, 'name' | 'email' | 'practiceName' | 'role'>;
  signOut: (input: Record<string, never>) => Promise<unknown>;
}

/** The one line every page of the workspace carries. */
export function TopLine({ actor, signOut }: TopLineProps) {
  const pathname = usePathname();
  const places = [
    { href: paths.desk(), label: 'Desk' },
    { href: paths.projects(), label: 'Projects' },
    ...(actor.role === 'client' ? [] : [{ href: paths.practice(), label: 'Practice' }]),
  ];
  return (
    <header className="border-b border-rule bg-ground" data-print="hide">
      <div className="flex min-h-12 items-center gap-x-3 px-4 sm:gap-x-7 sm:px-6">
        <Link
          href={paths.desk()}
          aria-label="Underfall, to the desk"
          className="-ml-1 inline-flex items-center gap-2 p-1 text-ink"
        >
          <Mark className="h-6 w-6" />
          <span className="hidden font-serif text-lg leading-none font-medium sm:inline">Underfall</span>
        </Link>
        <nav aria-label="Main" className="flex items-stretch gap-x-1 self-stretch sm:gap-x-2">
          {places.map(({ href, label }) => {
            const isHere = pathname === href || pathname.startsWith(`${href}/`);
            return (
              <Link
                key={href}
                href={href}
                aria-current={isHere ? 'page' : undefined}
                className={cn(
                  '-mb-px flex items-center border-b-2 px-1.5 text-[0.9375rem] hover:text-action sm:px-2',
                  isHere ? 'border-ink font-medium text-ink' : 'border-transparent text-secondary',
                )}
              >
                {label}
              </Link>
            );
          })}
        </nav>
        <AccountMenu actor={actor} signOut={signOut} />
      </div>
    </header>
  );
}

function AccountMenu({ actor, signOut }: TopLineProps) {
  const router = useRouter();
  const leave = async () => {
    await signOut({});
    router.push(paths.home());
    router.refresh();
  };
  return (
    <div className="ml-auto min-w-0">
      <Menu
        label="Account"
        trigger={
          <button
            type="button"
            className="flex min-h-9 max-w-full items-center gap-2 px-1 text-[0.9375rem] hover:text-action"
          >
            <span className="hidden max-w-64 truncate text-secondary md:inline">{actor.practiceName}</span>
            <span className="truncate font-medium">{actor.name}</span>
            <svg
              viewBox="0 0 10 6"
              aria-hidden
              className="h-1.5 w-2.5 shrink-0"
              fill="none"
              stroke="currentColor"
              strokeWidth="1.5"
            >
              <path d="m1 1 4 4 4-4" />
            </svg>
          </button>
        }
      >
        <MenuLabel>
          {actor.email}
          <br />
          {actor.practiceName}, {actor.role}
        </MenuLabel>
        <MenuItem onSelect={() => router.push(paths.account())}>Account</MenuItem>
        <MenuItem onSelect={() => router.push(paths.apiReference())}>API reference</MenuItem>
        <MenuItem onSelect={() => void leave()}>Sign out</MenuItem>
      </Menu>
    </div>
  );
}
