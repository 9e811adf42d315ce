import { describe, expect, it } from 'vitest';
import { Fraction, formatFraction, formatRhythm, parseRhythm } from '@/engine';
import { type Stamp, holdOn, insertAt, removeAt, replaceAt, stampLength } from '@/lib/client/staff-edits';

const stamp = (base: string, rest: Partial<Stamp> = {}): Stamp => ({ base: new Fraction(base), isDotted: false, tuplet: 1, isRest: false, ...rest });
const rhythm = parseRhythm('1/4> (1/8) 1/2');

describe('entry on the staff', () => {
  it.each<[Stamp, string]>([
    [stamp('1/4'), '1/4'], [stamp('1/4', { isDotted: true }), '3/8'], [stamp('1/8', { tuplet: 3 }), '1/12'], [stamp('1/16', { tuplet: 5 }), '1/20'], [stamp('1/16', { tuplet: 7 }), '1/28'],
    [stamp('1/8', { tuplet: 3, isDotted: true }), '1/8'],
  ])('a value lasts as long as it looks: %#', (one, length) => expect(formatFraction(stampLength(one))).toBe(length));
  it('is put in, put in the place of another, taken away', () => {
    expect(formatRhythm(insertAt(rhythm, 1, stamp('1/16')))).toBe('1/4> 1/16 (1/8) 1/2');
    expect(formatRhythm(insertAt([], 0, stamp('1/2', { isRest: true })))).toBe('(1/2)');
    expect(formatRhythm(replaceAt(rhythm, 0, stamp('1/8')))).toBe('1/8> (1/8) 1/2');
    expect(formatRhythm(removeAt(rhythm, 1))).toBe('1/4> 1/2');
  });
  it('is tied to the one before: one attack, longer; never to a rest, nor a rest', () => {
    expect(formatRhythm(holdOn(rhythm, 3, stamp('1/8'))!)).toBe('1/4> (1/8) 5/8');
    expect([holdOn(rhythm, 2, stamp('1/8')), holdOn(rhythm, 0, stamp('1/8')), holdOn(rhythm, 3, stamp('1/8', { isRest: true }))]).toEqual([null, null, null]);
  });
});
