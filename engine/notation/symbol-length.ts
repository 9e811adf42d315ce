import { Fraction, ONE } from '../exact/fraction';
import type { NotationSymbol } from './types';

/** What a symbol says by its base and dots, before its brackets, in whole notes: n dots make it 2 − 2^−n times as long. */
export function writtenLength({ base, dots }: Pick<NotationSymbol, 'base' | 'dots'>): Fraction {
  return new Fraction(base).mul(new Fraction(2).sub(new Fraction(1, 2).pow(dots) ?? ONE));
}

/** How long a symbol lasts, its brackets counted, in whole notes. */
export const symbolLength = (symbol: Pick<NotationSymbol, 'base' | 'dots' | 'tuplets'>): Fraction =>
  symbol.tuplets.reduce((length, { actual, normal }) => length.mul(normal).div(actual), writtenLength(symbol));
