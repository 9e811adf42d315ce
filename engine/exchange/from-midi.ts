import { Fraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { checkSize } from './from-musicxml';
import { channelRhythm } from './midi/channel';
import { measuresBefore, measuresUpTo, metresOf } from './midi/measures';
import { readMidi } from './midi/read-midi';
import { tempoOfMicroseconds } from './midi/tempo';
import { Names } from './names';
import { Odd } from './odd';
import { tooLarge, unreadable } from './refuse';
import { nextStep } from './steps';
import type { Candidate, ReadOptions } from './types';

/**
 * The rhythms of a Standard MIDI File of format 0 or 1: one candidate for each channel that strikes anything in each track.
 * Ticks are exact fractions of a quarter; nothing is quantised. Attacks of one moment are one attack; a note that overlaps the
 * next is cut there; silence between is a rest. The keys of the percussion channel are sounds, numbered from the lowest as General
 * MIDI has them, where there are from 2 to 12; pitches of other channels are left out. `holdToNext` gives lengths to the next attack.
 * @throws EngineError `unreadable_music` with the byte, `too_large`, `too_fine`, `out_of_time`
 */
export async function fromMidi(input: Uint8Array | ArrayBuffer, options: ReadOptions = {}): Promise<Candidate[]> {
  const bytes = input instanceof ArrayBuffer ? new Uint8Array(input) : input;
  checkSize(bytes.length);
  const { tracks, ticksPerQuarter, isCut } = await readMidi(bytes, options);
  const ofFile = new Odd();
  if (isCut) ofFile.note('The file holds fewer tracks than it says: it may be cut off');
  const every = tracks.flatMap(({ events }) => events.filter(({ kind }) => kind === 'tempo' || kind === 'metre'));
  const metres = metresOf(every, ofFile);
  const tempos = every.flatMap((event) => (event.kind === 'tempo' && event.microseconds > 0 ? [event] : [])).sort((a, b) => a.at - b.at);
  const first = tempos.filter(({ at }) => at === 0).at(-1) ?? tempos[0];
  const tempo = tempoOfMicroseconds(first?.microseconds ?? 500_000);
  if (first === undefined) ofFile.note('The file does not say a tempo: 120 quarter notes a minute are meant');
  else if (tempos.some(({ microseconds }) => microseconds !== first.microseconds)) ofFile.note('The tempo changes on the way: the first one was taken');
  if (metres.length > 1) ofFile.note(`The metre changes on the way: ${[...new Set(metres.map(({ metre }) => metre))].slice(0, 6).join(', ')}`);

  const ticksPerWhole = ticksPerQuarter * 4;
  const names = new Names();
  const found: (Candidate & { readonly end: number })[] = [];
  for (const [index, track] of tracks.entries()) {
    const channels = [...new Set(track.events.flatMap((event) => (event.kind === 'on' ? [event.channel] : [])))].sort((a, b) => a - b);
    for (const channel of channels) {
      if (found.length >= LIMITS.candidates) tooLarge(`This MIDI file has more than ${LIMITS.candidates} lines, which is the limit.`);
      const odd = new Odd();
      const read = channelRhythm(track.events, channel, track.end, ticksPerWhole, odd);
      if (read === null) continue;
      const name = track.name || `Track ${index + 1}`;
      found.push({ name: names.unlike(channels.length > 1 ? `${name}, channel ${channel + 1}` : name), metre: metres[0]!.metre, tempo, rhythm: read.rhythm, warnings: [...odd.sentences(), ...ofFile.sentences()], measures: [], end: read.end });
      await nextStep(options);
    }
  }
  if (found.length === 0) unreadable('This MIDI file holds no note.');
  const measures = measuresBefore(measuresUpTo(Math.max(...found.map(({ end }) => end)), metres, ticksPerWhole));
  return found.map(({ end, ...candidate }) => ({ ...candidate, measures: measures(new Fraction(end, ticksPerWhole)) }));
}
