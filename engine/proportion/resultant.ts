import { EngineError } from '../errors';
import { gcd } from '../exact/fraction';
import { LIMITS } from '../limits';

/** A whole number from 1 to the limit. */
export function readPulses(n: number, name: string): number {
  if (!Number.isSafeInteger(n) || n < 1 || n > LIMITS.pulses) {
    throw new EngineError('invalid_argument', `${name} must be a whole number from 1 to ${LIMITS.pulses}.`);
  }
  return n;
}

/**
 * The gaps between all attacks of a pulse in `a` and one in `b` over their least common multiple, as integers.
 * @throws EngineError `invalid_argument`
 * @see J. Schillinger, The Schillinger System of Musical Composition (1946), Book I: interference of generators
 * @example resultant(3, 2) //=> [2, 1, 1, 2]
 */
export function resultant(a: number, b: number): number[] {
  const first = readPulses(a, 'The first pulse');
  const second = readPulses(b, 'The second pulse');
  const end = (first * second) / Number(gcd(BigInt(first), BigInt(second)));
  const gaps: number[] = [];
  for (let at = 0; at < end; ) {
    const next = Math.min(at - (at % first) + first, at - (at % second) + second);
    gaps.push(next - at);
    at = next;
  }
  return gaps;
}
