import { type Exact, Fraction, gcd, lcm } from '../exact/fraction';
import { alignment } from './alignment';
import { readLengths } from './ladder';

export type Cycles = {
  /** after so long they begin together again */
  readonly meet: Fraction;
  /** how often each has turned by then */
  readonly turns: readonly Fraction[];
  /** the longest pulse that all of them are made of */
  readonly pulse: Fraction;
  /** how many pulses pass, and so how many ways there are in which they stand to one another */
  readonly states: Fraction;
};

/**
 * Cycles that begin together: when they meet again, and what happens until then.
 * @throws EngineError as `alignment`
 * @example cyclesOf(['3/4', '5/8', '1']) // meet after 15, with 20, 24 and 15 turns
 */
export function cyclesOf(lengths: readonly Exact[]): Cycles {
  const cycles = readLengths(lengths);
  const meet = alignment(cycles);
  const under = cycles.reduce((common, { d }) => lcm(common, d), 1n);
  const over = cycles.reduce((common, { n, d }) => gcd(common, (n * under) / d), 0n);
  const pulse = new Fraction(over, under);
  return { meet, turns: cycles.map((length) => meet.div(length)), pulse, states: meet.div(pulse) };
}
