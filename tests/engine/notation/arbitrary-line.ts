import fc from 'fast-check';
import { Fraction, type Rhythm, type Value, parseMetre } from '@/engine';

export const METRES = [
  '2/4', '3/4', '4/4', '2/2', '3/2', '3/8', '4/8', '6/8', '9/8', '12/8', '6/4', '5/8', '7/8', '3+2+2/8', '5/4', '7/4', '8/8', '11/8', '2/8', '5/16',
] as const;

const arbitraryMetre = fc.constantFrom(...METRES);

/** Dyadic lengths: every one can be written in every metre. */
export const plainLength: fc.Arbitrary<Fraction> = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: 1, max: 20 }).map((n) => new Fraction(n, 16)) },
  { weight: 3, arbitrary: fc.integer({ min: 1, max: 12 }).map((n) => new Fraction(n, 8)) },
  { weight: 1, arbitrary: fc.tuple(fc.integer({ min: 1, max: 300 }), fc.constantFrom(32, 64, 256)).map(([n, d]) => new Fraction(n, d)) },
);

const toValue = ([length, isRest]: [Fraction, boolean]): Value => ({ length, rest: isRest });
const sometimesRest = fc.integer({ min: 0, max: 4 }).map((n) => n === 0);

export const plainRhythm: fc.Arbitrary<Rhythm> = fc.array(fc.tuple(plainLength, sometimesRest).map(toValue), { minLength: 1, maxLength: 20 });

/** A span of 1/8 to 1/1 divided in 3, 5, 6, 7 or 9, some divisions held together, with a plain value before and after. */
const cell: fc.Arbitrary<Value[]> = fc
  .record({
    span: fc.constantFrom(new Fraction(1, 8), new Fraction(1, 4), new Fraction(3, 8), new Fraction(1, 2), new Fraction(1)),
    parts: fc.constantFrom(3, 5, 6, 7, 9),
    holds: fc.array(fc.integer({ min: 1, max: 3 }), { minLength: 9, maxLength: 9 }),
    rests: fc.array(sometimesRest, { minLength: 9, maxLength: 9 }),
  })
  .map(({ span, parts, holds, rests }) => {
    const values: Value[] = [];
    for (let at = 0, n = 0; at < parts; n += 1) {
      const held = Math.min(holds[n]!, parts - at);
      values.push({ length: span.mul(held).div(parts), rest: rests[n]! });
      at += held;
    }
    return values;
  });

/** Tuplets and plain values side by side; most can be written, not all. */
export const mixedRhythm: fc.Arbitrary<Rhythm> = fc
  .array(fc.oneof(cell, fc.tuple(plainLength, sometimesRest).map((one) => [toValue(one)])), { minLength: 1, maxLength: 8 })
  .map((cells) => cells.flat());

/** Any small fractions: most cannot be written. */
export const wildRhythm: fc.Arbitrary<Rhythm> = fc.array(
  fc.tuple(fc.tuple(fc.integer({ min: 1, max: 12 }), fc.constantFrom(3, 5, 6, 7, 9, 10, 12, 20, 24, 28, 36, 40)).map(([n, d]) => new Fraction(n, d)), sometimesRest).map(toValue),
  { minLength: 1, maxLength: 8 },
);

/** One metre, or two to four of them, each for some measures, the last of which may be cut short by some eighths. */
export const metrePlan = fc.oneof(
  arbitraryMetre.map((metre) => [{ at: new Fraction(0), metre }]),
  fc.array(fc.record({ metre: arbitraryMetre, measures: fc.integer({ min: 1, max: 3 }), cut: fc.integer({ min: 0, max: 4 }) }), { minLength: 2, maxLength: 4 }).map((stretches) => {
    let at = new Fraction(0);
    return stretches.map(({ metre, measures, cut }) => {
      const change = { at, metre };
      const { length } = parseMetre(metre);
      const short = new Fraction(cut, 8);
      at = at.add(length.mul(measures)).sub(short.compare(length) < 0 ? short : 0);
      return change;
    });
  }),
);
