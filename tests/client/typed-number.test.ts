import { describe, expect, it } from 'vitest';
import { EngineError, formatFraction } from '@/engine';
import { readCycles } from '@/lib/client/typed-cycles';
import { readNumber, readNumbers } from '@/lib/client/typed-number';

describe('one number, as people type it', () => {
  it.each([
    ['3/2', '3/2'], [' 3 / 2 ', '3/2'], ['1 1/2', '3/2'], ['1.5', '3/2'], ['1,5', '3/2'], ['150%', '3/2'], ['150 %', '3/2'], ['½', '1/2'], ['7½', '15/2'], ['3:2', '3/2'],
    ['3⁄2', '3/2'], ['4 measures', '4'], ['2 bars', '2'], ['×2', '2'], ['\u00a05\u00a0', '5'], ['-1/4', '-1/4'], ['−1/4', '-1/4'], ['12,25', '49/4'], ['sesquialtera', '3/2'], ['Subdupla', '1/2'], ['tripla  sesquialtera', '7/2'],
  ])('%s', (text, read) => expect(formatFraction(readNumber(text))).toBe(read));

  it.each([
    ['', 'Nothing is written here. Write a number such as 3, 3/2, 1 1/2, 1.5 or 150%.'],
    ['three', '“three” is no number. Write a number such as 3, 3/2, 1 1/2, 1.5 or 150%.'],
    ['1/0', '“1/0” divides by zero.'],
    ['1/3/4', '“1/3/4” is no number.'],
    ['9'.repeat(40), 'is too large or too fine'],
    ['<b>2</b>', 'is no number'],
    ['🥁', 'is no number'],
  ])('%s is refused with what to type', (text, message) => expect(() => readNumber(text)).toThrow(message));
});

describe('several numbers', () => {
  it.each([
    ['4, 6, 9', ['4', '6', '9']], ['5, 7 1/2, 10, 15', ['5', '15/2', '10', '15']], ['4 6 9', ['4', '6', '9']], ['4;6;9', ['4', '6', '9']], ['1,5; 2,25', ['3/2', '9/4']],
    ['4\t6\t9', ['4', '6', '9']], ['4\n6\n9\n', ['4', '6', '9']], ['3/4, 5/8 and 1', ['3/4', '5/8', '1']], ['7½, 10', ['15/2', '10']], ['4, , 6', ['4', '6']], ['3/2  9/4', ['3/2', '9/4']], ['4 1/2', ['9/2']],
  ])('%j', (text, read) => expect(readNumbers(text).map(formatFraction)).toEqual(read));
  it.each([['', 'Nothing is written here.'], ['4, six', '“six” is no number.']])('%j is refused', (text, message) => expect(() => readNumbers(text)).toThrow(message));
});

describe('cycles', () => {
  const read = (text: string) => readCycles(text).map(({ length, entry, repeats }) => [formatFraction(length), entry && formatFraction(entry), repeats]);
  it('with entries and repeats', () => {
    expect(read('3/4, 5/8 from 1/8, 1 x10')).toEqual([['3/4', undefined, undefined], ['5/8', '1/8', undefined], ['1', undefined, 10]]);
    expect(read('½ from ¼ ×3')).toEqual([['1/2', '1/4', 3]]);
    expect(read('3\t4')).toEqual([['3', undefined, undefined], ['4', undefined, undefined]]);
  });
  it.each(['', '3/4 from', '3/4 from soon', 'x3'])('%j is refused', (text) => expect(() => readCycles(text)).toThrow(EngineError));
});
