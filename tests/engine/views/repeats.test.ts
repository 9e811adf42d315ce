import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, type Repeat, type Score, type StudyInput, buildStudy, formatRhythm, parseStudy, scoreOf } from '@/engine';
import { shorthand } from '../notation/shorthand';
import { arbitraryProcessSection } from '../process/arbitrary-process';
import { plainRhythm } from '../notation/arbitrary-line';
import { mirror, study } from '../study/make-study';

const CLAPPING = '1/8 1/8 1/8 (1/8) 1/8 1/8 (1/8) 1/8 (1/8) 1/8 1/8 (1/8)';
type Process = Extract<StudyInput['sections'][number], { kind: 'process' }>['process'];

function score(process: Process, rhythm: string, rest: Partial<StudyInput> = {}): Score {
  const section = { id: 'a', name: 'A', role: 'exposition' as const, kind: 'process' as const, subject: 's', instruments: ['bell', 'block'], process };
  const document = parseStudy(study([section, mirror('m', 'a')], { subjects: [{ id: 's', name: 'S', rhythm }], ...rest }));
  return scoreOf(document, buildStudy(document));
}

const printed = ({ measures, repeats }: Score): number => measures.length - repeats.reduce((n, { length, times }) => n + length * (times - 1), 0);

/** Every measure that a repeat leaves out looks as the one that is printed for it. */
function expectAlike({ staves }: Score, { first, length, times }: Repeat): void {
  for (const staff of staves.filter(({ error }) => error === undefined)) {
    const look = (index: number) => shorthand([staff.measures[index]!]);
    for (let n = 0; n < length * times; n += 1) expect(look(first + n)).toBe(look(first + (n % length)));
  }
}

describe('repeats', () => {
  it('a phase of thirteen blocks of twelve repeats, and its mirror: 312 measures on 26', () => {
    const made = score({ kind: 'phase', pulse: '1/8', shift: 1, repeatsPerShift: 12, shifts: 12 }, CLAPPING, { metre: '12/8' });
    expect([made.measures.length, printed(made)]).toEqual([312, 26]);
    expect(made.repeats[0]).toEqual({ first: 0, length: 1, times: 12 });
    expect(made.repeats.every(({ times }) => times === 12)).toBe(true);
  });

  it('a figure that is no whole measure stands as often as fills whole ones: 3/4 in 4/4, eight times, is three measures twice', () => {
    const made = score({ kind: 'phase', pulse: '1/4', shift: 0, repeatsPerShift: 8, shifts: 0 }, '1/4 1/4 1/4');
    expect(made.repeats[0]).toEqual({ first: 0, length: 3, times: 2 });
  });

  it('a value held over the bar line inside the figure stays in it', () => {
    const made = score({ kind: 'phase', pulse: '1/4', shift: 0, repeatsPerShift: 3, shifts: 0 }, '1/2 1 1/2');
    expect(made.repeats[0]).toEqual({ first: 0, length: 2, times: 3 });
    expectAlike(made, made.repeats[0]!);
  });

  it('another line that goes on meanwhile keeps the measures apart', () => {
    const under = [{ instrument: 'drum', rhythm: '1/4 1/4 1/4 1/4 1/2 1/2 1' }];
    const section = { id: 'a', name: 'A', role: 'exposition' as const, kind: 'process' as const, subject: 's', instruments: ['bell'], under, process: { kind: 'additive' as const, direction: 'growing' as const, from: 'front' as const, repeatsEach: 4 } };
    const document = parseStudy(study([section], { subjects: [{ id: 's', name: 'S', rhythm: '1' }] }));
    expect(scoreOf(document, buildStudy(document)).repeats).toEqual([]);
  });

  it('law: what is left out looks as what is printed, and repeats never overlap', () => {
    const rhythm = plainRhythm.map((r) => formatRhythm(r.slice(0, 5))).filter((text) => text !== '');
    const stated = rhythm.chain((text) => arbitraryProcessSection(text).map((section): StudyInput => study([section, mirror('m', 'a')], { subjects: [{ id: 's', name: 'S', rhythm: text }] })));
    let folded = 0;
    fc.assert(
      fc.property(stated, (input) => {
        const document = parseStudy(input);
        let made: Score;
        try {
          made = scoreOf(document, buildStudy(document));
        } catch (error) {
          expect(error).toBeInstanceOf(EngineError);
          return;
        }
        let free = 0;
        for (const repeat of made.repeats) {
          expect(repeat.first).toBeGreaterThanOrEqual(free);
          expect(repeat.times).toBeGreaterThan(1);
          free = repeat.first + repeat.length * repeat.times;
          expectAlike(made, repeat);
          folded += 1;
        }
        expect(free).toBeLessThanOrEqual(made.measures.length);
      }),
      // A fixed seed: that something was folded at all must not depend on luck.
      { numRuns: 150, seed: 1 },
    );
    expect(folded).toBeGreaterThan(0);
  });
});
