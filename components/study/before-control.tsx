'use client';

import type { ProcessSection } from '@/engine';
import { setBefore } from '@/lib/client/study-edits';
import { attempt, useStudy } from './context';
import { StepsEditor } from './steps-editor';

/** The chain of transformations that the subject goes through before the process. */
export function BeforeControl({ section }: { section: ProcessSection }) {
  const { editor } = useStudy();
  return <StepsEditor steps={section.before ?? []} onTry={(next) => attempt(editor, () => setBefore(section.id, next))} />;
}
