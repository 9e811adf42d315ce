import { describe, expect, it } from 'vitest';
import { EngineError, SpellingError, augment, formatFraction, parseRhythm, spellLine, symbolLength, totalLength } from '@/engine';
import { shorthand, spelled } from '../engine/notation/shorthand';

/**
 * Messiaen, Technique de mon langage musical (1944), ch. IV: the factors of the table of augmentations, applied to
 * long-short-long; lengths and their spelling recomputed from the table (check values 1.2).
 */
describe('Messiaen’s table of augmentations on quarter, eighth, quarter (Technique, 1944, ch. IV)', () => {
  it.each([
    ['5/4', '5/16 5/32 5/16', '25/32', 'q~ s s~ s. t~ q~ t (t) (s) (e)'],
    ['4/3', '1/3 1/6 1/3', '5/6', '3:2{h q} 3:2{h (q)}'],
    ['3/2', '3/8 3/16 3/8', '15/16', 'q. e~ s e.~ e. (s)'],
    ['2', '1/2 1/4 1/2', '5/4', 'h q q~ | q (q) (h)'],
    ['3', '3/4 3/8 3/4', '15/8', 'h. q~ | e e~ q~ q. (e)'],
    ['4', '1 1/2 1', '5/2', 'w | h h~ | h (h)'],
    ['5', '5/4 5/8 5/4', '25/8', 'w~ | q q~ q. e~ | w~ | e (e) (q) (h)'],
    ['4/5', '1/5 1/10 1/5', '1/2', '5:4{q e q} (h)'],
    ['3/4', '3/16 3/32 3/16', '15/32', 'e. s~ t s.~ s. (t) (h)'],
    ['2/3', '1/6 1/12 1/6', '5/12', '3:2{q e} 3:2{q (e)} (h)'],
    ['1/2', '1/8 1/16 1/8', '5/16', 'e s s~ s (s) (e) (h)'],
    ['1/3', '1/12 1/24 1/12', '5/24', '3:2{e s e (s)} (q) (h)'],
    ['1/4', '1/16 1/32 1/16', '5/32', 's t t~ t (t) (s) (q) (h)'],
    ['1/5', '1/20 1/40 1/20', '1/8', '5:4{s t s} (e) (q) (h)'],
  ])('times %s', (factor, lengths, total, written) => {
    const stretched = augment(parseRhythm('1/4 1/8 1/4'), factor);
    expect(stretched.map(({ length }) => formatFraction(length)).join(' ')).toBe(lengths);
    expect(formatFraction(totalLength(stretched))).toBe(total);
    expect(shorthand(spellLine(stretched, '4/4'))).toBe(written);
  });
});

/** n dots make a value 2 − 2^−n times as long (check values 11.6, en.wikipedia.org, Note value; T21: not 1.5^n). */
describe('dots (11.6, T21): numerators 1, 3 and 7 over a power of two are one symbol', () => {
  it.each([
    ['1/4', 'q'], ['3/8', 'q.'], ['7/16', 'q..'], ['3/16', 'e.'], ['7/32', 'e..'], ['3/4', 'h.'], ['7/8', 'h~ q.'], ['1', 'w'],
  ])('%s', (length, written) => expect(spelled(length, '4/4').startsWith(written)).toBe(true));

  it.each([['5/8', 'h~ e'], ['9/16', 'h~ s'], ['11/16', 'h~ e.'], ['13/16', 'h~ q~ s'], ['5/16', 'q~ s']])('%s always needs a tie', (length, written) => {
    expect(spelled(length, '4/4').startsWith(`${written} `)).toBe(true);
  });
});

