'use client';

import { type Section, readDynamics, sectionDynamics } from '@/engine';
import { setDynamics, setFermata, setLineDynamics, setStatementDynamics } from '@/lib/client/print-edits';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { attempt, useStudy } from './context';

const HINT = 'Levels and hairpins, such as p < f > mp, laid over it at equal distances. Other words are printed in italics.';

const isWords = (text: string): boolean => text.trim() !== '' && readDynamics(text) === null;

/** How loud a section is, and whether its end is held. */
export function DynamicsControl({ section }: { section: Section }) {
  const { editor, state } = useStudy();
  const plan = sectionDynamics(state.study, section);
  const each = section.kind === 'process' ? (section.statementDynamics ?? []) : [];
  const shown = [each.length > 0 ? each.join('; ') : plan, section.fermata ? 'its end held' : ''].filter((part) => part !== '').join(', ');
  return (
    <Token text={shown === '' ? 'Dynamics' : `Dynamics ${shown}`} label="How loud this section is" className="border-b! font-normal! text-[14px]!">
      {(close) => (
        <div className="grid gap-4">
          <TryField wide label="Over the section" initial={section.dynamics ?? ''} hint={HINT} onTry={(text) => attempt(editor, () => setDynamics(section.id, text))} onDone={close} />
          {section.kind === 'mirror' && section.dynamics === undefined && plan !== '' && <p className="max-w-72 text-[13px] text-soft">{`Now ${plan}: what it mirrors, turned about.`}</p>}
          {isWords(plan) && <p className="max-w-72 text-[13px] text-soft">{`“${plan}” is printed as words.`}</p>}
          {section.kind === 'process' && (
            <TryField
              wide
              label="For each statement in turn"
              initial={each.join('; ')}
              hint="One plan a statement, separated by semicolons, in place of the section’s; they are repeated where there are more statements."
              onTry={(text) => attempt(editor, () => setStatementDynamics(section.id, text))}
              onDone={close}
            />
          )}
          <label className="flex cursor-pointer items-baseline gap-2.5">
            <input type="checkbox" className="accent-ink" checked={section.fermata === true} onChange={(event) => attempt(editor, () => setFermata(section.id, event.target.checked))} />
            Everybody holds its end (fermata)
          </label>
        </div>
      )}
    </Token>
  );
}

/** How loud one line of an episode is. */
export function LineDynamics({ section, index, text }: { section: string; index: number; text: string }) {
  const { editor } = useStudy();
  return (
    <Token text={text === '' ? 'as loud as the section' : text} label="How loud this line is" className="border-b! text-[13.5px]! font-normal!">
      {(close) => <TryField wide label="Over this line" initial={text} hint={HINT} onTry={(typed) => attempt(editor, () => setLineDynamics(section, index, typed))} onDone={close} />}
    </Token>
  );
}
