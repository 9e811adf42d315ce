import { EngineError } from '../errors';

/** Numbers that look like chance and are the same for the same seed. */
export type SeededRandom = {
  /** a whole number from 0, below `limit`, each as likely as any other */
  below(limit: bigint): bigint;
  /** the items in another order */
  shuffled<T>(items: readonly T[]): T[];
};

const WORD = 2 ** 32;

/** Spreads 32 bits over 32 bits: every bit of the input changes about half of the output. */
function mixed(word: number): number {
  let bits = word | 0;
  bits = Math.imul(bits ^ (bits >>> 16), 0x7feb352d);
  bits = Math.imul(bits ^ (bits >>> 15), 0x846ca68b);
  return (bits ^ (bits >>> 16)) >>> 0;
}

/**
 * A 32-bit generator, integers only: a counter that is mixed, word after word.
 * @param seed - an integer
 * @throws EngineError `invalid_argument`
 */
export function seededRandom(seed: number): SeededRandom {
  if (!Number.isSafeInteger(seed)) throw new EngineError('invalid_argument', 'A seed must be a whole number.', { path: 'seed' });
  // Both halves of the seed count.
  let state = mixed(seed | 0) ^ mixed(Math.floor(seed / WORD) + 1);
  const word = (): bigint => {
    state = (state + 0x9e3779b9) | 0;
    return BigInt(mixed(state));
  };
  const below = (limit: bigint): bigint => {
    const bits = BigInt((limit - 1n).toString(2).length);
    for (;;) {
      let drawn = 0n;
      for (let have = 0n; have < bits; have += 32n) drawn = (drawn << 32n) | word();
      // What lies beyond is drawn again, so that no number is favoured.
      drawn &= (1n << bits) - 1n;
      if (drawn < limit) return drawn;
    }
  };
  return {
    below,
    shuffled(items) {
      const order = [...items];
      for (let left = order.length; left > 1; left -= 1) {
        const other = Number(below(BigInt(left)));
        [order[left - 1], order[other]] = [order[other]!, order[left - 1]!];
      }
      return order;
    },
  };
}
