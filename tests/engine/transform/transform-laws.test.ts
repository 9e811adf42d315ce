import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  Fraction, type Rhythm, type RotateBy, type Step,
  addToEach, applySteps, attacks, augment, diminish, formatFraction, formatRhythm, retrograde, rotate, totalLength,
} from '@/engine';
import { arbitraryFactor, arbitraryLength, arbitraryRhythm, frozen } from '../rhythm/arbitrary-rhythm';

const text = formatRhythm;
const steps = fc.integer({ min: -40, max: 40 });
const at = (rhythm: Rhythm): string[] => attacks(rhythm).map(formatFraction);
const gaps = (rhythm: Rhythm): string[] => attacks(rhythm).slice(1).map((b, i) => formatFraction(b.sub(attacks(rhythm)[i]!)));
const marks = (rhythm: Rhythm) => rhythm.filter((v) => !v.rest).map(({ accent, roll, sound }) => ({ accent, roll, sound }));
const modulo = (value: Fraction, by: Fraction): Fraction => value.sub(value.div(by).floor().mul(by));
const sorted = (values: Fraction[]): string[] => [...values].sort((a, b) => a.compare(b)).map(formatFraction);

describe('augment and diminish', () => {
  it('by f, then by 1/f, give the original back', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryFactor, (r, f) => {
        expect(augment(augment(r, f), f.inverse())).toEqual(r);
        expect(diminish(augment(r, f), f)).toEqual(r);
        expect(text(diminish(r, f))).toBe(text(augment(r, f.inverse())));
      }),
    );
  });

  it('by f and by g are by f times g', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryFactor, arbitraryFactor, (r, f, g) => {
        expect(text(augment(augment(r, f), g))).toBe(text(augment(r, f.mul(g))));
      }),
    );
  });

  it('scale the total and every attack by f', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryFactor, (r, f) => {
        expect(totalLength(augment(r, f)).equals(totalLength(r).mul(f))).toBe(true);
        expect(at(augment(r, f))).toEqual(attacks(r).map((a) => formatFraction(a.mul(f))));
        expect(marks(augment(r, f))).toEqual(marks(r));
      }),
    );
  });
});

describe('retrograde', () => {
  it('twice gives the original back, by values and by attacks', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (r) => {
        expect(retrograde(retrograde(r, 'values'), 'values')).toEqual(r);
        expect(retrograde(retrograde(r, 'attacks'), 'attacks')).toEqual(r);
      }),
    );
  });

  it('keeps the total and the number of values', () => {
    fc.assert(
      fc.property(arbitraryRhythm, fc.constantFrom('values' as const, 'attacks' as const), (r, by) => {
        const back = retrograde(r, by);
        expect(back).toHaveLength(r.length);
        expect(totalLength(back).equals(totalLength(r))).toBe(true);
      }),
    );
  });

  it('by values: value i is value n − 1 − i', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (r) => {
        retrograde(r, 'values').forEach((value, i) => {
          expect(value).toEqual(r[r.length - 1 - i]);
        });
      }),
    );
  });

  it('by attacks: the gaps run backwards, first and last attack stay where they are', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (r) => {
        const back = retrograde(r, 'attacks');
        expect(gaps(back)).toEqual(gaps(r).reverse());
        expect(at(back)[0]).toBe(at(r)[0]);
        expect(at(back).at(-1)).toBe(at(r).at(-1));
      }),
    );
  });

  it('by attacks: attack i takes the marks of attack n − 1 − i, and nothing else does', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (r) => {
        expect(marks(retrograde(r, 'attacks'))).toEqual(marks(r).reverse());
      }),
    );
  });

  it('by attacks: what travels with an attack follows it, what travels with a rest stays with the rest', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (r) => {
        let attack = 0;
        const traced = r.map((value) => ({ ...value, origin: value.rest ? null : attack++ }));
        const origins = retrograde(traced, 'attacks').map((value) => value.origin);
        expect(origins.filter((origin) => origin !== null)).toEqual(Array.from({ length: attack }, (_, i) => attack - 1 - i));
      }),
    );
  });
});

