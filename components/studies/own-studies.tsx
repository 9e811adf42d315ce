'use client';

import { useInfiniteQuery, useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { restoreStudyMutation } from '@/lib/client/studies-mutations';
import { ownStudyListQuery } from '@/lib/client/studies-queries';
import { DELETED_DAYS, type StudyListItem, type StudySort } from '@/lib/schemas/studies';
import { Button, TextButton } from '../ui/button';
import { Failed } from '../ui/failed';
import { Field } from '../ui/field';
import { Segments } from '../ui/segments';
import { useSettled } from '../ui/use-settled';
import { DeletedRow, OwnRow } from './own-row';

const SORTS: readonly (readonly [StudySort, string])[] = [['changed', 'Last changed'], ['title', 'Title'], ['length', 'Length']];

function emptyWords(isDeleted: boolean, q: string): string {
  if (q !== '') return `No title holds “${q}”.`;
  return isDeleted ? `Nothing. What you delete is kept here for ${DELETED_DAYS} days.` : 'Nothing yet. Start a study, or open a demonstration and keep it as yours.';
}

/** What was just deleted, and the way back. */
function Undo({ study, onDone }: { study: StudyListItem; onDone: () => void }) {
  const { mutate, isPending, error } = useMutation(restoreStudyMutation());
  return (
    <p role="status" className="mt-3 flex flex-wrap items-baseline gap-x-4 bg-wash px-3 py-2">
      <span className="[overflow-wrap:anywhere]">{`“${study.title}” is deleted. It can be brought back for ${DELETED_DAYS} days.`}</span>
      <TextButton disabled={isPending} onClick={() => mutate({ id: study.id }, { onSuccess: onDone })}>
        Undo
      </TextButton>
      {error && <span className="text-mark">{error.message}</span>}
    </p>
  );
}

/** The studies of one's account: found by title, in three orders, page by page. */
export function OwnStudies() {
  const client = useQueryClient();
  const [text, setText] = useState('');
  const [sort, setSort] = useState<StudySort>('changed');
  const [isDeleted, setDeleted] = useState(false);
  const [gone, setGone] = useState<StudyListItem | null>(null);
  const q = useSettled(text.trim());
  const { data: studies, error, isPending, hasNextPage, fetchNextPage, isFetchingNextPage, refetch } = useInfiniteQuery(ownStudyListQuery({ q, sort, isDeleted }));
  const onChanged = (deleted?: StudyListItem) => {
    setGone(deleted ?? null);
    void client.invalidateQueries({ queryKey: ['studies', 'own'] });
  };
  return (
    <section aria-labelledby="own-heading" className="mt-10">
      <h2 id="own-heading" className="border-b border-ink pb-1.5 text-[15px] font-semibold">
        Yours
      </h2>
      <div className="mt-4 flex flex-wrap items-end gap-x-6 gap-y-3">
        <Field label="Find by title" type="search" maxLength={100} value={text} onChange={(event) => setText(event.target.value)} className="w-72 max-w-full text-[14px]" />
        <Segments label="Order" value={sort} options={SORTS} onChange={setSort} />
        <Segments label="Which" value={isDeleted ? 'deleted' : 'kept'} options={[['kept', 'Kept'], ['deleted', 'Deleted']]} onChange={(which) => setDeleted(which === 'deleted')} />
      </div>
      {gone && <Undo study={gone} onDone={() => onChanged()} />}
      {isPending && <p className="py-3.5 text-soft">Opening…</p>}
      {error && <Failed className="py-3.5" message={error.message} onRetry={() => void refetch()} />}
      {studies?.length === 0 && <p className="py-3.5 text-soft">{emptyWords(isDeleted, q)}</p>}
      <ul role="list" aria-label={isDeleted ? 'Deleted studies' : 'Your studies'}>
        {studies?.map((study) =>
          study.deletedAt === null ? <OwnRow key={study.id} study={study} onChanged={onChanged} /> : <DeletedRow key={study.id} study={study} onChanged={onChanged} />,
        )}
      </ul>
      {hasNextPage && (
        <Button className="mt-5" disabled={isFetchingNextPage} onClick={() => void fetchNextPage()}>
          Show more
        </Button>
      )}
    </section>
  );
}
