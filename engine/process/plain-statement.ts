import { type Fraction, ONE, sum } from '../exact/fraction';
import type { Placed, TracedValue } from './types';

type Given = Pick<Placed, 'start' | 'instrument' | 'subject'> & Partial<Omit<Placed, 'length' | 'end' | 'values'>> & { readonly values: readonly TracedValue[]; readonly length?: Fraction };

/** A statement at its own length, forwards and not rotated, but for what is given. */
export function plainStatement({ length, ...given }: Given): Placed {
  const lasts = length ?? sum(given.values.map((value) => value.length));
  return { factor: ONE, reading: 'forwards', rotation: 0, mirrored: false, ...given, length: lasts, end: given.start.add(lasts) };
}

/** Statements one after another, each from where the one before ends. */
export function successive(statements: readonly ((start: Fraction) => Placed)[], from: Fraction): Placed[] {
  let at = from;
  return statements.map((make) => {
    const placed = make(at);
    at = placed.end;
    return placed;
  });
}
