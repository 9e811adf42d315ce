'use client';

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { type ReactNode, useEffect, useState } from 'react';
import { EngineError, type StudyInput, type ValueNames } from '@/engine';
import { moveDraft } from '@/lib/client/move-drafts';
import { createStudyMutation, saveStudyMutation } from '@/lib/client/studies-mutations';
import { studyQuery } from '@/lib/client/studies-queries';
import { type Draft, type ReadDraft, deleteDraft, isLocal, readDraft } from '@/lib/client/study-draft';
import { StudyEditor, derive } from '@/lib/client/study-editor';
import { StudySaver } from '@/lib/client/study-saver';
import type { StudyItem } from '@/lib/schemas/studies';
import { Button, TextButton } from '../ui/button';
import { PaperContext, ValueNamesContext } from './context';
import { KeptLine } from './kept-line';
import { SavingLine } from './saving-line';
import { StudyEditorView } from './study-editor';

function Message({ children }: { children: ReactNode }) {
  return (
    <main className="mx-auto max-w-[62ch] px-5 py-16 text-[17px] leading-relaxed">
      {children}
      <p className="mt-6">
        <Link href="/studies" className="underline underline-offset-[3px]">
          All studies
        </Link>
      </p>
    </main>
  );
}

type Opened = { readonly editor: StudyEditor } | { readonly problem: string };

function openEditor(id: string, document: StudyInput, version: number | null, draft: Draft | null): Opened {
  try {
    return { editor: new StudyEditor(id, document, version, draft) };
  } catch (error) {
    if (error instanceof EngineError) return { problem: error.message };
    throw error;
  }
}

/** A draft that this version cannot read: shown, and only thrown away when its owner says so. */
function Unreadable({ id, text, problem, onGone }: { id: string; text: string; problem: string; onGone: () => void }) {
  return (
    <Message>
      <p role="alert">{`What this browser keeps of this study cannot be opened. ${problem} Nothing was deleted.`}</p>
      <label className="mt-5 block text-[14px]">
        <span className="mb-1 block text-soft">Copy it to keep it</span>
        <textarea readOnly value={text} rows={8} className="w-full rounded border border-hair bg-paper p-2 font-mono text-[12.5px]" />
      </label>
      <Button
        className="mt-3"
        onClick={() => {
          deleteDraft(id);
          onGone();
        }}
      >
        Throw it away and open the study afresh
      </Button>
    </Message>
  );
}

/** Puts what stands here into the account, and goes on there. */
function KeepAsMine({ editor, id }: { editor: StudyEditor; id: string }) {
  const router = useRouter();
  const { mutate, isPending, error } = useMutation(createStudyMutation());
  const [saveId] = useState(() => crypto.randomUUID());
  const keep = () =>
    mutate(
      { document: editor.getSnapshot().study, saveId },
      {
        onSuccess: (study) => {
          deleteDraft(id);
          router.push(`/studies/${study.id}`);
        },
      },
    );
  return (
    <>
      <TextButton className="text-ink" disabled={isPending} onClick={keep}>
        Keep as my study
      </TextButton>
      {error && (
        <span role="alert" className="text-mark">
          {error.message}
        </span>
      )}
    </>
  );
}

type OpenProps = {
  readonly id: string;
  readonly item: StudyItem | null;
  readonly isSignedIn: boolean;
  readonly onReload: () => void;
};

/** An own study: saved by itself; a draft on an older version than the server's waits for a choice. */
function Own({ id, item, editor }: { id: string; item: StudyItem; editor: StudyEditor }) {
  const client = useQueryClient();
  const [saver] = useState(() => {
    const base = editor.version;
    const made = new StudySaver(editor, derive(item.document).study, item.updatedAt, (request) =>
      client.getMutationCache().build(client, client.defaultMutationOptions(saveStudyMutation(id))).execute(request),
    );
    const { isChanged, study } = editor.getSnapshot();
    if (!isChanged) made.settle(study, item.version, item.updatedAt);
    else if (base !== item.version) made.holdForConflict();
    return made;
  });
  useEffect(() => {
    const retry = () => saver.retryNow();
    saver.start();
    window.addEventListener('online', retry);
    window.addEventListener('focus', retry);
    return () => {
      saver.stop();
      window.removeEventListener('online', retry);
      window.removeEventListener('focus', retry);
      // The list and the next opening ask the server anew.
      void client.invalidateQueries({ queryKey: ['studies'] });
      client.removeQueries({ queryKey: studyQuery(id).queryKey });
    };
  }, [saver, client, id]);
  return <StudyEditorView editor={editor} status={<SavingLine editor={editor} saver={saver} id={id} />} />;
}

