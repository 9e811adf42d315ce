import { LIMITS } from '../limits';
import type { SeededRandom } from './random';
import type { Plan } from './types';

/** Whether attacks, entering at each entry, fall on every pulse of the cycle exactly once. */
export function tiles(attacks: ReadonlySet<number>, entries: readonly number[], pulses: number): boolean {
  if (attacks.size * entries.length !== pulses) return false;
  const covered = new Set<number>();
  for (const attack of attacks) for (const entry of entries) covered.add((attack + entry) % pulses);
  return covered.size === pulses;
}

/** Looks on from one step to the next, so that a search that grows too long can be given up. */
export type Budget = { steps: number };
export const newBudget = (): Budget => ({ steps: LIMITS.subjectSteps });

/**
 * Every set of attacks that tiles the cycle with the entries, each once: the first pulse not yet attacked is attacked by one
 * of the copies, and each choice of the copy is followed up. Ends early where the budget is used up.
 * @param random - where given, choices are followed up in an order drawn from it
 */
export function* tilings(plan: Plan, entries: readonly number[], budget: Budget, random?: SeededRandom): Generator<ReadonlySet<number>> {
  const { pulses } = plan;
  if (pulses % entries.length !== 0) return;
  const covered = Array<boolean>(pulses).fill(false);
  const attacks = new Set<number>();
  // Without rests a value lasts until the next attack, so a palindrome has its attacks mirrored about its start.
  const mirrored = plan.palindrome && !plan.rests;

  const place = (attack: number): boolean => {
    const struck = entries.map((entry) => (attack + entry) % pulses);
    if (struck.some((pulse) => covered[pulse])) return false;
    for (const pulse of struck) covered[pulse] = true;
    attacks.add(attack);
    return true;
  };
  const remove = (attack: number): void => {
    for (const entry of entries) covered[(attack + entry) % pulses] = false;
    attacks.delete(attack);
  };
  /** The attack and what its mirror asks for; nothing is placed where one of them does not fit. */
  const placeAll = (attack: number): number[] | null => {
    const placed: number[] = [];
    for (const one of mirrored ? new Set([attack, (pulses - attack) % pulses]) : [attack]) {
      if (place(one)) placed.push(one);
      else {
        placed.forEach(remove);
        return null;
      }
    }
    return placed;
  };

  function* onwards(from: number): Generator<ReadonlySet<number>> {
    let open = from;
    while (open < pulses && covered[open]) open += 1;
    if (open === pulses) {
      yield new Set(attacks);
      return;
    }
    const choices = entries.map((entry) => (open - entry + pulses) % pulses);
    for (const attack of random ? random.shuffled(choices) : choices) {
      budget.steps -= entries.length;
      if (budget.steps < 0) return;
      const placed = placeAll(attack);
      if (!placed) continue;
      yield* onwards(open + 1);
      placed.forEach(remove);
    }
  }
  // Without rests the subject begins with an attack.
  if (!plan.rests && !placeAll(0)) return;
  yield* onwards(0);
}
