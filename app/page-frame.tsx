import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { SiteHeader } from '@/components/site-header';
import { readPerson } from './person';
import { readTheme } from './theme';

/** A page under the header. */
export async function PageFrame({ children }: { children: ReactNode }) {
  return (
    <>
      <SiteHeader theme={readTheme(await cookies())} person={await readPerson()} />
      {children}
    </>
  );
}
