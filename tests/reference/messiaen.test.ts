import { describe, expect, it } from 'vitest';
import {
  Fraction, addToEach, augment, diminish, formatFraction, formatRhythm, ladder, parseRhythm, retrograde, toFraction, totalLength,
} from '@/engine';
import { inUnits, isPalindrome } from './rhythms';

/**
 * Messiaen, Technique de mon langage musical (1944; tr. Satterfield 1956), ch. IV, exx. 23-24, tr. pp. 18-19, as given by a
 * commentary on the treatise (ch04-augmented-diminished.html).
 */
const FACTORS: [augmentation: string, factor: string, withdrawal: string, inverse: string][] = [
  ['add a quarter of each value', '5/4', 'take away a fifth', '4/5'],
  ['add a third', '4/3', 'take away a quarter', '3/4'],
  ['add the dot', '3/2', 'withdraw the dot', '2/3'],
  ['add the value to itself', '2', 'take half', '1/2'],
  ['add twice the value', '3', 'take two thirds', '1/3'],
  ['add three times the value', '4', 'take three quarters', '1/4'],
  ['add four times the value', '5', 'take four fifths', '1/5'],
];

/** 1/4 1/8 1/4 under each factor: recomputed from the table above. */
const WORKED: [factor: string, values: string, total: string][] = [
  ['5/4', '5/16 5/32 5/16', '25/32'],
  ['4/3', '1/3 1/6 1/3', '5/6'],
  ['3/2', '3/8 3/16 3/8', '15/16'],
  ['2', '1/2 1/4 1/2', '5/4'],
  ['3', '3/4 3/8 3/4', '15/8'],
  ['4', '1 1/2 1', '5/2'],
  ['5', '5/4 5/8 5/4', '25/8'],
  ['4/5', '1/5 1/10 1/5', '1/2'],
  ['3/4', '3/16 3/32 3/16', '15/32'],
  ['2/3', '1/6 1/12 1/6', '5/12'],
  ['1/2', '1/8 1/16 1/8', '5/16'],
  ['1/3', '1/12 1/24 1/12', '5/24'],
  ['1/4', '1/16 1/32 1/16', '5/32'],
  ['1/5', '1/20 1/40 1/20', '1/8'],
];

describe('Messiaen, Technique de mon langage musical, ch. IV: augmentations and their inverses (a commentary on exx. 23-24)', () => {
  const subject = parseRhythm('1/4 1/8 1/4');

  it.each(FACTORS)('%s (%s) is undone by: %s (%s)', (_augmentation, factor, _withdrawal, inverse) => {
    expect(formatFraction(toFraction(factor).mul(toFraction(inverse)))).toBe('1');
    expect(augment(augment(subject, factor), inverse)).toEqual(subject);
    expect(augment(augment(subject, inverse), factor)).toEqual(subject);
    expect(formatRhythm(diminish(subject, factor))).toBe(formatRhythm(augment(subject, inverse)));
  });

  it.each(WORKED)('long, short, long times %s is %s', (factor, values, total) => {
    const stretched = augment(subject, factor);
    expect(formatRhythm(stretched)).toBe(values);
    expect(formatFraction(totalLength(stretched))).toBe(total);
  });

  it('a quarter added is not undone by a quarter taken away (T5: 15/16 is left)', () => {
    const back = augment(augment(subject, '5/4'), '3/4');
    expect(formatRhythm(back)).toBe('15/64 15/128 15/64');
    expect(formatFraction(totalLength(back).div(totalLength(subject)))).toBe('15/16');
    expect(augment(augment(subject, '5/4'), '4/5')).toEqual(subject);
  });
});

describe('Messiaen, ex. 20 (a commentary): A lasts 5 sixteenths, its double 5 eighths, its quadruple 5 quarters', () => {
  it.each([['1', '5/16'], ['2', '5/8'], ['4', '5/4']])('times %s lasts %s', (factor, total) => {
    expect(formatFraction(totalLength(augment(inUnits('2 1 2', 16), factor)))).toBe(total);
  });
});

