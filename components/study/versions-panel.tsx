'use client';

import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { derive, type StudyEditor } from '@/lib/client/study-editor';
import { versionListQuery, versionQuery } from '@/lib/client/studies-queries';
import type { VersionListItem } from '@/lib/schemas/studies';
import { dayWords } from '../studies/study-row';
import { Button, TextButton } from '../ui/button';
import { DifferencesTable } from './differences-table';

/** What differs between here and a kept version, and the way back to it. */
function Look({ editor, id, version }: { editor: StudyEditor; id: string; version: number }) {
  const mine = useSyncExternalStore(editor.subscribe, editor.getSnapshot, editor.getSnapshot).study;
  const { data, error, isPending } = useQuery(versionQuery(id, version));
  const [refused, setRefused] = useState<string | null>(null);
  if (isPending) return <p className="mt-2 text-soft">Opening…</p>;
  if (error) return <p role="alert" className="mt-2 text-mark">{error.message}</p>;
  const theirs = derive(data.document).study;
  return (
    <>
      <DifferencesTable mine={mine} theirs={theirs} heading={`Version ${version}`} />
      <Button className="mt-3" disabled={JSON.stringify(mine) === JSON.stringify(theirs)} onClick={() => setRefused(editor.edit(() => theirs)?.message ?? null)}>
        {`Go back to version ${version}`}
      </Button>
      <p className="mt-1.5 text-[13px] text-soft">It becomes the next version; what stands here now is kept too.</p>
      {refused && <p role="alert" className="mt-2 text-mark">{refused}</p>}
    </>
  );
}

function Row({ editor, id, version: { version, createdAt, title } }: { editor: StudyEditor; id: string; version: VersionListItem }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <li className="border-b border-hair py-1.5">
      <div className="flex flex-wrap items-baseline gap-x-5">
        <span className="font-semibold">{`Version ${version}`}</span>
        <span className="text-soft">{dayWords(createdAt)}</span>
        <span className="[overflow-wrap:anywhere]">{title}</span>
        <TextButton className="ml-auto" aria-expanded={isOpen} aria-label={`What differs from version ${version}`} onClick={() => setOpen(!isOpen)}>
          {isOpen ? 'Close' : 'What differs'}
        </TextButton>
      </div>
      {isOpen && <Look editor={editor} id={id} version={version} />}
    </li>
  );
}

/** Every kept version of an own study, the newest first. @param props.saved - the version last saved: with a new one the list is asked for again */
export function VersionsPanel({ editor, id, saved }: { editor: StudyEditor; id: string; saved: number | null }) {
  const { data, error, isPending, hasNextPage, fetchNextPage, isFetchingNextPage, refetch } = useInfiniteQuery(versionListQuery(id));
  useEffect(() => void refetch(), [saved, refetch]);
  return (
    <section aria-labelledby="versions-heading" className="mt-3 border border-hair p-4 text-[14px]">
      <h2 id="versions-heading" className="text-[15px] font-semibold">
        Kept versions
      </h2>
      {isPending && <p className="mt-2 text-soft">Opening…</p>}
      {error && <p role="alert" className="mt-2 text-mark">{error.message}</p>}
      <ol role="list" className="mt-2 max-h-[60vh] overflow-y-auto">
        {data?.map((version) => (
          <Row key={version.version} editor={editor} id={id} version={version} />
        ))}
      </ol>
      {hasNextPage && (
        <TextButton className="mt-2" disabled={isFetchingNextPage} onClick={() => void fetchNextPage()}>
          Show earlier ones
        </TextButton>
      )}
    </section>
  );
}
