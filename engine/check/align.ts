import type { Value } from '../rhythm/types';
import { isSame } from './heard';

/** How a stretch of the key and a stretch of the answer stand for one another. */
export type Pairing =
  | { readonly kind: 'same' | 'changed'; readonly key: number; readonly answer: number }
  /** one value of the key struck several times in the answer, as long in all */
  | { readonly kind: 'struck-again'; readonly key: number; readonly answer: number; readonly count: number }
  /** several values of the key held as one in the answer */
  | { readonly kind: 'held-on'; readonly key: number; readonly answer: number; readonly count: number }
  | { readonly kind: 'missing'; readonly key: number }
  | { readonly kind: 'extra'; readonly answer: number };

const MOVE = { same: 1, changed: 2, missing: 3, extra: 4, struckAgain: 5, heldOn: 6 } as const;

const FAR = 2 ** 30;

/** Values joined into one, or one struck apart, at most. */
const MOST_JOINED = 4;
/** Pairs compared at most; beyond, values are paired by their number. */
export const MOST_PAIRS = 4_000_000;

/** How many values from an index on make up a length exactly, all of them sounding; 0 where none do. */
function madeUp(whole: Value, parts: readonly Value[], from: number): number {
  if (whole.rest) return 0;
  let length = whole.length.mul(0);
  for (let count = 1; count <= MOST_JOINED; count += 1) {
    const part = parts[from + count - 1];
    if (part === undefined || part.rest) return 0;
    length = length.add(part.length);
    if (count > 1 && length.equals(whole.length)) return count;
    if (length.compare(whole.length) >= 0) return 0;
  }
  return 0;
}

function byNumber(key: readonly Value[], answer: readonly Value[]): Pairing[] {
  return Array.from({ length: Math.max(key.length, answer.length) }, (_, index): Pairing => {
    const [a, b] = [key[index], answer[index]];
    if (a === undefined) return { kind: 'extra', answer: index };
    if (b === undefined) return { kind: 'missing', key: index };
    return { kind: isSame(a, b) ? 'same' : 'changed', key: index, answer: index };
  });
}

/** A change that keeps kind or length is likelier than one of both; costs are whole numbers, ten to a slip. */
const costOfChange = (a: Value, b: Value): number => (isSame(a, b) ? 0 : a.rest === b.rest || a.length.equals(b.length) ? 10 : 14);

/** Costs and moves of the places near the diagonal: `reach` places to either side. */
type Band = { readonly reach: number; readonly width: number; readonly costs: Int32Array; readonly moves: Uint8Array };

function fill(key: readonly Value[], answer: readonly Value[], reach: number): Band {
  const width = 2 * reach + 1;
  const costs = new Int32Array((key.length + 1) * width).fill(FAR);
  // How each place was reached: one of `MOVE`, and for joined values their number in the tens.
  const moves = new Uint8Array(costs.length);
  const go = (i: number, j: number, cost: number, move: number): void => {
    const beside = j - i + reach;
    if (beside < 0 || beside >= width) return;
    const place = i * width + beside;
    if (cost >= costs[place]!) return;
    costs[place] = cost;
    moves[place] = move;
  };
  costs[reach] = 0;
  for (let i = 0; i <= key.length; i += 1) {
    for (let j = Math.max(0, i - reach); j <= Math.min(answer.length, i + reach); j += 1) {
      const cost = costs[i * width + j - i + reach]!;
      if (cost === FAR) continue;
      const [a, b] = [key[i], answer[j]];
      if (a !== undefined && b !== undefined) {
        const change = costOfChange(a, b);
        go(i + 1, j + 1, cost + change, change === 0 ? MOVE.same : MOVE.changed);
        if (change > 0) {
          const struck = madeUp(a, answer, j);
          if (struck > 0) go(i + 1, j + struck, cost + 10, MOVE.struckAgain + 10 * struck);
          const held = madeUp(b, key, i);
          if (held > 0) go(i + held, j + 1, cost + 10, MOVE.heldOn + 10 * held);
        }
      }
      if (a !== undefined) go(i + 1, j, cost + 11, MOVE.missing);
      if (b !== undefined) go(i, j + 1, cost + 11, MOVE.extra);
    }
  }
  return { reach, width, costs, moves };
}

/**
 * The places near the diagonal, as many as the cheapest way can use: each slip leads away from it by so many values at most.
 * @returns null where that would be too many to compare
 */
function wideEnough(key: readonly Value[], answer: readonly Value[]): Band | null {
  const offset = Math.abs(key.length - answer.length);
  const whole = Math.max(key.length, answer.length);
  for (let reach = Math.min(whole, offset + 8); ; reach = Math.min(whole, reach * 4)) {
    if (key.length * (2 * reach + 1) > MOST_PAIRS) return null;
    const band = fill(key, answer, reach);
    const cost = band.costs[key.length * band.width + answer.length - key.length + reach]!;
    if (reach === whole || reach >= Math.ceil(cost / 10) * (MOST_JOINED - 1)) return band;
  }
}

/**
 * Lays an answer beside its key with the fewest slips, so that one slip does not fail the rest: a value changed, left out or
 * put in, struck again instead of held, or held instead of struck again.
 * @returns pairings in order, and the cost of all: ten for each slip
 */
export function align(key: readonly Value[], answer: readonly Value[]): { pairings: Pairing[]; cost: number } {
  const band = wideEnough(key, answer);
  if (band === null) {
    const pairings = byNumber(key, answer);
    return { pairings, cost: 10 * pairings.filter(({ kind }) => kind !== 'same').length };
  }
  const { reach, width, costs, moves } = band;
  const pairings: Pairing[] = [];
  for (let i = key.length, j = answer.length; i > 0 || j > 0; ) {
    const move = moves[i * width + j - i + reach]!;
    const count = Math.floor(move / 10);
    const kind = move % 10;
    i -= kind === MOVE.extra ? 0 : kind === MOVE.heldOn ? count : 1;
    j -= kind === MOVE.missing ? 0 : kind === MOVE.struckAgain ? count : 1;
    if (kind === MOVE.same || kind === MOVE.changed) pairings.push({ kind: kind === MOVE.same ? 'same' : 'changed', key: i, answer: j });
    else if (kind === MOVE.struckAgain) pairings.push({ kind: 'struck-again', key: i, answer: j, count });
    else if (kind === MOVE.heldOn) pairings.push({ kind: 'held-on', key: i, answer: j, count });
    else if (kind === MOVE.missing) pairings.push({ kind: 'missing', key: i });
    else pairings.push({ kind: 'extra', answer: j });
  }
  return { pairings: pairings.reverse(), cost: costs[key.length * width + answer.length - key.length + reach]! };
}
