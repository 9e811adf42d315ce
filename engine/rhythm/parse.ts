import { RhythmTextError } from '../errors';
import { type Fraction, lcm } from '../exact/fraction';
import { LIMITS } from '../limits';
import { Bars } from './bars';
import type { Metre } from './metre';
import { type Piece, pieces } from './pieces';
import { quote, readValue, refuse } from './read-value';
import type { Rhythm, Value } from './types';

/** Keeps the common denominator of all lengths small enough for exact counting in whole ticks. */
class CommonDenominator {
  private readonly seen = new Set<bigint>();
  private denominator = 1n;

  add({ d }: Fraction, { offset, text }: Piece): void {
    if (this.seen.has(d)) return;
    this.seen.add(d);
    this.denominator = lcm(this.denominator, d);
    if (this.denominator > BigInt(LIMITS.commonDenominator)) {
      refuse(
        `${quote(text)} has nothing in common with the lengths before it: together they are too fine to be counted exactly. Use simpler lengths.`,
        offset,
        text.length,
        'too_fine',
      );
    }
  }
}

/** How often `]x3` repeats. */
function repeatCount({ text, offset }: Piece): number {
  const times = /^\]\s*[x×](\d+)$/u.exec(text)?.[1];
  if (times === undefined) {
    return refuse('How often? A repeat is closed by ] and a whole number, such as ]x3, and a space.', offset, text.length);
  }
  const count = Number(times);
  if (count < 1 || count > LIMITS.repeatCount) {
    return refuse(`A repeat can be played from 1 to ${LIMITS.repeatCount} times.`, offset, text.length);
  }
  return count;
}

/**
 * Reads rhythm text. White space separates values; a value is a fraction, decimal or integer of whole notes, or a sum for
 * one attack held on (`1/4+1/16`); a rest stands in round brackets; `>` accent, `^` strong accent, `///` roll, `@2` sound
 * number; `[ … ]x3` repeats; `|` is a bar line, and `1/4+|1/4` is held over one.
 * @param options.metre - checks that each bar closed by `|` is full; the last may be short
 * @returns the values; sums are single values, repeats are written out
 * @throws RhythmTextError with `offset` and `length` of the offending piece: `invalid_rhythm`, `bar_not_full`, `too_large`
 *   or `too_fine`; EngineError `invalid_metre`
 * @example parseRhythm('1/4> (1/8) [1/8 1/16+1/16]x2')
 */
export function parseRhythm(text: string, options: { metre?: Metre } = {}): Rhythm {
  if (typeof text !== 'string') throw new RhythmTextError('invalid_rhythm', 'A rhythm is written as text.', 0, 1);
  if (text.length > LIMITS.rhythmTextLength) {
    refuse(`This rhythm has ${text.length} characters. ${LIMITS.rhythmTextLength} are the limit.`, LIMITS.rhythmTextLength, text.length - LIMITS.rhythmTextLength, 'too_large');
  }
  if (text.trim() === '') refuse('The rhythm is empty. Write values such as 1/4 1/8 (1/8) 1/2.', 0, text.length);

  const rhythm: Value[] = [];
  const bars = new Bars(options.metre);
  const common = new CommonDenominator();
  let repeat: { from: number; offset: number } | null = null;

  const room = (more: number, { offset, text: { length } }: Piece) => {
    if (rhythm.length + more > LIMITS.rhythmValues) {
      refuse(`This rhythm would have ${rhythm.length + more} values. ${LIMITS.rhythmValues} are the limit.`, offset, length, 'too_large');
    }
  };

  for (const piece of pieces(text)) {
    if (piece.kind === 'bar') {
      bars.close(piece.offset);
    } else if (piece.kind === 'open') {
      if (repeat) refuse('A repeat inside a repeat cannot be read. Write the inner one out.', piece.offset, 1);
      repeat = { from: rhythm.length, offset: piece.offset };
      bars.openRepeat();
    } else if (piece.kind === 'close') {
      if (!repeat) return refuse('A “]” here closes no repeat. A repeat is written [1/4 1/8]x3.', piece.offset, piece.text.length);
      const count = repeatCount(piece);
      const body = rhythm.slice(repeat.from);
      if (body.length === 0) return refuse('This repeat is empty.', repeat.offset, piece.offset + piece.text.length - repeat.offset);
      room(body.length * (count - 1), piece);
      repeat = null;
      bars.closeRepeat(count);
      for (let time = 1; time < count; time += 1) for (const value of body) rhythm.push(value);
    } else {
      const read = readValue(piece);
      room(1, piece);
      common.add(read.value.length, piece);
      read.parts.forEach((part, index) => {
        const bar = read.bars[index];
        if (typeof bar === 'number') bars.close(bar);
        bars.add(part);
      });
      rhythm.push(read.value);
    }
  }
  if (repeat) refuse('This repeat is not closed. Close it by ] and a number, such as ]x3.', repeat.offset, 1);
  if (rhythm.length === 0) refuse('There are bar lines here, but no values. Write values such as 1/4 1/8 (1/8).', 0, text.length);
  bars.end(text.length - 1);
  return rhythm;
}
