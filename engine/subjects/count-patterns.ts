import { EngineError } from '../errors';
import { gcd } from '../exact/fraction';
import { readPulses } from '../proportion/resultant';

export type PatternCounts = {
  /** patterns of attacks and silences, each starting point apart */
  readonly patterns: bigint;
  /** patterns that are no rotation of one another */
  readonly necklaces: bigint;
  /** patterns that are neither a rotation nor, read backwards, a rotation of one another */
  readonly bracelets: bigint;
};

/** Ways to choose k of n; none where k is no whole number from 0 to n. */
function choose(n: number, k: number): bigint {
  if (!Number.isInteger(k) || k < 0 || k > n) return 0n;
  let ways = 1n;
  for (let i = 1n; i <= BigInt(Math.min(k, n - k)); i += 1n) ways = (ways * (BigInt(n) + 1n - i)) / i;
  return ways;
}

/** How many numbers from 1 to n have no divisor in common with n. */
function totient(n: number): bigint {
  let count = 0n;
  for (let k = 1; k <= n; k += 1) if (gcd(BigInt(n), BigInt(k)) === 1n) count += 1n;
  return count;
}

/** Patterns of k attacks in n pulses that a reversal about one of the n axes leaves as they are, all axes together. */
function mirrored(n: number, k: number): bigint {
  if (n % 2 === 1) return BigInt(n) * choose((n - 1) / 2, Math.floor(k / 2));
  const pairs = n / 2;
  const between = choose(pairs, k / 2);
  // The axis goes through two pulses: none of them, both, or either is an attack.
  const through = choose(pairs - 1, k / 2) + choose(pairs - 1, k / 2 - 1) + 2n * choose(pairs - 1, (k - 1) / 2);
  return BigInt(pairs) * (between + through);
}

/** The periods that a turn can leave a pattern with, each with the number of turns that do. */
const turnsOf = (pulses: number): [period: number, turns: bigint][] =>
  Array.from({ length: pulses }, (_, k) => k + 1)
    .filter((period) => pulses % period === 0)
    .map((period) => [period, totient(pulses / period)]);

function countFor(pulses: number, attacks: number, turns: readonly (readonly [number, bigint])[]): PatternCounts {
  const turned = turns.reduce((sum, [period, count]) => sum + count * choose(period, (attacks * period) / pulses), 0n);
  const n = BigInt(pulses);
  return { patterns: choose(pulses, attacks), necklaces: turned / n, bracelets: (turned + mirrored(pulses, attacks)) / (2n * n) };
}

/**
 * How many patterns of attacks and silences a cycle has, by Burnside's lemma: over all turns, and over all turns and
 * reversals, the mean of the patterns left as they are.
 * @param attacks - how many of the pulses are attacks; any number where left out
 * @throws EngineError `invalid_argument`
 * @see OEIS A000031 (necklaces), A000029 (bracelets)
 * @example countPatterns(12, 8) //=> { patterns: 495n, necklaces: 43n, … }
 */
export function countPatterns(pulses: number, attacks?: number): PatternCounts {
  readPulses(pulses, 'The number of pulses');
  const turns = turnsOf(pulses);
  if (attacks !== undefined) {
    if (!Number.isSafeInteger(attacks) || attacks < 0 || attacks > pulses) {
      throw new EngineError('invalid_argument', `The number of attacks must be a whole number from 0 to ${pulses}.`);
    }
    return countFor(pulses, attacks, turns);
  }
  const counts = Array.from({ length: pulses + 1 }, (_, k) => countFor(pulses, k, turns));
  const total = (name: keyof PatternCounts): bigint => counts.reduce((sum, count) => sum + count[name], 0n);
  return { patterns: total('patterns'), necklaces: total('necklaces'), bracelets: total('bracelets') };
}
