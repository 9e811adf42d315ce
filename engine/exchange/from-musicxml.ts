import { LIMITS } from '../limits';
import { decoded } from './decode-text';
import { ScoreReader } from './musicxml/score';
import { openMxl } from './open-mxl';
import { megabytes, tooLarge, unreadable } from './refuse';
import { readXml } from './read-xml';
import { STEP_BYTES, inSteps, nextStep } from './steps';
import type { Candidate, ReadOptions } from './types';

const beginsWith = (bytes: Uint8Array, text: string): boolean => [...text].every((letter, index) => bytes[index] === letter.charCodeAt(0));
export const isZip = (bytes: Uint8Array): boolean => beginsWith(bytes, 'PK\u0003\u0004') || beginsWith(bytes, 'PK\u0005\u0006');
export const isMidi = (bytes: Uint8Array): boolean => beginsWith(bytes, 'MThd');

/** @throws EngineError `too_large`, `unreadable_music` for nothing at all */
export function checkSize(size: number): void {
  if (size > LIMITS.musicBytes) tooLarge(`This file has ${megabytes(size)}: ${megabytes(LIMITS.musicBytes)} are the limit. Save the part that is needed as a file of its own.`);
  if (size === 0) unreadable('This file is empty.');
}

async function* textInSteps(text: string, options: ReadOptions): AsyncGenerator<string> {
  for (let at = 0; at < text.length; at += STEP_BYTES) {
    yield text.slice(at, at + STEP_BYTES);
    await nextStep(options);
  }
}

/**
 * The rhythms of MusicXML, plain or compressed, one candidate for each voice of each part. Lengths are what `duration` and
 * `divisions` say (1 a quarter where the file says nothing), else what the note is written as. Chords count once, ties are
 * joined, notes of one moment are one attack; what is between attacks is one rest. Grace notes, cues, pitches and what repeats
 * asks for are left out and told. Unpitched notes of several instruments, or at several places of the staff, are numbered
 * sounds from the lowest. Measures stand as long as they are written. Nothing that the file names is fetched.
 * @param input - text, or the bytes of a `.musicxml`, `.xml` or `.mxl` file
 * @param options - pauses between steps, and when to give up
 * @throws EngineError `unreadable_music`, `hostile_file`, `too_large`, `too_fine`, `out_of_time`, with a sentence that says where
 * @see W3C, MusicXML 4.0
 */
export async function fromMusicXML(input: string | Uint8Array | ArrayBuffer, options: ReadOptions = {}): Promise<Candidate[]> {
  const reader = new ScoreReader();
  if (typeof input === 'string') {
    checkSize(input.length);
    await readXml(textInSteps(input, options), reader);
  } else {
    const bytes = input instanceof ArrayBuffer ? new Uint8Array(input) : input;
    checkSize(bytes.length);
    if (isMidi(bytes)) unreadable('This is a MIDI file, not MusicXML.');
    await readXml(decoded(isZip(bytes) ? await openMxl(bytes, options) : inSteps(bytes, options)), reader);
  }
  return reader.candidates(options);
}
