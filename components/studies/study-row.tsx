'use client';

import Link from 'next/link';
import type { ReactNode } from 'react';
import { lengthWords } from '@/lib/client/figures-words';
import type { StudyListItem } from '@/lib/schemas/studies';
import { SmallStrip } from './small-strip';

const DAY: Intl.DateTimeFormatOptions = { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit', hourCycle: 'h23' };
export const dayWords = (at: Date): string => at.toLocaleString(undefined, DAY);

type RowProps = {
  readonly study: StudyListItem;
  /** false where it cannot be opened, because it was deleted */
  readonly opens?: boolean;
  /** beneath the title */
  readonly note: ReactNode;
  /** what can be done with it */
  readonly children?: ReactNode;
};

/** One study of a list: its title, its form drawn small, its length. */
export function StudyRow({ study, opens = true, note, children }: RowProps) {
  const title = 'text-[17px] font-semibold [overflow-wrap:anywhere]';
  return (
    <li className="grid items-center gap-x-8 gap-y-1.5 border-b border-hair py-3.5 sm:grid-cols-[minmax(0,1fr)_minmax(0,260px)]">
      <div className="min-w-0">
        {opens ? (
          <Link href={`/studies/${study.slug ?? study.id}`} className={`${title} underline-offset-[4px] hover:underline`}>
            {study.title}
          </Link>
        ) : (
          <span className={title}>{study.title}</span>
        )}
        <div className="mt-0.5 text-[14px] text-soft">{note}</div>
        {children && <div className="mt-1.5 flex flex-wrap items-baseline gap-x-5 gap-y-1 text-[14px]">{children}</div>}
      </div>
      <div className="min-w-0">
        <SmallStrip strip={study.strip} />
        <p className="mt-1 text-[13.5px] text-soft">{lengthWords(study)}</p>
      </div>
    </li>
  );
}
