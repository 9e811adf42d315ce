'use client';

import { useState } from 'react';
import {
  type Entries,
  LIMITS,
  type MirrorSection,
  type ProcessSection,
  type ProportionProcess,
  type Reading,
  type Section,
  formatFraction,
  measuresOf,
  metreOf,
  parseMetre,
  processChoices,
  proportionFactors,
  readingWords,
  toFraction,
} from '@/engine';
import {
  setCount,
  setEntries,
  setFactors,
  setMirror,
  setProcessFields,
  setProcessKind,
  setRatio,
  setReadings,
  setRotations,
  setSectionInstruments,
  setSectionSubject,
  splitFactors,
} from '@/lib/client/study-edits';
import { Button, TextButton } from '../ui/button';
import { TryField } from '../ui/try-field';
import { Choices, Refusal } from './choices';
import { attempt, useStudy } from './context';

export type Close = () => void;
const SELECT = 'w-full rounded border border-hair bg-paper px-2.5 py-1.5';

export function CountControl({ section, process, close }: { section: ProcessSection; process: ProportionProcess; close: Close }) {
  const { editor } = useStudy();
  return (
    <TryField
      label={`From 1 to ${LIMITS.statements}`}
      initial={String(proportionFactors(process).length)}
      onTry={(text) => attempt(editor, () => setCount(section.id, /^\s*\d{1,6}\s*$/.test(text) ? Number(text) : NaN))}
      onDone={close}
    />
  );
}

export function FactorsControl({ section, process, close }: { section: ProcessSection; process: ProportionProcess; close: Close }) {
  const { editor } = useStudy();
  const isRatio = process.factors === undefined;
  const [byRatio, setByRatio] = useState(isRatio);
  return (
    <>
      <Choices
        name={`How ${section.name} is stretched`}
        value={byRatio ? 'ratio' : 'factors'}
        options={[
          ['factors', 'A factor for each statement'],
          ['ratio', 'Each by one ratio to the one before'],
        ]}
        onTry={(value) => {
          setByRatio(value === 'ratio');
          return null;
        }}
      />
      <span className="mt-2 block">
        {byRatio ? (
          <TryField
            key="ratio"
            label="Ratio"
            initial={isRatio ? (process.ratio ?? '1') : '3/2'}
            hint="A fraction, a decimal or per cent: 3/2, 1.5, 150%."
            onTry={(text) => attempt(editor, () => setRatio(section.id, text))}
            onDone={close}
          />
        ) : (
          <TryField
            key="factors"
            wide
            label="Factors, with commas between"
            initial={proportionFactors(process).map(formatFraction).join(', ')}
            hint="Fractions, decimals or per cent: 1, 5/4, 1.5, 200%."
            onTry={(text) => attempt(editor, () => setFactors(section.id, splitFactors(text)))}
            onDone={close}
          />
        )}
      </span>
    </>
  );
}

export function EntriesControl({ section, entries = 'successive', close }: { section: ProcessSection; entries: Entries | undefined; close: Close }) {
  const { editor, state } = useStudy();
  const metre = metreOf(state.study, section);
  const kind = typeof entries === 'string' ? entries : 'every';
  const [isEvery, setEvery] = useState(kind === 'every');
  const measures = typeof entries === 'string' ? '1' : formatFraction(measuresOf(entries.every, metre));
  const set = (next: Entries) => attempt(editor, () => setEntries(section.id, next));
  return (
    <>
      <Choices
        name={`Entries of ${section.name}`}
        value={isEvery ? 'every' : kind}
        options={[
          ['successive', 'one after another'],
          ['together', 'all beginning together'],
          ['ending-together', 'all ending together'],
          ['every', 'a new one every so often'],
        ]}
        onTry={(value) => {
          setEvery(value === 'every');
          return value === 'every' ? null : set(value);
        }}
      />
      {isEvery && (
        <span className="mt-2 block">
          <TryField
            label="Measures between entries"
            initial={measures}
            onTry={(text) => {
              try {
                return set({ every: formatFraction(toFraction(text).mul(parseMetre(metre).length)) });
              } catch (error) {
                return (error as Error).message;
              }
            }}
            onDone={close}
          />
        </span>
      )}
    </>
  );
}

const READINGS: readonly Reading[] = ['forwards', 'backwards-values', 'backwards-attacks'];

