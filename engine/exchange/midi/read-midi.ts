import { LIMITS } from '../../limits';
import { shown, tooLarge, unreadable } from '../refuse';
import { STEP_EVENTS, nextStep } from '../steps';
import type { ReadOptions } from '../types';

/** What of a track matters here; times in ticks from its start. */
export type MidiEvent =
  | { readonly kind: 'on' | 'off'; readonly at: number; readonly channel: number; readonly key: number }
  | { readonly kind: 'tempo'; readonly at: number; readonly microseconds: number }
  | { readonly kind: 'metre'; readonly at: number; readonly beats: number; readonly unit: number };
export type MidiTrack = { readonly name: string; readonly events: readonly MidiEvent[]; readonly end: number };
export type MidiFile = { readonly format: number; readonly ticksPerQuarter: number; readonly tracks: readonly MidiTrack[]; readonly isCut: boolean };

/** Reads bytes one after another, and says where they end too soon. */
class Bytes {
  constructor(
    private readonly bytes: Uint8Array,
    public at: number,
    readonly end: number,
    private readonly of: string,
  ) {}

  get isDone(): boolean {
    return this.at >= this.end;
  }

  byte(): number {
    if (this.at >= this.end) return unreadable(`This MIDI file is damaged or cut off: ${this.of} ends at byte ${this.end}, in the middle of an event.`);
    return this.bytes[this.at++]!;
  }

  number(count: number): number {
    let value = 0;
    for (let n = 0; n < count; n += 1) value = value * 256 + this.byte();
    return value;
  }

  /** A number of at most four bytes, seven bits each. */
  variable(): number {
    const from = this.at;
    let value = 0;
    for (let n = 0; n < 4; n += 1) {
      const byte = this.byte();
      value = value * 128 + (byte & 0x7f);
      if (byte < 0x80) return value;
    }
    return unreadable(`This MIDI file is damaged: the number at byte ${from} has no end.`);
  }

  take(count: number): Uint8Array {
    if (this.at + count > this.end) return unreadable(`This MIDI file is damaged or cut off: ${this.of} ends at byte ${this.end}, and an event at byte ${this.at} should go on for ${count} bytes.`);
    this.at += count;
    return this.bytes.subarray(this.at - count, this.at);
  }
}

/** Names are UTF-8 in files of today, and ISO-8859-1 before. */
function textOf(bytes: Uint8Array): string {
  const some = bytes.subarray(0, LIMITS.name * 4);
  try {
    return shown(new TextDecoder('utf-8', { fatal: true }).decode(some), LIMITS.name);
  } catch {
    return shown(String.fromCharCode(...some), LIMITS.name);
  }
}

type Counter = { count: number };

async function readTrack(bytes: Bytes, index: number, counter: Counter, options: ReadOptions): Promise<MidiTrack> {
  const events: MidiEvent[] = [];
  let [at, status, name] = [0, 0, ''];
  while (!bytes.isDone) {
    counter.count += 1;
    if (counter.count > LIMITS.midiEvents) tooLarge(`This MIDI file has more than ${LIMITS.midiEvents} events, which is the limit.`);
    if (counter.count % STEP_EVENTS === 0) await nextStep(options);
    at += bytes.variable();
    const place = bytes.at;
    const first = bytes.byte();
    if (first === 0xff) {
      const type = bytes.byte();
      const data = bytes.take(bytes.variable());
      if (type === 0x2f) break;
      if (type === 0x03 && name === '') name = textOf(data);
      if (type === 0x51 && data.length === 3) events.push({ kind: 'tempo', at, microseconds: data[0]! * 65_536 + data[1]! * 256 + data[2]! });
      if (type === 0x58 && data.length >= 2) events.push({ kind: 'metre', at, beats: data[0]!, unit: 2 ** Math.min(data[1]!, 30) });
    } else if (first === 0xf0 || first === 0xf7) {
      bytes.take(bytes.variable());
    } else if (first >= 0xf0) {
      unreadable(`This MIDI file is damaged: track ${index + 1} holds at byte ${place} what no file may hold.`);
    } else {
      if (first >= 0x80) status = first;
      else bytes.at -= 1;
      if (status === 0) unreadable(`This MIDI file is damaged: track ${index + 1} holds at byte ${place} values of no event.`);
      const [kind, channel] = [status >> 4, status & 0x0f];
      const key = bytes.byte();
      const velocity = kind === 0xc || kind === 0xd ? 0 : bytes.byte();
      if (key > 0x7f || velocity > 0x7f) unreadable(`This MIDI file is damaged: an event of track ${index + 1}, at byte ${place}, is broken off by another.`);
      if (kind === 0x9 || kind === 0x8) events.push({ kind: kind === 0x9 && velocity > 0 ? 'on' : 'off', at, channel, key });
    }
  }
  return { name, events, end: at };
}

/**
 * Reads the bytes of a Standard MIDI File.
 * @throws EngineError `unreadable_music` with the byte, `too_large`, `out_of_time`
 * @see MIDI Manufacturers Association, Standard MIDI Files 1.0
 */
export async function readMidi(bytes: Uint8Array, options: ReadOptions): Promise<MidiFile> {
  const file = new Bytes(bytes, 0, bytes.length, 'the file');
  if (String.fromCharCode(...bytes.subarray(0, 4)) !== 'MThd') unreadable('This is no MIDI file: it does not begin with “MThd”.');
  file.at = 4;
  const size = file.number(4);
  const header = new Bytes(bytes, file.at, Math.min(bytes.length, file.at + size), 'its head');
  const [format, count, division] = [header.number(2), header.number(2), header.number(2)] as [number, number, number];
  if (format > 2) unreadable(`This MIDI file is of format ${format}, which there is not: it is damaged.`);
  if (format === 2) unreadable('This MIDI file is of format 2, whose tracks are pieces apart. Save the one that is needed as format 0 or 1.');
  if (division >= 0x8000) unreadable('This MIDI file counts frames of film, not beats: what it holds cannot be told in note values. Export it again with ticks for each quarter note.');
  if (division === 0) unreadable('This MIDI file is damaged: it divides a quarter note into 0 ticks.');
  const tracks: MidiTrack[] = [];
  const counter = { count: 0 };
  file.at = Math.min(bytes.length, 8 + size);
  while (tracks.length < count && bytes.length - file.at >= 8) {
    const [kind, length] = [String.fromCharCode(...file.take(4)), file.number(4)];
    if (kind !== 'MTrk') {
      // Chunks of other kinds are allowed, and passed over; noise is not.
      if (!/^[A-Za-z0-9 ]{4}$/.test(kind)) unreadable(`This MIDI file is damaged: at byte ${file.at - 8} a track should begin.`);
      file.at = Math.min(bytes.length, file.at + length);
      continue;
    }
    if (tracks.length >= LIMITS.candidates) tooLarge(`This MIDI file has more than ${LIMITS.candidates} tracks, which is the limit.`);
    if (file.at + length > bytes.length) unreadable(`This MIDI file is cut off: track ${tracks.length + 1} should go on to byte ${file.at + length}, and the file ends at ${bytes.length}.`);
    tracks.push(await readTrack(new Bytes(bytes, file.at, file.at + length, `track ${tracks.length + 1}`), tracks.length, counter, options));
    file.at += length;
    await nextStep(options);
  }
  if (tracks.length === 0) unreadable('This MIDI file holds no track.');
  return { format, ticksPerQuarter: division, tracks, isCut: tracks.length < count };
}
