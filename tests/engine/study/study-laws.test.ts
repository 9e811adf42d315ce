import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  EngineError, Fraction, type Rhythm, type StudyInput,
  attacks, augment, buildStudy, formatFraction, formatRhythm, parseRhythm, parseStudy, playEvents, retrograde, rotate, totalLength,
} from '@/engine';
import { arbitraryStudy, played, shortRhythm, stated } from './arbitrary-study';
import { free, mirror, study } from './make-study';

const f = formatFraction;
/** Builds; a study whose lengths have too fine a common measure is passed over. */
function build(document: StudyInput) {
  try {
    return buildStudy(document);
  } catch (error) {
    if (error instanceof EngineError && error.code === 'too_fine') return fc.pre(false) as never;
    throw error;
  }
}

const marksOf = (rhythm: Rhythm) => rhythm.filter((v) => !v.rest).map(({ accent, roll, sound }) => `${accent ?? ''} ${roll ?? ''} ${sound ?? ''}`);
const at = (rhythm: Rhythm, start = new Fraction(0)) => attacks(rhythm).map((a) => f(a.add(start)));
const runs = { numRuns: 200 };

describe('laws of built studies', () => {
  it('totals add up: sections without gaps, lines as long as the whole, statements as long as their rhythms', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        let end = new Fraction(0);
        for (const section of built.sections) {
          expect(f(section.start)).toBe(f(end));
          end = end.add(section.length);
          const own = built.statements.filter((s) => s.section === section.id);
          const last = own.map((s) => s.start.add(s.length)).reduce((a, b) => (a.compare(b) > 0 ? a : b), section.start);
          expect(f(section.start.add(section.length))).toBe(f(last));
        }
        expect(f(built.totalLength)).toBe(f(end));
        for (const line of built.lines) expect(f(totalLength(line.rhythm))).toBe(f(end));
        for (const s of built.statements) expect(f(totalLength(s.rhythm))).toBe(f(s.length));
      }),
      runs,
    );
  });

  it('the attacks of a line are those of its instrument’s statements, marks with them', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        for (const line of built.lines) {
          const own = built.statements.filter((s) => s.instrument === line.instrument).sort((a, b) => a.start.compare(b.start));
          expect(at(line.rhythm)).toEqual(own.flatMap((s) => at(s.rhythm, s.start)));
          expect(marksOf(line.rhythm)).toEqual(own.flatMap((s) => marksOf(s.rhythm)));
        }
      }),
      runs,
    );
  });

  it('a statement is the subject stretched, then read, then rotated; a mirror turns it about', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        const subject = parseRhythm(document.subjects![0]!.rhythm);
        for (const s of built.statements.filter(({ subject: id, mirrored }) => id === 's' && !mirrored)) {
          const section = document.sections.find(({ id }) => id === s.section)!;
          if (section.kind !== 'process') continue;
          const stretched = augment(subject, s.factor);
          const read = s.reading === 'forwards' ? stretched : retrograde(stretched, s.reading === 'backwards-values' ? 'values' : 'attacks');
          expect(formatRhythm(s.rhythm)).toBe(formatRhythm(rotate(read, s.rotation, 'values')));
        }
      }),
      runs,
    );
  });

  it('origins: one for each value, null for rests and free lines, each attack of the subject once, with its own marks', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        const subject = parseRhythm(document.subjects![0]!.rhythm);
        const marks = marksOf(subject);
        for (const s of built.statements) {
          expect(s.origins).toHaveLength(s.rhythm.length);
          const sounding = s.rhythm.flatMap((value, i) => (value.rest ? [] : [s.origins[i]!]));
          expect(s.rhythm.every((value, i) => !value.rest || s.origins[i] === null)).toBe(true);
          if (s.subject === null) {
            expect(s.origins.every((origin) => origin === null)).toBe(true);
          } else {
            expect([...sounding].sort((a, b) => a - b)).toEqual(marks.map((_, k) => k));
            expect(marksOf(s.rhythm)).toEqual(sounding.map((origin) => marks[origin]));
          }
        }
      }),
      runs,
    );
  });

  it('an unrotated statement has its origins in order, or in reverse where it is read backwards or mirrored, but not both', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        for (const s of build(document).statements) {
          if (s.subject === null || s.rotation !== 0) continue;
          const order = s.origins.filter((origin) => origin !== null);
          const up = order.map((_, k) => k);
          const isBackwards = (s.reading !== 'forwards') !== s.mirrored;
          expect(order).toEqual(isBackwards ? up.reverse() : up);
        }
      }),
      runs,
    );
  });

  it('a mirror puts [s, e] at [L − e, L − s] on the same instrument; a mirror of that by the same way gives the source', () => {
    fc.assert(
      fc.property(fc.oneof(stated, played), shortRhythm, fc.constantFrom('values' as const, 'attacks' as const), (section, rhythm, by) => {
        const document = study([{ ...section, id: 'a' }, mirror('b', 'a', by), mirror('c', 'b', by)], { subjects: [{ id: 's', name: 'S', rhythm }] });
        const built = build(document);
        const of = (id: string) => {
          const { start } = built.sections.find((one) => one.id === id)!;
          return built.statements
            .filter((s) => s.section === id)
            .map((s) => ({ instrument: s.instrument!, from: s.start.sub(start), to: s.start.sub(start).add(s.length), text: formatRhythm(s.rhythm), origins: s.origins, turned: formatRhythm(retrograde(s.rhythm, by)) }))
            .sort((x, y) => x.instrument.localeCompare(y.instrument));
        };
        const length = built.sections[0]!.length;
        const [a, b, c] = [of('a'), of('b'), of('c')];
        b.forEach((s, k) => {
          expect([s.instrument, f(s.from), f(s.to), s.text]).toEqual([a[k]!.instrument, f(length.sub(a[k]!.to)), f(length.sub(a[k]!.from)), a[k]!.turned]);
        });
        c.forEach((s, k) => {
          expect([s.instrument, f(s.from), s.text, s.origins]).toEqual([a[k]!.instrument, f(a[k]!.from), a[k]!.text, a[k]!.origins]);
        });
      }),
      runs,
    );
  });

  it('any study followed by its mirrors in reverse order is a palindrome of form and of values', () => {
    fc.assert(
      fc.property(fc.array(fc.oneof(stated, played), { minLength: 1, maxLength: 3 }), shortRhythm, (list, rhythm) => {
        const out = list.map((section, k) => ({ ...section, id: `s${k}`, name: `S${k}` }));
        const back = out.map((section, k) => mirror(`m${k}`, section.id)).reverse();
        const { palindrome } = build(study([...out, ...back], { subjects: [{ id: 's', name: 'S', rhythm }] }));
        expect([palindrome.form, palindrome.values]).toEqual([{ holds: true }, { holds: true }]);
      }),
      runs,
    );
  });

  it('attacks are a palindrome exactly where the times of every instrument, mirrored, are themselves', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        const times = built.lines.map((line) => attacks(line.rhythm));
        const all = times.flat().sort((a, b) => a.compare(b));
        const about = all.length === 0 ? new Fraction(0) : all[0]!.add(all.at(-1)!);
        const holds = times.every((own) => own.map((a) => f(about.sub(a))).reverse().join() === own.map(f).join());
        expect(built.palindrome.attacks.holds).toBe(holds);
        expect(built.palindrome.attacks.failure === undefined).toBe(holds);
      }),
      runs,
    );
  });

  it('values are a palindrome exactly where every line, rests joined, reads the same backwards', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        const joined = (rhythm: Rhythm) => {
          const result: { length: Fraction; text: string }[] = [];
          for (const value of rhythm) {
            const last = result.at(-1);
            if (value.rest && last?.text === 'rest') last.length = last.length.add(value.length);
            else result.push({ length: value.length, text: value.rest ? 'rest' : marksOf([value])[0]! });
          }
          return result.map(({ length, text }) => `${f(length)} ${text}`);
        };
        const holds = built.lines.every((line) => joined(line.rhythm).join() === joined(line.rhythm).reverse().join());
        expect(built.palindrome.values.holds).toBe(holds);
        expect(built.palindrome.values.failure === undefined).toBe(holds);
      }),
      runs,
    );
  });

  it('what sounds is what is written: one event an attack, in order, at exact seconds', () => {
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const built = build(document);
        const events = playEvents(parseStudy(document), built);
        expect(events.length).toBe(built.lines.reduce((n, line) => n + attacks(line.rhythm).length, 0));
        for (const line of built.lines) {
          expect(events.filter((e) => e.instrument === line.instrument).map((e) => f(e.position))).toEqual(at(line.rhythm));
        }
        events.forEach((e, k) => {
          // quarter = 60: a whole note lasts 4 seconds
          expect(f(e.seconds)).toBe(f(e.position.mul(4)));
          if (k > 0) expect(events[k - 1]!.position.compare(e.position)).toBeLessThanOrEqual(0);
          const s = built.statements.find(({ id }) => id === e.statement)!;
          expect(e.origin).toBe(s.origins[e.value]);
          expect(f(e.lasts)).toBe(f(s.rhythm[e.value]!.length.mul(4)));
        });
      }),
      runs,
    );
  });
});

describe('the clock over sections of unlike tempo', () => {
  it('adds the seconds of each section', () => {
    const lines = [{ instrument: 'bell', rhythm: '1/2 1/2' }];
    const document = study([
      free('a', lines),
      free('b', lines, { tempo: { beat: '1/4', perMinute: '90' } }),
      mirror('c', 'b'),
    ]);
    const events = playEvents(parseStudy(document), buildStudy(document));
    expect(events.map((e) => f(e.seconds))).toEqual(['0', '2', '4', '16/3', '20/3', '8']);
    expect(events.map((e) => f(e.lasts))).toEqual(['2', '2', '4/3', '4/3', '4/3', '4/3']);
  });
});
