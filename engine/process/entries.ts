import { EngineError } from '../errors';
import { Fraction, ZERO, toFraction } from '../exact/fraction';
import type { Entries } from '../study/fields';

export type Span = { readonly start: Fraction; readonly end: Fraction };

/**
 * When each statement begins and ends, from the section's start.
 * @param lengths - of the statements, in whole notes
 */
export function entrySpans(lengths: readonly Fraction[], entries: Entries): Span[] {
  if (entries === 'together') return lengths.map((length) => ({ start: ZERO, end: length }));
  if (entries === 'ending-together') {
    const end = lengths.reduce((a, b) => (a.compare(b) < 0 ? b : a), ZERO);
    return lengths.map((length) => ({ start: end.sub(length), end }));
  }
  if (entries === 'successive') {
    let at = ZERO;
    return lengths.map((length) => {
      const start = at;
      at = at.add(length);
      return { start, end: at };
    });
  }
  const every = toFraction(entries.every);
  if (every.compare(ZERO) <= 0) throw new EngineError('invalid_argument', 'The time between entries must be above 0.');
  return lengths.map((length, index) => {
    const start = every.mul(index);
    return { start, end: start.add(length) };
  });
}
