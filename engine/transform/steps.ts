import { EngineError } from '../errors';
import type { Exact } from '../exact/fraction';
import { LIMITS } from '../limits';
import type { RetrogradeBy, Value } from '../rhythm/types';
import { addToEach, augment, diminish } from './augment';
import { retrograde } from './retrograde';
import { type RotateBy, rotate } from './rotate';

/** One transformation of a chain. */
export type Step =
  | { readonly kind: 'augment' | 'diminish'; readonly factor: Exact }
  | { readonly kind: 'retrograde'; readonly by: RetrogradeBy }
  | { readonly kind: 'rotate'; readonly steps: number; readonly by: RotateBy }
  | { readonly kind: 'add'; readonly amount: Exact };

function applyStep<T extends Value>(rhythm: readonly T[], step: Step): T[] {
  switch (step.kind) {
    case 'augment':
      return augment(rhythm, step.factor);
    case 'diminish':
      return diminish(rhythm, step.factor);
    case 'retrograde':
      return retrograde(rhythm, step.by);
    case 'rotate':
      return rotate(rhythm, step.steps, step.by);
    case 'add':
      return addToEach(rhythm, step.amount);
    default:
      throw new EngineError('invalid_argument', 'A step must augment, diminish, add, rotate, or be a retrograde.');
  }
}

/**
 * A chain of transformations, first to last.
 * @throws EngineError whatever its steps throw, `too_large` for a chain beyond the limit
 */
export function applySteps<T extends Value>(rhythm: readonly T[], steps: readonly Step[]): T[] {
  if (steps.length > LIMITS.steps) throw new EngineError('too_large', `A chain may have ${LIMITS.steps} steps; this one has ${steps.length}.`);
  return steps.reduce<T[]>(applyStep, [...rhythm]);
}
