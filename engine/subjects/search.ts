import { EngineError } from '../errors';
import { LIMITS } from '../limits';
import { euclidean } from '../proportion/euclidean';
import { type Ways, countValues } from './count-values';
import type { SeededRandom } from './random';
import { type Budget, newBudget, tiles, tilings } from './tilings';
import type { Plan } from './types';

/** What was found; `complete` where nothing was left out, so that `total` counts every rhythm of the plan. */
export type Found = Ways & { readonly complete: boolean };

/** Every evenest spread of so many attacks over the cycle, from each starting point, each once. */
function* evenSpreads(attacks: number, pulses: number): Generator<ReadonlySet<number>> {
  const places: number[] = [];
  for (const gap of euclidean(attacks, pulses)) places.push((places.at(-1) ?? -gap) + gap);
  const seen = new Set<string>();
  for (let start = 0; start < pulses; start += 1) {
    const turned = places.map((place) => (place + start) % pulses).sort((a, b) => a - b);
    const key = turned.join();
    if (seen.has(key)) return;
    seen.add(key);
    yield new Set(turned);
  }
}

function* attackSets(plan: Plan, budget: Budget, random?: SeededRandom): Generator<ReadonlySet<number>> {
  const { pulses, attacks, entries } = plan;
  if (!plan.even) {
    if (entries && (attacks ?? pulses / entries.length) * entries.length === pulses) yield* tilings(plan, entries, budget, random);
    return;
  }
  const counts = attacks === null ? Array.from({ length: pulses }, (_, k) => k + 1) : [attacks];
  for (const count of counts.filter((one) => one <= pulses)) {
    for (const spread of evenSpreads(count, pulses)) {
      budget.steps -= pulses;
      if (budget.steps < 0) return;
      if (entries && !tiles(spread, entries, pulses)) continue;
      if (plan.rests || spread.has(0)) yield spread;
    }
  }
}

/**
 * Every rhythm that meets a plan, counted. Where attacks are fixed by entries or evenness, their sets are gone through one by
 * one; beyond a limit of sets the rest is left out once something is found.
 * @throws EngineError `too_large` where the search was given up before anything was found
 */
export function search(plan: Plan, random?: SeededRandom): Found {
  if (!plan.even && !plan.entries) return { ...countValues(plan), complete: true };
  const budget = newBudget();
  const found: { attacks: ReadonlySet<number>; total: bigint }[] = [];
  let total = 0n;
  let sets = 0;
  let complete = true;
  for (const attacks of attackSets(plan, budget, random)) {
    budget.steps -= plan.pulses;
    const ways = countValues(plan, attacks).total;
    if (ways > 0n) found.push({ attacks, total: ways });
    total += ways;
    sets += 1;
    if (sets >= LIMITS.subjectSets && total > 0n) {
      complete = false;
      break;
    }
  }
  if (budget.steps < 0) complete = false;
  if (!complete && total === 0n) {
    throw new EngineError('too_large', 'The search was given up before it found a rhythm or could say that there is none. Take fewer pulses, or name the number of attacks.');
  }
  const choose = (index: bigint) => {
    let rank = index;
    for (const { attacks, total: ways } of found) {
      if (rank < ways) return countValues(plan, attacks).choose(rank);
      rank -= ways;
    }
    throw new RangeError(`There is no rhythm of number ${index}.`);
  };
  return { total, complete, choose };
}
