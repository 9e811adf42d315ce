import { type Fraction, formatFraction } from '../exact/fraction';
import type { Metre } from '../rhythm/metre';
import { parseMetre } from '../rhythm/metre';

export type ValueNames = 'american' | 'british';
export type DescribeOptions = { readonly locale?: string; readonly valueNames?: ValueNames };

const VALUES: Record<string, [american: string, british: string]> = {
  '2': ['double whole', 'breve'],
  '1': ['whole', 'semibreve'],
  '1/2': ['half', 'minim'],
  '1/4': ['quarter', 'crotchet'],
  '1/8': ['eighth', 'quaver'],
  '1/16': ['sixteenth', 'semiquaver'],
  '1/32': ['thirty-second', 'demisemiquaver'],
  '1/64': ['sixty-fourth', 'hemidemisemiquaver'],
};

/** The name of a note value, or the fraction where it has none. */
export function valueName(length: Fraction, names: ValueNames = 'american'): string {
  const index = names === 'british' ? 1 : 0;
  const plain = VALUES[formatFraction(length)];
  if (plain) return plain[index];
  const dotted = VALUES[formatFraction(length.mul(2).div(3))];
  return dotted ? `dotted ${dotted[index]}` : `${formatFraction(length)} note`;
}

/** “a, b and c”. */
export function listWords(items: readonly string[]): string {
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
}

export const plural = (n: number, word: string): string => `${n} ${word}${Math.abs(n) === 1 ? '' : 's'}`;

export const times = (n: number): string => (n === 1 ? 'once' : n === 2 ? 'twice' : `${n} times`);

/** A length as measures of a metre, as mixed number: `4`, `2 1/3`. */
export const measureNumber = (length: Fraction, metre: Metre): string => length.div(parseMetre(metre).length).toFraction(true);

/** One measure or a part of one is a measure; none, and more than one, are measures. */
export const measureWord = (count: Fraction): string => (count.n === 0n || count.compare(1) > 0 ? 'measures' : 'measure');

/** “4 measures”, “1/2 measure”. */
export function measureWords(length: Fraction, metre: Metre): string {
  const count = length.div(parseMetre(metre).length);
  return `${count.toFraction(true)} ${measureWord(count)}`;
}

/** An instrument's name as it stands inside a sentence. */
export const inSentence = (name: string): string => name.charAt(0).toLowerCase() + name.slice(1);

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
