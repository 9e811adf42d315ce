'use client';

import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { copyStudyMutation, deleteStudyMutation, renameStudyMutation, restoreStudyMutation } from '@/lib/client/studies-mutations';
import { DELETED_DAYS, type StudyListItem } from '@/lib/schemas/studies';
import { TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { dayWords, StudyRow } from './study-row';

const DAY = 24 * 60 * 60 * 1000;

type Props = {
  readonly study: StudyListItem;
  /** after a change: the list is asked for again; `deleted` is what was just thrown away */
  readonly onChanged: (deleted?: StudyListItem) => void;
};

const Problem = ({ error }: { error: Error | null }) =>
  error && (
    <span role="alert" className="text-mark">
      {error.message}
    </span>
  );

/** One's own study, with what can be done with it. */
export function OwnRow({ study, onChanged }: Props) {
  const rename = useMutation(renameStudyMutation());
  const copy = useMutation(copyStudyMutation());
  const remove = useMutation(deleteStudyMutation());
  // Pressed again after a lost answer, the copy is still made once.
  const [copyId, setCopyId] = useState(() => crypto.randomUUID());
  const isBusy = rename.isPending || copy.isPending || remove.isPending;
  const note = `Last changed ${dayWords(study.updatedAt)}, version ${study.version}`;
  const onCopied = () => {
    setCopyId(crypto.randomUUID());
    onChanged();
  };
  return (
    <StudyRow study={study} note={note}>
      <Token text="Rename" label={`New title for “${study.title}”`} className="border-b! text-[14px]! font-normal!">
        {(close) => (
          <TryField
            wide
            label="Title"
            initial={study.title}
            onTry={async (title) => {
              const refused = await rename.mutateAsync({ id: study.id, title, baseVersion: study.version }).then(
                () => null,
                (error: Error) => error.message,
              );
              onChanged();
              return refused;
            }}
            onDone={close}
          />
        )}
      </Token>
      <TextButton disabled={isBusy} aria-label={`Duplicate “${study.title}”`} onClick={() => copy.mutate({ id: study.id, saveId: copyId }, { onSuccess: onCopied })}>
        Duplicate
      </TextButton>
      <TextButton disabled={isBusy} aria-label={`Delete “${study.title}”`} onClick={() => remove.mutate({ id: study.id }, { onSuccess: (gone) => onChanged(gone) })}>
        Delete
      </TextButton>
      <Problem error={copy.error ?? remove.error} />
    </StudyRow>
  );
}

/** A study that was thrown away and can still be brought back. */
export function DeletedRow({ study, onChanged }: Props) {
  const { mutate, isPending, error } = useMutation(restoreStudyMutation());
  const until = study.deletedAt && dayWords(new Date(study.deletedAt.getTime() + DELETED_DAYS * DAY));
  return (
    <StudyRow study={study} opens={false} note={`Deleted ${study.deletedAt ? dayWords(study.deletedAt) : ''}, kept until ${until}`}>
      <TextButton disabled={isPending} aria-label={`Bring back “${study.title}”`} onClick={() => mutate({ id: study.id }, { onSuccess: () => onChanged() })}>
        Bring back
      </TextButton>
      <Problem error={error} />
    </StudyRow>
  );
}
