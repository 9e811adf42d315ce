'use client';

import { type FormEvent, useId, useState } from 'react';
import { type Candidate, rulesOf } from '@/engine';
import { type Destination, bringIn } from '@/lib/client/bring-in';
import { attempt, useStudy } from '../study/context';
import { Button } from '../ui/button';

const FIELD = 'block w-72 max-w-full rounded border border-hair bg-paper px-2.5 py-1.5';

function Choice({ name, text, isChosen, onChoose }: { name: string; text: string; isChosen: boolean; onChoose: () => void }) {
  return (
    <label className="flex cursor-pointer items-baseline gap-2.5 py-1">
      <input type="radio" name={name} checked={isChosen} onChange={onChoose} className="accent-ink" />
      <span className="[overflow-wrap:anywhere]">{text}</span>
    </label>
  );
}

/**
 * What a line becomes in the study that is open.
 * @param props.problem - why it cannot be brought in as it is chosen, null where it can
 */
export function DestinationForm({ line, text, problem, onDone }: { line: Candidate; text: string; problem: string | null; onDone: (sentence: string) => void }) {
  const { editor, state, selection, select } = useStudy();
  const { study } = state;
  const group = useId();
  const section = study.sections.find(({ id }) => id === selection.section)!;
  const states = section.kind === 'process' && rulesOf(section.process).takesSubject;
  const subject = study.subjects.find(({ id }) => section.kind === 'process' && id === section.subject) ?? study.subjects[0];
  const free = section.kind === 'free' ? section : null;
  const [kind, setKind] = useState<Destination['kind']>(free ? 'line' : 'subject');
  const [name, setName] = useState(line.name);
  const [isStated, setStated] = useState(states);
  const [instrument, setInstrument] = useState(() => (free ? study.instruments.find(({ id }) => !free.lines.some((one) => one.instrument === id)) : undefined)?.id ?? study.instruments[0]?.id ?? '');
  const [error, setError] = useState<string | null>(null);

  const destination = (): Destination => {
    if (kind === 'subject') return { kind, name, statedBy: isStated && states ? section.id : null };
    if (kind === 'replace') return { kind, subject: subject!.id };
    return kind === 'line' ? { kind, section: section.id, instrument } : { kind, name, after: section.id, instrument };
  };
  const sentence = (): string => {
    if (kind === 'subject') return `“${name.trim()}” is now a subject${isStated && states ? `, stated in “${section.name}”` : ''}. Undo takes it back.`;
    if (kind === 'replace') return `It is now the rhythm of “${subject!.name}”. Undo brings back what was there.`;
    const who = study.instruments.find(({ id }) => id === instrument)?.name ?? instrument;
    return kind === 'line' ? `It is now the line of ${who} in “${section.name}”. Undo takes it back.` : `“${name.trim()}” is now an episode after “${section.name}”, played by ${who}. Undo takes it back.`;
  };
  const send = (event: FormEvent) => {
    event.preventDefault();
    if (problem !== null) return setError(problem);
    if ((kind === 'subject' || kind === 'episode') && name.trim() === '') return setError('A name is missing.');
    const said = sentence();
    const refused = attempt(editor, () => bringIn(text, destination()));
    setError(refused);
    if (refused !== null) return;
    const index = study.sections.indexOf(section);
    const added = editor.getSnapshot().study.sections[index + 1];
    if (kind === 'episode' && added) select({ section: added.id, statement: null, origin: null });
    onDone(said);
  };
  const takesInstrument = kind === 'line' || kind === 'episode';
  const isReplaced = kind === 'line' && free?.lines.some((one) => one.instrument === instrument);
  return (
    <form onSubmit={send} className="mt-4">
      <fieldset>
        <legend className="mb-1 text-[13px] text-soft">It becomes</legend>
        <Choice name={group} text="A new subject" isChosen={kind === 'subject'} onChoose={() => setKind('subject')} />
        {subject && <Choice name={group} text={`The subject “${subject.name}”, in place of what it is`} isChosen={kind === 'replace'} onChoose={() => setKind('replace')} />}
        {study.instruments.length > 0 && <Choice name={group} text={`A line of a new episode after “${section.name}”`} isChosen={kind === 'episode'} onChoose={() => setKind('episode')} />}
        {free && study.instruments.length > 0 && <Choice name={group} text={`A line of “${free.name}”`} isChosen={kind === 'line'} onChoose={() => setKind('line')} />}
      </fieldset>
      <div className="mt-2 grid gap-3">
        {(kind === 'subject' || kind === 'episode') && (
          <label>
            <span className="mb-1 block text-[13px] text-soft">Name</span>
            <input value={name} maxLength={200} autoComplete="off" onChange={(event) => setName(event.target.value)} className={FIELD} />
          </label>
        )}
        {kind === 'subject' && states && (
          <label className="flex cursor-pointer items-baseline gap-2.5">
            <input type="checkbox" checked={isStated} onChange={(event) => setStated(event.target.checked)} className="accent-ink" />
            <span>{`Let “${section.name}” state it`}</span>
          </label>
        )}
        {takesInstrument && (
          <label>
            <span className="mb-1 block text-[13px] text-soft">Instrument</span>
            <select value={instrument} onChange={(event) => setInstrument(event.target.value)} className={FIELD}>
              {study.instruments.map((one) => (
                <option key={one.id} value={one.id}>
                  {one.name}
                </option>
              ))}
            </select>
          </label>
        )}
        {isReplaced && <p className="text-[13.5px] text-soft">Its line there is replaced.</p>}
        {line.metre !== study.metre && <p className="text-[13.5px] text-soft">{`The file begins in ${line.metre}, the study in ${study.metre}: the lengths stay, the bar lines are the study’s.`}</p>}
      </div>
      <Button type="submit" kind="strong" className="mt-3">
        Bring it in
      </Button>
      {error && (
        <p role="alert" className="mt-2 text-[14px] text-mark">
          {error}
        </p>
      )}
    </form>
  );
}
