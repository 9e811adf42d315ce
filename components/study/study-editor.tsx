'use client';

import Link from 'next/link';
import { type ReactNode, useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { describeSection } from '@/engine';
import { DRAWN_MARK, type StudyEditor as Editor } from '@/lib/client/study-editor';
import { BringInPanel } from '../bring-in/bring-in-panel';
import { type Selection, StudyContext, type StudyContextValue, subjectOf, useValueNames } from './context';
import { FormStrip } from './form-strip';
import { InstrumentsPanel } from './instruments-panel';
import { PlayersPanel } from './players-panel';
import { ScorePanel } from './score-panel';
import { SectionPanel } from './section-panel';
import { StatementTable } from './statement-table';
import { StudyHead } from './study-head';
import { SubjectPanel } from './subject-panel';
import { ThreadsView } from './threads-view';
import { TransportBar } from './transport-bar';
import { usePlayer } from './use-player';

/** Undo and redo from anywhere on the page but a text field, which has its own. */
function useHistoryKeys(editor: Editor) {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
      if ((event.target as HTMLElement).closest('input:not([type=radio]):not([type=checkbox]):not([type=range]), textarea')) return;
      const key = event.key.toLowerCase();
      if (key === 'z' && !event.shiftKey) editor.undo();
      else if (key === 'y' || (key === 'z' && event.shiftKey)) editor.redo();
      else return;
      event.preventDefault();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [editor]);
}

/** Writes what waits to be kept before the page goes away. */
function useFlush(editor: Editor) {
  useEffect(() => {
    const flush = () => editor.flush();
    window.addEventListener('pagehide', flush);
    document.addEventListener('visibilitychange', flush);
    return () => {
      flush();
      window.removeEventListener('pagehide', flush);
      document.removeEventListener('visibilitychange', flush);
    };
  }, [editor]);
}

/** One study, open: the whole page below the header. `status` says how it is kept. */
export function StudyEditorView({ editor, status }: { editor: Editor; status: ReactNode }) {
  const state = useSyncExternalStore(editor.subscribe, editor.getSnapshot, editor.getSnapshot);
  const [chosen, setChosen] = useState<Selection>({ section: state.study.sections[0]!.id, statement: null, origin: null });
  const valueNames = useValueNames();
  useHistoryKeys(editor);
  useFlush(editor);

  // What was chosen may have been removed or undone: the nearest thing that is still there is shown instead.
  const selection = useMemo<Selection>(() => {
    const section = state.study.sections.some(({ id }) => id === chosen.section) ? chosen.section : state.study.sections[0]!.id;
    const statement = state.built.statements.some((s) => s.id === chosen.statement && s.section === section) ? chosen.statement : null;
    return { ...chosen, section, statement };
  }, [state, chosen]);

  const subject = subjectOf(state, selection);
  const { player, place, playing } = usePlayer(state, subject === null || selection.origin === null ? null : { subject, origin: selection.origin });

  const value = useMemo<StudyContextValue>(
    () => ({
      editor,
      state,
      selection,
      place,
      select: ({ section, statement, origin }) =>
        setChosen((before) => ({
          section: section ?? before.section,
          statement: statement === undefined ? before.statement : statement,
          origin: origin === undefined ? before.origin : origin,
        })),
    }),
    [editor, state, selection, place],
  );

  useEffect(() => {
    performance.mark(DRAWN_MARK);
  }, [state]);

  const onSeek = (position: number) => {
    player.seek(place.secondsAt(position));
    place.wake();
  };

  return (
    <StudyContext value={value}>
      <main className="mx-auto max-w-[1536px] px-5 pb-40 pt-6 sm:px-8 lg:px-12">
        {status}
        <div className="mt-4">
          <StudyHead />
        </div>
        <FormStrip />
        <div className="mt-9 grid gap-x-14 gap-y-10 lg:grid-cols-[minmax(340px,430px)_minmax(0,1fr)]">
          <SectionPanel />
          <ThreadsView />
        </div>
        <SubjectPanel />
        <BringInPanel />
        <ScorePanel onSeek={onSeek} />
        <StatementTable />
        <InstrumentsPanel />
        <PlayersPanel />
        <p className="sr-only" aria-live="polite">
          {describeSection(state.study, selection.section, { valueNames })}
        </p>
        <p className="mt-10 text-[13.5px] text-soft">
          <Link href="/studies" className="underline underline-offset-[3px]">
            All studies
          </Link>
        </p>
      </main>
      <TransportBar player={player} playing={playing} />
    </StudyContext>
  );
}
