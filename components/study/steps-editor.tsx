'use client';

import { useState } from 'react';
import { type ProcessSection, formatFraction, stepWords, toFactor, toFraction } from '@/engine';
import { Button, TextButton } from '../ui/button';
import { Refusal } from './choices';

/** A chain of transformations, as a study keeps it. */
export type Steps = NonNullable<ProcessSection['before']>;
type Step = Steps[number];

const KINDS = [
  ['augment', 'stretched so many times'],
  ['diminish', 'shortened so many times'],
  ['values', 'its values reversed'],
  ['attacks', 'its attacks reversed'],
  ['rotate', 'rotated by so many values'],
  ['rotate-attacks', 'rotated by so many attacks'],
  ['add', 'each attack longer by'],
] as const;
type Kind = (typeof KINDS)[number][0];
const TAKES_NUMBER: ReadonlySet<Kind> = new Set(['augment', 'diminish', 'rotate', 'rotate-attacks', 'add']);
const BEGINS: Record<string, string> = { augment: '2', diminish: '2', rotate: '1', 'rotate-attacks': '1', add: '1/8' };

/** @throws EngineError where the number cannot be read */
function readStep(kind: Kind, text: string): Step {
  switch (kind) {
    case 'augment':
    case 'diminish':
      return { kind, factor: formatFraction(toFactor(text)) };
    case 'values':
    case 'attacks':
      return { kind: 'retrograde', by: kind };
    case 'rotate':
    case 'rotate-attacks':
      return { kind: 'rotate', steps: Number(toFraction(text)), by: kind === 'rotate' ? 'values' : 'attacks' };
    case 'add':
      return { kind, amount: formatFraction(toFraction(text)) };
  }
}

/** A chain of transformations: steps are added at its end and taken away. @param props.onTry - null, or why the chain is refused */
export function StepsEditor({ steps, onTry }: { steps: Steps; onTry: (next: Steps) => string | null }) {
  const [kind, setKind] = useState<Kind>('values');
  const [text, setText] = useState('');
  const [error, setError] = useState<string | null>(null);
  const set = (next: Steps) => setError(onTry(next));
  const add = () => {
    try {
      set([...steps, readStep(kind, text || (BEGINS[kind] ?? ''))]);
    } catch (cause) {
      setError((cause as Error).message);
    }
  };
  return (
    <>
      <ol className="list-decimal pl-5">
        {steps.map((step, index) => (
          <li key={index} className="py-0.5">
            {stepWords(step)}{' '}
            <TextButton className="ml-2 text-[14px]" aria-label={`Take step ${index + 1} away`} onClick={() => set(steps.toSpliced(index, 1))}>
              Take away
            </TextButton>
          </li>
        ))}
      </ol>
      <span className="mt-2 flex flex-wrap gap-2">
        <select aria-label="What is done" className="rounded border border-hair bg-paper px-2.5 py-1.5" value={kind} onChange={(event) => setKind(event.target.value as Kind)}>
          {KINDS.map(([value, words]) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </select>
        {TAKES_NUMBER.has(kind) && (
          <input
            aria-label="By how much"
            value={text}
            placeholder={BEGINS[kind]}
            autoComplete="off"
            onChange={(event) => {
              setText(event.target.value);
              setError(null);
            }}
            className="w-20 rounded border border-hair bg-paper px-2.5 py-1.5"
          />
        )}
        <Button className="px-3! py-1.5!" onClick={add}>
          Add a step
        </Button>
      </span>
      <Refusal text={error} />
    </>
  );
}
