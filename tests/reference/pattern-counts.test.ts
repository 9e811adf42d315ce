import { describe, expect, it } from 'vitest';
import { countPatterns, countSubjects } from '@/engine';

/** OEIS A000031 (number.house/seq/A000031), from n = 1. */
const NECKLACES = [2, 3, 4, 6, 8, 14, 20, 36, 60, 108, 188, 352, 632, 1182, 2192, 4116];
/** OEIS A000029 (a copy of oeis.org/A000029), from n = 1. */
const BRACELETS = [2, 3, 4, 6, 8, 13, 18, 30, 46, 78, 126, 224, 380, 687, 1224, 2250];

describe('patterns of attacks and silences in a cycle', () => {
  it.each(NECKLACES.map((count, k) => [k + 1, count] as const))('A000031: %d pulses have %d necklaces', (n, count) => {
    expect(countPatterns(n).necklaces).toBe(BigInt(count));
    expect(countPatterns(n).patterns).toBe(2n ** BigInt(n));
  });

  it.each(BRACELETS.map((count, k) => [k + 1, count] as const))('A000029: %d pulses have %d bracelets', (n, count) => {
    expect(countPatterns(n).bracelets).toBe(BigInt(count));
  });

  it('T19: necklaces and bracelets first differ at 6 pulses, 14 and 13', () => {
    const differ = NECKLACES.map((_, k) => countPatterns(k + 1)).findIndex(({ necklaces, bracelets }) => necklaces !== bracelets);
    expect(differ + 1).toBe(6);
    expect(countPatterns(6)).toMatchObject({ necklaces: 14n, bracelets: 13n });
  });

  /** Recomputed in the check values: the clapping pattern is one of 495 patterns, 43 of them no rotations of one another. */
  it('8 attacks in 12 pulses: 495 patterns, 43 necklaces', () => {
    expect(countPatterns(12, 8)).toMatchObject({ patterns: 495n, necklaces: 43n });
  });
});

describe('rhythms of n pulses', () => {
  const pulses = (n: number) => ({ length: `${n}/8`, pulse: '1/8' });

  /** geneffects.com/briarskin/music/music_math.html */
  it.each([1, 2, 3, 4, 8, 16, 64])('%d pulses are divided into notes in 2^(n−1) ways', (n) => {
    expect(countSubjects(pulses(n))).toBe(2n ** BigInt(n - 1));
  });

  /** Standard, recomputed in the check values: 2^floor(n/2). */
  it.each([1, 2, 2, 4, 4, 8, 8, 16, 16, 32].map((count, k) => [k + 1, count] as const))('of those, %d pulses have %d palindromes', (n, count) => {
    expect(countSubjects({ ...pulses(n), palindrome: true })).toBe(BigInt(count));
  });

  /**
   * "Counting rhythms using combinatorics on words" (hal.science/hal-05582871v1): attacks, holds and silences, every second
   * Fibonacci number; less the one that is silent throughout, which is no subject.
   */
  it.each([2, 5, 13, 34, 89, 233, 610, 1597].map((count, k) => [k + 1, count] as const))('with rests, %d pulses have %d rhythms, the silent one among them', (n, count) => {
    expect(countSubjects({ ...pulses(n), rests: true })).toBe(BigInt(count - 1));
  });
});
