import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { SiteHeader } from '@/components/site-header';
import { readPerson } from '../person';
import { readTheme } from '../theme';

export default async function StudiesLayout({ children }: { children: ReactNode }) {
  return (
    <>
      <SiteHeader theme={readTheme(await cookies())} person={await readPerson()} />
      {children}
    </>
  );
}
