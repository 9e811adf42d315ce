import { Fraction, formatFraction } from '../../exact/fraction';
import type { Tempo } from '../../rhythm/tempo';

/** The fraction of the smallest terms between two, both above 0 and included. @see Stern, 1858; Brocot, 1861, from memory */
function simplestBetween(low: Fraction, high: Fraction): Fraction {
  const whole = low.ceil();
  if (whole.compare(high) <= 0) return whole;
  const floor = low.floor();
  return floor.add(simplestBetween(high.sub(floor).inverse(), low.sub(floor).inverse()).inverse());
}

/**
 * Quarters a minute of so many microseconds a quarter. Files hold whole microseconds, so that most tempos are rounded in them:
 * the simplest number that rounds to these is meant.
 * @example tempoOfMicroseconds(714_286) //=> 84 quarters a minute
 */
export function tempoOfMicroseconds(microseconds: number): Tempo {
  const minute = new Fraction(60_000_000);
  const half = new Fraction(1, 2);
  const exact = new Fraction(microseconds);
  return { beat: '1/4', perMinute: formatFraction(simplestBetween(minute.div(exact.add(half)), minute.div(exact.sub(half)))) };
}
