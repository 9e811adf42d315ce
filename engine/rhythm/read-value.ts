import { EngineError, type EngineErrorCode, RhythmTextError } from '../errors';
import { Fraction, ZERO, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import type { Piece } from './pieces';
import type { Value } from './types';

/** A value as it was read: its parts lie before and after any bar line that it is held over. */
export type ReadValue = {
  readonly value: Value;
  readonly parts: readonly Fraction[];
  /** for each part, the offset of the bar line that stands before it, or null */
  readonly bars: readonly (number | null)[];
};

export function refuse(message: string, offset: number, length: number, code: EngineErrorCode = 'invalid_rhythm'): never {
  throw new RhythmTextError(code, message, offset, Math.max(length, 1));
}

/** A piece of text in quotation marks, no longer than can be read. */
export const quote = (text: string): string => (text.length > 40 ? `“${text.slice(0, 40)}…”` : `“${text}”`);

const NUMBER = /^(?:\d+(?:\.\d+)?|\.\d+)(?:\/(?:\d+(?:\.\d+)?|\.\d+))?$/;
const MARKS = /^([>^]?)(\/\/\/)?(?:@(\d{1,4}))?$/;
const MINUS = /^[-\u2212]/;

/** Lengths read before: the same few stand in a rhythm over and over. */
const known = new Map<string, Fraction>();

function readLength(text: string, offset: number): Fraction {
  const before = known.get(text);
  if (before) return before;
  if (MINUS.test(text)) {
    return refuse(`${quote(text)} is negative. A value lasts some time; a rest stands in round brackets, such as (1/4).`, offset, text.length);
  }
  if (text.length <= LIMITS.fractionText && !NUMBER.test(text)) {
    return refuse(`${quote(text)} is not a length. Write a fraction of a whole note, such as 1/4.`, offset, text.length);
  }
  try {
    const length = toFraction(text);
    if (length.compare(ZERO) <= 0) return refuse(`${quote(text)} has no length. Every value must be above 0.`, offset, text.length);
    if (known.size > 1_000) known.clear();
    known.set(text, length);
    return length;
  } catch (error) {
    if (error instanceof EngineError && !(error instanceof RhythmTextError)) return refuse(error.message, offset, text.length);
    throw error;
  }
}

const beyond = (length: Fraction): boolean => length.n > BigInt(LIMITS.fractionTerm) || length.d > BigInt(LIMITS.fractionTerm);

/** Reads `1/4+1/16+|1/8`, whose first character stands at `offset`. */
function readSum(text: string, offset: number): { length: Fraction; parts: Fraction[]; bars: (number | null)[] } {
  const parts: Fraction[] = [];
  const bars: (number | null)[] = [];
  let length = ZERO;
  let at = offset;
  for (const [index, joined] of text.split('+').entries()) {
    const lead = /^\s*(\|?)\s*/.exec(joined)!;
    const bar = index > 0 && lead[1] === '|';
    const term = joined.slice(bar ? lead[0].length : 0).trim();
    const from = joined.indexOf(term);
    if (term === '') {
      return index === 0
        ? refuse('A “+” stands between two lengths, such as 1/4+1/16.', at, 1)
        : refuse('A “+” here joins nothing. Write the length that is added after it.', at - 1, 1);
    }
    const part = readLength(term, at + from);
    length = index === 0 ? part : length.add(part);
    if (beyond(length)) {
      return refuse('This sum is too long or too fine to be counted exactly. Use simpler lengths.', offset, text.length, 'too_fine');
    }
    parts.push(part);
    bars.push(bar ? at + joined.indexOf('|') : null);
    at += joined.length + 1;
  }
  return { length, parts, bars };
}

function readRest({ text, offset }: Piece): ReadValue {
  const close = text.indexOf(')');
  if (close < 0) {
    return refuse('This rest is not closed. A rest is one length in round brackets, such as (1/4).', offset, text.length);
  }
  const tail = text.slice(close + 1);
  if (/^[\d.(]/.test(tail)) return refuse(`A space is missing before ${quote(tail)}.`, offset + close + 1, tail.length);
  if (tail !== '') {
    return refuse(`${quote(tail)} follows a rest. A rest carries no accent, roll or sound.`, offset + close + 1, tail.length);
  }
  const body = text.slice(1, close);
  const inside = body.trim();
  const mark = /[>^@]|\/\//.exec(inside);
  if (mark) {
    const from = 1 + body.indexOf(inside) + mark.index;
    return refuse('A rest carries no accent, roll or sound.', offset + from, 1 + inside.length - mark.index - mark[0].length);
  }
  if (inside === '' || /[^\s+|]\s+[^\s+|]/.test(inside) || /^\||[^+\s]\s*\|/.test(inside)) {
    return refuse(`${quote(text)} cannot be read. A rest is one length in round brackets, such as (1/4).`, offset, text.length);
  }
  const { length, parts, bars } = readSum(body, offset + 1);
  return { value: { length, rest: true }, parts, bars };
}

/** Where the length of a sounding value ends and its marks begin. Three strokes are a roll, not a division. */
function endOfLength(text: string): number {
  const end = /^[\d./+|\s]*/.exec(text)![0].length;
  let strokes = end;
  while (strokes > 0 && text[strokes - 1] === '/') strokes -= 1;
  return end - strokes >= 2 ? strokes : end;
}

/**
 * Reads one value or rest.
 * @throws RhythmTextError
 */
export function readValue(piece: Piece): ReadValue {
  const { text, offset } = piece;
  if (text === ')') return refuse('This “)” closes no rest. A rest is one length in round brackets, such as (1/4).', offset, 1);
  if (piece.touches) return refuse(`A space is missing before ${quote(text)}.`, offset, text.length);
  if (piece.kind === 'rest') return readRest(piece);
  if (text === '+') return refuse('A “+” stands between two lengths, such as 1/4+1/16.', offset, 1);
  if (MINUS.test(text)) readLength(text, offset);
  const end = endOfLength(text);
  const body = text.slice(0, end);
  const tail = text.slice(end);
  if (body.trim() === '') {
    return refuse(`${quote(text)} is not a value. Write a fraction of a whole note, such as 1/4.`, offset, text.length);
  }
  const marks = MARKS.exec(tail);
  if (!marks) {
    return refuse(
      `${quote(tail)} cannot be read after a length. The marks are, in this order: > or ^ for an accent, /// for a roll, @2 for the sound.`,
      offset + end,
      tail.length,
    );
  }
  const [, accent, roll, written] = marks;
  const { length, parts, bars } = readSum(body, offset);
  const sound = written === undefined ? undefined : Number(written);
  if (sound !== undefined && (sound < 1 || sound > LIMITS.sounds)) {
    const from = tail.indexOf('@');
    return refuse(
      `${quote(tail.slice(from))} is no sound number. Sounds are numbered from 1, the lowest, to ${LIMITS.sounds}.`,
      offset + end + from,
      tail.length - from,
    );
  }
  return {
    value: {
      length,
      rest: false,
      ...(accent ? { accent: accent === '>' ? ('accent' as const) : ('strong' as const) } : {}),
      ...(roll ? { roll: true as const } : {}),
      ...(sound === undefined ? {} : { sound }),
    },
    parts,
    bars,
  };
}
