import type { Base } from './types';

const BASES: readonly Base[] = ['2', '1', '1/2', '1/4', '1/8', '1/16', '1/32', '1/64', '1/128', '1/256'];

/** How many beams a base has: an eighth one, a sixteenth two. */
export const BEAM_LEVELS: Readonly<Record<Base, number>> = Object.fromEntries(
  BASES.map((base, index) => [base, Math.max(0, index - 3)]),
) as Record<Base, number>;

export type Written = { readonly base: Base; readonly dots: number };

/**
 * What single symbols are worth on a grid: n dots make a value 2 − 2^−n times as long, so only numerators 1, 3 and 7 over a
 * power of two are one symbol here (three dots are not used).
 * @param whole - integers of one written whole note, a multiple of 256
 */
export function writtenOn(whole: number): (length: number) => Written | undefined {
  const known = new Map<number, Written>();
  BASES.forEach((base, index) => {
    const length = (whole * 2) / 2 ** index;
    for (let dots = 0, total = length; dots <= 2; dots += 1) {
      if (Number.isInteger(total)) known.set(total, { base, dots });
      total += length / 2 ** (dots + 1);
    }
  });
  return (length) => known.get(length);
}
