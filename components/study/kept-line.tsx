'use client';

import { type ReactNode, useState, useSyncExternalStore } from 'react';
import type { StudyEditor as Editor } from '@/lib/client/study-editor';
import { TextButton } from '../ui/button';

/** Above a study that is kept in the browser only: says so, undo and redo, and throwing the changes away. */
export function KeptLine({ editor, onThrowAway, children }: { editor: Editor; onThrowAway: () => void; children?: ReactNode }) {
  const state = useSyncExternalStore(editor.subscribe, editor.getSnapshot, editor.getSnapshot);
  const [isAsked, setAsked] = useState(false);
  return (
    <div className="flex flex-wrap items-baseline gap-x-5 gap-y-1 text-[14px] text-soft" role="status">
      {state.isUnkept ? (
        <span className="text-mark">This browser does not keep your changes: its storage is full or closed. Leave this page open.</span>
      ) : (
        <span>{state.isChanged ? 'Your changes are kept in this browser.' : 'Nothing changed yet. What you change stays in this browser.'}</span>
      )}
      <TextButton disabled={!state.canUndo} onClick={() => editor.undo()}>
        Undo
      </TextButton>
      <TextButton disabled={!state.canRedo} onClick={() => editor.redo()}>
        Redo
      </TextButton>
      {state.isChanged &&
        (isAsked ? (
          <span>
            Throw them away for good?{' '}
            <TextButton className="text-mark" onClick={onThrowAway}>
              Throw away
            </TextButton>{' '}
            <TextButton onClick={() => setAsked(false)}>Keep</TextButton>
          </span>
        ) : (
          <TextButton onClick={() => setAsked(true)}>Throw my changes away</TextButton>
        ))}
      {children}
    </div>
  );
}
