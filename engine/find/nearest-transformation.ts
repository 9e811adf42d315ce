import type { Fraction } from '../exact/fraction';
import type { Rhythm } from '../rhythm/types';
import { REVERSALS, type Transformation, reversed } from './find-transformations';
import { gcdOf, primitive } from './primitive';

/** Values side by side that one stretch explains. */
export type FittingStretch = {
  /** the first value of it in the rhythm given, as it stands reversed */
  readonly from: number;
  /** the first value of it in the result */
  readonly to: number;
  /** how many values */
  readonly length: number;
  readonly factor: Fraction;
  readonly retrograde: Transformation['retrograde'];
};

export type NearestTransformation = {
  /** each value of the result to the one at its place; null where there is none, or one rests and the other sounds */
  readonly ratios: readonly (Fraction | null)[];
  /** the longest stretch of two values or more that does fit; null where there is none */
  readonly stretch: FittingStretch | null;
};

/** Pairs of values that are compared at most: beyond, no stretch is looked for. */
const MOST_PAIRS = 25_000_000;

/** The ratio of each value to the one before it, with the kinds of both, as text. */
function steps(rhythm: Rhythm): string[] {
  const counted = primitive(rhythm);
  return counted.slice(1).map((next, index) => {
    const before = counted[index]!;
    const common = gcdOf(Math.abs(next), Math.abs(before)) || 1;
    return `${next / common}/${before / common}`;
  });
}

/** The longest run that two lists have in common. */
function longestCommon(a: readonly string[], b: readonly string[]): { a: number; b: number; length: number } {
  let best = { a: 0, b: 0, length: 0 };
  let above = new Int32Array(b.length + 1);
  for (let i = 0; i < a.length; i += 1) {
    const row = new Int32Array(b.length + 1);
    for (let j = 0; j < b.length; j += 1) {
      if (a[i] !== b[j]) continue;
      const length = above[j]! + 1;
      row[j + 1] = length;
      if (length > best.length) best = { a: i - length + 1, b: j - length + 1, length };
    }
    above = row;
  }
  return best;
}

/**
 * Where no one transformation turns a rhythm into another: how each value was changed, and the longest stretch of values that
 * one transformation does explain.
 * @see check values 14.2: where only some values vary it is a rhythmic change, not an augmentation (Hutchinson, 11.2)
 */
export function nearestTransformation(from: Rhythm, to: Rhythm): NearestTransformation {
  const ratios = to.map((value, index) => {
    const other = from[index];
    return other === undefined || other.rest !== value.rest ? null : value.length.div(other.length);
  });
  let stretch: FittingStretch | null = null;
  if (from.length * to.length <= MOST_PAIRS) {
    for (const by of REVERSALS) {
      const base = reversed(from, by);
      const run = longestCommon(steps(base), steps(to));
      if (run.length === 0 || run.length + 1 <= (stretch?.length ?? 1)) continue;
      stretch = { from: run.a, to: run.b, length: run.length + 1, factor: to[run.b]!.length.div(base[run.a]!.length), retrograde: by };
    }
  }
  return { ratios, stretch };
}
