import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, Fraction, NoSubjectError, type SubjectConstraints, countSubjects, formatRhythm, generateSubject, totalLength } from '@/engine';
import { type Tried, everyRhythm, inPulses, meets } from './every-rhythm';

const often = fc.oneof({ weight: 3, arbitrary: fc.constant(false) }, { weight: 1, arbitrary: fc.constant(true) });

const maybe = <T>(arbitrary: fc.Arbitrary<T>): fc.Arbitrary<T | undefined> => fc.oneof(fc.constant(undefined), arbitrary);

/** Entries at equal distances, which many cycles allow, and any others. */
const arbitraryEntries = (pulses: number): fc.Arbitrary<number[]> =>
  fc.oneof(
    fc
      .record({ count: fc.integer({ min: 1, max: 4 }), step: fc.integer({ min: 1, max: pulses }), first: fc.integer({ min: -2, max: 2 }) })
      .map(({ count, step, first }) => Array.from({ length: count }, (_, k) => first + k * step)),
    fc.uniqueArray(fc.integer({ min: 0, max: pulses - 1 }), { minLength: 1, maxLength: 4 }),
  );

/** Constraints on up to `most` pulses, few enough that all rhythms can be written out. */
const arbitraryTried = (most: number, restsTo: number): fc.Arbitrary<Tried> =>
  fc.integer({ min: 1, max: most }).chain((pulses) =>
    fc.record({
      pulses: fc.constant(pulses),
      values: maybe(fc.uniqueArray(fc.integer({ min: 1, max: pulses }), { minLength: 1, maxLength: 5 })),
      attacks: maybe(fc.integer({ min: 1, max: pulses })),
      rests: pulses <= restsTo ? fc.boolean() : fc.constant(false),
      differingNeighbours: often,
      palindrome: often,
      entries: fc.oneof({ weight: 2, arbitrary: fc.constant(undefined) }, { weight: 1, arbitrary: arbitraryEntries(pulses) }),
      even: often,
    }),
  );

const arbitraryPulse = fc.constantFrom('1/8', '1/16', '1/12', '1/20', '3/16', '1').map((text) => new Fraction(text));

const constraintsOf = (tried: Tried, pulse: Fraction): SubjectConstraints => ({
  length: pulse.mul(tried.pulses),
  pulse,
  values: tried.values?.map((value) => pulse.mul(value)),
  attacks: tried.attacks,
  rests: tried.rests,
  differingNeighbours: tried.differingNeighbours,
  palindrome: tried.palindrome,
  entries: tried.entries?.map((entry) => pulse.mul(entry)),
  even: tried.even,
});

/** The order in which a refusal adds constraints. */
const ORDER = ['values', 'attacks', 'even', 'entries', 'palindrome', 'differingNeighbours'] as const;

const doubleEntries = ({ entries, pulses }: Tried): boolean =>
  entries !== undefined && new Set(entries.map((entry) => ((entry % pulses) + pulses) % pulses)).size < entries.length;

function refusalOf(constraints: SubjectConstraints): NoSubjectError | null {
  try {
    generateSubject(constraints, 0);
    return null;
  } catch (error) {
    if (error instanceof NoSubjectError) return error;
    throw error;
  }
}

const seeds = fc.integer({ min: -(2 ** 40), max: 2 ** 40 });

