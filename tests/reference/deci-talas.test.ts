import { describe, expect, it } from 'vitest';
import { CATALOGUE, Fraction, augment, formatFraction, formatRhythm, ladder, parseRhythm, retrograde, searchCatalogue, totalLength } from '@/engine';
import { inUnits, isPalindrome } from './rhythms';

const SOURCE = 'Sharngadeva’s table, data of L. Poeppel, decitala (MIT)';
const TALAS = CATALOGUE.filter((entry) => entry.family === 'deçî-tâla');

/** From the files themselves, corpora/Decitalas/*.xml, in sixteenths; totals added up apart from this project's code. */
const ROWS: [name: string, values: string, total: string][] = [
  ['8 Simhavikrama', '4 4 4 2 6 4 6', '30'],
  ['15 Caccari', '1 3/2 1 3/2 1 3/2 1 3/2 1 3/2 1 3/2 1 3/2 1 3/2', '20'],
  ['26 A Iryasra Varna', '2 2 1 1 2 2', '10'],
  ['27 Simhavikridita', '2 6 4 6 6 4 2 4 6 2 6', '48'],
  ['33 Turangalila', '3/2 3/2 1 1', '5'],
  ['35 Simhanandana', '4 4 2 6 2 4 1 1 4 4 2 6 2 6 4 2 2 8', '64'],
  ['77 Gajajhampa', '4 1 1 3/2', '15/2'],
  ['88 Lakskmica', '1 3/2 2 4', '17/2'],
  ['93 Ragavardhana', '1 3/2 1 6', '19/2'],
  ['105 Candrakala', '4 4 4 6 6 6 2', '32'],
  ['106 Laya', '4 2 6 6 6 4 6 1 1 1', '37'],
  ['120 Carngadeva', '1 1 4 6 4 4 2', '22'],
];

describe(`${SOURCE}: every tala`, () => {
  it('is there: 130 files, numbers 1 to 120', () => {
    expect(TALAS).toHaveLength(130);
    expect(new Set(TALAS.map(({ name }) => Number(name.split(' ')[0])))).toEqual(new Set(Array.from({ length: 120 }, (_, k) => k + 1)));
  });

  /** Added up from the files apart from this project's code. */
  it('together they have 651 values that last 1622 sixteenths', () => {
    const all = TALAS.map(({ rhythm }) => parseRhythm(rhythm));
    expect(all.flat()).toHaveLength(651);
    expect(formatFraction(all.reduce((sum, tala) => sum.add(totalLength(tala)), new Fraction(0)).mul(16))).toBe('1622');
  });

  it.each(ROWS)('%s: %s adds up to %s sixteenths', (name, values, total) => {
    const [entry] = TALAS.filter((one) => one.name === name);
    expect(entry?.rhythm).toBe(formatRhythm(inUnits(values, 16)));
    expect(formatFraction(totalLength(parseRhythm(entry!.rhythm)).mul(16))).toBe(total);
  });

  it.each(TALAS.map(({ name, rhythm }) => [name, rhythm]))('%s: %s comes back from retrograde, from Messiaen’s 5/4 and 4/5, and from text', (_name, rhythm) => {
    const tala = parseRhythm(rhythm!);
    expect(retrograde(retrograde(tala, 'values'), 'values')).toEqual(tala);
    expect(augment(augment(tala, '5/4'), '4/5')).toEqual(tala);
    expect(formatRhythm(tala)).toBe(rhythm);
  });
});

describe(`${SOURCE}: palindromes`, () => {
  it('are exactly seven, besides those of one value over and over', () => {
    const found = searchCatalogue({ words: 'deçî-tâla', palindrome: true }).filter(({ rhythm }) => new Set(rhythm.split(' ')).size > 1);
    expect(found.map(({ name }) => name)).toEqual([
      '26 A Iryasra Varna',
      '34 Carabhalila',
      '46 Jayacri',
      '51 Vijaya',
      '52 Bindumali',
      '58 Dhenki',
      '80 Pralimanthaka Kollaka',
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
