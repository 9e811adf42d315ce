'use client';

import { createContext, useContext } from 'react';
import type { ValueNames } from '@/engine';
import type { Edit } from '@/lib/client/study-edits';
import type { EditorSnapshot, StudyEditor } from '@/lib/client/study-editor';
import type { Place } from '@/lib/client/place';

/** What is chosen on the page: a section, perhaps a statement of it, perhaps one attack of the subject. */
export type Selection = {
  readonly section: string;
  readonly statement: string | null;
  /** the subject's attack number */
  readonly origin: number | null;
};

export type StudyContextValue = {
  readonly editor: StudyEditor;
  readonly state: EditorSnapshot;
  readonly selection: Selection;
  readonly select: (next: Partial<Selection> & { scroll?: boolean }) => void;
  readonly place: Place;
};

/** The subject that the chosen statement states, else the first that the chosen section does; null for an episode. */
export function subjectOf({ built }: Pick<EditorSnapshot, 'built'>, { section, statement }: Selection): string | null {
  const chosen = built.statements.find(({ id }) => id === statement);
  return chosen ? chosen.subject : (built.statements.find((s) => s.section === section && s.subject !== null)?.subject ?? null);
}

export const StudyContext = createContext<StudyContextValue | null>(null);

export function useStudy(): StudyContextValue {
  const value = useContext(StudyContext);
  if (value === null) throw new Error('A study component stands outside a study.');
  return value;
}

/** Tries a change. @returns null, or the sentence that says why it is refused */
export function attempt(editor: StudyEditor, edit: () => Edit): string | null {
  return editor.edit((study) => edit()(study))?.message ?? null;
}

/** How the reader calls values: quarter note or crotchet. */
export const ValueNamesContext = createContext<ValueNames>('american');
export const useValueNames = (): ValueNames => useContext(ValueNamesContext);

/** The paper that the reader prints on. */
export const PaperContext = createContext<'a4' | 'letter'>('a4');
