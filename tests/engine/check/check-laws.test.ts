import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  Fraction, type Mistake, type Rhythm, type Step, type Value,
  applySteps, augment, checkAnswer, formatFraction, formatRhythm, retrograde, rotate,
} from '@/engine';
import { align } from '@/engine/check/align';
import { arbitraryFactor, arbitraryRhythm } from '../rhythm/arbitrary-rhythm';

const subject = arbitraryRhythm.filter((rhythm) => rhythm.length >= 3 && rhythm.length <= 14 && rhythm.some(({ rest }) => !rest)).map((rhythm) => rhythm.map(({ length, rest }) => ({ length, rest })));
const stretch = arbitraryFactor.filter((factor) => !factor.equals(1));
const runs = { numRuns: 300 };

/** A rhythm as it is heard, by means of its own: rests joined, as text. */
function heardText(rhythm: Rhythm): string {
  const joined: Value[] = [];
  for (const value of rhythm) {
    const last = joined.at(-1);
    if (value.rest && last?.rest) joined[joined.length - 1] = { length: last.length.add(value.length), rest: true };
    else joined.push({ length: value.length, rest: value.rest });
  }
  return formatRhythm(joined);
}

/** An answer with one mistake in it: what was asked, what is written, and the mistake's name. */
type Planted = { readonly steps: Step[]; readonly answer: Rhythm; readonly code: Mistake };

const augmentBy = (factor: Fraction): Step => ({ kind: 'augment', factor: formatFraction(factor) });
const each = (rhythm: Rhythm, kind: boolean, factor: Fraction): Rhythm => rhythm.map((value) => (value.rest === kind ? { ...value, length: value.length.mul(factor) } : value));

const plant = (rhythm: Rhythm): fc.Arbitrary<Planted> =>
  fc.oneof(
    stretch.map((factor): Planted => ({ code: 'factor-inverted', steps: [augmentBy(factor)], answer: augment(rhythm, factor.inverse()) })),
    fc.tuple(stretch, arbitraryFactor).map(([factor, other]): Planted => ({ code: 'wrong-factor', steps: [augmentBy(factor)], answer: augment(rhythm, other) })),
    stretch.map((factor): Planted => ({ code: 'rests-not-stretched', steps: [augmentBy(factor)], answer: each(rhythm, false, factor) })),
    stretch.map((factor): Planted => ({ code: 'only-rests-stretched', steps: [augmentBy(factor)], answer: each(rhythm, true, factor) })),
    stretch.map((factor): Planted => ({ code: 'not-reversed', steps: [augmentBy(factor), { kind: 'retrograde', by: 'values' }], answer: augment(rhythm, factor) })),
    fc.constant<Planted>({ code: 'reversed-by-attacks', steps: [{ kind: 'retrograde', by: 'values' }], answer: retrograde(rhythm, 'attacks') }),
    fc.constant<Planted>({ code: 'reversed-by-values', steps: [{ kind: 'retrograde', by: 'attacks' }], answer: retrograde(rhythm, 'values') }),
    fc.integer({ min: 1, max: 6 }).map((steps): Planted => ({ code: 'rotated-the-wrong-way', steps: [{ kind: 'rotate', steps, by: 'values' }], answer: rotate(rhythm, -steps, 'values') })),
    fc.integer({ min: 1, max: 6 }).map((steps): Planted => ({ code: 'rotated-too-far', steps: [{ kind: 'rotate', steps, by: 'values' }], answer: rotate(rhythm, steps + 1, 'values') })),
    fc.integer({ min: 2, max: 6 }).map((steps): Planted => ({ code: 'rotated-too-little', steps: [{ kind: 'rotate', steps, by: 'values' }], answer: rotate(rhythm, steps - 1, 'values') })),
  );

