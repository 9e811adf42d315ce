import { type Rhythm, type Value, Fraction } from '@/engine';

/** What a value that is put on the staff looks like. */
export type Stamp = {
  /** in whole notes, before the dot and the tuplet */
  readonly base: Fraction;
  readonly isDotted: boolean;
  /** three, five or seven in the place of the next lower power of two; 1 for none */
  readonly tuplet: 1 | 3 | 5 | 7;
  readonly isRest: boolean;
};

const NORMAL = { 1: 1, 3: 2, 5: 4, 7: 4 } as const;

/** How long a stamp lasts, in whole notes. */
export function stampLength({ base, isDotted, tuplet }: Stamp): Fraction {
  return base.mul(isDotted ? new Fraction(3, 2) : 1).mul(NORMAL[tuplet]).div(tuplet);
}

const valueOf = (stamp: Stamp): Value => ({ length: stampLength(stamp), rest: stamp.isRest });

/** Puts a value in at a place; the place after it comes next. */
export const insertAt = (rhythm: Rhythm, at: number, stamp: Stamp): Rhythm => rhythm.toSpliced(at, 0, valueOf(stamp));

/** Puts a value in the place of another. */
export const replaceAt = (rhythm: Rhythm, at: number, stamp: Stamp): Rhythm => (at < rhythm.length ? rhythm.with(at, { ...rhythm[at]!, ...valueOf(stamp) }) : rhythm);

export const removeAt = (rhythm: Rhythm, at: number): Rhythm => rhythm.toSpliced(at, 1);

/** Holds the value before a place on into one more: one attack, as a tie writes it. Only what sounds is held on. */
export function holdOn(rhythm: Rhythm, at: number, stamp: Stamp): Rhythm | null {
  const before = rhythm[at - 1];
  if (before === undefined || before.rest || stamp.isRest) return null;
  return rhythm.with(at - 1, { ...before, length: before.length.add(stampLength(stamp)) });
}
