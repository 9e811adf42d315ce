import { describe, expect, it } from 'vitest';
import { augment, formatFraction, formatRhythm, ladder, parseRhythm, retrograde, totalLength } from '@/engine';
import { DECI_TALAS } from './deci-talas';
import { inUnits, isPalindrome } from './rhythms';

const SOURCE = 'Sharngadeva’s table, data of L. Poeppel, decitala (MIT)';

describe(`${SOURCE}: every tala`, () => {
  it('is there: 130 files, numbers 1 to 120', () => {
    expect(DECI_TALAS).toHaveLength(130);
    expect(new Set(DECI_TALAS.map(([name]) => Number(name.split('_')[0])))).toEqual(new Set(Array.from({ length: 120 }, (_, k) => k + 1)));
  });

  it.each(DECI_TALAS)('%s: %s adds up to %s sixteenths', (_name, values, total) => {
    const tala = inUnits(values, 16);
    expect(formatFraction(totalLength(tala).mul(16))).toBe(total);
    expect(retrograde(retrograde(tala, 'values'), 'values')).toEqual(tala);
    expect(augment(augment(tala, '5/4'), '4/5')).toEqual(tala);
    expect(parseRhythm(formatRhythm(tala))).toEqual(tala);
  });
});

describe(`${SOURCE}: palindromes`, () => {
  it('are exactly seven, besides those of one value over and over', () => {
    const found = DECI_TALAS.filter(([, values]) => {
      const tala = inUnits(values, 16);
      return new Set(values.split(' ')).size > 1 && isPalindrome(tala, retrograde(tala, 'values'));
    });
    expect(found.map(([name]) => name)).toEqual([
      '26_A_Iryasra_Varna',
      '34_Carabhalila',
      '46_Jayacri',
      '51_Vijaya',
      '52_Bindumali',
      '58_Dhenki',
      '80_Pralimanthaka_Kollaka',
    ]);
  });
});

describe('Ragavardhana, no. 93 of the Sharngadeva table (decitala, 93_Ragavardhana.xml), and Messiaen’s reading of it (a commentary)', () => {
  const tala = inUnits('1 3/2 1 6', 16);

  it('lasts 19/2 sixteenths', () => {
    expect(formatFraction(totalLength(tala).mul(16))).toBe('19/2');
  });

  it('reversed and doubled is 12 2 3 2; Messiaen splits the 12 into 4 4 4', () => {
    const turned = augment(retrograde(tala, 'values'), 2);
    expect(formatRhythm(turned)).toBe(formatRhythm(inUnits('12 2 3 2', 16)));
    const messiaen = parseRhythm('1/4 1/4 1/4 1/8 3/16 1/8');
    expect(totalLength(messiaen).equals(totalLength(turned))).toBe(true);
    expect(formatRhythm(messiaen.slice(3))).toBe(formatRhythm(turned.slice(1)));
  });

  it('its last three values, 2 3 2, are a palindrome', () => {
    const last = inUnits('2 3 2', 16);
    expect(isPalindrome(last, retrograde(last, 'values'))).toBe(true);
    expect(ladder(last.map((v) => v.length)).steps.map(formatFraction)).toEqual(['3/2', '2/3']);
  });
});
