import { EngineError, type EngineErrorCode, RhythmTextError } from '../errors';
import { Fraction, ZERO, formatFraction, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { type Metre, parseMetre } from './metre';
import type { Rhythm, Value } from './types';

const refuse = (message: string, offset: number, length: number, code: EngineErrorCode = 'invalid_rhythm'): never => {
  throw new RhythmTextError(code, message, offset, Math.max(length, 1));
};

/** One value, repeat bracket or bar line, with its place in the text. */
type Piece = { kind: 'value' | 'open' | 'close' | 'bar'; text: string; offset: number };

const NUMBER = /^(?:\d+(?:\.\d+)?|\.\d+)(?:\/(?:\d+(?:\.\d+)?|\.\d+))?/;
const SUM = String.raw`[\d./]+(?:\s*\+\s*\|?\s*[\d./]+)*`;
/** A piece runs to white space or a bracket; `+`, also with a bar line after it, joins what follows to the same value. */
const PIECE = new RegExp(String.raw`\(\s*${SUM}\s*\)[^\s|\[\]]*|[^\s|\[\]()+]+(?:\s*\+\s*\|?\s*[^\s|\[\]()+]+)*\+?|\(|\)|\+`, 'y');

function* pieces(text: string): Generator<Piece> {
  let at = 0;
  while (at < text.length) {
    const char = text[at]!;
    if (/\s/.test(char)) {
      at += 1;
    } else if (char === '|') {
      yield { kind: 'bar', text: char, offset: at };
      at += 1;
    } else if (char === '[') {
      yield { kind: 'open', text: char, offset: at };
      at += 1;
    } else if (char === ']') {
      const close = /^\]\s*[x×]\s*\d+/u.exec(text.slice(at, at + 24))?.[0] ?? ']';
      yield { kind: 'close', text: close, offset: at };
      at += close.length;
    } else {
      PIECE.lastIndex = at;
      const piece = PIECE.exec(text)?.[0] ?? char;
      yield { kind: 'value', text: piece, offset: at };
      at += piece.length;
    }
  }
}

/** A value as it was read: its parts lie before and after any bar line that it is held over. */
type Read = { value: Value; parts: Fraction[]; bars: boolean[]; offset: number; length: number };

/** Lengths read before: the same few stand in a rhythm over and over. */
const known = new Map<string, Fraction>();

function readLength(text: string, offset: number): Fraction {
  const before = known.get(text);
  if (before) return before;
  if (NUMBER.exec(text)?.[0] !== text) {
    return refuse(`“${text}” is not a length. Write a fraction of a whole note, such as 1/4.`, offset, text.length);
  }
  try {
    const length = toFraction(text);
    if (length.compare(ZERO) <= 0) return refuse(`“${text}” has no length. Every value must be above 0.`, offset, text.length);
    if (known.size > 1_000) known.clear();
    known.set(text, length);
    return length;
  } catch (error) {
    if (error instanceof EngineError && !(error instanceof RhythmTextError)) return refuse(error.message, offset, text.length);
    throw error;
  }
}

function readSum(text: string, offset: number): { parts: Fraction[]; bars: boolean[] } {
  const parts: Fraction[] = [];
  const bars: boolean[] = [];
  let at = 0;
  for (const [index, joined] of text.split('+').entries()) {
    const bar = index > 0 && /^\s*\|/.test(joined);
    const body = bar ? joined.replace('|', ' ') : joined;
    const term = body.trim();
    const lead = body.length - body.trimStart().length;
    if (term === '') return refuse('A “+” here joins nothing. Write the length that is added after it.', offset + at, joined.length);
    parts.push(readLength(term, offset + at + lead));
    bars.push(bar);
    at += joined.length + 1;
  }
  return { parts, bars };
}

const total = ([first = ZERO, ...more]: Fraction[]): Fraction => more.reduce((a, b) => a.add(b), first);

function readValue({ text, offset }: Piece): Read {
  if (text.startsWith('-') || text.startsWith('\u2212')) {
    return refuse(`“${text}” is negative. A value lasts some time; a rest stands in round brackets, such as (1/4).`, offset, text.length);
  }
  if (text === '(' || text === ')' || text === '+') {
    const hint = text === '+' ? 'A “+” stands between two lengths.' : 'A rest is one length in round brackets, such as (1/4).';
    return refuse(`“${text}” stands alone. ${hint}`, offset, 1);
  }
  if (text.startsWith('(')) {
    const close = text.indexOf(')');
    if (close < text.length - 1) {
      return refuse(`“${text.slice(close + 1)}” follows a rest. A rest carries no accent, roll or sound.`, offset + close + 1, text.length - close - 1);
    }
    const sumOf = readSum(text.slice(1, close), offset + 1);
    return { value: { length: total(sumOf.parts), rest: true }, ...sumOf, offset, length: text.length };
  }
  const split = /^([\d./+|\s]*)(.*)$/su.exec(text)!;
  const marks = split[2]!;
  // A third slash row is a roll, not a division: take the roll away before the length is read.
  let body = split[1]!;
  let tail = marks;
  const slashes = /\/\/+$/.exec(body);
  if (slashes) {
    body = body.slice(0, slashes.index);
    tail = slashes[0] + marks;
  }
  const read = /^([>^]?)(\/\/\/)?(?:@(\d{1,4}))?$/.exec(tail);
  if (body.trim() === '') return refuse(`“${text}” is not a value. Write a fraction of a whole note, such as 1/4.`, offset, text.length);
  if (!read) {
    return refuse(
      `“${tail}” cannot be read after a length. The marks are, in this order: > or ^ for an accent, /// for a roll, @2 for the sound.`,
      offset + body.length,
      tail.length,
    );
  }
  const sumOf = readSum(body, offset);
  const [, accent, roll, sound] = read;
  const number = sound === undefined ? undefined : Number(sound);
  if (number !== undefined && (number < 1 || number > LIMITS.sounds)) {
    return refuse(`“@${sound}” is no sound number. Sounds are numbered from 1, the lowest, to ${LIMITS.sounds}.`, offset + body.length, tail.length);
  }
  return {
    value: {
      length: total(sumOf.parts),
      rest: false,
      ...(accent ? { accent: accent === '>' ? ('accent' as const) : ('strong' as const) } : {}),
      ...(roll ? { roll: true as const } : {}),
      ...(number === undefined ? {} : { sound: number }),
    },
    ...sumOf,
    offset,
    length: text.length,
  };
}

