'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import type { ReactNode } from 'react';
import { type Person, PersonLinks } from './person-links';
import { ThemeSwitch, type Theme } from './ui/theme-switch';
import { Wordmark } from './ui/wordmark';

/** The line at the top of every page but the first. */
export function SiteHeader({ theme, person, status }: { theme: Theme; person: Person; status?: ReactNode }) {
  const here = usePathname();
  const places = [['/studies', 'Studies'], ['/proportions', 'Proportions'], ['/check', 'Check'], ...(person?.role === 'administrator' ? [['/people', 'People']] : [])] as [string, string][];
  return (
    <header className="flex flex-wrap items-baseline gap-x-8 gap-y-2 border-b border-hair px-5 pb-3.5 pt-4 text-[14.5px] sm:px-8 lg:px-12">
      <Link href="/" className="mr-2">
        <Wordmark className="text-[25px] font-[650] leading-none tracking-[-0.01em]" />
      </Link>
      <nav aria-label="Main" className="flex gap-x-6">
        {places.map(([href, text]) => {
          const isHere = here === href || here.startsWith(`${href}/`);
          return (
            <Link key={href} href={href} aria-current={isHere ? 'page' : undefined} className={isHere ? 'border-b-[3px] border-ink pb-0.5 font-semibold' : 'pb-0.5 hover:text-ink'}>
              {text}
            </Link>
          );
        })}
      </nav>
      <div className="ml-auto flex min-w-0 flex-wrap items-baseline gap-x-5 gap-y-1 text-[14px] text-soft">
        {status}
        <ThemeSwitch initial={theme} />
        <PersonLinks person={person} />
      </div>
    </header>
  );
}
