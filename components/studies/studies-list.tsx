'use client';

import { useQuery } from '@tanstack/react-query';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState, useSyncExternalStore } from 'react';
import { beginStudy } from '@/lib/client/new-study';
import { type DraftEntry, isLocal, listDrafts } from '@/lib/client/study-draft';
import { studyListQuery } from '@/lib/client/studies-queries';
import { Button } from '../ui/button';
import { Failed } from '../ui/failed';
import { PageHeading } from '../ui/page-heading';
import { OpenStudyFile } from '../bring-in/open-study-file';
import { OwnStudies } from './own-studies';
import { StudyRow } from './study-row';

const NONE: DraftEntry[] = [];
let known: { text: string; entries: DraftEntry[] } = { text: '[]', entries: NONE };

/** The same list gives the same object, as the store asks. */
function drafts(): DraftEntry[] {
  const entries = listDrafts();
  const text = JSON.stringify(entries);
  if (text !== known.text) known = { text, entries };
  return known.entries;
}

function subscribe(listener: () => void): () => void {
  window.addEventListener('storage', listener);
  return () => window.removeEventListener('storage', listener);
}

const ROW = 'block border-b border-hair py-3.5 hover:bg-wash';

/** One's own studies, what this browser keeps, and the demo studies. */
export function StudiesList({ isSignedIn }: { isSignedIn: boolean }) {
  const router = useRouter();
  const { data, error, isPending, refetch } = useQuery(studyListQuery());
  const own = useSyncExternalStore(subscribe, drafts, () => NONE);
  const [problem, setProblem] = useState(false);
  const titles = new Map(data?.map((study) => [study.slug ?? study.id, study.title]));
  const begin = () => {
    const id = beginStudy();
    if (id === null) setProblem(true);
    else router.push(`/studies/${id}`);
  };
  return (
    <main className="mx-auto max-w-[1100px] px-5 pb-20 pt-10 sm:px-8">
      <PageHeading text="Studies">
        <span className="flex flex-wrap items-baseline gap-x-5 gap-y-2">
          <OpenStudyFile onUnkept={() => setProblem(true)} />
          <Button kind="strong" onClick={begin}>
            Start a study
          </Button>
        </span>
      </PageHeading>
      {problem && (
        <p role="alert" className="mt-3 text-mark">
          This browser does not let a study be kept: its storage is full or closed. Make room, or allow storage for this page, and try again.
        </p>
      )}
      {isSignedIn && <OwnStudies />}
      {(!isSignedIn || own.length > 0) && <h2 className="mt-10 border-b border-ink pb-1.5 text-[15px] font-semibold">Kept in this browser</h2>}
      {own.length === 0 ? (
        !isSignedIn && <p className="py-3.5 text-soft">Nothing yet. What you start or change without an account is kept here.</p>
      ) : (
        <ul role="list">
          {own.map(({ id, title, changedAt }) => (
            <li key={id}>
              <Link href={`/studies/${id}`} className={ROW}>
                <span className="text-[17px] font-semibold">{title}</span>
                <span className="ml-4 text-soft">
                  {isLocal(id) ? '' : `your changes to ${titles.get(id) ?? id}, `}
                  {`last changed ${new Date(changedAt).toLocaleString()}`}
                </span>
              </Link>
            </li>
          ))}
        </ul>
      )}
      <h2 className="mt-10 border-b border-ink pb-1.5 text-[15px] font-semibold">Demonstrations</h2>
      {isPending && <p className="py-3.5 text-soft">Opening…</p>}
      {error && <Failed className="py-3.5" message={error.message} onRetry={() => void refetch()} />}
      <ul role="list">
        {data?.map((study) => (
          <StudyRow key={study.id} study={study} note={<span className="block max-w-[80ch] font-serif text-[17px]">{study.summary}</span>} />
        ))}
      </ul>
    </main>
  );
}
