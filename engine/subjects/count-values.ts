import { EngineError } from '../errors';
import { LIMITS } from '../limits';
import type { Item, Plan } from './types';

/** Ways to meet constraints: how many, and each of them by its number. */
export type Ways = {
  readonly total: bigint;
  /** the way of that number, from 0 */
  choose(index: bigint): Item[];
};

const allPulses = (pulses: number): number[] => Array.from({ length: pulses }, (_, k) => k + 1);

/** For each pulse the next attack after it, or the end. */
function nextAttacks(attacks: ReadonlySet<number>, pulses: number): number[] {
  const next = Array<number>(pulses + 1).fill(pulses);
  for (let at = pulses - 1; at >= 0; at -= 1) next[at] = attacks.has(at + 1) ? at + 1 : next[at + 1]!;
  return next;
}

/**
 * Counts the rhythms of a plan, its entries and evenness apart, from their ends: for each place, number of attacks left and
 * last value, how many ways lead on. A palindrome is counted up to its middle, each value for two.
 * @param fixed - the pulses on which the attacks fall; where left out, anywhere
 * @throws EngineError `too_large`
 */
export function countValues(plan: Plan, fixed?: ReadonlySet<number>): Ways {
  const { pulses, palindrome, differingNeighbours } = plan;
  const wanted = fixed ? null : plan.attacks;
  const next = fixed && nextAttacks(fixed, pulses);
  const allowed = plan.values ?? allPulses(pulses);
  const longest = next ? Math.max(...next.map((to, at) => to - at)) : pulses;
  const values = allowed.filter((value) => value <= longest);
  const places = (palindrome ? Math.floor(pulses / 2) : pulses) + 1;
  const levels = (wanted ?? 0) + 1;
  const kinds = plan.rests ? [false, true] : [false];
  if (!fixed && places * levels * values.length * kinds.length > LIMITS.subjectStates) {
    throw new EngineError('too_large', 'So many pulses, values and attacks together are too much to search. Take a coarser pulse, fewer values or a shorter length.');
  }

  /** Whether a note or rest may stand there, attacks being fixed. */
  const stands = (at: number, { length, rest }: Item): boolean =>
    fixed === undefined || next === undefined || (fixed.has(at) !== rest && at + length <= next[at]!);
  const mayStand = (at: number, item: Item): boolean =>
    stands(at, item) && (!palindrome || stands(pulses - at - item.length, item));
  const follows = (last: Item | null, item: Item): boolean =>
    last === null || ((!differingNeighbours || last.length !== item.length) && !(last.rest && item.rest));

  /** What may close the rhythm at a place: nothing at its end, the free value in the middle of a palindrome. */
  const closings = (at: number, left: number, last: Item | null): (Item | null)[] => {
    const middle = palindrome ? pulses - 2 * at : pulses - at;
    if (middle === 0) {
      const closes = left === 0 && !(palindrome && last && (last.rest || differingNeighbours));
      return closes ? [null] : [];
    }
    if (!palindrome || !values.includes(middle)) return [];
    return kinds
      .map((rest) => ({ length: middle, rest }))
      // A rest alone is no subject.
      .filter((item) => !(item.rest && at === 0) && left === (item.rest || wanted === null ? 0 : 1) && follows(last, item) && stands(at, item));
  };

  const weight = palindrome ? 2 : 1;
  const leftAfter = (left: number, item: Item): number => (item.rest || wanted === null ? left : left - weight);
  const cell = (at: number, left: number): number => at * levels + left;
  // Sums over what may come next, for notes and for rests; and single counts where a neighbour excludes one.
  const sums = kinds.map(() => Array<bigint>(places * levels).fill(0n));
  const single: bigint[][][] | null = differingNeighbours ? kinds.map(() => []) : null;

  const counted = (at: number, left: number, item: Item): bigint => {
    const to = at + item.length;
    const then = leftAfter(left, item);
    if (to >= places || then < 0 || (item.rest && item.length === pulses) || !mayStand(at, item)) return 0n;
    return onwards(to, then, item);
  };
  const onwards = (at: number, left: number, last: Item | null): bigint => {
    let ways = BigInt(closings(at, left, last).length);
    kinds.forEach((rest, kind) => {
      if (last?.rest && rest) return;
      ways += sums[kind]![cell(at, left)]!;
      if (single && last) ways -= single[kind]![last.length]?.[cell(at, left)] ?? 0n;
    });
    return ways;
  };

  for (let at = places - 1; at >= 0; at -= 1) {
    const end = next ? Math.min(next[at]!, places - 1) : places - 1;
    kinds.forEach((rest, kind) => {
      if (fixed && fixed.has(at) === rest) return;
      for (let index = 0; index < values.length && at + values[index]! <= end; index += 1) {
        // Where attacks are fixed, a rest lasts until the next: no other rest may follow it.
        if (fixed && rest && at + values[index]! < end) continue;
        for (let left = 0; left < levels; left += 1) {
          const ways = counted(at, left, { length: values[index]!, rest });
          if (ways === 0n) continue;
          sums[kind]![cell(at, left)]! += ways;
          if (single) (single[kind]![values[index]!] ??= Array<bigint>(places * levels).fill(0n))[cell(at, left)] = ways;
        }
      }
    });
  }

  const choose = (index: bigint): Item[] => {
    const items: Item[] = [];
    let [at, left, last, rank]: [number, number, Item | null, bigint] = [0, wanted ?? 0, null, index];
    for (;;) {
      const ends = closings(at, left, last);
      if (rank < BigInt(ends.length)) {
        const middle = ends[Number(rank)] ?? null;
        return palindrome ? [...items, ...(middle ? [middle] : []), ...[...items].reverse()] : items;
      }
      rank -= BigInt(ends.length);
      const [item, within] = step(at, left, last, rank);
      items.push(item);
      at += item.length;
      left = leftAfter(left, item);
      last = item;
      rank = within;
    }
  };
  const step = (at: number, left: number, last: Item | null, rank: bigint): [Item, bigint] => {
    let before = rank;
    for (const rest of kinds) {
      for (const length of values) {
        const item = { length, rest };
        if (!follows(last, item)) continue;
        const ways = counted(at, left, item);
        if (before < ways) return [item, before];
        before -= ways;
      }
    }
    throw new RangeError(`There is no way of number ${rank}.`);
  };
  return { total: onwards(0, wanted ?? 0, null), choose };
}
