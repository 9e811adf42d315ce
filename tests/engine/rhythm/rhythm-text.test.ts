import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, formatRhythm, parseRhythm, totalLength } from '@/engine';
import { arbitraryRhythm } from './arbitrary-rhythm';

describe('parseRhythm reads', () => {
  it.each([
    ['fractions, decimals and integers', '1/4 0.25 1 .5 1.5', '1/4 1/4 1 1/2 3/2'],
    ['lengths not in lowest terms', '2/8 4/16 10/5', '1/4 1/4 2'],
    ['a quotient of decimals', '0.5/3', '1/6'],
    ['a tenth exactly', '0.1 0.2', '1/10 1/5'],
    ['one attack held on', '1/4+1/16', '5/16'],
    ['a sum of many', '1/4+1/8+1/16+1/16', '1/2'],
    ['a sum with spaces about the plus', '1/4 + 1/8', '3/8'],
    ['a rest that is a sum', '(1/4+1/8)', '(3/8)'],
    ['a rest with spaces in its brackets', '( 1/4 )', '(1/4)'],
    ['an accent', '1/4>', '1/4>'],
    ['a strong accent', '1/4^', '1/4^'],
    ['a roll', '1/4///', '1/4///'],
    ['a roll on a whole note', '1///', '1///'],
    ['a sound', '1/4@2', '1/4@2'],
    ['all marks', '3/8^///@12', '3/8^///@12'],
    ['marks after a sum', '1/4+1/16>@3', '5/16>@3'],
    ['a repeat', '[1/4 (1/8)]x3', '1/4 (1/8) 1/4 (1/8) 1/4 (1/8)'],
    ['a repeat with the sign of multiplication', '[1/4]×2', '1/4 1/4'],
    ['a repeat with spaces', '[ 1/4 1/8 ] x2 1/2', '1/4 1/8 1/4 1/8 1/2'],
    ['a repeat once', '[1/4]x1', '1/4'],
    ['two repeats side by side', '[1/4]x2[1/8]x2', '1/4 1/4 1/8 1/8'],
    ['a repeat whose number has noughts before it', `[1/4]x${'0'.repeat(40)}2`, '1/4 1/4'],
    ['a repeat number far from its bracket', `[1/4]${' '.repeat(60)}x2`, '1/4 1/4'],
    ['marks inside a repeat', '[1/4>@2 1/8]x2', '1/4>@2 1/8 1/4>@2 1/8'],
    ['bar lines, which change nothing', '1/4 | 1/4|1/4 || (1/4)', '1/4 1/4 1/4 (1/4)'],
    ['a bar line first and last', '| 1/4 |', '1/4'],
    ['a value held over a bar line', '1/4+|1/4', '1/2'],
    ['a value held over a bar line with spaces', '1/4+ | 1/4', '1/2'],
    ['a value held over two bar lines', '1/4+|1+|1/8>', '11/8>'],
    ['a rest held over a bar line', '(1/4+|1/4)', '(1/2)'],
    ['tabs and line ends of every kind', '1/4\t1/8\r\n1/16\n1/32\r1/64', '1/4 1/8 1/16 1/32 1/64'],
    ['no-break and thin spaces', '1/4\u00a01/8\u20091/16', '1/4 1/8 1/16'],
  ])('%s', (_what, text, expected) => {
    expect(formatRhythm(parseRhythm(text))).toBe(expected);
  });

  it('gives only the marks that are written', () => {
    expect(parseRhythm('1/4 (1/4) 1/4>///@2').map(({ length, ...rest }) => ({ ...rest, length: length.toFraction() }))).toEqual([
      { length: '1/4', rest: false },
      { length: '1/4', rest: true },
      { length: '1/4', rest: false, accent: 'accent', roll: true, sound: 2 },
    ]);
  });
});

