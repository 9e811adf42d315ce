import { EngineError } from '../errors';
import { LIMITS } from '../limits';

/** The whole part of the square root. */
function rootOf(square: bigint): bigint {
  if (square < 2n) return square;
  let root = 1n << BigInt(Math.ceil(square.toString(2).length / 2));
  for (;;) {
    const nearer = (root + square / root) / 2n;
    if (nearer >= root) return root;
    root = nearer;
  }
}

/**
 * The golden section of so many measures, to the nearest whole measure: n × (√5 − 1) / 2, found in whole numbers. So many
 * measures have gone by there; the next begins the shorter part.
 * @throws EngineError `invalid_argument`
 * @see E. Lendvai's tradition of 0.618 of the measures, rounded to the nearest
 * @example goldenSection(89) //=> 55
 */
export function goldenSection(measures: number): number {
  if (!Number.isSafeInteger(measures) || measures < 1 || measures > LIMITS.measures) {
    throw new EngineError('invalid_argument', `The number of measures must be a whole number from 1 to ${LIMITS.measures}.`);
  }
  const n = BigInt(measures);
  return Number((rootOf(5n * n * n) - n + 1n) / 2n);
}
