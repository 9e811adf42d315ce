import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  EngineError, Fraction, attacks, augment, formatFraction, measuresOf, metreOfLength, parseMetre, parseRhythm, secondsOf, totalLength,
} from '@/engine';
import { arbitraryRhythm } from './arbitrary-rhythm';

const texts = (values: readonly Fraction[]): string[] => values.map(formatFraction);

describe('totalLength and attacks', () => {
  it.each([
    ['1/4 1/8 1/4', '5/8', ['0', '1/4', '3/8']],
    ['(1/8) 1/4 (1/4) 1/8', '3/4', ['1/8', '5/8']],
    ['(1/4) (1/8)', '3/8', []],
    ['1/12 1/12 1/12 1/5', '9/20', ['0', '1/12', '1/6', '1/4']],
  ])('of %s', (text, total, at) => {
    const rhythm = parseRhythm(text);
    expect(formatFraction(totalLength(rhythm))).toBe(total);
    expect(texts(attacks(rhythm))).toEqual(at);
  });

  it('of nothing are 0 and none', () => {
    expect(formatFraction(totalLength([]))).toBe('0');
    expect(attacks([])).toEqual([]);
  });

  it('agree with plain addition of fractions', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (rhythm) => {
        let at = new Fraction(0);
        const expected: string[] = [];
        for (const value of rhythm) {
          if (!value.rest) expected.push(formatFraction(at));
          at = at.add(value.length);
        }
        expect(texts(attacks(rhythm))).toEqual(expected);
        expect(totalLength(rhythm).equals(at)).toBe(true);
      }),
    );
  });

  it('place the last of 100,000 triplet eighths exactly', () => {
    const at = attacks(parseRhythm('[1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000 [1/12]x10000'));
    expect(formatFraction(at[99_999]!)).toBe(formatFraction(new Fraction(99_999, 12)));
  });
});

describe('secondsOf', () => {
  it.each([
    ['1', { beat: '1/4', perMinute: '60' }, '4'],
    ['1/4', { beat: '1/4', perMinute: '84' }, '5/7'],
    ['77', { beat: '1/4', perMinute: '84' }, '220'],
    ['3/8', { beat: '3/8', perMinute: '84' }, '5/7'],
    ['1/12', { beat: '1/8', perMinute: '100' }, '2/5'],
    ['0', { beat: '1/4', perMinute: '60' }, '0'],
  ])('of %s at %j is %s', (length, tempo, seconds) => {
    expect(formatFraction(secondsOf(length, tempo))).toBe(seconds);
  });

  it.each([
    { beat: '0', perMinute: '60' },
    { beat: '1/4', perMinute: '0' },
    { beat: '-1/4', perMinute: '60' },
    { beat: '1/4', perMinute: '-60' },
  ])('refuses the tempo %j', (tempo) => {
    expect(() => secondsOf('1', tempo)).toThrow(expect.objectContaining({ code: 'invalid_tempo' }));
  });
});

describe('measuresOf', () => {
  it.each([
    ['5', '4/4', '5'],
    ['1', '7/8', '8/7'],
    ['7/8', '3+2+2/8', '1'],
    ['1/3', '6/8', '4/9'],
  ])('%s in %s is %s', (length, metre, measures) => {
    expect(formatFraction(measuresOf(length, metre))).toBe(measures);
  });
});

/** How 5, 7, 8 and 11 are grouped: common practice, no source; the contract fixes it. */
describe('parseMetre', () => {
  it.each([
    ['4/4', 'simple', [1, 1, 1, 1], '1'],
    ['3/4', 'simple', [1, 1, 1], '3/4'],
    ['2/2', 'simple', [1, 1], '1'],
    ['6/8', 'compound', [3, 3], '3/4'],
    ['9/8', 'compound', [3, 3, 3], '9/8'],
    ['12/8', 'compound', [3, 3, 3, 3], '3/2'],
    ['5/4', 'additive', [3, 2], '5/4'],
    ['5/8', 'additive', [3, 2], '5/8'],
    ['7/8', 'additive', [2, 2, 3], '7/8'],
    ['8/8', 'additive', [3, 3, 2], '1'],
    ['11/8', 'additive', [3, 3, 3, 2], '11/8'],
    ['3+2+2/8', 'additive', [3, 2, 2], '7/8'],
    ['2+3/4', 'additive', [2, 3], '5/4'],
    ['2+2+2+3/8', 'additive', [2, 2, 2, 3], '9/8'],
    [' 3 + 2 + 2 / 8 ', 'additive', [3, 2, 2], '7/8'],
  ])('%s', (text, kind, groups, length) => {
    const metre = parseMetre(text);
    expect([metre.kind, metre.groups, formatFraction(metre.length)]).toEqual([kind, groups, length]);
    expect(metre.groups.reduce((a, b) => a + b, 0)).toBe(metre.count);
  });

  it.each(['', '4', '4/', '/4', '4/3', '0/4', '4/0', '4/128', '65/4', '3+0/8', '3++2/8', '+3/8', '-4/4', '4/4/4', 'C', '1.5/4', '(3+2)/8', '999+999/8'])('refuses %j', (text) => {
    try {
      parseMetre(text);
    } catch (error) {
      expect(error).toBeInstanceOf(EngineError);
      expect((error as EngineError).code).toBe('invalid_metre');
      return;
    }
    throw new Error(`${text} was read`);
  });

  it('groups every plain number of beats into twos and threes that add up', () => {
    for (let count = 5; count <= 64; count += 1) {
      const { groups } = parseMetre(`${count}/8`);
      expect(groups.reduce((a, b) => a + b, 0)).toBe(count);
      expect(groups.every((group) => group === 2 || group === 3)).toBe(true);
    }
  });

  it.each([
    ['1/2', '4/4', '2/4'],
    ['3/8', '4/4', '3/8'],
    ['7/8', '3+2+2/8', '3+2+2/8'],
    ['5/16', '4/4', '5/16'],
  ])('a measure of %s cut from %s is written in %s', (length, like, metre) => {
    expect(metreOfLength(new Fraction(length), like)).toBe(metre);
  });

  it('no metre has the length of a third', () => {
    expect(() => metreOfLength(new Fraction(1, 3), '4/4')).toThrow(expect.objectContaining({ code: 'invalid_metre' }));
  });
});

describe('time and length', () => {
  it('seconds scale as lengths do', () => {
    fc.assert(
      fc.property(arbitraryRhythm, fc.integer({ min: 1, max: 20 }), (rhythm, factor) => {
        const tempo = { beat: '3/8', perMinute: '84' };
        const once = secondsOf(totalLength(rhythm), tempo);
        expect(secondsOf(totalLength(augment(rhythm, factor)), tempo).equals(once.mul(factor))).toBe(true);
      }),
    );
  });
});
