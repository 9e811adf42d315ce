import { listWords, plural } from '../describe/words';
import { EngineError } from '../errors';
import { formatFraction } from '../exact/fraction';
import { search } from './search';
import { NoSubjectError, type Plan, type SubjectConstraint } from './types';

type Part = { readonly constraint: SubjectConstraint; readonly words: string; apply(bare: Plan): Plan };

/** The constraints of a plan one by one, in the order in which they are added. */
function partsOf(plan: Plan): Part[] {
  const { values, attacks, entries, pulses, pulse } = plan;
  const lengths = (list: readonly number[]): string => listWords(list.map((count) => formatFraction(pulse.mul(count))));
  const parts: (Part | false | null)[] = [
    values && { constraint: 'values', words: `only values of ${lengths(values)}`, apply: (bare) => ({ ...bare, values }) },
    attacks !== null && {
      constraint: plan.byDensity ? 'density' : 'attacks',
      words: `${plural(attacks, 'attack')}${plan.byDensity ? ` in ${plural(pulses, 'pulse')}` : ''}`,
      apply: (bare) => ({ ...bare, attacks }),
    },
    plan.even && { constraint: 'even', words: 'the evenest spread of attacks', apply: (bare) => ({ ...bare, even: true }) },
    entries && {
      constraint: 'entries',
      words: `attacks that cover each pulse once with entries at ${lengths(entries)}`,
      apply: (bare) => ({ ...bare, entries }),
    },
    plan.palindrome && { constraint: 'palindrome', words: 'the same values forwards and backwards', apply: (bare) => ({ ...bare, palindrome: true }) },
    plan.differingNeighbours && {
      constraint: 'differingNeighbours',
      words: 'neighbours that always differ in length',
      apply: (bare) => ({ ...bare, differingNeighbours: true }),
    },
  ];
  return parts.filter((part) => part !== null && part !== false);
}

/** How many rhythms meet a plan, and null where that is not known. */
function known(plan: Plan): bigint | null {
  try {
    const { total, complete } = search(plan);
    return complete ? total : null;
  } catch (error) {
    if (error instanceof EngineError && error.code === 'too_large') return null;
    throw error;
  }
}

/** A count in a sentence; not where its digits would fill the page. */
const GREATEST_TOLD = 10n ** 12n;

/**
 * Why no rhythm meets a plan: the first constraint that cannot be met by itself, else the first that leaves nothing of what
 * those before it leave.
 */
export function noSubject(plan: Plan): NoSubjectError {
  const bare: Plan = { ...plan, values: null, attacks: null, even: false, entries: null, palindrome: false, differingNeighbours: false };
  const rhythm = `rhythm of length ${formatFraction(plan.length)} on a pulse of ${formatFraction(plan.pulse)}${plan.rests ? '' : ' without rests'}`;
  const parts = partsOf(plan);
  const alone = parts.find((part) => known(part.apply(bare)) === 0n);
  if (alone) return new NoSubjectError(alone.constraint, `No ${rhythm} has ${alone.words}.`);

  let before = bare;
  let count = known(bare);
  const words: string[] = [];
  for (const part of parts) {
    const now = part.apply(before);
    const left = known(now);
    if (left === 0n) return new NoSubjectError(part.constraint, leavesNothing(rhythm, words, part.words, count));
    [before, count] = [now, left];
    words.push(part.words);
  }
  throw new RangeError('There is a rhythm that meets these constraints.');
}

function leavesNothing(rhythm: string, kept: readonly string[], missing: string, count: bigint | null): string {
  const those = `${rhythm} with ${listWords(kept)}`;
  if (count === 1n) return `The only ${those} does not have ${missing}.`;
  if (count !== null && count <= GREATEST_TOLD) return `Of the ${count} ${those.replace('rhythm', 'rhythms')}, none has ${missing}.`;
  return `No ${those} has ${missing}.`;
}
