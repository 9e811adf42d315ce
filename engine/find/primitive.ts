import { sum } from '../exact/fraction';
import { gridFor } from '../exact/grid';
import type { Value } from '../rhythm/types';

/**
 * Lengths as whole numbers without a common divisor: rhythms that are one another's stretches have the same. A rest is told
 * from an attack of the same length by its sign.
 * @throws EngineError `too_fine`
 */
export function primitive(rhythm: readonly Value[]): number[] {
  const { ticks } = gridFor(rhythm.map(({ length }) => length), sum(rhythm.map(({ length }) => length)));
  const counted = rhythm.map(({ length }) => ticks(length));
  let common = 0;
  for (const count of counted) common = gcdOf(common, count);
  return counted.map((count, index) => (rhythm[index]!.rest ? -count : count) / (common || 1));
}

export function gcdOf(a: number, b: number): number {
  while (b !== 0) [a, b] = [b, a % b];
  return a;
}
