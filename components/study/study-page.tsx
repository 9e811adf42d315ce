'use client';

import { useQuery } from '@tanstack/react-query';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { type ReactNode, useState } from 'react';
import { EngineError, type StudyInput } from '@/engine';
import { type Draft, type ReadDraft, deleteDraft, isLocal, readDraft } from '@/lib/client/study-draft';
import { StudyEditor } from '@/lib/client/study-editor';
import { studyQuery } from '@/lib/client/studies-queries';
import { Button } from '../ui/button';
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

function Open({ id, document, version, onReload }: { id: string; document: StudyInput | null; version: number | null; onReload: () => void }) {
  const router = useRouter();
  const [read] = useState<ReadDraft>(() => readDraft(id));
  const [opened] = useState<Opened>(() => {
    if (read.kind === 'draft') return openEditor(id, read.draft.document, version, read.draft);
    if (document === null) return { problem: 'This study is not in this browser. A study that was begun without an account stays where it was begun.' };
    return openEditor(id, document, version, null);
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
  return (
    <StudyEditorView
      editor={opened.editor}
      onThrowAway={() => {
        opened.editor.flush();
        deleteDraft(id);
        if (document === null) router.push('/studies');
        else onReload();
      }}
    />
  );
}

function Remote({ id }: { id: string }) {
  const { data, error, isPending, refetch } = useQuery(studyQuery(id));
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
  return <Open key={round} id={id} document={data?.document ?? null} version={data?.version ?? null} onReload={() => setRound(round + 1)} />;
}

/** A study by its address: from the server with the browser's draft over it, or from this browser alone. */
export function StudyPage({ id }: { id: string }) {
  const [round, setRound] = useState(0);
  return isLocal(id) ? <Open key={round} id={id} document={null} version={null} onReload={() => setRound(round + 1)} /> : <Remote id={id} />;
}
