'use client';

import { type FormEvent, useId, useState } from 'react';
import {
  type FreeSection,
  type Section,
  metreOf,
  rulesOf,
  sectionRemarks,
  sectionSum,
} from '@/engine';
import {
  addSection,
  moveSection,
  removeSection,
  renameSection,
  setFactors,
  setLines,
  setRatio,
} from '@/lib/client/study-edits';
import { setLineMarks } from '@/lib/client/print-edits';
import { Button, TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { BeforeControl } from './before-control';
import { attempt, useStudy } from './context';
import { DynamicsControl, LineDynamics } from './dynamics-control';
import { MarksControl } from './marks-control';
import { ProcessSentence } from './process-sentence';
import { RhythmField } from './rhythm-field';
import { WritingControl } from './writing-control';

function Sum({ section }: { section: Section }) {
  const { editor, state } = useStudy();
  const { study, built } = state;
  const { terms, total } = sectionSum(study, built, section);
  const remarks = sectionRemarks(study, built, section);
  return (
    <p className="mt-4 max-w-[70ch] text-[13.5px] leading-relaxed text-soft" data-testid="section-sum">
      {terms && `${terms} = `}
      <b className="font-semibold text-ink">{total}</b>.
      {remarks.map(({ code, text, mend }) => (
        <span key={code}>
          {' '}
          {text}{' '}
          {mend && (
            <TextButton
              className="text-ink"
              onClick={() => attempt(editor, () => (mend.ratio !== undefined && mend.factors[0] === '1' ? setRatio(section.id, mend.ratio) : setFactors(section.id, mend.factors)))}
            >
              {mend.label}
            </TextButton>
          )}
        </span>
      ))}
    </p>
  );
}

/** The lines of an episode: each an instrument and its rhythm text. */
function FreeLines({ section }: { section: FreeSection }) {
  const { editor, state } = useStudy();
  const { study } = state;
  const [error, setError] = useState<string | null>(null);
  const set = (lines: FreeSection['lines']) => attempt(editor, () => setLines(section.id, lines));
  const free = study.instruments.find(({ id }) => !section.lines.some((line) => line.instrument === id));
  return (
    <div className="mt-5 grid gap-5">
      {section.lines.map((line, index) => (
        <div key={`${section.id}-${index}`}>
          <RhythmField
            field={`${section.id}.lines.${index}`}
            label={`${study.instruments.find(({ id }) => id === line.instrument)?.name ?? line.instrument}, as rhythm text`}
            value={line.rhythm}
            metre={metreOf(study, section)}
            instrument={line.instrument}
            onTry={(rhythm) => set(section.lines.map((one, n) => (n === index ? { ...one, rhythm } : one)))}
          />
          <p className="mt-1 flex flex-wrap gap-x-4 gap-y-1 text-[13.5px] text-soft">
            <LineDynamics section={section.id} index={index} text={line.dynamics ?? ''} />
            <MarksControl rhythm={line.rhythm} marks={line.marks} label="How attacks of this line end" set={(marks) => setLineMarks(section.id, index, marks)} />
          </p>
          {section.lines.length > 1 && (
            <TextButton className="mt-1 text-[13.5px]" onClick={() => setError(set(section.lines.toSpliced(index, 1)))}>
              Take this line away
            </TextButton>
          )}
        </div>
      ))}
      {free && (
        <div>
          <TextButton onClick={() => setError(set([...section.lines, { instrument: free.id, rhythm: '1/4 1/4 1/4 1/4' }]))}>
            {`Add a line for ${free.name.toLowerCase()}`}
          </TextButton>
        </div>
      )}
      {error && (
        <p role="alert" className="text-[14px] text-mark">
          {error}
        </p>
      )}
    </div>
  );
}

const KINDS = [
  ['process', 'A process on the subject'],
  ['free', 'An episode of free lines'],
  ['mirror', 'This one, reversed'],
] as const;

function SectionTools({ section }: { section: Section }) {
  const { editor, state, select } = useStudy();
  const [error, setError] = useState<string | null>(null);
  const [kind, setKind] = useState<Section['kind']>('process');
  const id = useId();
  const index = state.study.sections.findIndex((one) => one.id === section.id);
  const add = (close: () => void) => (event: FormEvent) => {
    event.preventDefault();
    const answer = attempt(editor, () => addSection(kind, section.id));
    setError(answer);
    if (answer !== null) return;
    const added = editor.getSnapshot().study.sections[index + 1];
    close();
    if (added) select({ section: added.id, statement: null, origin: null });
  };
  const remove = () => {
    const next = state.study.sections[index === 0 ? 1 : index - 1];
    const answer = attempt(editor, () => removeSection(section.id));
    setError(answer);
    if (answer === null && next) select({ section: next.id, statement: null, origin: null });
  };
  return (
    <div className="mt-5 flex flex-wrap items-baseline gap-x-5 gap-y-2 text-[14px]">
      <Token text="Rename" label="Name of this section" className="border-b! font-normal! text-[14px]!">
        {(close) => <TryField label="Name" initial={section.name} onTry={(name) => attempt(editor, () => renameSection(section.id, name))} onDone={close} />}
      </Token>
      <Token text="Add a section" label="Add a section after this one" className="border-b! font-normal! text-[14px]!">
        {(close) => (
          <form onSubmit={add(close)}>
            {KINDS.map(([value, text]) => (
              <label key={value} className="flex cursor-pointer items-baseline gap-2.5 py-1">
                <input type="radio" name={id} checked={value === kind} onChange={() => setKind(value)} className="accent-ink" />
                {text}
              </label>
            ))}
            <Button type="submit" kind="strong" className="mt-2">
              Add
            </Button>
          </form>
        )}
      </Token>
      {section.kind === 'process' && !section.before?.length && rulesOf(section.process).takesSubject && (
        <Token text="First change the subject" label="What is done to the subject first" className="border-b! font-normal! text-[14px]!">
          {() => <BeforeControl section={section} />}
        </Token>
      )}
      {section.kind !== 'free' && state.built.statements.some((one) => one.section === section.id && !one.factor.equals(1)) && <WritingControl section={section} />}
      <DynamicsControl section={section} />
      <TextButton disabled={index === 0} onClick={() => setError(attempt(editor, () => moveSection(section.id, -1)))}>
        Move earlier
      </TextButton>
      <TextButton disabled={index === state.study.sections.length - 1} onClick={() => setError(attempt(editor, () => moveSection(section.id, 1)))}>
        Move later
      </TextButton>
      <TextButton disabled={state.study.sections.length === 1} onClick={remove}>
        Remove
      </TextButton>
      {error && (
        <p role="alert" className="w-full text-mark">
          {error}
        </p>
      )}
    </div>
  );
}

/** How the chosen section is made. */
export function SectionPanel() {
  const { state, selection } = useStudy();
  const section = state.study.sections.find(({ id }) => id === selection.section)!;
  return (
    <section aria-labelledby="made-heading" className="min-w-0">
      <h2 id="made-heading" className="mb-2.5 text-[15px] font-semibold">
        {`How “${section.name}” is made`}
      </h2>
      <ProcessSentence section={section} />
      <Sum section={section} />
      {section.kind === 'free' && <FreeLines section={section} />}
      <SectionTools section={section} />
    </section>
  );
}