export function ReadingControl({ section, process }: { section: ProcessSection; process: ProportionProcess }) {
  const { editor } = useStudy();
  const readings = process.readings ?? [process.reading ?? 'forwards'];
  const [error, setError] = useState<string | null>(null);
  const set = (next: readonly Reading[]) => setError(attempt(editor, () => setReadings(section.id, next)));
  return (
    <>
      {readings.map((reading, index) => (
        <label key={index} className="mb-2 flex items-baseline gap-2">
          <span className="min-w-20 text-[13px] text-soft">{readings.length === 1 ? 'Every one' : `Turn ${index + 1}`}</span>
          <select
            className={SELECT}
            value={reading}
            onChange={(event) => set(readings.map((one, n) => (n === index ? (event.target.value as Reading) : one)))}
          >
            {READINGS.map((one) => (
              <option key={one} value={one}>
                {readingWords(one)}
              </option>
            ))}
          </select>
        </label>
      ))}
      <span className="flex flex-wrap gap-4 text-[14px]">
        {readings.length < 8 && <TextButton onClick={() => set([...readings, 'forwards'])}>Add a turn</TextButton>}
        {readings.length > 1 && <TextButton onClick={() => set(readings.slice(0, -1))}>Take the last away</TextButton>}
      </span>
      <span className="mt-2 block max-w-72 text-[13px] text-soft">By values, the lengths run backwards. By attacks, the gaps between attacks do.</span>
      <Refusal text={error} />
    </>
  );
}

/** The one reading of a process. */
export function OneReadingControl({ section, reading = 'forwards' }: { section: ProcessSection; reading: Reading | undefined }) {
  const { editor } = useStudy();
  return (
    <Choices
      name={`Reading of ${section.name}`}
      value={reading}
      options={READINGS.map((one) => [one, readingWords(one)] as const)}
      onTry={(next) => attempt(editor, () => setProcessFields(section.id, { reading: next }))}
    />
  );
}

/** Which process the section is made by; another one begins afresh on the same subject. */
export function ProcessControl({ section }: { section: ProcessSection }) {
  const { editor } = useStudy();
  return (
    <Choices
      name={`Process of ${section.name}`}
      value={section.process.kind}
      options={processChoices}
      onTry={(kind) => attempt(editor, () => setProcessKind(section.id, kind))}
    />
  );
}

export function RotationsControl({ section, process, close }: { section: ProcessSection; process: ProportionProcess; close: Close }) {
  const { editor } = useStudy();
  return (
    <TryField
      label="Values moved to the end, one number a statement"
      initial={(process.rotations ?? [0]).join(', ')}
      onTry={(text) => attempt(editor, () => setRotations(section.id, text))}
      onDone={close}
    />
  );
}

/** Which instrument plays, in which order; more and fewer. */
export function InstrumentControl({ section, index, ids }: { section: Section; index: number; ids: readonly string[] }) {
  const { editor, state } = useStudy();
  const [error, setError] = useState<string | null>(null);
  const set = (next: readonly string[]) => setError(attempt(editor, () => setSectionInstruments(section.id, next)));
  const swapped = (other: number) => ids.map((id, n) => (n === index ? ids[other]! : n === other ? ids[index]! : id));
  return (
    <>
      <select
        aria-label="Instrument"
        className={SELECT}
        value={ids[index]}
        onChange={(event) => set(ids.map((id, n) => (n === index ? event.target.value : id)))}
      >
        {state.study.instruments.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </select>
      {section.kind === 'process' && (
        <span className="mt-3 flex flex-wrap gap-x-4 gap-y-1 text-[14px]">
          <TextButton disabled={index === 0} onClick={() => set(swapped(index - 1))}>
            Earlier
          </TextButton>
          <TextButton disabled={index === ids.length - 1} onClick={() => set(swapped(index + 1))}>
            Later
          </TextButton>
          <TextButton onClick={() => set(ids.toSpliced(index + 1, 0, state.study.instruments.find(({ id }) => !ids.includes(id))?.id ?? ids[index]!))}>
            Add after it
          </TextButton>
          <TextButton disabled={ids.length === 1} onClick={() => set(ids.toSpliced(index, 1))}>
            Take away
          </TextButton>
        </span>
      )}
      <Refusal text={error} />
    </>
  );
}

export function SubjectControl({ section, close }: { section: ProcessSection; close: Close }) {
  const { editor, state } = useStudy();
  return (
    <>
      <Choices
        name={`Subject of ${section.name}`}
        value={section.subject ?? ''}
        options={state.study.subjects.map(({ id, name }) => [id, name] as const)}
        onTry={(id) => attempt(editor, () => setSectionSubject(section.id, id))}
      />
      <Button className="mt-2" onClick={close}>
        Done
      </Button>
    </>
  );
}

export function MirrorOfControl({ section }: { section: MirrorSection }) {
  const { editor, state } = useStudy();
  return (
    <Choices
      name={`What ${section.name} mirrors`}
      value={section.of}
      options={state.study.sections.filter(({ id }) => id !== section.id).map(({ id, name }) => [id, name] as const)}
      onTry={(of) => attempt(editor, () => setMirror(section.id, { of }))}
    />
  );
}

export function MirrorByControl({ section }: { section: MirrorSection }) {
  const { editor } = useStudy();
  return (
    <Choices
      name={`How ${section.name} is reversed`}
      value={section.by ?? 'values'}
      options={[
        ['values', 'its values reversed'],
        ['attacks', 'its attacks reversed'],
      ]}
      onTry={(by) => attempt(editor, () => setMirror(section.id, { by }))}
    />
  );
}
