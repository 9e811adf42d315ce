import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { StaveNote, Tuplet } from 'vexflow/core';
import { Fraction, type NotationMeasure, type NotationSymbol, type Rhythm, SpellingError, attacks, parseRhythm, spellLine } from '@/engine';
import { metrePlan, mixedRhythm, wildRhythm } from '../engine/notation/arbitrary-line';

const isNested = (measures: readonly NotationMeasure[]): boolean => measures.some(({ symbols }) => symbols.some(({ tuplets }) => tuplets.length > 1));

/** VexFlow’s ticks of a whole note. */
const TICKS_OF_WHOLE = 16_384;
const VEX: Readonly<Record<NotationSymbol['base'], string>> = { '2': '1/2', '1': '1', '1/2': '2', '1/4': '4', '1/8': '8', '1/16': '16', '1/32': '32', '1/64': '64', '1/128': '128', '1/256': '256' };

/** What VexFlow counts for each symbol, in whole notes, exact: its ticks are fractions, and brackets multiply. */
function vexLengths({ symbols }: NotationMeasure): Fraction[] {
  const notes = symbols.map(({ base, dots, rest }) => new StaveNote({ keys: ['b/4'], duration: `${VEX[base]}${'d'.repeat(dots)}${rest ? 'r' : ''}` }));
  for (const depth of [1, 0]) {
    let open: StaveNote[] = [];
    symbols.forEach(({ tuplets }, index) => {
      const mark = tuplets[depth];
      if (mark === undefined) return;
      if (mark.starts) open = [];
      open.push(notes[index]!);
      if (mark.stops) new Tuplet(open, { numNotes: mark.actual, notesOccupied: mark.normal });
    });
  }
  return notes.map((note) => {
    const { numerator, denominator } = note.getTicks();
    return new Fraction(numerator, denominator).div(TICKS_OF_WHOLE);
  });
}

describe('an independent counter, VexFlow 5.0.0, finds our attacks too, in brackets within brackets as well', () => {
  beforeAll(() => {
    // Without a canvas it measures no text, and says so at each note.
    vi.spyOn(console, 'error').mockImplementation(() => {});
    vi.spyOn(console, 'warn').mockImplementation(() => {});
  });
  afterAll(() => vi.restoreAllMocks());

  function expectCounted(rhythm: Rhythm, measures: readonly NotationMeasure[]): void {
    const onsets: string[] = [];
    let at = new Fraction(0);
    for (const measure of measures) {
      const lengths = vexLengths(measure);
      measure.symbols.forEach(({ rest, tiedFromBefore }, index) => {
        if (!rest && !tiedFromBefore) onsets.push(at.toFraction());
        at = at.add(lengths[index]!);
      });
    }
    expect(onsets).toEqual(attacks(rhythm).map((attack) => attack.toFraction()));
  }

  it.each(['1/60 1/60 1/60 1/60 1/60 1/6 3/4', '1/6 1/84 1/84 1/84 1/84 1/84 1/84 1/84 3/4', '1/20 1/60 1/60 1/60 1/10 3/4'])('%s', (text) => {
    const measures = spellLine(parseRhythm(text), '4/4');
    expect(isNested(measures)).toBe(true);
    expectCounted(parseRhythm(text), measures);
  });

  it('hundreds of lines in all metres and their changes', () => {
    let nested = 0;
    fc.assert(
      fc.property(fc.oneof(mixedRhythm, wildRhythm), metrePlan, (rhythm, plan) => {
        let measures: NotationMeasure[];
        try {
          measures = spellLine(rhythm, plan);
        } catch (error) {
          expect(error).toBeInstanceOf(SpellingError);
          return;
        }
        expectCounted(rhythm, measures);
        if (isNested(measures)) nested += 1;
      }),
      { numRuns: 400, seed: 20261202 },
    );
    expect(nested).toBeGreaterThan(0);
  }, 60_000);
});
