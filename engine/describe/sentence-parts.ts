import { formatFraction, toFraction } from '../exact/fraction';
import type { Entries } from '../study/fields';
import { parseMetre } from '../rhythm/metre';
import type { Reading } from '../rhythm/types';
import type { ProcessSection, Study } from '../study/schema';
import type { RotateBy } from '../transform/rotate';
import type { Step } from '../transform/steps';
import { inSentence, listWords, measureWords, plural } from './words';

/** What can be typed or chosen for a field of a process. */
export type FieldInput =
  /** a whole number, typed as people count */
  | { readonly kind: 'integer' }
  /** an exact fraction */
  | { readonly kind: 'exact' }
  /** whole numbers with commas between, shown from 1 and kept from 0 */
  | { readonly kind: 'ordinals' }
  /** one of a few */
  | { readonly kind: 'choice'; readonly options: readonly (readonly [value: string, text: string])[] }
  /** what a rotation counts: values, attacks or a pulse */
  | { readonly kind: 'rotate-by' }
  /** instruments in order, the same one as often as wanted */
  | { readonly kind: 'instruments' }
  /** until things align, or a number of times */
  | { readonly kind: 'until' };

/** A field of the process that a word stands for. */
export type FieldControl = {
  readonly kind: 'field';
  readonly field: string;
  /** what the word stands for, for whoever opens it */
  readonly label: string;
  readonly input: FieldInput;
  readonly hint?: string;
};

/** Which part of the document a word of the sentence stands for. */
export type SentenceControl =
  | { readonly kind: 'process' | 'subject' | 'count' | 'entries' | 'factors' | 'reading' | 'rotations' | 'before' | 'mirror-of' | 'mirror-by' }
  | FieldControl
  /** the instrument of this number in the section's list, or of this line */
  | { readonly kind: 'instrument'; readonly index: number; readonly instrument: string };

export type SentencePart = { readonly text: string; readonly control?: SentenceControl };

export const plain = (text: string): SentencePart => ({ text });
export const word = (text: string, kind: Exclude<SentenceControl['kind'], 'instrument' | 'field'>): SentencePart => ({ text, control: { kind } });
export const field = (text: string, name: string, label: string, input: FieldInput, hint?: string): SentencePart => ({
  text,
  control: { kind: 'field', field: name, label, input, ...(hint === undefined ? {} : { hint }) },
});

const READINGS: Record<Reading, string> = {
  forwards: 'forwards',
  'backwards-values': 'backwards by values',
  'backwards-attacks': 'backwards by attacks',
};
export const readingWords = (reading: Reading): string => READINGS[reading];
/** The word for the one reading of a process. */
export const readingPart = (reading: Reading | undefined): SentencePart => word(readingWords(reading ?? 'forwards'), 'reading');

export function entriesWords(entries: Entries, metre: string): string {
  if (entries === 'successive') return 'one after another';
  if (entries === 'together') return 'all beginning together';
  if (entries === 'ending-together') return 'all ending together';
  const every = toFraction(entries.every);
  return every.equals(parseMetre(metre).length) ? 'entering every measure' : `entering every ${measureWords(every, metre)}`;
}

export const instrumentName = (study: Study, id: string): string => inSentence(study.instruments.find((one) => one.id === id)?.name ?? id);

/** Instruments as words, “a, b and c”. @param from - the number of the first in the section's list */
export function instrumentParts(study: Study, ids: readonly string[], from = 0): SentencePart[] {
  const named = ids.map((id, index): SentencePart => ({ text: instrumentName(study, id), control: { kind: 'instrument', index: from + index, instrument: id } }));
  return named.flatMap((part, index) => {
    if (index === 0) return [part];
    return [{ text: index === named.length - 1 ? ' and ' : ', ' }, part];
  });
}

/** Instruments beyond the number of statements do not play: the sentence says so, and keeps them within reach. */
export function playersParts(study: Study, instruments: readonly string[], count: number): SentencePart[] {
  const parts = [plain(', by '), ...instrumentParts(study, instruments.slice(0, count)), plain('.')];
  const waiting = instruments.slice(count);
  if (waiting.length === 0) return parts;
  return [...parts, plain(' Waiting for a statement: '), ...instrumentParts(study, waiting, count), plain('.')];
}

/** What a rotation counts, in words: “value”, “attack”, “pulse of 1/8”. */
export function rotationWords(steps: number, by: RotateBy): string {
  if (typeof by === 'object') return `${plural(steps, 'pulse')} of ${formatFraction(toFraction(by.pulse))}`;
  return plural(steps, by === 'values' ? 'value' : 'attack');
}

export function stepWords(step: Step): string {
  switch (step.kind) {
    case 'augment':
      return `stretched ${formatFraction(toFraction(step.factor))} times`;
    case 'diminish':
      return `shortened ${formatFraction(toFraction(step.factor))} times`;
    case 'add': {
      const amount = toFraction(step.amount);
      return `each attack ${amount.s < 0n ? 'shorter' : 'longer'} by ${formatFraction(amount.abs())}`;
    }
    case 'retrograde':
      return step.by === 'values' ? 'its values reversed' : 'its attacks reversed';
    case 'rotate':
      return `rotated by ${rotationWords(step.steps, step.by)}`;
  }
}

/** The subject of a section, what is done to it first, as the beginning of its sentence. */
export function subjectParts(study: Study, section: ProcessSection): SentencePart[] {
  const subject = study.subjects.find(({ id }) => id === section.subject);
  const named = study.subjects.length < 2 ? plain('The subject') : word(`“${subject?.name ?? section.subject ?? ''}”`, 'subject');
  if (!section.before?.length) return [named];
  return [named, plain(', first '), word(listWords(section.before.map(stepWords)), 'before'), plain(',')];
}