describe('generateSubject against all rhythms written out', () => {
  it('counts what there is, refuses exactly where there is none, and gives what meets every constraint', () => {
    let refused = 0;
    /** how often each constraint was met by something */
    const given = new Map<string, number>();
    fc.assert(
      fc.property(arbitraryTried(11, 7), arbitraryPulse, seeds, (tried, pulse, seed) => {
        const constraints = constraintsOf(tried, pulse);
        const all = everyRhythm(tried.pulses, tried.rests).filter((items) => meets(items, tried));
        if (doubleEntries(tried)) {
          expect(all).toHaveLength(0);
          expect(() => countSubjects(constraints)).toThrow(NoSubjectError);
          return;
        }
        expect(countSubjects(constraints)).toBe(BigInt(all.length));
        if (all.length === 0) {
          refused += 1;
          expect(() => generateSubject(constraints, seed)).toThrow(NoSubjectError);
          return;
        }
        for (const [name, asked] of Object.entries(tried)) if (asked !== undefined && asked !== false) given.set(name, (given.get(name) ?? 0) + 1);
        const { rhythm, solutions } = generateSubject(constraints, seed);
        expect(solutions).toBe(BigInt(all.length));
        expect(totalLength(rhythm).equals(pulse.mul(tried.pulses))).toBe(true);
        expect(meets(inPulses(rhythm, pulse), tried)).toBe(true);
      }),
      { numRuns: 4_000, seed: 4 },
    );
    // Nothing may be reached by a handful of cases only.
    expect(refused).toBeGreaterThan(200);
    for (const name of [...ORDER, 'rests']) expect(given.get(name), name).toBeGreaterThan(80);
  });

  it('a refusal names a constraint that cannot be met by itself, or that leaves nothing of so many rhythms with those before', () => {
    const told = { alone: 0, together: 0 };
    fc.assert(
      fc.property(arbitraryTried(9, 6), (tried) => {
        if (doubleEntries(tried)) return;
        const refusal = refusalOf(constraintsOf(tried, new Fraction(1, 8)));
        if (refusal === null) return;
        expect(refusal.path).toBe(refusal.constraint);
        const all = everyRhythm(tried.pulses, tried.rests);
        const bare: Tried = { pulses: tried.pulses, rests: tried.rests, differingNeighbours: false, palindrome: false, even: false };
        const named = ORDER.find((name) => name === refusal.constraint)!;
        const before = ORDER.slice(0, ORDER.indexOf(named)).reduce((some, name) => ({ ...some, [name]: tried[name] }), bare);
        if (all.every((items) => !meets(items, { ...bare, [named]: tried[named] }))) {
          told.alone += 1;
          expect(refusal.message).toMatch(/^No rhythm of length \S+ on a pulse of 1\/8( without rests)? has /);
          return;
        }
        told.together += 1;
        const kept = all.filter((items) => meets(items, before));
        expect(refusal.message).toContain(kept.length === 1 ? 'The only rhythm of length' : `Of the ${kept.length} rhythms of length`);
        expect(kept.some((items) => meets(items, { ...before, [named]: tried[named] }))).toBe(false);
      }),
      { numRuns: 2_500, seed: 4 },
    );
    expect(Math.min(told.alone, told.together)).toBeGreaterThan(50);
  });
});

describe('what is drawn', () => {
  it('is the same for the same seed', () => {
    fc.assert(
      fc.property(arbitraryTried(24, 24), seeds, (tried, seed) => {
        const draw = () => {
          try {
            return formatRhythm(generateSubject(constraintsOf(tried, new Fraction(1, 16)), seed).rhythm);
          } catch (error) {
            if (error instanceof EngineError) return error.message;
            throw error;
          }
        };
        expect(draw()).toBe(draw());
      }),
    );
  });

  it('differs from seed to seed, also where seeds differ far up or not all is gone through', () => {
    const texts = (constraints: SubjectConstraints, list: readonly number[]) => new Set(list.map((seed) => formatRhythm(generateSubject(constraints, seed).rhythm)));
    const near = Array.from({ length: 20 }, (_, k) => k - 10);
    expect(texts({ length: 4 }, near).size).toBe(20);
    expect(texts({ length: 4 }, near.map((k) => k * 2 ** 32)).size).toBe(20);
    const uncounted = { length: 8, entries: [0, 4] };
    expect(generateSubject(uncounted, 0).solutions).toBeNull();
    expect(texts(uncounted, near).size).toBe(20);
    // Beyond the last turn taken too: the first values are not always the same.
    expect(new Set(near.map((seed) => formatRhythm(generateSubject(uncounted, seed).rhythm.slice(0, 4)))).size).toBeGreaterThan(8);
  });

  it('comes in time to every rhythm there is, none much more often than another', () => {
    for (const constraints of [
      { length: 1, values: ['1/8', '1/4', '3/8'] },
      { length: '5/8', rests: true, differingNeighbours: true },
      { length: 3, rests: true, palindrome: true, values: ['1/4', '3/4'] },
      { length: 1, entries: [0, '1/2'] },
      { length: '3/2', attacks: 5, even: true },
    ] satisfies SubjectConstraints[]) {
      const count = Number(countSubjects(constraints));
      const drawn = new Map<string, number>();
      for (let seed = 0; seed < 100 * count; seed += 1) {
        const text = formatRhythm(generateSubject(constraints, seed).rhythm);
        drawn.set(text, (drawn.get(text) ?? 0) + 1);
      }
      // 100 are expected of each, give or take 10; the seeds are fixed.
      expect(drawn.size).toBe(count);
      expect(Math.min(...drawn.values())).toBeGreaterThan(55);
      expect(Math.max(...drawn.values())).toBeLessThan(145);
    }
  });
});
