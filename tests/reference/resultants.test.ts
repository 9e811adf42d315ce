import { describe, expect, it } from 'vitest';
import { alignment, attacks, formatRhythm, parseRhythm, resultant, retrograde, totalLength } from '@/engine';
import { inUnits, isPalindrome } from './rhythms';

/**
 * Schillinger, The Schillinger System of Musical Composition (1946), Book I: interference of generators. The rule as in public
 * notes (scribd.com/doc/273965762; F. Absil, A Guide to Schillinger's Theory of Rhythm); single strings from memory, and
 * recomputed from the rule.
 */
const RESULTANTS: [a: number, b: number, gaps: string][] = [
  [2, 1, '1 1'],
  [3, 2, '2 1 1 2'],
  [4, 3, '3 1 2 2 1 3'],
  [5, 2, '2 2 1 1 2 2'],
  [5, 3, '3 2 1 3 1 2 3'],
  [5, 4, '4 1 3 2 2 3 1 4'],
  [6, 5, '5 1 4 2 3 3 2 4 1 5'],
  [7, 2, '2 2 2 1 1 2 2 2'],
  [7, 3, '3 3 1 2 3 2 1 3 3'],
  [7, 4, '4 3 1 4 2 2 4 1 3 4'],
  [7, 5, '5 2 3 4 1 5 1 4 3 2 5'],
  [7, 6, '6 1 5 2 4 3 3 4 2 5 1 6'],
  [8, 3, '3 3 2 1 3 3 1 2 3 3'],
  [8, 5, '5 3 2 5 1 4 4 1 5 2 3 5'],
  [8, 7, '7 1 6 2 5 3 4 4 3 5 2 6 1 7'],
  [9, 2, '2 2 2 2 1 1 2 2 2 2'],
  [9, 4, '4 4 1 3 4 2 2 4 3 1 4 4'],
  [9, 5, '5 4 1 5 3 2 5 2 3 5 1 4 5'],
  [9, 7, '7 2 5 4 3 6 1 7 1 6 3 4 5 2 7'],
  [9, 8, '8 1 7 2 6 3 5 4 4 5 3 6 2 7 1 8'],
];

describe('Schillinger, The Schillinger System of Musical Composition (1946), Book I (the rule; strings from memory)', () => {
  it.each(RESULTANTS)('r(%d:%d) is %s', (a, b, gaps) => {
    const found = resultant(a, b);
    expect(found.join(' ')).toBe(gaps);
    expect(resultant(b, a)).toEqual(found);
    expect(found.reduce((x, y) => x + y, 0)).toBe(a * b);
    expect(found).toHaveLength(a + b - 1);
    const rhythm = inUnits(found, 8);
    expect(isPalindrome(rhythm, retrograde(rhythm, 'values'))).toBe(true);
  });

  it('each string is the attacks of both pulses together', () => {
    for (const [a, b] of RESULTANTS) {
      const together = [...Array(a * b).keys()].filter((pulse) => pulse % a === 0 || pulse % b === 0);
      expect(attacks(inUnits(resultant(a, b), 1)).map(Number)).toEqual(together);
    }
  });

  it('pulses with a common divisor end at their least common multiple', () => {
    expect(resultant(6, 4)).toEqual([4, 2, 2, 4]);
    expect(resultant(5, 5)).toEqual([5]);
    expect(resultant(1, 1)).toEqual([1]);
    for (let a = 1; a <= 16; a += 1) {
      for (let b = 1; b <= 16; b += 1) {
        expect(String(resultant(a, b).reduce((x, y) => x + y, 0))).toBe(alignment([a, b]).toFraction());
      }
    }
  });
});

describe('palindromes and counts', () => {
  const compositions = (n: number): number[][] =>
    n === 0 ? [[]] : Array.from({ length: n }, (_, k) => k + 1).flatMap((first) => compositions(n - first).map((rest) => [first, ...rest]));

  /** Compositions of n: 2^(n-1) (geneffects.com/briarskin/music/music_math.html); palindromic ones 2^floor(n/2) (standard). */
  it.each([1, 2, 2, 4, 4, 8, 8, 16, 16, 32].map((palindromes, index) => [index + 1, palindromes] as const))(
    'rhythms of %d pulses without rests: %d are palindromes',
    (n, palindromes) => {
      const all = compositions(n).map((gaps) => inUnits(gaps, 8));
      expect(all).toHaveLength(2 ** (n - 1));
      expect(all.filter((rhythm) => isPalindrome(rhythm, retrograde(rhythm, 'values')))).toHaveLength(palindromes);
      expect(all.every((rhythm) => totalLength(rhythm).mul(8).toFraction() === String(n))).toBe(true);
    },
  );

  /** "Counting rhythms using combinatorics on words" (hal.science/hal-05582871v1): every second Fibonacci number. */
  it.each([2, 5, 13, 34, 89, 233, 610].map((count, index) => [index + 1, count] as const))(
    'rhythms of %d pulses over attack, hold and silence: %d',
    (n, count) => {
      let strings = [''];
      for (let pulse = 0; pulse < n; pulse += 1) strings = strings.flatMap((s) => ['x', '-', '.'].map((next) => s + next));
      const playable = strings.filter((s) => !s.startsWith('-') && !s.includes('.-'));
      const texts = playable.map((s) => formatRhythm(parseRhythm((s.match(/x-*|\./g) ?? []).map((v) => (v === '.' ? '(1/8)' : `${v.length}/8`)).join(' '))));
      expect(new Set(texts).size).toBe(count);
      // T23: as strings of attacks alone there are only 2^n.
      const heard = playable.map((s) => attacks(parseRhythm((s.match(/x-*|\./g) ?? []).map((v) => (v === '.' ? '(1/8)' : `${v.length}/8`)).join(' '))).join());
      expect(new Set(heard).size).toBe(2 ** n);
    },
  );
});
