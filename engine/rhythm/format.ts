import { formatFraction } from '../exact/fraction';
import type { Rhythm, Value } from './types';

function formatValue(value: Value): string {
  const length = formatFraction(value.length);
  if (value.rest) return `(${length})`;
  const accent = value.accent === 'accent' ? '>' : value.accent === 'strong' ? '^' : '';
  return `${length}${accent}${value.roll ? '///' : ''}${value.sound === undefined ? '' : `@${value.sound}`}`;
}

/**
 * Canonical rhythm text: lowest terms, sums and repeats written out, single spaces, no bar lines, marks kept.
 * @example formatRhythm(parseRhythm('2/8 [(1/8)]x2')) //=> '1/4 (1/8) (1/8)'
 */
export const formatRhythm = (rhythm: Rhythm): string => rhythm.map(formatValue).join(' ');
