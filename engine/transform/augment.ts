import { EngineError } from '../errors';
import { type Exact, type Fraction, ZERO, formatFraction, toFactor, toFraction } from '../exact/fraction';
import type { Value } from '../rhythm/types';

/** Each distinct length is worked out once. */
function mapLengths<T extends Value>(rhythm: readonly T[], change: (length: Fraction, index: number) => Fraction): T[] {
  const done = new Map<Fraction, Fraction>();
  return rhythm.map((value, index) => {
    let length = done.get(value.length);
    if (length === undefined) {
      length = change(value.length, index);
      done.set(value.length, length);
    }
    return { ...value, length };
  });
}

/**
 * Every value, rests too, times the factor.
 * @param factor - above 0
 * @throws EngineError `invalid_factor`
 * @example augment(parseRhythm('1/4 1/8'), '3/2') //=> 3/8 3/16
 */
export function augment<T extends Value>(rhythm: readonly T[], factor: Exact): T[] {
  const by = toFactor(factor);
  return mapLengths(rhythm, (length) => length.mul(by));
}

/** Every value, rests too, divided by the factor. @throws EngineError `invalid_factor` */
export const diminish = <T extends Value>(rhythm: readonly T[], factor: Exact): T[] => augment(rhythm, toFactor(factor).inverse());

/**
 * Every sounding value longer by `amount`, shorter when it is negative; rests stay.
 * @throws EngineError `invalid_argument` where a value would come to 0 or below
 */
export function addToEach<T extends Value>(rhythm: readonly T[], amount: Exact): T[] {
  const by = toFraction(amount);
  const longer = mapLengths(rhythm.filter((v) => !v.rest), (length, index) => {
    const next = length.add(by);
    if (next.compare(ZERO) <= 0) {
      throw new EngineError(
        'invalid_argument',
        `Attack ${index + 1} lasts ${formatFraction(length)}. Taking ${formatFraction(by.neg())} away would leave nothing of it.`,
      );
    }
    return next;
  });
  let next = 0;
  return rhythm.map((value) => (value.rest ? value : longer[next++]!));
}