describe('parseRhythm with a metre takes', () => {
  it.each([
    ['full measures', '1/4 1/4 1/2 | 1', '4/4'],
    ['a last measure left open', '1 | 1/4', '4/4'],
    ['a last measure closed', '1 | 1 |', '4/4'],
    ['a value held over', '3/4 1/4+|1/4 3/4 |', '4/4'],
    ['a value held over two bar lines', '1/2 1/2+|1+|1/2 1/2 |', '4/4'],
    ['a rest held over', '3/4 (1/4+|1/4) 3/4 |', '4/4'],
    ['an additive metre', '3/8 1/4 1/4 | 7/8 |', '3+2+2/8'],
    ['bar lines in a repeat', '[1/2 1/2 |]x3', '4/4'],
    ['a repeat that begins inside a measure', '1/4 [1/2 | 1/4]x2', '3/4'],
    ['a repeat with no bar line in it', '[1/8]x8 | [1/8]x8 |', '4/4'],
    ['a text with no bar lines at all', '1/4 7 1/3', '4/4'],
    ['tuplets', '1/12 1/12 1/12 3/4 | 1/5 1/5 1/5 1/5 1/5 |', '4/4'],
  ])('%s', (_what, text, metre) => {
    expect(formatRhythm(parseRhythm(text, { metre }))).toBe(formatRhythm(parseRhythm(text)));
  });
});

describe('laws of rhythm text', () => {
  it('what is formatted and read is the same rhythm', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (rhythm) => {
        const read = parseRhythm(formatRhythm(rhythm));
        expect(read).toEqual(rhythm);
      }),
    );
  });

  it('canonical text is canonical', () => {
    fc.assert(
      fc.property(arbitraryRhythm, (rhythm) => {
        const text = formatRhythm(rhythm);
        expect(formatRhythm(parseRhythm(text))).toBe(text);
        expect(text).not.toMatch(/[|+[\]]|\s\s|^\s|\s$/);
      }),
    );
  });

  it('bar lines, white space and repeats change nothing', () => {
    const separator = fc.constantFrom(' ', '  ', '\n', ' | ', '|', '\t|\r\n');
    fc.assert(
      fc.property(arbitraryRhythm, fc.array(separator, { minLength: 24, maxLength: 24 }), fc.integer({ min: 1, max: 5 }), (rhythm, between, times) => {
        const text = formatRhythm(rhythm);
        const spread = text.split(' ').reduce((all, piece, index) => `${all}${between[index % between.length]}${piece}`);
        expect(formatRhythm(parseRhythm(spread))).toBe(text);
        const repeated = parseRhythm(`[${spread}]x${times}`);
        expect(formatRhythm(repeated)).toBe(Array<string>(times).fill(text).join(' '));
        expect(totalLength(repeated).equals(totalLength(rhythm).mul(times))).toBe(true);
      }),
    );
  });

  it('any text gives a rhythm or an EngineError whose place lies in the text', () => {
    const junk = fc.oneof(
      fc.string({ maxLength: 60 }),
      fc.stringMatching(/^[-0-9/.+()[\]x|>^@ ]{0,40}$/),
      fc.array(fc.constantFrom('1/4', '(1/8)', '[', ']x2', '|', '+', ' ', '///', '>', '@2', '1/0', '\n', '(', ')', '🥁'), { maxLength: 30 }).map((parts) => parts.join('')),
    );
    fc.assert(
      fc.property(junk, fc.constantFrom(undefined, '4/4', '7/8'), (text, metre) => {
        try {
          const read = parseRhythm(text, metre === undefined ? {} : { metre });
          expect(formatRhythm(parseRhythm(formatRhythm(read)))).toBe(formatRhythm(read));
        } catch (error) {
          if (!(error instanceof EngineError) || !('offset' in error) || !('length' in error)) throw error;
          const [offset, length] = [Number(error.offset), Number(error.length)];
          expect(length).toBeGreaterThan(0);
          expect(offset).toBeGreaterThanOrEqual(0);
          expect(offset + length).toBeLessThanOrEqual(Math.max(text.length, 1));
        }
      }),
      { numRuns: 2_000 },
    );
  });
});
