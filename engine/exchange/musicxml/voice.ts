import { type Fraction } from '../../exact/fraction';
import { LIMITS } from '../../limits';
import type { Value } from '../../rhythm/types';
import { type Struck, assembleRhythm } from '../assemble';
import type { Odd } from '../odd';
import type { NoteEvent, NoteKey } from './note';

/** One attack per moment: what is written for the same moment in a voice is struck together. */
function together(events: readonly NoteEvent[], odd: Odd): NoteEvent[] {
  const sorted = [...events].sort((a, b) => a.start.compare(b.start));
  const result: NoteEvent[] = [];
  for (const event of sorted) {
    const last = result.at(-1);
    if (!last?.start.equals(event.start)) {
      result.push(event);
      continue;
    }
    for (const key of event.keys) last.keys.push(key);
    if (event.end.compare(last.end) > 0) last.end = event.end;
    last.isTiedFromBefore &&= event.isTiedFromBefore;
    last.isTiedOn ||= event.isTiedOn;
    last.accent ??= event.accent;
    last.roll ||= event.roll;
    odd.note('Notes of one voice that are struck together count once', event.measure);
  }
  return result;
}

const goesOn = (before: NoteEvent, event: NoteEvent): boolean =>
  before.isTiedOn && before.end.equals(event.start) && event.keys.some(({ id }) => before.keys.some((key) => key.id === id));

/** Joins what is tied; a tie without an end or a beginning is told, and the note stands as it is written. */
function tiesJoined(events: readonly NoteEvent[], odd: Odd): NoteEvent[] {
  const result: NoteEvent[] = [];
  for (const event of events) {
    const last = result.at(-1);
    if (event.isTiedFromBefore && last && goesOn(last, event)) {
      last.end = event.end;
      last.isTiedOn = event.isTiedOn;
      continue;
    }
    if (last?.isTiedOn) odd.note('A tie is begun and not ended: the notes are taken as they are written', last.measure);
    if (event.isTiedFromBefore) odd.note('A tie is ended and was not begun: the note is taken as struck', event.measure);
    result.push({ ...event });
  }
  if (result.at(-1)?.isTiedOn) odd.note('A tie is begun and not ended: the notes are taken as they are written', result.at(-1)!.measure);
  return result;
}

/** Instruments of a part, in the order in which it names them. */
export type Declared = ReadonlyMap<string, { readonly name: string; readonly midi: number }>;

/**
 * Where every note is of one instrument that the part lists with several sounds, under one name, from the lowest: a sound's
 * number is its place in that list, whichever of them the voice uses.
 */
function listedSounds(keys: readonly NoteKey[], declared: Declared): ((key: NoteKey) => number) | null {
  const used = new Map(keys.map((key) => [key.instrument ?? '', key]));
  const names = new Set([...used.keys()].map((id) => declared.get(id)?.name));
  const [name] = names;
  if (names.size !== 1 || !name) return null;
  const list = [...declared].filter(([, one]) => one.name === name).map(([id]) => id);
  if (list.length < 2 || list.length > LIMITS.sounds) return null;
  const places = list.flatMap((id) => used.get(id)?.place ?? []);
  return places.every((place, index) => index === 0 || place > places[index - 1]!) ? ({ instrument }) => list.indexOf(instrument ?? '') + 1 : null;
}

/** Numbers of the sounds that a voice uses, 1 the lowest; null where it uses one, has pitches, or uses too many. */
function soundsOf(events: readonly NoteEvent[], declared: Declared, odd: Odd): ((key: NoteKey) => number) | null {
  const keys = events.flatMap((event) => event.keys);
  if (keys.some(({ isPitched }) => isPitched)) {
    odd.note('Pitches were left out');
    return null;
  }
  const listed = listedSounds(keys, declared);
  if (listed) return keys.some((key) => listed(key) > 1) ? listed : null;
  const byInstrument = new Set(keys.map(({ instrument }) => instrument)).size > 1;
  const nameOf = (key: NoteKey) => (byInstrument ? (key.instrument ?? '') : String(key.place));
  const order = [...declared.keys()];
  const height = ({ place, instrument }: NoteKey): [number, number, number] => [place ?? -1, declared.get(instrument ?? '')?.midi ?? -1, order.indexOf(instrument ?? '')];
  const lowest = new Map<string, [number, number, number]>();
  for (const key of keys) if (!lowest.has(nameOf(key))) lowest.set(nameOf(key), height(key));
  if (lowest.size <= 1) return null;
  if (lowest.size > LIMITS.sounds) {
    odd.note(`The sounds of the instrument were left out: it has ${lowest.size}, and ${LIMITS.sounds} are the limit`);
    return null;
  }
  const ranked = [...lowest].sort(([, a], [, b]) => a[0] - b[0] || a[1] - b[1] || a[2] - b[2]).map(([name]) => name);
  return (key) => ranked.indexOf(nameOf(key)) + 1;
}

/** Ends each attack where the next begins, if it would sound into it. */
function cutShort(events: readonly NoteEvent[], odd: Odd): NoteEvent[] {
  return events.map((event, index) => {
    const next = events[index + 1];
    if (!next || event.end.compare(next.start) <= 0) return event;
    odd.note('A note of the voice begins while another sounds: the earlier one was shortened', next.measure);
    return { ...event, end: next.start };
  });
}

/**
 * The rhythm of one voice.
 * @param total - where the part ends
 * @throws EngineError `too_large`, `too_fine`
 */
export function voiceRhythm(events: readonly NoteEvent[], total: Fraction, declared: Declared, odd: Odd): Value[] {
  const sounding = events.filter(({ isRest }) => !isRest);
  if (sounding.length === 0) {
    odd.note('This line holds rests only');
    // No attack tells which rests belong together: they stay as they are written.
    const written = events.filter(({ start, end }) => end.compare(start) > 0).map(({ start, end }) => ({ length: end.sub(start), rest: true }));
    return written.length > 0 ? written : assembleRhythm([], total);
  }
  const attacks = cutShort(tiesJoined(together(sounding, odd), odd), odd);
  const sound = soundsOf(attacks, declared, odd);
  const struck = attacks.map(({ start, end, accent, roll, keys }): Struck => {
    if (sound === null) return { start, end, accent, roll };
    const numbers = [...new Set(keys.map(sound))].sort((a, b) => a - b);
    if (numbers.length > 1) odd.note('Of sounds struck together the lowest was taken');
    return { start, end, accent, roll, sound: numbers[0]! };
  });
  return assembleRhythm(struck, total);
}
