'use client';

import { setComposer, setRights } from '@/lib/client/print-edits';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { attempt, useStudy } from './context';

/** What stands on the first page besides the title: who made it, and the composer's own line about their rights. */
export function TitlePage() {
  const { editor, state } = useStudy();
  const { composer, rights } = state.study;
  return (
    <Token text={composer || 'Composer and rights'} label="Composer and rights" className="border-b! text-[1em]! font-normal!">
      {(close) => (
        <div className="grid gap-4">
          <TryField wide label="Composer" initial={composer ?? ''} onTry={(text) => attempt(editor, () => setComposer(text))} onDone={() => undefined} />
          <TryField
            wide
            label="Your line about rights"
            initial={rights ?? ''}
            hint="Printed as you write it, such as © year and name, or the name of a licence. Sesqui claims nothing and states nothing for you."
            onTry={(text) => attempt(editor, () => setRights(text))}
            onDone={close}
          />
        </div>
      )}
    </Token>
  );
}
