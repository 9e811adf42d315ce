import { EngineError } from '../errors';
import { type Exact, type Fraction, ZERO, formatFraction, toFraction } from '../exact/fraction';
import { ladder } from './ladder';

/** Whether a run of lengths grows by one ratio, as somebody claims. */
export type LadderClaim = {
  readonly holds: boolean;
  /** the first step that does not: the length of this number is not `ratio` times the one before it */
  readonly failure?: { readonly step: number; readonly ratio: Fraction; readonly expected: Fraction; readonly given: Fraction };
  /** the run from the same first length that would satisfy the claim */
  readonly run: readonly Fraction[];
};

/**
 * Checks a claim such as “each half as long again” against actual lengths.
 * @param ratio - of each length to the one before, above 0
 * @returns steps counted from 0, as `ladder` gives them
 * @throws EngineError `invalid_argument` as `ladder`; `invalid_fraction`
 * @example checkLadder(['4', '6', '8', '12'], '150%').failure //=> step 1: 4/3, expected 9, given 8
 */
export function checkLadder(lengths: readonly Exact[], ratio: Exact): LadderClaim {
  const { steps } = ladder(lengths);
  const claimed = toFraction(ratio);
  if (claimed.compare(ZERO) <= 0) throw new EngineError('invalid_argument', 'The ratio of a claim must be above 0.');
  const given = lengths.map((length) => toFraction(length));
  const run: Fraction[] = [];
  for (const [index, first] of given.entries()) run.push(index === 0 ? first : run[index - 1]!.mul(claimed));
  const step = steps.findIndex((one) => !one.equals(claimed));
  if (step === -1) return { holds: true, run };
  return { holds: false, failure: { step, ratio: steps[step]!, expected: given[step]!.mul(claimed), given: given[step + 1]! }, run };
}

/** A claim that fails, in words; counting is from 1 there. */
export function claimWords({ failure, run }: LadderClaim): string {
  if (failure === undefined) return 'The claim holds: every step is the same.';
  const { step, ratio, expected, given } = failure;
  return `The claim fails at step ${step + 1}: length ${step + 2} is ${given.toFraction(true)}, ${formatFraction(ratio)} of the one before it; it would be ${expected.toFraction(true)}. ${run.map((length) => length.toFraction(true)).join(', ')} would satisfy it.`;
}