/** treblis.com/notation/Tuplet.html; musictheory.pugetsound.edu/mt21c/Tuplets.html. */
describe('tuplets (11.7): the plain number is the ratio to the next lower normal value', () => {
  const many = (length: string, count: number, rest: string) => `${Array.from({ length: count }, () => length).join(' ')} ${rest}`;
  it.each([
    ['4/4', many('1/12', 3, '3/4'), '3:2{e e e} h.'],
    ['4/4', many('1/20', 5, '3/4'), '5:4{s s s s s} h.'],
    ['4/4', many('1/24', 6, '3/4'), '6:4{s s s s s s} h.'],
    ['4/4', many('1/28', 7, '3/4'), '7:4{s s s s s s s} h.'],
    ['4/4', many('1/36', 9, '3/4'), '9:8{t t t t t t t t t} h.'],
    ['4/4', '1/3 1/3 1/3', '3:2{h h h}'],
    ['4/4', '1/6 1/12 3/4', '3:2{q e} h.'],
    ['4/4', '(1/12) 1/6 3/4', '3:2{(e) q} h.'],
    ['2/4', many('1/10', 5, '').trim(), '5:4{e e e e e}'],
    // compound: duplet, quadruplet, quintuplet in a dotted quarter
    ['6/8', '3/16 3/16 3/8', '2:3{e e} q.'],
    ['6/8', many('3/32', 4, '3/8'), '4:3{e e e e} q.'],
    ['6/8', many('3/40', 5, '3/8'), '5:3{e e e e e} q.'],
    // in the long group of an additive metre too, and in no short one
    ['3+2/8', '3/16 3/16 1/4', '2:3{e e} q'],
    ['2+2+3/8', '1/4 1/4 3/16 3/16', 'q q 2:3{e e}'],
    // what keeps the beat in three is no quadruplet
    ['6/8', '3/16 1/16 1/8 3/8', 'e. s e q.'],
  ])('%s: %s', (metre, rhythm, written) => expect(spelled(rhythm, metre)).toBe(written));

  it.each(['1/12 1/12 1/12', '1/20 1/20 1/20 1/20 1/20', '3/16 3/16', '3/32 3/32 3/32 3/32'])('%s: the symbols of a bracket add up to its normal units', (rhythm) => {
    const [measure] = spellLine(parseRhythm(rhythm), '6/8');
    const inside = measure!.symbols.filter(({ tuplets }) => tuplets.length > 0);
    const total = inside.map((symbol) => symbolLength(symbol)).reduce((a, b) => a.add(b));
    expect(formatFraction(total)).toBe(formatFraction(totalLength(parseRhythm(rhythm))));
  });
});

/** T12: nested tuplets multiply, 5:4 inside 3:2 is 15:8; a reader must count both. */
describe('brackets within brackets (T12), only where nothing simpler does', () => {
  it.each([
    ['1/60 1/60 1/60 1/60 1/60 1/6 3/4', '3:2{5:4{t t t t t} q} h.'],
    ['1/84 1/84 1/84 1/84 1/84 1/84 1/84 1/6 3/4', '3:2{7:4{t t t t t t t} q} h.'],
    // ninths of a beat need no nesting
    ['1/12 1/36 1/36 1/36 1/12 3/4', '9:8{s. t t t s.} h.'],
  ])('%s', (rhythm, written) => {
    expect(spelled(rhythm, '4/4')).toBe(written);
    const [measure] = spellLine(parseRhythm(rhythm), '4/4');
    expect(formatFraction(symbolLength(measure!.symbols[0]!))).toBe(rhythm.split(' ')[0]);
  });
});

describe('what cannot be written is refused by name, with factors that can', () => {
  it.each([
    ['1/2 1/11 9/22', 0, 1, '1/11'],
    ['1/4 3/4 1/13', 1, 2, '1/13'],
  ])('%s', (rhythm, measure, value, length) => {
    let refused: unknown;
    try {
      spellLine(parseRhythm(rhythm), '4/4');
    } catch (error) {
      refused = error;
    }
    expect(refused).toBeInstanceOf(SpellingError);
    const error = refused as SpellingError;
    expect(error).toBeInstanceOf(EngineError);
    expect([error.code, error.measure, error.value]).toEqual(['unspellable', measure, value]);
    expect(error.message).toContain(`Value ${value + 1}, of ${length}, cannot be written in measure ${measure + 1}`);
    expect(error.nearest.length).toBeGreaterThan(0);
    for (const factor of error.nearest) expect(() => spellLine(augment(parseRhythm(rhythm), factor), '4/4')).not.toThrow();
  });
});
