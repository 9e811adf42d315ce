import { type Exact, Fraction, gcd, lcm } from '../exact/fraction';
import { readLengths } from './ladder';

/**
 * The shortest length after which all cycles begin together: the least common multiple of fractions, which is the least
 * common multiple of the numerators over the greatest common divisor of the denominators, in lowest terms.
 * @throws EngineError `invalid_argument`
 * @example alignment([3, 4]) //=> 12
 */
export function alignment(cycles: readonly Exact[]): Fraction {
  const lengths = readLengths(cycles);
  return new Fraction(
    lengths.reduce((n, length) => lcm(n, length.n), 1n),
    lengths.reduce((d, length) => gcd(d, length.d), 0n),
  );
}
