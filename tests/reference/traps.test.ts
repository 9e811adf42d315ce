import { describe, expect, it } from 'vitest';
import { attacks, augment, formatFraction, formatRhythm, parseRhythm, retrograde, rotate, totalLength } from '@/engine';
import { inUnits } from './rhythms';

const at = (rhythm: ReturnType<typeof parseRhythm>, unit: number) => attacks(rhythm).map((a) => Number(a.mul(unit)));

/** Mazzola, Noll, Lluis-Puebla (eds.), Perspectives in Mathematical and Computational Music Theory (epOs 2004), sect. 9.2. */
describe('T1 (Mazzola et al., epOs 2004, 9.2): reversing values is not mirroring attacks', () => {
  const subject = inUnits('3 1 2 2', 8);
  it('3 1 2 2 attacks at 0 3 4 6; its values reversed at 0 2 4 5', () => {
    expect(at(subject, 8)).toEqual([0, 3, 4, 6]);
    expect(formatRhythm(retrograde(subject, 'values'))).toBe(formatRhythm(inUnits('2 2 1 3', 8)));
    expect(at(retrograde(subject, 'values'), 8)).toEqual([0, 2, 4, 5]);
  });
  it('its attacks reversed come at 0 2 3 6: the mirrored times 2 4 5 8, taken from the first', () => {
    expect(at(retrograde(subject, 'attacks'), 8)).toEqual([0, 2, 3, 6]);
    const mirrored = at(subject, 8).map((a) => 8 - a).reverse();
    expect(mirrored).toEqual([2, 4, 5, 8]);
    expect(mirrored.map((a) => a - mirrored[0]!)).toEqual(at(retrograde(subject, 'attacks'), 8));
  });
  it('new onset = end − onset − duration is the reversal of values', () => {
    const total = Number(totalLength(subject).mul(8));
    const onsets = at(subject, 8).map((onset, i) => total - onset - Number(subject[i]!.length.mul(8)));
    expect(onsets.sort((a, b) => a - b)).toEqual(at(retrograde(subject, 'values'), 8));
  });
});

describe('T2: a palindrome of values is not heard as one where sounds do not sustain', () => {
  it('3 1 3 reads the same both ways, but its gaps 3 1 do not', () => {
    const subject = inUnits('3 1 3', 8);
    expect(formatRhythm(retrograde(subject, 'values'))).toBe(formatRhythm(subject));
    expect(at(subject, 8)).toEqual([0, 3, 4]);
    expect(at(retrograde(subject, 'attacks'), 8)).toEqual([0, 1, 4]);
  });
  it('with one attack more, at 7, the gaps are 3 1 3 and it is', () => {
    const closed = inUnits('3 1 3 1', 8);
    expect(at(closed, 8)).toEqual([0, 3, 4, 7]);
    expect(at(retrograde(closed, 'attacks'), 8)).toEqual(at(closed, 8));
    expect(formatRhythm(retrograde(closed, 'values'))).not.toBe(formatRhythm(closed));
  });
});

describe('T6: rests in retrograde and rotation', () => {
  it('note and rest become rest and note by values, and stay by attacks', () => {
    expect(formatRhythm(retrograde(parseRhythm('1/4 (1/8)'), 'values'))).toBe('(1/8) 1/4');
    expect(formatRhythm(retrograde(parseRhythm('1/4 (1/8)'), 'attacks'))).toBe('1/4 (1/8)');
    expect(formatRhythm(retrograde(parseRhythm('(1/8) 1/4 1/2'), 'values'))).toBe('1/2 1/4 (1/8)');
  });
  it('a rotation by values may begin with silence, a rotation by attacks begins with a sound where the subject does', () => {
    expect(rotate(parseRhythm('1/4 (1/8) 1/2'), 1, 'values')[0]!.rest).toBe(true);
    expect(rotate(parseRhythm('1/4 (1/8) 1/2'), 1, 'attacks')[0]!.rest).toBe(false);
  });
});

describe('T7: a pickup is stretched with the rest', () => {
  it.each([['2', '1/4'], ['3/2', '3/16']])('an eighth before the measure, times %s, is %s', (factor, pickup) => {
    const subject = parseRhythm('1/8 1/4 1/4 1/4 1/4');
    const stretched = augment(subject, factor);
    expect(formatFraction(stretched[0]!.length)).toBe(pickup);
    expect(formatFraction(attacks(stretched)[1]!)).toBe(pickup);
    // A full measure and its pickup no longer end with a measure of 4/4.
    expect(totalLength(stretched).sub(stretched[0]!.length).d === 1n).toBe(factor === '2');
  });
});

describe('T8: an exact stretch may be no single note', () => {
  it.each([
    ['3/8', '3/2', '9/16'],
    ['1/4', '5/4', '5/16'],
    ['1/2', '5/4', '5/8'],
  ])('%s times %s is %s', (length, factor, expected) => {
    const [value] = augment(parseRhythm(length), factor);
    expect(formatFraction(value!.length)).toBe(expected);
    expect([1n, 3n, 7n, 15n]).not.toContain(value!.length.n);
  });
});
