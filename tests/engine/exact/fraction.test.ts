import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, Fraction, augment, formatFraction, ladder, parseRhythm, toFactor, toFraction, totalLength } from '@/engine';
import { gridFor } from '@/engine/exact/grid';

function codeOf(act: () => unknown): string {
  try {
    act();
  } catch (error) {
    if (error instanceof EngineError) return error.code;
    throw error;
  }
  return 'nothing thrown';
}

describe('toFraction reads', () => {
  it.each([
    ['3/2', '3/2'],
    ['2', '2'],
    ['1 1/2', '3/2'],
    ['  1   1 / 2 ', '3/2'],
    ['150%', '3/2'],
    ['62.5 %', '5/8'],
    ['1.5', '3/2'],
    ['.5', '1/2'],
    ['0.1', '1/10'],
    ['1.5/2.5', '3/5'],
    ['-3/2', '-3/2'],
    ['\u22123/2', '-3/2'],
    ['-1 1/2', '-3/2'],
    ['+4/6', '2/3'],
    ['0', '0'],
    ['0/5', '0'],
    ['12345678.9', '123456789/10'],
  ])('%j as %s', (text, expected) => {
    expect(formatFraction(toFraction(text))).toBe(expected);
  });

  it.each([0, 1, -7, 4096])('the integer %d', (n) => {
    expect(toFraction(n).equals(new Fraction(n))).toBe(true);
  });

  it('a Fraction as it is', () => {
    const half = new Fraction(1, 2);
    expect(toFraction(half)).toBe(half);
  });

  it('a tenth exactly, though no binary number holds it', () => {
    const tenth = toFraction('0.1');
    expect([tenth.n, tenth.d]).toEqual([1n, 10n]);
    expect(toFraction('0.1').add(toFraction('0.2')).equals(toFraction('0.3'))).toBe(true);
  });
});

describe('toFraction refuses', () => {
  it.each([
    '', '   ', '1/0', '0/0', '1/0.0', '1/3/4', '1/-2', '1//2', '1 2', '1 1', 'a', '1e3', '0x10', '1,5', '5.', '.', '/', '%', '--1', '1/2%',
    '½', '١', 'Infinity', 'NaN', `1/${10 ** 9 + 1}`, '1'.repeat(65), '0.0000000001',
  ])('%j', (text) => {
    expect(codeOf(() => toFraction(text))).toBe('invalid_fraction');
  });

  it.each([1.5, 0.1, Number.NaN, Number.POSITIVE_INFINITY, 2 ** 53])('the number %d, which is no exact integer', (n) => {
    expect(codeOf(() => toFraction(n))).toBe('invalid_fraction');
  });

  it.each([undefined, null, {}, [], true])('%j, which is no fraction at all', (input) => {
    expect(codeOf(() => toFraction(input as unknown as string))).toBe('invalid_fraction');
  });
});

describe('toFactor', () => {
  it.each(['0', '-1', '-1/4', '1000000000', '1/1000000000', '1001', '1/1001'])('refuses %s', (factor) => {
    expect(codeOf(() => toFactor(factor))).toBe('invalid_factor');
  });
  it.each(['1/1000', '1000', '3/2'])('takes %s', (factor) => {
    expect(formatFraction(toFactor(factor))).toBe(factor);
  });
});

describe('laws of exact fractions', () => {
  const term = fc.integer({ min: 1, max: 1_000_000 });

  it('format and read give the same back', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1_000_000, max: 1_000_000 }), term, (n, d) => {
        const value = new Fraction(n, d);
        expect(toFraction(formatFraction(value)).equals(value)).toBe(true);
      }),
    );
  });

  it('any text gives a fraction or an EngineError, nothing else', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string({ maxLength: 80 }), fc.stringMatching(/^[-+0-9./% ]{0,12}$/)), (text) => {
        const code = codeOf(() => toFraction(text));
        expect(['nothing thrown', 'invalid_fraction']).toContain(code);
      }),
    );
  });
});

describe('sums of lengths without a common measure', () => {
  it('of a few are exact', () => {
    const { total } = ladder(['1/999999937', '1/999999929', '1/999999893']);
    const expected = new Fraction(1n, 999999937n).add(new Fraction(1n, 999999929n)).add(new Fraction(1n, 999999893n));
    expect(total.equals(expected)).toBe(true);
  });

  it('of a thousand are refused rather than counted for ever', () => {
    const lengths = Array.from({ length: 1_000 }, (_, k) => `1/${900_000_001 + 2 * k}`);
    expect(codeOf(() => ladder(lengths))).toBe('too_fine');
    const rhythm = lengths.map((length) => ({ length: toFraction(length), rest: false }));
    expect(codeOf(() => totalLength(rhythm))).toBe('too_fine');
  });

  it('of a hundred thousand values on one grid are exact', () => {
    const rhythm = augment(parseRhythm('[1/12 1/10 1/14 1/16]x10000 [1/12 1/10 1/14 1/16]x10000'), '27/8');
    const one = ['1/12', '1/10', '1/14', '1/16'].reduce((total, length) => total.add(length), new Fraction(0));
    expect(totalLength(rhythm).equals(one.mul(20_000).mul('27/8'))).toBe(true);
  });
});

describe('gridFor', () => {
  it('counts up to the longest position, and refuses what would pass the exact integers there', () => {
    const fine = new Fraction(1, 999_999_937);
    expect(gridFor([fine], new Fraction(9_000_000)).ticks(fine)).toBe(1);
    expect(() => gridFor([fine], new Fraction(10_000_000))).toThrow(EngineError);
  });
});