describe('Messiaen, exx. 25-27 (a commentary): inexact augmentation is no uniform scaling', () => {
  it('shows as unlike ratios of note to note', () => {
    const from = parseRhythm('1/4 1/8 1/4');
    const to = parseRhythm('1/2 3/16 1/2');
    const ratios = to.map((value, i) => value.length.div(from[i]!.length));
    expect(ratios.map(formatFraction)).toEqual(['2', '3/2', '2']);
    expect(ladder(ratios).equalSteps).toBe(false);
  });
});

describe('Messiaen, ch. V (a commentary; universalis.fr, A. Feron): nonretrogradable rhythms', () => {
  const reversed = (values: string) => retrograde(inUnits(values, 16), 'values');

  it('retrogradable: 4 1 4 4 becomes 4 4 1 4', () => {
    expect(formatRhythm(reversed('4 1 4 4'))).toBe(formatRhythm(inUnits('4 4 1 4', 16)));
    expect(isPalindrome(inUnits('4 1 4 4', 16), reversed('4 1 4 4'))).toBe(false);
  });

  it('nonretrogradable: 4 1 1 4, with no single centre', () => {
    expect(isPalindrome(inUnits('4 1 1 4', 16), reversed('4 1 1 4'))).toBe(true);
  });

  it.each(['3 5 3', '1 7 1', '5/2 3 5/2'])('every A B A: %s', (values) => {
    expect(isPalindrome(inUnits(values, 16), reversed(values))).toBe(true);
  });

  it('a group, a free central value of five sixteenths (ex. 32), and the group reversed', () => {
    expect(isPalindrome(inUnits('3 2 5 2 3', 16), reversed('3 2 5 2 3'))).toBe(true);
  });

  it.each(['3 5 8 5 3', '4 3 7 3 4'])('Danse de la fureur, from memory: %s', (values) => {
    expect(isPalindrome(inUnits(values, 16), reversed(values))).toBe(true);
  });
});

describe('Messiaen, exx. 28-29 (a commentary): a formula of 13 quarters keeps its length in retrograde', () => {
  it.each(['values', 'attacks'] as const)('by %s', (by) => {
    const formula = parseRhythm('3/4 1/2 3/8 (1/8) 1/2 1/4 3/4');
    expect(formatFraction(totalLength(formula).mul(4))).toBe('13');
    expect(formatFraction(totalLength(retrograde(formula, by)).mul(4))).toBe('13');
  });
});

describe('Messiaen, ch. III (a commentary): added values are no uniform scaling', () => {
  const plain = parseRhythm('1/4 1/8 1/4');
  it.each([
    ['a short note', '1/4 1/8 1/16 1/4', '1/16'],
    ['a short rest', '1/4 1/8 (1/16) 1/4', '1/16'],
    ['a dot', '1/4 3/16 1/4', '1/16'],
  ])('%s adds to the total and scales nothing', (_kind, text, added) => {
    const changed = parseRhythm(text);
    expect(formatFraction(totalLength(changed).sub(totalLength(plain)))).toBe(added);
    const factor = totalLength(changed).div(totalLength(plain));
    expect(formatRhythm(augment(plain, factor))).not.toBe(text);
  });

  it('a dot on every note is a scaling, a sixteenth on every note is none', () => {
    expect(formatRhythm(augment(plain, '3/2'))).toBe('3/8 3/16 3/8');
    const longer = addToEach(plain, '1/16');
    const ratios = longer.map((value, i) => value.length.div(plain[i]!.length));
    expect(ratios.map(formatFraction)).toEqual(['5/4', '3/2', '5/4']);
  });
});

/** T4: augmentation alone means twice in Grove, AP and Hutchinson, any of seven factors in Messiaen: the factor is an argument. */
describe('T4: no factor is taken for granted', () => {
  it.each([undefined, null])('augment by %s is refused', (factor) => {
    expect(() => augment(parseRhythm('1/4'), factor as unknown as string)).toThrow(expect.objectContaining({ code: 'invalid_fraction' }));
  });

  it('a factor in any writing is the same factor', () => {
    for (const factor of ['3/2', '1 1/2', '1.5', '150%', new Fraction(3, 2)]) {
      expect(formatRhythm(augment(parseRhythm('1/4'), factor))).toBe('3/8');
    }
  });
});