describe('laws of the checker', () => {
  it('the key is right however it is spelled: rests cut in two, values through their text', () => {
    fc.assert(
      fc.property(subject, stretch, fc.constantFrom('values' as const, 'attacks' as const), (rhythm, factor, by) => {
        const steps: Step[] = [augmentBy(factor), { kind: 'retrograde', by }];
        const key = applySteps(rhythm, steps);
        const cut = key.flatMap((value): Value[] => (value.rest ? [1, 2].map(() => ({ ...value, length: value.length.div(2) })) : [value]));
        for (const answer of [key, cut, formatRhythm(key)]) {
          const { correct, marks, diagnoses } = checkAnswer({ subject: rhythm, steps, answer });
          expect([correct, marks.got, diagnoses]).toEqual([true, marks.of, []]);
        }
      }),
      runs,
    );
  });

  it('a planted mistake is among the named ones; where it is not first, another explains the answer as well', () => {
    let planted = 0;
    let notFirst = 0;
    fc.assert(
      fc.property(subject.chain((rhythm) => plant(rhythm).map((one) => ({ rhythm, ...one }))), ({ rhythm, steps, answer, code }) => {
        const { expected, correct, diagnoses } = checkAnswer({ subject: rhythm, steps, answer });
        const isHarmless = heardText(answer) === heardText(expected);
        expect(correct).toBe(isHarmless);
        if (isHarmless) return;
        expect(diagnoses.map((one) => one.code)).toContain(code);
        planted += 1;
        if (diagnoses[0]!.code !== code) notFirst += 1;
      }),
      { numRuns: 3_000 },
    );
    console.info(`checker: of ${planted} planted mistakes ${notFirst} (${((100 * notFirst) / planted).toFixed(1)} %) are not named first, since another explains the same answer`);
    expect(planted).toBeGreaterThan(1_000);
    expect(notFirst / planted).toBeLessThan(0.35);
  });

  it('one slip costs one mark, wherever it is, and is told at its place', () => {
    fc.assert(
      fc.property(subject, stretch, fc.nat(100), fc.constantFrom('value-missing' as const, 'value-added' as const, 'value-wrong' as const), (rhythm, factor, where, slip) => {
        const steps = [augmentBy(factor)];
        const key = applySteps(rhythm, steps);
        const index = where % key.length;
        // A length that nothing else in the key has, so that the slip cannot be read as another.
        const odd: Value = { length: new Fraction(1, 9973), rest: false };
        fc.pre(!key[index]!.rest && !key[index - 1]?.rest && !key[index + 1]?.rest);
        const answer = slip === 'value-missing' ? key.toSpliced(index, 1) : slip === 'value-added' ? key.toSpliced(index, 0, odd) : key.with(index, odd);
        fc.pre(answer.length > 0);
        const { correct, marks, values } = checkAnswer({ subject: rhythm, steps, answer });
        expect([correct, marks.of - marks.got]).toEqual([false, 1]);
        const wrong = values.filter(({ verdict }) => verdict !== 'right');
        expect(wrong.map(({ verdict }) => verdict)).toEqual([{ 'value-missing': 'missing', 'value-added': 'extra', 'value-wrong': 'wrong-length' }[slip]]);
      }),
      runs,
    );
  });

  it('the fewest slips, as found by trying every way', () => {
    /** Fewest slips between two short lists, each a change, a value left out or put in, struck apart or held together. */
    const fewest = (key: Rhythm, answer: Rhythm): number => {
      const known = new Map<string, number>();
      const from = (i: number, j: number): number => {
        if (i === key.length && j === answer.length) return 0;
        const place = `${i} ${j}`;
        const before = known.get(place);
        if (before !== undefined) return before;
        const ways: number[] = [];
        if (i < key.length) ways.push(11 + from(i + 1, j));
        if (j < answer.length) ways.push(11 + from(i, j + 1));
        if (i < key.length && j < answer.length) {
          const [a, b] = [key[i]!, answer[j]!];
          const same = a.rest === b.rest && a.length.equals(b.length);
          ways.push((same ? 0 : a.rest === b.rest || a.length.equals(b.length) ? 10 : 14) + from(i + 1, j + 1));
          for (let count = 2; count <= 4; count += 1) {
            const sums = (whole: Value, parts: Rhythm) => !whole.rest && parts.length === count && parts.every(({ rest }) => !rest) && parts.reduce((sum, { length }) => sum.add(length), new Fraction(0)).equals(whole.length);
            if (sums(a, answer.slice(j, j + count))) ways.push(10 + from(i + 1, j + count));
            if (sums(b, key.slice(i, i + count))) ways.push(10 + from(i + count, j + 1));
          }
        }
        const least = Math.min(...ways);
        known.set(place, least);
        return least;
      };
      return from(0, 0);
    };
    const short = fc.array(fc.tuple(fc.constantFrom(1, 1, 2, 3, 4), fc.boolean()).map(([n, rest]): Value => ({ length: new Fraction(n, 8), rest: rest && n === 1 })), { maxLength: 40 });
    fc.assert(
      fc.property(short, short, (key, answer) => {
        expect(align(key, answer).cost).toBe(fewest(key, answer));
      }),
      { numRuns: 400 },
    );
  });

  it('whatever is answered: marks within bounds, every value of key and answer accounted for once, sentences whole', () => {
    fc.assert(
      fc.property(subject, arbitraryRhythm, stretch, (rhythm, answer, factor) => {
        fc.pre(answer.length > 0);
        const { marks, values, diagnoses, expected, correct } = checkAnswer({ subject: rhythm, steps: [augmentBy(factor)], answer, metre: '4/4' });
        expect(marks.got).toBeGreaterThanOrEqual(0);
        expect(marks.got).toBeLessThanOrEqual(marks.of);
        const side = (pick: 'expected' | 'given') => formatRhythm(values.flatMap((value) => (value[pick] ? [value[pick]] : [])));
        expect(side('expected')).toBe(heardText(expected));
        expect(side('given')).toBe(heardText(answer));
        expect(diagnoses.length > 0).toBe(!correct);
        for (const { message } of diagnoses) expect(message).toMatch(/^[A-Z].*\.$/);
      }),
      runs,
    );
  });
});