function Open({ id, item, isSignedIn, onReload }: OpenProps) {
  const router = useRouter();
  const isOwn = item !== null && !item.isDemo;
  const [read] = useState<ReadDraft>(() => readDraft(id));
  const [opened] = useState<Opened>(() => {
    if (read.kind === 'draft') return openEditor(id, read.draft.document, isOwn ? read.draft.baseVersion : (item?.version ?? null), read.draft);
    if (item === null) return { problem: 'This study is not in this browser. A study that was begun without an account stays where it was begun.' };
    return openEditor(id, item.document, item.version, null);
  });
  if (read.kind === 'unreadable') {
    return <Unreadable id={id} text={read.text} problem="It was made by another version of Sesqui, or is damaged." onGone={onReload} />;
  }
  if ('problem' in opened) {
    return read.kind === 'draft' ? (
      <Unreadable id={id} text={JSON.stringify(read.draft.document, null, 1)} problem={opened.problem} onGone={onReload} />
    ) : (
      <Message>
        <p role="alert">{opened.problem}</p>
      </Message>
    );
  }
  const { editor } = opened;
  if (isOwn) return <Own id={id} item={item} editor={editor} />;
  const throwAway = () => {
    editor.flush();
    deleteDraft(id);
    if (item === null) router.push('/studies');
    else onReload();
  };
  return (
    <StudyEditorView
      editor={editor}
      status={
        <KeptLine editor={editor} onThrowAway={throwAway}>
          {isSignedIn && <KeepAsMine editor={editor} id={id} />}
        </KeptLine>
      }
    />
  );
}

function Remote({ id, isSignedIn }: { id: string; isSignedIn: boolean }) {
  const { data, error, isPending, refetch } = useQuery({ ...studyQuery(id), staleTime: 0, gcTime: 0 });
  const [round, setRound] = useState(0);
  if (isPending) return <Message>Opening…</Message>;
  // Without an answer from the server a draft in this browser still opens.
  if (error && readDraft(id).kind === 'none') {
    return (
      <Message>
        <p role="alert">{error.message}</p>
        <Button className="mt-4" onClick={() => void refetch()}>
          Try again
        </Button>
      </Message>
    );
  }
  return <Open key={round} id={id} item={data ?? null} isSignedIn={isSignedIn} onReload={() => setRound(round + 1)} />;
}

/** A study that was begun without an account, opened with one: it moves there first. */
function MoveThenOpen({ id }: { id: string }) {
  const router = useRouter();
  const { error, mutate } = useMutation({
    mutationFn: () => moveDraft(id),
    onSuccess: (moved) => router.replace(moved ? `/studies/${moved.id}` : '/studies'),
    networkMode: 'always',
  });
  useEffect(() => mutate(), [mutate]);
  if (!error) return <Message>Moving this study into your account…</Message>;
  return (
    <Message>
      <p role="alert">{`This study is still in this browser only. ${error.message}`}</p>
      <Button className="mt-4" onClick={() => mutate()}>
        Try again
      </Button>
    </Message>
  );
}

function Local({ id }: { id: string }) {
  const [round, setRound] = useState(0);
  return <Open key={round} id={id} item={null} isSignedIn={false} onReload={() => setRound(round + 1)} />;
}

function Addressed({ id, isSignedIn }: { id: string; isSignedIn: boolean }) {
  if (!isLocal(id)) return <Remote id={id} isSignedIn={isSignedIn} />;
  if (isSignedIn && readDraft(id).kind === 'draft') return <MoveThenOpen id={id} />;
  return <Local id={id} />;
}

/** A study by its address: from the server with the browser's draft over it, or from this browser alone. */
export function StudyPage({ valueNames, paper, ...study }: { id: string; isSignedIn: boolean; valueNames: ValueNames; paper: 'a4' | 'letter' }) {
  return (
    <ValueNamesContext value={valueNames}>
      <PaperContext value={paper}>
        <Addressed {...study} />
      </PaperContext>
    </ValueNamesContext>
  );
}
