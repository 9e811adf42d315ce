import { EngineError } from '../errors';
import { LIMITS } from '../limits';
import { Fraction, lcm } from './fraction';

/**
 * A common denominator for many fractions: the hot loops of the engine count in whole ticks of `1/denominator`, as plain
 * integers that are exact up to 2^53.
 */
export type Grid = {
  /** ticks of one whole note */
  readonly denominator: number;
  /** a fraction as ticks; exact */
  ticks(value: Fraction): number;
  /** ticks as a fraction; equal ticks give the same object */
  fraction(ticks: number): Fraction;
};

/** Ticks above this could lose a unit in a plain number. */
const GREATEST = BigInt(LIMITS.commonDenominator);

const tooFine = (): never => {
  throw new EngineError(
    'too_fine',
    'These lengths together are too fine to be counted exactly: their common denominator is too large. Use simpler factors.',
  );
};

/**
 * The coarsest grid on which all the fractions are whole.
 * @param values - fractions, of which only the distinct denominators matter
 * @param longest - the greatest position that will be counted
 * @throws EngineError `too_fine` where positions up to `longest` would pass 2^53
 */
export function gridFor(values: Iterable<Fraction>, longest: Fraction): Grid {
  // Equal lengths are mostly one object: asking for it is cheaper than asking for a big integer.
  const objects = new Set<Fraction>();
  const seen = new Set<bigint>();
  let denominator = 1n;
  for (const value of values) {
    if (objects.has(value)) continue;
    objects.add(value);
    const { d } = value;
    if (seen.has(d)) continue;
    seen.add(d);
    denominator = lcm(denominator, d);
    if (denominator > GREATEST) tooFine();
  }
  if ((denominator * longest.n) / longest.d > GREATEST) tooFine();
  const cache = new Map<number, Fraction>();
  const counted = new Map<Fraction, number>();
  return {
    denominator: Number(denominator),
    ticks(value) {
      let ticks = counted.get(value);
      if (ticks === undefined) {
        ticks = Number((value.s * value.n * denominator) / value.d);
        counted.set(value, ticks);
      }
      return ticks;
    },
    fraction(ticks) {
      let value = cache.get(ticks);
      if (value === undefined) {
        value = new Fraction(BigInt(ticks), denominator);
        cache.set(ticks, value);
      }
      return value;
    },
  };
}
