import { EngineError } from '../errors';
import { type Exact, Fraction, ZERO, gcd, lcm, toFraction } from '../exact/fraction';
import { readLengths } from './ladder';

/** A cycle that begins at `entry` and turns without end, or so many times. */
export type EnteringCycle = { readonly length: Exact; readonly entry?: Exact | undefined; readonly repeats?: number | undefined };

export type Meeting = {
  /** the first moment at which a turn of every cycle begins, or ends the last; null where there is none */
  readonly at: Fraction | null;
  /** turns of each by then */
  readonly turns: readonly Fraction[];
  /** how long after that they meet again */
  readonly period: Fraction;
  /** the longest pulse that all lengths and entries are made of */
  readonly pulse: Fraction;
  /** how many ways there are in which they stand to one another, one a pulse */
  readonly states: Fraction;
  /** the first cycle that has ended before the meeting, by number; null where all last so long */
  readonly ended: number | null;
};

/** x with x ≡ a (mod m) and x ≡ b (mod n), as the least that is not negative, and the modulus; null where there is none. */
function congruence([a, m]: readonly [bigint, bigint], [b, n]: readonly [bigint, bigint]): [bigint, bigint] | null {
  // Extended Euclid: m × p + n × q = common.
  let [r0, r1, p0, p1] = [m, n, 1n, 0n];
  while (r1 !== 0n) {
    const quotient = r0 / r1;
    [r0, r1] = [r1, r0 - quotient * r1];
    [p0, p1] = [p1, p0 - quotient * p1];
  }
  const common = r0;
  if ((b - a) % common !== 0n) return null;
  const modulus = (m / common) * n;
  const x = a + m * ((((b - a) / common) * p0) % (n / common));
  return [((x % modulus) + modulus) % modulus, modulus];
}

/**
 * When cycles meet that enter at moments of their own: the first moment at or after the last entry at which a turn of every one
 * begins.
 * @throws EngineError `invalid_argument`, `too_large`, `invalid_fraction`
 * @see the Chinese remainder theorem, for moduli with common divisors
 * @example meetingOf([{ length: 3 }, { length: 4, entry: 1 }]).at //=> 9
 */
export function meetingOf(cycles: readonly EnteringCycle[]): Meeting {
  const lengths = readLengths(cycles.map(({ length }) => length));
  const entries = cycles.map(({ entry }) => (entry === undefined ? ZERO : toFraction(entry)));
  if (entries.some((entry) => entry.compare(ZERO) < 0)) throw new EngineError('invalid_argument', 'A cycle enters at 0 or later.');
  for (const { repeats } of cycles) {
    if (repeats !== undefined && (!Number.isSafeInteger(repeats) || repeats < 1)) throw new EngineError('invalid_argument', 'A cycle turns once at least, and a whole number of times.');
  }
  const all = [...lengths, ...entries];
  const under = all.reduce((common, { d }) => lcm(common, d), 1n);
  const units = (value: Fraction): bigint => (value.n * under) / value.d;
  const pulse = new Fraction(all.reduce((common, value) => gcd(common, units(value)), 0n), under);
  const count = (value: Fraction): bigint => value.div(pulse).n;
  const period = pulse.mul(new Fraction(lengths.reduce((common, length) => lcm(common, count(length)), 1n)));
  const states = period.div(pulse);
  let met: [bigint, bigint] | null = [0n, 1n];
  lengths.forEach((length, index) => {
    if (met !== null) met = congruence(met, [count(entries[index]!) % count(length), count(length)]);
  });
  const found = met as [bigint, bigint] | null;
  if (found === null) return { at: null, turns: [], period, pulse, states, ended: null };
  const latest = entries.reduce((last, entry) => (entry.compare(last) > 0 ? entry : last), ZERO);
  let at = pulse.mul(new Fraction(found[0]));
  // All at 0: they begin together, and the question is when they do so again.
  const isTogether = entries.every((entry) => entry.n === 0n);
  if (isTogether || at.compare(latest) < 0) at = at.add(period.mul(latest.sub(at).div(period).ceil().n > 0n ? latest.sub(at).div(period).ceil() : 1));
  const turns = lengths.map((length, index) => at.sub(entries[index]!).div(length));
  const ended = cycles.findIndex(({ repeats }, index) => repeats !== undefined && turns[index]!.compare(repeats) > 0);
  return { at, turns, period, pulse, states, ended: ended === -1 ? null : ended };
}
