import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import createVerovioModule from 'verovio/wasm';
import { VerovioToolkit } from 'verovio/esm';
import { StaveNote, Tuplet } from 'vexflow/core';
import { footbridge } from '../../db/demo/footbridge';
import { lockGates } from '../../db/demo/lock-gates';
import { threeFerries } from '../../db/demo/three-ferries';
import { Fraction, type MetrePlan, type NotationMeasure, type NotationSymbol, type Rhythm, SpellingError, attacks, buildStudy, parseRhythm, parseStudy, scoreOf, spellLine } from '@/engine';
import { metrePlan, mixedRhythm, plainRhythm, wildRhythm } from '../engine/notation/arbitrary-line';
import { spelledMusicXML } from '../helpers/spelled-musicxml';

let reader: VerovioToolkit;

beforeAll(async () => {
  reader = new VerovioToolkit(await createVerovioModule());
  reader.setOptions({ inputFrom: 'musicxml', breaks: 'none' });
});

/** The onsets that the reader finds, in whole notes, floating point, by the number of the attack. */
function readOnsets(measures: readonly NotationMeasure[]): Map<number, number> {
  if (!reader.loadData(spelledMusicXML(measures))) throw new Error(`the reader refuses the file: ${reader.getLog()}`);
  const onsets = new Map<number, number>();
  for (const { qstamp, on = [] } of reader.renderToTimemap({ includeMeasures: false, includeRests: false })) {
    for (const id of on) if (/^a\d+$/.test(id)) onsets.set(Number(id.slice(1)), qstamp / 4);
  }
  return onsets;
}

/** Positions on the reader's page, each the nearest on the rhythm's own grid, and not farther from it than a rounding. */
function expectSame(rhythm: Rhythm, measures: readonly NotationMeasure[]): void {
  const wanted = attacks(rhythm);
  const found = readOnsets(measures);
  const grid = rhythm.reduce((common, { length }) => lcm(common, length.d), 1n);
  expect(found.size).toBe(wanted.length);
  wanted.forEach((at, index) => {
    const onset = found.get(index);
    expect(onset).toBeDefined();
    const ticks = Math.round(onset! * Number(grid));
    expect(Math.abs(onset! * Number(grid) - ticks)).toBeLessThan(1e-3);
    expect(new Fraction(BigInt(ticks), grid).toFraction()).toBe(at.toFraction());
  });
}

const isNested = (measures: readonly NotationMeasure[]): boolean => measures.some(({ symbols }) => symbols.some(({ tuplets }) => tuplets.length > 1));

const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
const lcm = (a: bigint, b: bigint): bigint => (a / gcd(a, b)) * b;

/** Verovio 6.3.0 (npm, LGPL, verovio.org): an engraver that reads MusicXML and works out times from what is written. */
describe('an independent reader, Verovio 6.3.0, finds our attacks in our spelling', () => {
  it('is the version named here', () => expect(reader.getVersion()).toMatch(/^6\.3\.0/));

  it.each<[string, MetrePlan]>([
    ['3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 3/8 1/8 1/2 (1/4) 1/4', '4/4'],
    ['15/32 5/32 5/16 (5/16) 5/32 5/32 5/16', '4/4'],
    ['9/16 3/16 3/8 (3/8) 3/16 3/16 3/8', '3/4'],
    ['1/2 1/4 1/8 3/8 (1/4) 1/8', '6/8'],
    ['3/8 1/4 1/4 5/8 1/4 7/8', '3+2+2/8'],
    ['1/12 1/12 1/12 1/6 1/12 1/20 1/20 1/20 1/20 1/20 1/4', '4/4'],
    ['1/24 1/24 1/24 1/24 1/24 1/24 1/28 1/28 1/28 1/28 1/28 1/28 1/28 1/2', '4/4'],
    ['1/36 1/36 1/36 1/36 1/36 1/36 1/36 1/36 1/36 3/4', '4/4'],
    ['1/3 1/3 1/3 1/5 1/5 1/5 1/5 1/5', '4/4'],
    ['3/16 3/16 3/32 3/32 3/32 3/32 3/40 3/40 3/40 3/40 3/40 3/8', '6/8'],
    ['7/8 7/8 7/8 3/8', '4/4'],
    ['1/2 3/4 3/4 3/8 5/8 1/4', [{ at: 0, metre: '4/4' }, { at: '5/4', metre: '6/8' }, { at: 2, metre: '3+2/8' }]],
  ])('%s', (text, plan) => {
    const rhythm = parseRhythm(text);
    expectSame(rhythm, spellLine(rhythm, plan));
  });

  it.each([['plain values', plainRhythm], ['tuplets', mixedRhythm]] as const)('hundreds of lines in all metres and their changes: %s', (_, arbitrary) => {
    let read = 0;
    fc.assert(
      fc.property(arbitrary, metrePlan, (rhythm, plan) => {
        let measures: NotationMeasure[];
        try {
          measures = spellLine(rhythm, plan);
        } catch (error) {
          expect(error).toBeInstanceOf(SpellingError);
          return;
        }
        // Of brackets within brackets this reader counts the innermost only: VexFlow reads those, below.
        if (isNested(measures)) return;
        expectSame(rhythm, measures);
        read += 1;
      }),
      { numRuns: 300, seed: 20261201 },
    );
    expect(read).toBeGreaterThan(150);
  }, 60_000);

  it.each([['Lock Gates', lockGates], ['Three Ferries', threeFerries], ['Footbridge', footbridge]] as const)('every staff of “%s”', (_, demo) => {
    const document = parseStudy(demo);
    const { staves } = scoreOf(document, buildStudy(document));
    for (const { measures, values } of staves) expectSame(values, measures);
  }, 60_000);
});

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
