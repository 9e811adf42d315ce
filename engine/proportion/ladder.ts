import { EngineError } from '../errors';
import { type Exact, type Fraction, ZERO, sum, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';

/** Reads lengths that must be above 0 and at least one. */
export function readLengths(lengths: readonly Exact[]): Fraction[] {
  if (lengths.length === 0) throw new EngineError('invalid_argument', 'At least one length is needed.');
  if (lengths.length > LIMITS.lengths) throw new EngineError('too_large', `${LIMITS.lengths} lengths are the limit.`);
  return lengths.map((length) => {
    const value = toFraction(length);
    if (value.compare(ZERO) <= 0) throw new EngineError('invalid_argument', 'Every length must be above 0.');
    return value;
  });
}

export type Ladder = {
  /** each length over the first */
  readonly toFirst: Fraction[];
  /** each length over the one before: one fewer than the lengths */
  readonly steps: Fraction[];
  /** whether all steps are the same; true where there are fewer than two */
  readonly equalSteps: boolean;
  readonly total: Fraction;
};

/**
 * A run of lengths, as ratios.
 * @throws EngineError `invalid_argument`
 * @example ladder([4, 6, 9]) // steps 3/2, 3/2: each half as long again
 */
export function ladder(lengths: readonly Exact[]): Ladder {
  const run = readLengths(lengths);
  const first = run[0]!;
  const steps = run.slice(1).map((length, index) => length.div(run[index]!));
  return {
    toFirst: run.map((length) => length.div(first)),
    steps,
    equalSteps: steps.every((step) => step.equals(steps[0]!)),
    total: sum(run),
  };
}