describe('rotate', () => {
  const counted = fc.constantFrom<RotateBy>('values', 'attacks');

  it('there and back by values or attacks gives the original', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, counted, (r, n, by) => {
        expect(rotate(rotate(r, n, by), -n, by)).toEqual(r);
      }),
    );
  });

  it('goes modulo the number of values, or of attack groups', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, (r, n) => {
        expect(rotate(r, n + r.length, 'values')).toEqual(rotate(r, n, 'values'));
        const groups = r.filter((v) => !v.rest).length;
        expect(rotate(r, n + groups, 'attacks')).toEqual(rotate(r, n, 'attacks'));
        expect(rotate(r, groups, 'attacks')).toEqual(r);
      }),
    );
  });

  it('by m, then n, is by m + n', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, steps, counted, (r, m, n, by) => {
        expect(rotate(rotate(r, m, by), n, by)).toEqual(rotate(r, m + n, by));
      }),
    );
  });

  it('keeps the total, and the first attack where it goes by attacks', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, arbitraryLength, (r, n, pulse) => {
        for (const by of ['values', 'attacks', { pulse }] as const) {
          expect(totalLength(rotate(r, n, by)).equals(totalLength(r))).toBe(true);
        }
        expect(at(rotate(r, n, 'attacks'))[0]).toBe(at(r)[0]);
      }),
    );
  });

  it('by pulses puts each attack at (a − steps × pulse) modulo the total', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, arbitraryLength, (r, n, pulse) => {
        const total = totalLength(r);
        const expected = attacks(r).map((a) => modulo(a.sub(pulse.mul(n)), total));
        expect(at(rotate(r, n, { pulse }))).toEqual(sorted(expected));
      }),
    );
  });

  it('by pulses there and back restores the attacks and their marks', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, arbitraryLength, (r, n, pulse) => {
        const back = rotate(rotate(r, n, { pulse }), -n, { pulse });
        expect(at(back)).toEqual(at(r));
        expect(marks(back)).toEqual(marks(r));
      }),
    );
  });

  it('by pulses leaves every value above 0 and adds one value at most', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, arbitraryLength, (r, n, pulse) => {
        const turned = rotate(r, n, { pulse });
        expect(turned.every((v) => v.length.compare(0) > 0)).toBe(true);
        expect(turned.length - r.length === 0 || turned.length - r.length === 1).toBe(true);
        expect(turned.filter((v) => v.rest).every((v) => v.accent === undefined && v.roll === undefined && v.sound === undefined)).toBe(true);
      }),
    );
  });
});

describe('addToEach', () => {
  it('there and back gives the original', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryLength, (r, amount) => {
        expect(addToEach(addToEach(r, amount), amount.neg())).toEqual(r);
      }),
    );
  });

  it('adds the amount once for each attack', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryLength, (r, amount) => {
        const added = totalLength(addToEach(r, amount)).sub(totalLength(r));
        expect(added.equals(amount.mul(attacks(r).length))).toBe(true);
      }),
    );
  });
});

describe('applySteps', () => {
  const step: fc.Arbitrary<Step> = fc.oneof(
    arbitraryFactor.map((factor): Step => ({ kind: 'augment', factor })),
    arbitraryFactor.map((factor): Step => ({ kind: 'diminish', factor })),
    fc.constantFrom<Step>({ kind: 'retrograde', by: 'values' }, { kind: 'retrograde', by: 'attacks' }),
    fc.tuple(steps, fc.constantFrom('values' as const, 'attacks' as const)).map(([n, by]): Step => ({ kind: 'rotate', steps: n, by })),
    fc.tuple(steps, arbitraryLength).map(([n, pulse]): Step => ({ kind: 'rotate', steps: n, by: { pulse } })),
    arbitraryLength.map((amount): Step => ({ kind: 'add', amount })),
  );

  it('is its steps one after another', () => {
    fc.assert(
      fc.property(arbitraryRhythm, fc.array(step, { maxLength: 4 }), fc.array(step, { maxLength: 4 }), (r, first, then) => {
        expect(applySteps(r, [...first, ...then])).toEqual(applySteps(applySteps(r, first), then));
      }),
    );
  });

  it('changes nothing of what it is given', () => {
    fc.assert(
      fc.property(arbitraryRhythm, fc.array(step, { minLength: 1, maxLength: 6 }), (r, chain) => {
        const before = text(r);
        applySteps(frozen(r), Object.freeze(chain));
        expect(text(r)).toBe(before);
      }),
    );
  });

  it('gives a list of its own, so that changing the result leaves the subject alone', () => {
    fc.assert(
      fc.property(arbitraryRhythm, step, (r, one) => {
        const result = applySteps(r, [one]);
        const before = text(r);
        result.length = 0;
        expect(text(r)).toBe(before);
        expect(applySteps(r, [])).not.toBe(r);
      }),
    );
  });
});

describe('laws between transformations', () => {
  it('stretching changes no order: it can be done before or after a retrograde or a rotation', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryFactor, steps, (r, f, n) => {
        for (const by of ['values', 'attacks'] as const) {
          expect(text(augment(retrograde(r, by), f))).toBe(text(retrograde(augment(r, f), by)));
          expect(text(augment(rotate(r, n, by), f))).toBe(text(rotate(augment(r, f), n, by)));
        }
      }),
    );
  });

  it('a retrograde by values turns a rotation about', () => {
    fc.assert(
      fc.property(arbitraryRhythm, steps, (r, n) => {
        expect(retrograde(rotate(r, n, 'values'), 'values')).toEqual(rotate(retrograde(r, 'values'), -n, 'values'));
      }),
    );
  });

  it('a stretched rotation by pulses is a rotation by stretched pulses', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryFactor, steps, arbitraryLength, (r, f, n, pulse) => {
        expect(text(augment(rotate(r, n, { pulse }), f))).toBe(text(rotate(augment(r, f), n, { pulse: pulse.mul(f) })));
      }),
    );
  });
});