/** Checks each `|` against the metre as values go by. */
class Bars {
  private filled = ZERO;
  private number = 1;
  constructor(private readonly metre: Metre | undefined) {}

  add(length: Fraction): void {
    if (this.metre !== undefined) this.filled = this.filled.add(length);
  }

  close(offset: number): void {
    if (this.metre === undefined) return;
    const full = parseMetre(this.metre).length;
    if (!this.filled.equals(full)) {
      const word = this.filled.compare(full) < 0 ? 'short' : 'long';
      const by = this.filled.sub(full).abs();
      refuse(
        `Measure ${this.number} lasts ${formatFraction(this.filled)}; in ${this.metre} it should last ${formatFraction(full)}. It is ${formatFraction(by)} too ${word}.`,
        offset,
        1,
        'bar_not_full',
      );
    }
    this.filled = ZERO;
    this.number += 1;
  }

  /** The last bar may be short, never long. */
  end(offset: number): void {
    if (this.metre !== undefined && this.number > 1 && this.filled.compare(parseMetre(this.metre).length) > 0) this.close(offset);
  }
}

/**
 * Reads rhythm text. White space separates values; a value is a fraction, decimal or integer of whole notes, or a sum for
 * one attack held on (`1/4+1/16`); a rest stands in round brackets; `>` accent, `^` strong accent, `///` roll, `@2` sound
 * number; `[ … ]x3` repeats; `|` is a bar line, and `1/4+|1/4` is held over one.
 * @param options.metre - checks that each bar closed by `|` is full; the last may be short
 * @returns the values; sums are single values, repeats are written out
 * @throws RhythmTextError with `offset` and `length` of the offending piece
 * @example parseRhythm('1/4> (1/8) [1/8 1/16+1/16]x2')
 */
export function parseRhythm(text: string, options: { metre?: Metre } = {}): Rhythm {
  if (typeof text !== 'string') throw new RhythmTextError('invalid_rhythm', 'A rhythm is written as text.', 0, 1);
  if (text.trim() === '') refuse('The rhythm is empty. Write values such as 1/4 1/8 (1/8) 1/2.', 0, text.length);
  if (text.length > LIMITS.rhythmTextLength) {
    refuse(`This rhythm has ${text.length} characters. ${LIMITS.rhythmTextLength} are the limit.`, LIMITS.rhythmTextLength, 1, 'too_large');
  }
  if (options.metre !== undefined) parseMetre(options.metre);

  const rhythm: Value[] = [];
  const bars = new Bars(options.metre);
  let repeat: { from: number; offset: number; checks: (() => void)[] } | null = null;

  const room = (more: number, offset: number, length: number) => {
    if (rhythm.length + more > LIMITS.rhythmValues) {
      refuse(`This rhythm would have ${rhythm.length + more} values. ${LIMITS.rhythmValues} are the limit.`, offset, length, 'too_large');
    }
  };
  /** Bars inside a repeat are checked each time round, for they may fall differently. */
  const check = (step: () => void) => {
    step();
    repeat?.checks.push(step);
  };

  for (const piece of pieces(text)) {
    if (piece.kind === 'bar') {
      check(() => bars.close(piece.offset));
    } else if (piece.kind === 'open') {
      if (repeat) refuse('A repeat inside a repeat cannot be read. Write the inner one out.', piece.offset, 1);
      repeat = { from: rhythm.length, offset: piece.offset, checks: [] };
    } else if (piece.kind === 'close') {
      if (!repeat) return refuse('A “]” here closes no repeat. A repeat is written [1/4 1/8]x3.', piece.offset, 1);
      const { from, checks } = repeat;
      const count = Number(/\d+$/.exec(piece.text)?.[0] ?? NaN);
      if (Number.isNaN(count)) return refuse('How often? A repeat is closed by ] and a number, such as ]x3.', piece.offset, 1);
      if (count < 1 || count > LIMITS.repeatCount) {
        return refuse(`A repeat can be played from 1 to ${LIMITS.repeatCount} times.`, piece.offset, piece.text.length);
      }
      const body = rhythm.slice(from);
      if (body.length === 0) return refuse('This repeat is empty.', repeat.offset, piece.offset + piece.text.length - repeat.offset);
      repeat = null;
      room(body.length * (count - 1), piece.offset, piece.text.length);
      for (let time = 1; time < count; time += 1) {
        for (const step of checks) step();
        for (const value of body) rhythm.push(value);
      }
    } else {
      const read = readValue(piece);
      room(1, piece.offset, piece.text.length);
      read.parts.forEach((part, index) => {
        if (read.bars[index]) check(() => bars.close(piece.offset));
        check(() => bars.add(part));
      });
      rhythm.push(read.value);
    }
  }
  if (repeat !== null) refuse('This repeat is not closed. Close it by ] and a number, such as ]x3.', (repeat as { offset: number }).offset, 1);
  if (rhythm.length === 0) refuse('There are bar lines here, but no values. Write values such as 1/4 1/8 (1/8).', 0, text.length);
  bars.end(text.length - 1);
  return rhythm;
}
