import { EngineError, Fraction, type Rhythm, type Value, formatRhythm, parseRhythm } from '@/engine';
import { tidyRhythm } from './typed-rhythm';

/** Largest file that is read, in bytes. */
export const MUSIC_FILE_BYTES = 2 * 1024 * 1024;

/** A rhythm that a file holds: one voice of one part, or its text. */
export type Candidate = {
  readonly name: string;
  readonly rhythm: Rhythm;
  /** what was left out, in sentences */
  readonly warnings: readonly string[];
};

/** A file that cannot be read, with a sentence that says why. */
export class MusicFileError extends Error {}

const refuse = (message: string): never => {
  throw new MusicFileError(message);
};

const textOf = (parent: Element, name: string): string | null => [...parent.children].find(({ tagName }) => tagName === name)?.textContent.trim() ?? null;
const childrenOf = (parent: Element, name: string): Element[] => [...parent.children].filter(({ tagName }) => tagName === name);

function wholeNumber(text: string | null, what: string, measure: string): number {
  if (text === null || !/^\d{1,9}$/.test(text)) return refuse(`Measure ${measure}: ${what} is missing or no whole number.`);
  return Number(text);
}

/** One voice as it is read: what has been filled so far, in whole notes. */
type Voice = { values: Value[]; at: Fraction; isTied: boolean };

/** Fills a voice with silence up to a position. */
function restUntil(voice: Voice, position: Fraction): void {
  if (position.compare(voice.at) <= 0) return;
  voice.values.push({ length: position.sub(voice.at), rest: true });
  voice.at = position;
}

function addNote(voice: Voice, start: Fraction, length: Fraction, note: Element): void {
  restUntil(voice, start);
  if (start.compare(voice.at) < 0) refuse('Two notes of one voice sound at once where no chord is written.');
  const rest = childrenOf(note, 'rest').length > 0;
  const ties = childrenOf(note, 'tie').map((tie) => tie.getAttribute('type'));
  const last = voice.values.at(-1);
  if (!rest && ties.includes('stop') && voice.isTied && last && !last.rest) voice.values[voice.values.length - 1] = { ...last, length: last.length.add(length) };
  else voice.values.push({ length, rest });
  voice.isTied = !rest && ties.includes('start');
  voice.at = start.add(length);
}

/** Reads a part: each of its voices, exact, from what its notes last. */
function readPart(part: Element, name: string): Candidate[] {
  const voices = new Map<string, Voice>();
  const warnings = new Set<string>();
  let divisions = 1;
  let at = new Fraction(0);
  for (const measure of childrenOf(part, 'measure')) {
    const number = measure.getAttribute('number') ?? '?';
    let end = at;
    let now = at;
    const lasts = (element: Element) => new Fraction(wholeNumber(textOf(element, 'duration'), 'a duration', number), divisions * 4);
    for (const element of measure.children) {
      if (element.tagName === 'attributes' && textOf(element, 'divisions') !== null) {
        divisions = wholeNumber(textOf(element, 'divisions'), 'the number of divisions', number);
        if (divisions === 0) refuse(`Measure ${number}: the number of divisions is 0.`);
      }
      if (element.tagName === 'backup') now = now.sub(lasts(element));
      if (element.tagName === 'forward') now = now.add(lasts(element));
      if (element.tagName === 'barline' && childrenOf(element, 'repeat').length > 0) warnings.add('Repeats are read once.');
      if (element.tagName === 'note') {
        if (childrenOf(element, 'grace').length > 0) {
          warnings.add('Grace notes were left out.');
          continue;
        }
        if (childrenOf(element, 'chord').length > 0) continue;
        if (childrenOf(element, 'pitch').length > 0) warnings.add('Pitches were left out.');
        const length = lasts(element);
        if (length.n === 0n) continue;
        const id = textOf(element, 'voice') ?? '1';
        const voice: Voice = voices.get(id) ?? { values: [], at: new Fraction(0), isTied: false };
        voices.set(id, voice);
        addNote(voice, now, length, element);
        now = now.add(length);
      }
      if (now.compare(at) < 0) refuse(`Measure ${number} goes back beyond its beginning.`);
      if (now.compare(end) > 0) end = now;
    }
    at = end;
  }
  return [...voices].map(([id, voice]) => {
    restUntil(voice, at);
    return { name: voices.size === 1 ? name : `${name}, voice ${id}`, rhythm: voice.values, warnings: [...warnings] };
  });
}

function readMusicXML(text: string): Candidate[] {
  // Entities could name files of others, or grow without end; no music needs them.
  if (/<!ENTITY/i.test(text)) refuse('This file defines entities of its own, which are not read. Export it again as plain MusicXML.');
  const xml = new DOMParser().parseFromString(text.replace(/<!DOCTYPE[^>[]*(?:\[[^\]]*\])?[^>]*>/i, ''), 'application/xml');
  if (xml.querySelector('parsererror')) refuse('This is no well-formed MusicXML: the file is damaged, or of another kind.');
  const root = xml.documentElement;
  if (root.tagName === 'score-timewise') refuse('This MusicXML is written measure by measure. Export it part by part (score-partwise).');
  if (root.tagName !== 'score-partwise') refuse(`This is XML, but no music that can be read: its root is “${root.tagName.slice(0, 40)}”.`);
  const names = new Map([...root.querySelectorAll('part-list > score-part')].map((part) => [part.getAttribute('id'), textOf(part, 'part-name')]));
  const found = childrenOf(root, 'part').flatMap((part, index) => readPart(part, names.get(part.getAttribute('id')) || `Part ${index + 1}`));
  return found.filter(({ rhythm }) => rhythm.some(({ rest }) => !rest));
}

/**
 * The rhythms of a file: MusicXML, part by part and voice by voice, or rhythm text.
 * @param name - of the file, for its kind
 * @throws MusicFileError with a sentence
 */
export function readMusicFile(name: string, text: string): Candidate[] {
  if (text.length > MUSIC_FILE_BYTES) refuse(`This file is too large: ${MUSIC_FILE_BYTES / 1024 / 1024} MB is the limit.`);
  if (text.trim() === '') refuse('This file is empty.');
  try {
    if (/^\s*</.test(text.replace(/^\ufeff/, ''))) {
      const found = readMusicXML(text.replace(/^\ufeff/, ''));
      if (found.length === 0) refuse('This file holds no attack in any part.');
      for (const { rhythm } of found) parseRhythm(formatRhythm(rhythm));
      return found;
    }
    if (text.startsWith('PK')) refuse('This is a compressed file. Save it uncompressed, as .musicxml or .xml.');
    return [{ name, rhythm: parseRhythm(tidyRhythm(text)), warnings: [] }];
  } catch (error) {
    if (error instanceof EngineError) refuse(`This file holds no rhythm that can be read. ${error.message}`);
    throw error;
  }
}
