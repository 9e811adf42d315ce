import { type Exact, type Fraction, sum, toFraction } from '../exact/fraction';
import { gridFor } from '../exact/grid';
import { type Metre, parseMetre } from './metre';
import type { Rhythm } from './types';

/** The sum of all values, in whole notes. */
export const totalLength = (rhythm: Rhythm): Fraction => sum(rhythm.map((v) => v.length));

/** The position of each sounding value, from 0, in whole notes. */
export function attacks(rhythm: Rhythm): Fraction[] {
  const lengths = rhythm.map((v) => v.length);
  const grid = gridFor(lengths, sum(lengths));
  const result: Fraction[] = [];
  let at = 0;
  for (const value of rhythm) {
    if (!value.rest) result.push(grid.fraction(at));
    at += grid.ticks(value.length);
  }
  return result;
}

/** A length in measures of a metre, exact. @example measuresOf('5', '4/4') //=> 5 */
export const measuresOf = (length: Exact, metre: Metre): Fraction => toFraction(length).div(parseMetre(metre).length);

