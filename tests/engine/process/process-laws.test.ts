import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  EngineError, Fraction, type Rhythm, type StudyInput,
  attacks, buildStudy, describeStudy, formatFraction, formatRhythm, parseStudy, playEvents, retrograde, totalLength,
} from '@/engine';
import { arbitraryRhythm } from '../rhythm/arbitrary-rhythm';
import { mirror, study } from '../study/make-study';
import { arbitraryProcessSection } from './arbitrary-process';

const f = formatFraction;
const runs = { numRuns: 300 };
const shortRhythm = arbitraryRhythm.map((r) => formatRhythm(r.slice(0, 7)));
const at = (rhythm: Rhythm, start = new Fraction(0)) => attacks(rhythm).map((a) => f(a.add(start)));

const stated = shortRhythm.chain((rhythm) =>
  arbitraryProcessSection(rhythm).map((section): StudyInput => study([section, mirror('m', 'a')], { subjects: [{ id: 's', name: 'S', rhythm }] })),
);

/** Builds; what cannot be counted on one grid is passed over. */
function build(document: StudyInput) {
  try {
    return buildStudy(document);
  } catch (error) {
    if (error instanceof EngineError && (error.code === 'too_fine' || error.code === 'too_large')) return fc.pre(false) as never;
    throw error;
  }
}

describe('laws of every process', () => {
  it('totals add up, and a mirror lasts as long as its source', () => {
    fc.assert(
      fc.property(stated, (document) => {
        const built = build(document);
        const [source, back] = built.sections;
        expect(f(back!.length)).toBe(f(source!.length));
        for (const line of built.lines) expect(f(totalLength(line.rhythm))).toBe(f(built.totalLength));
        for (const s of built.statements) {
          expect(f(totalLength(s.rhythm))).toBe(f(s.length));
          expect(s.origins).toHaveLength(s.rhythm.length);
          expect(s.rhythm.every((value, i) => !value.rest || s.origins[i] === null)).toBe(true);
        }
      }),
      runs,
    );
  });

  it('every attack of a statement sounds once, on its own instrument or on the one that it is handed to', () => {
    fc.assert(
      fc.property(stated, (document) => {
        const built = build(document);
        const events = playEvents(parseStudy(document), built);
        for (const line of built.lines) {
          expect(events.filter((e) => e.instrument === line.instrument).map((e) => f(e.position))).toEqual(at(line.rhythm));
        }
        for (const s of built.statements) {
          const own = events.filter((e) => e.statement === s.id);
          expect(own.map((e) => f(e.position))).toEqual(at(s.rhythm, s.start));
          expect(own.map((e) => e.instrument)).toEqual(s.assigned ?? own.map(() => s.instrument));
        }
      }),
      runs,
    );
  });

  it('a mirror turns each statement about, its colours with it, and the whole is a palindrome of values', () => {
    fc.assert(
      fc.property(stated, (document) => {
        const built = build(document);
        const own = built.statements.filter((s) => s.section === 'a');
        const back = built.statements.filter((s) => s.section === 'm');
        expect(back.map((s) => formatRhythm(s.rhythm)).sort()).toEqual(own.map((s) => formatRhythm(retrograde(s.rhythm, 'values'))).sort());
        expect(built.palindrome.values).toEqual({ holds: true });
        expect(new Set(own.map((s) => s.mirrored))).toEqual(new Set(own.length > 0 ? [false] : []));
        expect(new Set(back.map((s) => s.mirrored))).toEqual(new Set(back.length > 0 ? [true] : []));
      }),
      runs,
    );
  });

  it('whatever can be built is described, in whole sentences', () => {
    fc.assert(
      fc.property(stated, (document) => {
        build(document);
        const text = describeStudy(document);
        expect(text).not.toMatch(/undefined|null|NaN|\[object|“”|cannot be described|\s\s|\bor\.|, \./);
        for (const line of text.split('\n')) expect(line).toMatch(/\.$/);
      }),
      runs,
    );
  });
});
