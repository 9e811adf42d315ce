import { EngineError } from '../../errors';

/** An event at a time, in ticks from the start of the track. Lower `order` comes first at one time. */
export type MidiEvent = { readonly at: number; readonly order: number; readonly bytes: readonly number[] };

/** A number as seven bits a byte, the highest first (Standard MIDI Files 1.0, variable-length quantity). */
export function variableLength(value: number): number[] {
  const bytes = [value & 0x7f];
  for (let rest = Math.floor(value / 128); rest > 0; rest = Math.floor(rest / 128)) bytes.unshift((rest & 0x7f) | 0x80);
  return bytes;
}

const LONE_SURROGATE = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g;

/** UTF-8: the standard asks for ASCII and forbids nothing else. The engine has no TextEncoder of its own. */
export function textBytes(text: string): number[] {
  return [...unescapedBytes(encodeURIComponent(text.replace(LONE_SURROGATE, '\uFFFD')))];
}

function* unescapedBytes(encoded: string): Generator<number> {
  for (let index = 0; index < encoded.length; index += 1) {
    if (encoded[index] === '%') {
      yield Number.parseInt(encoded.slice(index + 1, index + 3), 16);
      index += 2;
    } else yield encoded.charCodeAt(index);
  }
}

export const meta = (type: number, data: readonly number[]): number[] => [0xff, type, ...variableLength(data.length), ...data];

const big = (value: number, count: number): number[] => Array.from({ length: count }, (_, n) => Math.floor(value / 256 ** (count - 1 - n)) % 256);
const chunk = (name: string, data: readonly number[]): number[] => [...[...name].map((letter) => letter.charCodeAt(0)), ...big(data.length, 4), ...data];

/** The greatest time that four bytes of seven bits hold. */
const LONGEST = 0x0fffffff;

/** A track: events in order of time, then its end. */
export function trackChunk(events: readonly MidiEvent[], end: number): number[] {
  const data: number[] = [];
  let now = 0;
  const wait = (at: number): void => {
    if (at - now > LONGEST) throw new EngineError('too_large', 'This piece is too long for a MIDI file at the fineness that its lengths need.');
    for (const byte of variableLength(at - now)) data.push(byte);
    now = at;
  };
  for (const { at, bytes } of events.toSorted((a, b) => a.at - b.at || a.order - b.order)) {
    wait(at);
    for (const byte of bytes) data.push(byte);
  }
  wait(Math.max(end, now));
  for (const byte of meta(0x2f, [])) data.push(byte);
  return chunk('MTrk', data);
}

/** Format 1, so many ticks a quarter. */
export const headerChunk = (tracks: number, division: number): number[] => chunk('MThd', [...big(1, 2), ...big(tracks, 2), ...big(division, 2)]);

export const threeBytes = (value: number): number[] => big(value, 3);
