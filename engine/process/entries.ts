import { EngineError } from '../errors';
import { Fraction, ZERO, toFraction } from '../exact/fraction';
import type { Entries } from '../study/schema';

/**
 * When each statement begins, from the section's start.
 * @param lengths - of the statements, in whole notes
 */
export function entryTimes(lengths: readonly Fraction[], entries: Entries): Fraction[] {
  if (entries === 'together') return lengths.map(() => ZERO);
  if (entries === 'ending-together') {
    const longest = lengths.reduce((a, b) => (a.compare(b) < 0 ? b : a), ZERO);
    return lengths.map((length) => longest.sub(length));
  }
  if (entries === 'successive') {
    let at = ZERO;
    return lengths.map((length) => {
      const start = at;
      at = at.add(length);
      return start;
    });
  }
  const every = toFraction(entries.every);
  if (every.compare(ZERO) <= 0) throw new EngineError('invalid_argument', 'The time between entries must be above 0.');
  return lengths.map((_, index) => every.mul(index));
}
