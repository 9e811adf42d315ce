import fc from 'fast-check';
import { Fraction, type Rhythm, type Value } from '@/engine';

/** Lengths that occur in written music, and some that do not: tuplets of 3, 5, 6, 7 and 9 among them. */
export const arbitraryLength: fc.Arbitrary<Fraction> = fc
  .tuple(fc.integer({ min: 1, max: 16 }), fc.constantFrom(1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 12, 14, 16, 18, 20, 24, 32, 64))
  .map(([n, d]) => new Fraction(n, d));

const arbitraryMarks = fc.record(
  {
    accent: fc.constantFrom('accent' as const, 'strong' as const),
    roll: fc.constant(true as const),
    sound: fc.integer({ min: 1, max: 12 }),
  },
  { requiredKeys: [] },
);

export const arbitraryNote: fc.Arbitrary<Value> = fc
  .tuple(arbitraryLength, arbitraryMarks)
  .map(([length, marks]) => ({ length, rest: false, ...marks }));

export const arbitraryRest: fc.Arbitrary<Value> = arbitraryLength.map((length) => ({ length, rest: true }));

const arbitraryValue = fc.oneof({ weight: 3, arbitrary: arbitraryNote }, { weight: 1, arbitrary: arbitraryRest });

/** Up to 24 values, rests first, last and in a row included; a rhythm of rests alone too. */
export const arbitraryRhythm: fc.Arbitrary<Rhythm> = fc.array(arbitraryValue, { minLength: 1, maxLength: 24 });

/** Factors as a composer writes them. */
export const arbitraryFactor: fc.Arbitrary<Fraction> = fc
  .tuple(fc.integer({ min: 1, max: 24 }), fc.integer({ min: 1, max: 24 }))
  .map(([n, d]) => new Fraction(n, d));

/** Freezes a rhythm through and through, its fractions too, so that a function that changes its input throws. */
export function frozen(rhythm: Rhythm): Rhythm {
  for (const value of rhythm) {
    Object.freeze(value.length);
    Object.freeze(value);
  }
  return Object.freeze(rhythm);
}
