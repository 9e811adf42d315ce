import { describe, expect, it } from 'vitest';
import { Fraction, type PlannedMeasure } from '@/engine';
import { foldOf } from '@/components/score/fold';

const measures = Array.from({ length: 10 }, (_, index): PlannedMeasure => ({ index, number: index + 1, start: new Fraction(index), length: new Fraction(1), scale: new Fraction(1), metre: '4/4', signature: index === 0 ? '4/4' : null }));
const printed = [0, 1, 2, 7, 8];

describe('what is repeated is printed once', () => {
  // measure 1; 2 and 3 three times (to 7); 8; 9 twice
  const fold = foldOf({ measures, printed, repeats: [{ first: 1, length: 2, times: 3 }, { first: 8, length: 1, times: 2 }] });

  it('every measure is found where it is printed', () => {
    expect(measures.map(({ index }) => fold.printed(index))).toEqual([0, 1, 2, 1, 2, 1, 2, 3, 4, 4]);
  });

  it('the moving place goes through the figure again each time', () => {
    expect([0.5, 1, 2.5, 3.25, 6.75, 7, 8.5, 9.5].map(fold.place)).toEqual([0.5, 1, 2.5, 1.25, 2.75, 7, 8.5, 8.5]);
  });
});
