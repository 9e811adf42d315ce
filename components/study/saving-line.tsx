'use client';

import { useQueryClient } from '@tanstack/react-query';
import Link from 'next/link';
import { useState, useSyncExternalStore } from 'react';
import type { Study } from '@/engine';
import { createStudyMutation } from '@/lib/client/studies-mutations';
import { studyQuery } from '@/lib/client/studies-queries';
import type { StudyEditor } from '@/lib/client/study-editor';
import type { SaveState, StudySaver } from '@/lib/client/study-saver';
import { studyResponse } from '@/lib/schemas/studies';
import { Button, TextButton } from '../ui/button';
import { DifferencesTable } from './differences-table';
import { VersionsPanel } from './versions-panel';

const clock = (at: Date): string => at.toLocaleTimeString([], { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });

/** How the saving stands, in words. */
export function savingWords(state: SaveState, isUnkept: boolean): string {
  const kept = isUnkept ? 'This browser does not keep it either: leave this page open.' : 'Your work is kept in this browser';
  switch (state.kind) {
    case 'saved':
      return state.at ? `Saved ${clock(state.at)}, version ${state.version}` : `Version ${state.version}`;
    case 'saving':
      return `Saving, version ${state.version} so far`;
    case 'waiting':
      return `Not saved yet. ${state.why} ${kept}${isUnkept ? '' : ' and will be saved by itself.'}`;
    case 'signed-out':
      return `Not saved: you are signed out. ${kept}${isUnkept ? '' : '.'}`;
    case 'conflict':
      return `Not saved: another version was saved first. ${kept}${isUnkept ? '' : '.'}`;
    case 'gone':
      return `Not saved: this study was deleted elsewhere. ${kept}${isUnkept ? '' : '.'}`;
    case 'refused':
      return `Not saved. ${state.why} ${kept}${isUnkept ? '' : '.'}`;
  }
}

type Theirs = { readonly document: Study; readonly version: number; readonly updatedAt: Date };

/** Two versions of one study: what differs, and the choice. Both are kept, whichever is chosen. */
function Conflict({ editor, saver, id }: { editor: StudyEditor; saver: StudySaver; id: string }) {
  const client = useQueryClient();
  const [theirs, setTheirs] = useState<Theirs | null>(null);
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  // Asked for again after a lost answer, the copy is still made once.
  const [copyId] = useState(() => crypto.randomUUID());
  const mine = useSyncExternalStore(editor.subscribe, editor.getSnapshot, editor.getSnapshot).study;

  const run = async (work: () => Promise<void>) => {
    setBusy(true);
    setError(null);
    await work().catch((cause: unknown) => setError(cause instanceof Error ? cause.message : String(cause)));
    setBusy(false);
  };
  const compare = () =>
    run(async () => {
      const body = await client.fetchQuery({ ...studyQuery(id), staleTime: 0 });
      setTheirs(studyResponse.parse(body).study);
    });
  const keepMine = () =>
    run(async () => {
      if (!theirs) return;
      saver.settle(theirs.document, theirs.version, theirs.updatedAt);
    });
  const takeTheirs = () =>
    run(async () => {
      if (!theirs) return;
      const copy = { ...mine, title: `${mine.title.slice(0, 180)} (my version)` };
      await client.getMutationCache().build(client, client.defaultMutationOptions(createStudyMutation())).execute({ document: copy, saveId: copyId });
      const refused = editor.edit(() => theirs.document);
      if (refused) throw refused;
      saver.settle(editor.getSnapshot().study, theirs.version, theirs.updatedAt);
    });

  return (
    <section role="alertdialog" aria-labelledby="conflict-heading" className="mt-3 border border-mark p-4 text-[14.5px]">
      <h2 id="conflict-heading" className="font-semibold">
        This study was saved elsewhere in the meantime
      </h2>
      <p className="mt-1 max-w-[76ch]">Both versions are kept. Look at what differs, then say which one goes on here.</p>
      {theirs === null ? (
        <Button className="mt-3" disabled={isBusy} onClick={() => void compare()}>
          Show what differs
        </Button>
      ) : (
        <>
          <DifferencesTable mine={mine} theirs={theirs.document} heading={`There, version ${theirs.version}, ${clock(theirs.updatedAt)}`} />
          <div className="mt-3 flex flex-wrap gap-3">
            <Button kind="strong" disabled={isBusy} onClick={() => void keepMine()}>
              {`Go on with this one, as version ${theirs.version + 1}`}
            </Button>
            <Button disabled={isBusy} onClick={() => void takeTheirs()}>
              Go on with the other, keep this one as a copy
            </Button>
          </div>
        </>
      )}
      {error && (
        <p role="alert" className="mt-2 text-mark">
          {error}
        </p>
      )}
    </section>
  );
}

/** Above an own study: how the saving stands, undo and redo, and the choice where two versions met. */
export function SavingLine({ editor, saver, id }: { editor: StudyEditor; saver: StudySaver; id: string }) {
  const state = useSyncExternalStore(editor.subscribe, editor.getSnapshot, editor.getSnapshot);
  const saving = useSyncExternalStore(saver.subscribe, saver.getState, saver.getState);
  const [isListed, setListed] = useState(false);
  const isTrouble = saving.kind !== 'saved' && saving.kind !== 'saving';
  return (
    <>
      <div className="flex flex-wrap items-baseline gap-x-5 gap-y-1 text-[14px] text-soft">
        <span role="status" data-testid="saving" className={isTrouble ? 'text-mark' : ''}>
          {savingWords(saving, state.isUnkept)}
        </span>
        {saving.kind === 'waiting' && <TextButton onClick={() => saver.retryNow()}>Try now</TextButton>}
        {saving.kind === 'signed-out' && (
          <Link href={`/sign-in?next=/studies/${id}`} className="text-ink underline underline-offset-[3px]">
            Sign in
          </Link>
        )}
        <TextButton disabled={!state.canUndo} onClick={() => editor.undo()}>
          Undo
        </TextButton>
        <TextButton disabled={!state.canRedo} onClick={() => editor.redo()}>
          Redo
        </TextButton>
        <TextButton aria-expanded={isListed} onClick={() => setListed(!isListed)}>
          Versions
        </TextButton>
      </div>
      {isListed && <VersionsPanel editor={editor} id={id} saved={editor.version} />}
      {saving.kind === 'conflict' && <Conflict editor={editor} saver={saver} id={id} />}
    </>
  );
}
