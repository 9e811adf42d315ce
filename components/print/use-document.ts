'use client';

import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { type BuiltStudy, EngineError, type Study, buildStudy, parseStudy } from '@/engine';
import { studyQuery } from '@/lib/client/studies-queries';
import { isLocal, readDraft } from '@/lib/client/study-draft';

export type Opened =
  | { readonly kind: 'waiting' }
  | { readonly kind: 'failed'; readonly message: string }
  | { readonly kind: 'open'; readonly study: Study; readonly built: BuiltStudy; /** which version, in words */ readonly stamp: string };

function open(document: unknown, stamp: string): Opened {
  try {
    const study = parseStudy(document);
    return { kind: 'open', study, built: buildStudy(study), stamp };
  } catch (error) {
    if (error instanceof EngineError) return { kind: 'failed', message: error.message };
    throw error;
  }
}

const dayWords = (date: Date): string => date.toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });

/** The study as this browser has it: what was changed here and not saved yet stands over what the server keeps. */
export function useDocument(id: string): Opened {
  const [draft] = useState(() => readDraft(id));
  const { data, error } = useQuery({ ...studyQuery(id), enabled: !isLocal(id) });
  const [seen, setSeen] = useState<{ key: string; opened: Opened } | null>(null);
  const key = draft.kind === 'draft' ? 'draft' : data ? `version ${data.version}` : (error?.message ?? null);
  if (key !== null && seen?.key !== key) {
    const opened =
      draft.kind === 'draft'
        ? open(draft.draft.document, `changed ${dayWords(new Date(draft.draft.changedAt))}, not saved as a version`)
        : data
          ? open(data.document, `version ${data.version}, ${dayWords(data.updatedAt)}`)
          : { kind: 'failed' as const, message: error!.message };
    setSeen({ key, opened });
  }
  if (draft.kind === 'unreadable') return { kind: 'failed', message: 'What this browser keeps of this study cannot be read. Open the study to see it.' };
  if (isLocal(id) && draft.kind === 'none') return { kind: 'failed', message: 'There is no such study in this browser.' };
  return seen?.opened ?? { kind: 'waiting' };
}
