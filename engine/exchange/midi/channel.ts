import { Fraction, ZERO } from '../../exact/fraction';
import { LIMITS } from '../../limits';
import type { Value } from '../../rhythm/types';
import { type Struck, assembleRhythm } from '../assemble';
import type { Odd } from '../odd';
import { byHeight } from './heights';
import type { MidiEvent } from './read-midi';

type Note = { readonly at: number; end: number; keys: number[] };
/** percussion of General MIDI, counted from 0 */
export const PERCUSSION = 9;

/** Notes of one channel, in order of their starts; what is struck at once is one. */
function notesOf(events: readonly MidiEvent[], channel: number, end: number, odd: Odd): Note[] {
  const notes: Note[] = [];
  const sounding = new Map<number, { note: Note }>();
  let isEndless = false;
  for (const event of events) {
    if (event.kind === 'tempo' || event.kind === 'metre' || event.channel !== channel) continue;
    const open = sounding.get(event.key);
    if (open) open.note.end = Math.max(open.note.end, event.at);
    sounding.delete(event.key);
    if (event.kind === 'off') continue;
    const last = notes.at(-1);
    const note = last?.at === event.at ? last : { at: event.at, end: event.at, keys: [] };
    if (note === last) odd.note('Notes struck together count as one attack');
    else notes.push(note);
    note.keys.push(event.key);
    sounding.set(event.key, { note });
  }
  for (const { note } of sounding.values()) {
    isEndless = true;
    note.end = Math.max(note.end, end);
  }
  if (isEndless) odd.note('A note is not ended: it was held to the next attack, or to the end');
  return notes;
}

/** Each lasts until the next at most, and longer than nothing. */
function cutShort(notes: readonly Note[], end: number, odd: Odd): Note[] {
  return notes.map((note, index) => {
    const next = notes[index + 1]?.at ?? Math.max(end, note.at + 1);
    if (note.end > next && index + 1 < notes.length) odd.note('Notes overlap: the earlier one was shortened');
    if (note.end === note.at) odd.note('Notes without a length were held to the next attack');
    return { ...note, end: note.end === note.at ? next : Math.min(note.end, next) };
  });
}

/** Where the line ends: where its track does, unless less than the shortest value that is written is left until there. */
function endOf(notes: readonly Note[], end: number, ticksPerWhole: number): number {
  const last = notes.at(-1)!.end;
  return (end - last) * LIMITS.shortestSymbol < ticksPerWhole ? last : end;
}

/** Whether no note reaches the next attack, as in most files of percussion. */
const areShort = (notes: readonly Note[]): boolean => notes.length > 3 && notes.every(({ end }, index) => index + 1 === notes.length || end < notes[index + 1]!.at);

/**
 * The rhythm of one channel of a track, in exact fractions of a whole note.
 * @returns null where nothing is struck
 * @throws EngineError `too_large`, `too_fine`
 */
export function channelRhythm(events: readonly MidiEvent[], channel: number, trackEnd: number, ticksPerWhole: number, odd: Odd): { rhythm: Value[]; end: number } | null {
  const read = notesOf(events, channel, trackEnd, odd);
  if (read.length === 0) return null;
  const notes = cutShort(read, trackEnd, odd);
  const keys = [...new Set(notes.flatMap((note) => note.keys))].sort(byHeight);
  const hasSounds = channel === PERCUSSION && keys.length > 1 && keys.length <= LIMITS.sounds;
  if (channel !== PERCUSSION && keys.length > 1) odd.note('Pitches were left out');
  if (channel === PERCUSSION && keys.length > LIMITS.sounds) odd.note(`The sounds were left out: the channel has ${keys.length}, and ${LIMITS.sounds} are the limit`);
  if (hasSounds) odd.note(`Its ${keys.length} keys became sounds, numbered from the lowest`);
  if (hasSounds && notes.some((note) => new Set(note.keys).size > 1)) odd.note('Of sounds struck together the lowest was taken');
  if (areShort(notes)) odd.note('Every note ends before the next begins, as files of percussion often have it: each can be held to the next attack instead');
  const end = endOf(notes, trackEnd, ticksPerWhole);
  const place = (tick: number) => (tick === 0 ? ZERO : new Fraction(tick, ticksPerWhole));
  const struck = notes.map((note): Struck => ({ start: place(note.at), end: place(note.end), ...(hasSounds && { sound: note.keys.reduce((lowest, key) => Math.min(lowest, keys.indexOf(key)), keys.length) + 1 }) }));
  return { rhythm: assembleRhythm(struck, place(end)), end };
}
