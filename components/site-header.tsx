import Link from 'next/link';
import type { ReactNode } from 'react';
import { ThemeSwitch, type Theme } from './ui/theme-switch';
import { Wordmark } from './ui/wordmark';

export type Person = { readonly name: string; readonly role: string } | null;

/** The line at the top of every page but the first. */
export function SiteHeader({ theme, person, status }: { theme: Theme; person: Person; status?: ReactNode }) {
  return (
    <header className="flex flex-wrap items-baseline gap-x-8 gap-y-2 border-b border-hair px-5 pb-3.5 pt-4 text-[14.5px] sm:px-8 lg:px-12">
      <Link href="/" className="mr-2">
        <Wordmark className="text-[25px] font-[650] leading-none tracking-[-0.01em]" />
      </Link>
      <nav aria-label="Main">
        <Link href="/studies" className="border-b-[3px] border-ink pb-0.5 font-semibold">
          Studies
        </Link>
      </nav>
      <div className="ml-auto flex flex-wrap items-baseline gap-x-5 gap-y-1 text-[14px] text-soft">
        {status}
        <ThemeSwitch initial={theme} />
        {person ? <span>{`${person.name} · ${person.role}`}</span> : <Link href="/sign-in">Sign in</Link>}
      </div>
    </header>
  );
}
