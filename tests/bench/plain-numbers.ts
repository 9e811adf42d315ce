import type { Rhythm } from '../../engine';

/** A measure of 4/4, in whole notes. */
export const METRE = 1;

/** A rhythm as doubles: whole notes, negative for rests. */
export const doubles = (rhythm: Rhythm): Float64Array => Float64Array.from(rhythm, ({ length, rest }) => (rest ? -1 : 1) * length.valueOf());

/** One attack in its measure: the measure's own beat position and the length that is left in it, in doubles. */
export type PlainAttack = { position: number; length: number; value: number };

/**
 * For scale: places the same values into measures with doubles, in one pass. It writes no ties, dots, rests, tuplets or beams,
 * rounds as doubles do, and cuts a value that crosses a bar line.
 * @param lengths - whole notes; negative for rests
 */
export function placePlain(lengths: Float64Array, measure: number): PlainAttack[][] {
  const measures: PlainAttack[][] = [];
  let at = 0;
  for (let value = 0; value < lengths.length; value += 1) {
    const isRest = lengths[value]! < 0;
    const end = at + Math.abs(lengths[value]!);
    while (at < end - 1e-9) {
      const index = Math.floor(at / measure + 1e-9);
      const until = Math.min(end, (index + 1) * measure);
      const list = (measures[index] ??= []);
      if (!isRest) list.push({ position: at - index * measure, length: until - at, value });
      at = until;
    }
    at = end;
  }
  return measures;
}
