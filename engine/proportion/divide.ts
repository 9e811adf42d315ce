import { EngineError } from '../errors';
import { type Exact, Fraction, ZERO, sum, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { readLengths } from './ladder';

/**
 * A whole divided in the ratio of some numbers; the parts add up to it exactly.
 * @throws EngineError `invalid_argument`, `too_large`, `invalid_fraction`
 * @example divide('8', ['1', '2', '5']) //=> 1, 2, 5
 */
export function divide(whole: Exact, ratios: readonly Exact[]): Fraction[] {
  const [length] = readLengths([whole]);
  const shares = readLengths(ratios);
  const all = sum(shares);
  return shares.map((share) => length!.mul(share).div(all));
}

/** The first so many Fibonacci numbers, 1, 1, 2, 3 … @throws EngineError `invalid_argument` */
export function fibonacci(count: number): Fraction[] {
  if (!Number.isInteger(count) || count < 1 || count > 90) throw new EngineError('invalid_argument', 'From 1 to 90 Fibonacci numbers can be taken.');
  const numbers = [1n, 1n];
  while (numbers.length < count) numbers.push(numbers.at(-1)! + numbers.at(-2)!);
  return numbers.slice(0, count).map((number) => new Fraction(number));
}

export type RoundedPart = {
  readonly exact: Fraction;
  /** a whole number of units */
  readonly rounded: Fraction;
  /** rounded less exact */
  readonly error: Fraction;
};

/**
 * Parts rounded to whole units so that their sum stays the sum rounded: each is cut down, and the units that are left go to the
 * parts that lost most, the earlier first where they lost the same (the method of largest remainders).
 * @throws EngineError `invalid_argument`
 */
export function roundParts(parts: readonly Fraction[], unit: Exact): RoundedPart[] {
  const size = toFraction(unit);
  if (size.compare(ZERO) <= 0) throw new EngineError('invalid_argument', 'Parts are rounded to a unit above 0.');
  if (parts.length > LIMITS.lengths) throw new EngineError('too_large', `${LIMITS.lengths} parts are the limit.`);
  const counts = parts.map((part) => part.div(size).floor());
  const lost = parts.map((part, index) => part.div(size).sub(counts[index]!));
  const left = Number(sum(parts).div(size).round().sub(sum(counts)).n);
  const first = [...parts.keys()].sort((a, b) => lost[b]!.compare(lost[a]!) || a - b).slice(0, left);
  return parts.map((exact, index) => {
    const rounded = counts[index]!.add(first.includes(index) ? 1 : 0).mul(size);
    return { exact, rounded, error: rounded.sub(exact) };
  });
}
