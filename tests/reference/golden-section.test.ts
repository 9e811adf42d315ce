import { describe, expect, it } from 'vitest';
import { EngineError, LIMITS, formatFraction, goldenSection, ladder } from '@/engine';

describe('golden section of a number of measures', () => {
  /** Lendvai 1979, as cited at epos.uni-osnabrueck.de/books/m/ma_nl004/pages/34.htm: 0.618 of the measures, to the nearest. */
  it.each([
    ['Bartók, Sonata for Two Pianos and Percussion, I', 443, 274],
    ['Bartók, Contrasts, I', 93, 57],
  ])('%s: %d measures, %d', (_piece, measures, section) => {
    expect(goldenSection(measures)).toBe(section);
  });

  /** Lendvai on Music for Strings, Percussion and Celesta, I, from memory; T17: its score has 88 measures, not 89. */
  it.each([[89, 55, 34], [55, 34, 21], [34, 21, 13]])('%d measures are %d and %d, from memory', (measures, longer, shorter) => {
    expect(goldenSection(measures)).toBe(longer);
    expect(measures - goldenSection(measures)).toBe(shorter);
  });

  it('of every Fibonacci number is the one before (recomputed)', () => {
    let [before, now] = [1, 2];
    while (now <= LIMITS.measures) {
      expect(goldenSection(now)).toBe(before);
      [before, now] = [now, before + now];
    }
  });

  it('is the nearest whole measure: twice it, and one more or less, lie about n (√5 − 1)', () => {
    for (let n = 1; n <= 2_000; n += 1) {
      const twice = 2n * BigInt(goldenSection(n));
      const square = 5n * BigInt(n) ** 2n;
      expect((twice - 1n + BigInt(n)) ** 2n < square).toBe(true);
      expect((twice + 1n + BigInt(n)) ** 2n > square).toBe(true);
    }
  });

  it.each([0, -1, 1.5, LIMITS.measures + 1, Number.NaN])('%s measures are refused', (measures) => {
    expect(() => goldenSection(measures)).toThrow(EngineError);
  });
});

describe('chains of Fibonacci lengths (joshuaharriscomposer.com: 377 233 144 … 2 1 in 13, and 1 1 2 3 … 144 in 12)', () => {
  const chain = (length: number, first: number, second: number): number[] => {
    const run = [first, second];
    while (run.length < length) run.push(run.at(-1)! + run.at(-2)!);
    return run;
  };

  /** Sums recomputed: F(1) to F(n) make F(n + 2) − 1. */
  it('last 985 and 376', () => {
    const [long, short] = [chain(13, 1, 2).reverse(), chain(12, 1, 1)];
    expect([long[0], short.at(-1)]).toEqual([377, 144]);
    expect([long, short].map((run) => formatFraction(ladder(run).total))).toEqual(['985', '376']);
  });

  it('are no geometric runs: their steps come close to one another without ever being equal', () => {
    const { steps, equalSteps } = ladder(chain(12, 1, 1));
    expect(equalSteps).toBe(false);
    expect(new Set(steps.slice(1).map(formatFraction)).size).toBe(steps.length - 1);
  });
});
