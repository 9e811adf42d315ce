import type { Fraction } from '../exact/fraction';
import type { Rhythm } from '../rhythm/types';
import { noSubject } from './explain';
import { seededRandom } from './random';
import { readConstraints } from './read-constraints';
import { search } from './search';
import type { GeneratedSubject, Item, Plan, SubjectConstraints } from './types';

function toRhythm(items: readonly Item[], { pulse }: Plan): Rhythm {
  const lengths = new Map<number, Fraction>();
  return items.map(({ length, rest }) => {
    const exact = lengths.get(length) ?? pulse.mul(length);
    lengths.set(length, exact);
    return { length: exact, rest };
  });
}

/**
 * A rhythm that meets constraints, drawn from all that do, each as likely as any other; where they are too many to go
 * through, from those that were found. The same constraints and seed give the same rhythm.
 * @param seed - an integer
 * @throws NoSubjectError where there is none: the sentence names the constraint that leaves nothing
 * @throws EngineError `invalid_fraction`, `invalid_argument`, `too_large`
 * @example generateSubject({ length: 1, values: ['1/4', '3/8'], attacks: 3 }, 1) // one of 3/8 3/8 1/4, 3/8 1/4 3/8, 1/4 3/8 3/8
 */
export function generateSubject(constraints: SubjectConstraints, seed: number): GeneratedSubject {
  const plan = readConstraints(constraints);
  const random = seededRandom(seed);
  const { total, complete, choose } = search(plan, random);
  if (total === 0n) throw noSubject(plan);
  return { rhythm: toRhythm(choose(random.below(total)), plan), solutions: complete ? total : null };
}

/**
 * How many rhythms meet constraints, 0 for none; null where they are too many to go through.
 * @throws EngineError `invalid_fraction`, `invalid_argument`, `too_large`
 */
export function countSubjects(constraints: SubjectConstraints): bigint | null {
  const { total, complete } = search(readConstraints(constraints));
  return complete ? total : null;
}
