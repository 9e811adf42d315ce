import { formatFraction, toFraction } from '../exact/fraction';
import { proportionFactors } from '../process/proportion';
import { parseMetre } from '../rhythm/metre';
import type { Reading } from '../rhythm/types';
import type { Entries, FreeSection, MirrorSection, ProcessSection, ProportionProcess, Section, Study } from '../study/schema';
import type { Step } from '../transform/steps';
import { metreOf } from '../views/measures';
import { inSentence, listWords, measureWords, plural, times } from './words';

/** Which part of the document a word of the sentence stands for. */
export type SentenceControl =
  | { readonly kind: 'subject' | 'count' | 'entries' | 'factors' | 'reading' | 'rotations' | 'before' | 'mirror-of' | 'mirror-by' }
  /** the instrument of this number in the section's list, or of this line */
  | { readonly kind: 'instrument'; readonly index: number; readonly instrument: string };

export type SentencePart = { readonly text: string; readonly control?: SentenceControl };

const word = (text: string, kind: Exclude<SentenceControl['kind'], 'instrument'>): SentencePart => ({ text, control: { kind } });

const READINGS: Record<Reading, string> = {
  forwards: 'forwards',
  'backwards-values': 'backwards by values',
  'backwards-attacks': 'backwards by attacks',
};

export const readingWords = (reading: Reading): string => READINGS[reading];

function entriesWords(entries: Entries, metre: string): string {
  if (entries === 'successive') return 'one after another';
  if (entries === 'together') return 'all beginning together';
  if (entries === 'ending-together') return 'all ending together';
  const every = toFraction(entries.every);
  return every.equals(parseMetre(metre).length) ? 'entering every measure' : `entering every ${measureWords(every, metre)}`;
}

function instrumentParts(study: Study, ids: readonly string[]): SentencePart[] {
  const named = ids.map((id, index): SentencePart => {
    const name = study.instruments.find((one) => one.id === id)?.name ?? id;
    return { text: inSentence(name), control: { kind: 'instrument', index, instrument: id } };
  });
  return named.flatMap((part, index) => {
    if (index === 0) return [part];
    return [{ text: index === named.length - 1 ? ' and ' : ', ' }, part];
  });
}

function stepWords(step: Step): string {
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
      return typeof step.by === 'object'
        ? `rotated by ${plural(step.steps, 'pulse')} of ${formatFraction(toFraction(step.by.pulse))}`
        : `rotated by ${plural(step.steps, step.by === 'values' ? 'value' : 'attack')}`;
  }
}

function factorParts(process: ProportionProcess): SentencePart[] {
  const factors = proportionFactors(process).map(formatFraction);
  if (process.factors === undefined && factors.length > 1) {
    const ratio = formatFraction(toFraction(process.ratio ?? '1'));
    return [{ text: ', each ' }, word(ratio, 'factors'), { text: ' times as long as the one before, ' }];
  }
  return [{ text: ', at ' }, word(factors.join(', '), 'factors'), { text: factors.join() === '1' ? ' time its length, ' : ' times its length, ' }];
}

function readingPart(process: ProportionProcess, count: number): SentencePart {
  const readings = (process.readings ?? [process.reading ?? 'forwards']).slice(0, count);
  const distinct = readings.every((reading) => reading === readings[0]) ? readings.slice(0, 1) : readings;
  const words = listWords(distinct.map(readingWords));
  return word(distinct.length > 1 ? `${words} in turn` : words, 'reading');
}

function subjectPart(study: Study, section: ProcessSection): SentencePart {
  if (study.subjects.length < 2) return { text: 'The subject' };
  const subject = study.subjects.find(({ id }) => id === section.subject);
  return word(`“${subject?.name ?? section.subject ?? ''}”`, 'subject');
}

/** Instruments beyond the number of statements do not play: the sentence says so, and keeps them within reach. */
function waitingParts(study: Study, section: ProcessSection, count: number): SentencePart[] {
  const waiting = section.instruments.slice(count);
  if (waiting.length === 0) return [];
  const parts = instrumentParts(study, waiting).map(
    ({ text, control }): SentencePart => (control?.kind === 'instrument' ? { text, control: { ...control, index: control.index + count } } : { text }),
  );
  return [{ text: ' Waiting for a statement: ' }, ...parts, { text: '.' }];
}

function processParts(study: Study, section: ProcessSection): SentencePart[] {
  const { process } = section;
  if (process.kind !== 'proportion') return [{ text: `The process “${process.kind}” cannot be described yet.` }];
  const count = proportionFactors(process).length;
  const parts: SentencePart[] = [subjectPart(study, section)];
  if (section.before?.length) {
    parts.push({ text: ', first ' }, word(listWords(section.before.map(stepWords)), 'before'), { text: ',' });
  }
  parts.push({ text: ' is stated ' }, word(times(count), 'count'));
  if (count > 1) parts.push({ text: ', ' }, word(entriesWords(process.entries ?? 'successive', metreOf(study, section)), 'entries'));
  parts.push(...factorParts(process), readingPart(process, count));
  const turns = process.rotations?.slice(0, count) ?? [];
  if (turns.some((turn) => turn !== 0)) {
    parts.push({ text: ', rotated by ' }, word(turns.join(', '), 'rotations'), { text: turns.join() === '1' ? ' value' : ' values' });
  }
  const playing = instrumentParts(study, section.instruments.slice(0, count));
  return [...parts, { text: ', by ' }, ...playing, { text: '.' }, ...waitingParts(study, section, count)];
}

function freeParts(study: Study, section: FreeSection): SentencePart[] {
  if (section.lines.length === 0) return [{ text: 'No subject here, and nothing is played yet.' }];
  const ids = section.lines.map(({ instrument }) => instrument);
  return [{ text: 'No subject here: ' }, ...instrumentParts(study, ids), { text: ids.length === 1 ? ' alone.' : ' together.' }];
}

function mirrorParts(study: Study, section: MirrorSection): SentencePart[] {
  const of = study.sections.find(({ id }) => id === section.of)?.name ?? section.of;
  return [
    word(`“${of}”`, 'mirror-of'),
    { text: ' is played from its end, ' },
    word(section.by === 'attacks' ? 'its attacks reversed' : 'its values reversed', 'mirror-by'),
    { text: '.' },
  ];
}

/** The process sentence of a section, in parts: those with a `control` can be changed. */
export function sectionSentence(study: Study, section: Section): SentencePart[] {
  const main =
    section.kind === 'process' ? processParts(study, section) : section.kind === 'free' ? freeParts(study, section) : mirrorParts(study, section);
  const under = section.under ?? [];
  if (under.length === 0) return main;
  const ids = under.map(({ instrument }) => instrument);
  const parts = instrumentParts(study, ids).map(({ text }) => ({ text }));
  return [...main, { text: ' Under it: ' }, ...parts, { text: '.' }];
}
