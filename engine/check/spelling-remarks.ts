import { EngineError } from '../errors';
import { formatFraction, sum, toFraction } from '../exact/fraction';
import { spellLine } from '../notation/spell-line';
import { type Metre } from '../rhythm/metre';
import type { Value } from '../rhythm/types';
import { heard } from './heard';

/** Something about how an answer is spelled; it costs no marks. */
export type SpellingRemark = {
  /** the value of the answer, counted from 0, side by side rests taken together */
  readonly value: number;
  readonly message: string;
};

/** A value of the answer as it is written: `1/4+1/8` in two parts, rests side by side in as many. */
type WrittenValue = { readonly value: Value; readonly parts: readonly string[] };

/** The values of a rhythm text with their parts; null for a text with repeats, whose parts stand for several values. */
function writtenValues(text: string): WrittenValue[] | null {
  if (/[[\]]/.test(text)) return null;
  const values: { value: Value; parts: string[] }[] = [];
  // A sum is held over a bar line: 1/4+|1/4.
  for (const piece of text.replaceAll(/\+\s*\|\s*/g, '+').replaceAll('|', ' ').split(/\s+/).filter((one) => one !== '')) {
    const rest = piece.startsWith('(');
    const parts = piece.replaceAll(/[()]|[>^@/]{1,3}$|\/\/\/|[>^]|@\d+/g, '').split('+');
    const length = sum(parts.map((part) => toFraction(part)));
    const last = values.at(-1);
    if (rest && last?.value.rest) values[values.length - 1] = { value: { length: last.value.length.add(length), rest }, parts: [...last.parts, ...parts] };
    else values.push({ value: { length, rest }, parts });
  }
  return values;
}

/**
 * Where an answer is written with more symbols than it needs at that place: ties for what one value writes, rests that one rest
 * writes. Told apart from the marks, which judge time.
 * @param answer - rhythm text that can be read
 */
export function spellingRemarks(answer: string, metre: Metre): SpellingRemark[] {
  const written = writtenValues(answer);
  if (written === null) return [];
  try {
    const values = heard(written.map(({ value }) => value));
    const needed = new Map<number, number>();
    for (const { symbols } of spellLine(values, metre)) for (const { value } of symbols) if (value !== null) needed.set(value, (needed.get(value) ?? 0) + 1);
    return written.flatMap(({ value: { length, rest }, parts }, index): SpellingRemark[] => {
      const fewest = needed.get(index) ?? parts.length;
      if (parts.length <= fewest) return [];
      const what = rest ? `Value ${index + 1}, a silence of ${formatFraction(length)}, is written in ${parts.length} rests` : `Value ${index + 1}, of ${formatFraction(length)}, is tied together from ${parts.length} parts`;
      return [{ value: index, message: `${what}; here ${fewest === 1 ? 'one does' : `${fewest} do`}.` }];
    });
  } catch (error) {
    // What cannot be spelled in this metre has no better spelling to compare with.
    if (error instanceof EngineError) return [];
    throw error;
  }
}
