import { type Candidate, EngineError, Fraction, LIMITS, formatRhythm, parseRhythm, totalLength } from '@/engine';
import { tidyRhythm } from './typed-rhythm';

/** Kinds of files that are read, for a file dialogue. */
export const MUSIC_TYPES = '.musicxml,.xml,.mxl,.mid,.midi,.txt,text/plain,application/xml,audio/midi';

/** A file that cannot be read, with a sentence that says why. */
export class MusicFileError extends Error {}

const refuse = (message: string): never => {
  throw new MusicFileError(message);
};

/** How long the page may wait while a file is read, in milliseconds. */
const SLICE = 12;

/** Lets the page draw and answer between steps. */
function turnTaking(): () => Promise<void> | undefined {
  let begun = performance.now();
  return () => {
    if (performance.now() - begun < SLICE) return undefined;
    return new Promise((resolve) =>
      setTimeout(() => {
        begun = performance.now();
        resolve();
      }),
    );
  };
}

function readText(name: string, bytes: Uint8Array): Candidate {
  let text = '';
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    refuse('This is no file of music that can be read. Choose MusicXML (.musicxml, .xml, .mxl), MIDI (.mid) or a file of rhythm text.');
  }
  const rhythm = parseRhythm(tidyRhythm(text));
  return { name, metre: '4/4', tempo: { beat: '1/4', perMinute: '120' }, rhythm, warnings: [], measures: [{ number: '1', start: new Fraction(0), length: totalLength(rhythm), metre: '4/4' }] };
}

/** MusicXML in any encoding, a compressed file or MIDI, by the first bytes. */
function isMusic(bytes: Uint8Array): boolean {
  const start = String.fromCharCode(...bytes.subarray(0, 64)).replace(/^(?:\xef\xbb\xbf|\xff\xfe|\xfe\xff)|\0/g, '').trimStart();
  return /^(?:<|MThd|PK)/.test(start);
}

async function read(name: string, bytes: Uint8Array, signal: AbortSignal | undefined): Promise<Candidate[]> {
  if (bytes.length > LIMITS.musicBytes) refuse(`This file is too large: ${LIMITS.musicBytes / 1024 / 1024} MB is the limit.`);
  if (!isMusic(bytes)) return bytes.every((byte) => byte <= 32) ? refuse('This file is empty.') : [readText(name, bytes)];
  // The readers of files are fetched where a file is read.
  const { readMusic } = await import('@/engine/exchange/read-music').catch(() => refuse('What reads files could not be fetched. Check the connection and try again.'));
  const found = (await readMusic(bytes, { pause: turnTaking(), isExpired: () => signal?.aborted ?? false })).filter(({ rhythm }) => rhythm.some(({ rest }) => !rest));
  if (found.length === 0) refuse('This file holds no attack in any part.');
  for (const { rhythm } of found) parseRhythm(formatRhythm(rhythm));
  return found;
}

/**
 * The lines of a file that strike anything: MusicXML, plain or compressed, MIDI, or rhythm text.
 * @param name - of the file, for a line that has no other name
 * @param signal - aborting it ends the reading
 * @throws MusicFileError with a sentence; what the signal gives where it was aborted
 */
export async function readMusicFile(name: string, bytes: Uint8Array, signal?: AbortSignal): Promise<Candidate[]> {
  try {
    return await read(name, bytes, signal);
  } catch (error) {
    signal?.throwIfAborted();
    if (error instanceof EngineError) refuse(/^(?:invalid_rhythm|bar_not_full)$/.test(error.code) ? `This file holds no rhythm that can be read. ${error.message}` : error.message);
    throw error;
  }
}
