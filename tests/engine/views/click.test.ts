import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import { type StudyInput, buildStudy, clickEvents, clockOf, parseStudy, planMeasures } from '@/engine';
import { arbitraryStudy } from '../study/arbitrary-study';

const study = (metre: string, perMinute: string, rhythm: string, extra: Partial<StudyInput> = {}): StudyInput => ({
  title: 'X', metre, tempo: { beat: '1/4', perMinute }, instruments: [{ id: 'a', name: 'A', family: 'wood' }, { id: 'b', name: 'B', family: 'wood' }],
  players: [{ id: 'p', name: 'P', instruments: ['a'] }, { id: 'q', name: 'Q', instruments: ['b'] }],
  sections: [{ id: 's', name: 'S', role: 'other', kind: 'free', lines: [{ instrument: 'a', rhythm }] }], ...extra,
});
const clicks = (document: StudyInput, options: Parameters<typeof clickEvents>[2] = {}) => {
  const parsed = parseStudy(document);
  const { events, lead } = clickEvents(parsed, buildStudy(parsed), options);
  return { lead: lead.toFraction(), text: events.map(({ seconds, kind }) => `${seconds.toFraction()}${{ bar: '|', beat: '', part: '.', ready: '!' }[kind]}`).join(' ') };
};

// Hand arithmetic.
describe('a click', () => {
  it('counts in one measure, then beats: 4/4 at quarter = 60', () => {
    expect(clicks(study('4/4', '60', '1'))).toEqual({ lead: '4', text: '0| 1 2 3 4| 5 6 7' });
  });
  it('counts in two measures where one is shorter than two seconds: 2/4 at quarter = 120', () => {
    expect(clicks(study('2/4', '120', '1/2'))).toEqual({ lead: '2', text: '0| 1/2 1| 3/2 2| 5/2' });
  });
  it('beats of compound and additive metres are their groups', () => {
    expect(clicks(study('6/8', '90', '3/4'), { countIn: 0 }).text).toBe('0| 1');
    expect(clicks(study('3+2+2/8', '60', '7/8'), { countIn: 0 }).text).toBe('0| 3/2 5/2');
  });
  it('divides beats that are farther apart than 1.8 seconds (Repp 2006), by two, in compound time by three', () => {
    expect(clicks(study('2/4', '30', '1/2'), { countIn: 0 }).text).toBe('0| 1. 2 3.');
    expect(clicks(study('6/8', '40', '3/4'), { countIn: 0 }).text).toBe('0| 3/4. 3/2. 9/4 3. 15/4.');
  });
  it('leaves out beats that are closer than a tenth of a second', () => {
    expect(clicks(study('8/32', '200', '1/4 1/4'), { countIn: 0 }).text).toBe('0| 3/10|');
  });
  it('a pickup ends the count-in, and is no beginning of a measure', () => {
    expect(clicks(study('4/4', '60', '1/4 1', { pickup: '1/4' }))).toEqual({ lead: '7', text: '0| 1 2 3 4| 5 6 7 8| 9 10 11' });
  });
  it('announces an entry after four measures of rest or more, to its player only', () => {
    const document = study('2/4', '60', '1/2 (2) 1/2');
    expect(clicks(document, { player: 'p', countIn: 0 }).text).toBe('0| 1 2| 3 4| 5 6| 7 8! 9! 10| 11');
    expect(clicks(document, { player: 'q', countIn: 0 }).text).not.toContain('!');
    expect(() => clicks(document, { player: 'nobody' })).toThrow(/no player/);
  });
  it('follows what is printed: a stretch that is written as another tempo', () => {
    const document = study('4/4', '60', '1', {
      subjects: [{ id: 's', name: 'S', rhythm: '1' }],
      sections: [{ id: 'x', name: 'X', role: 'other', kind: 'process', subject: 's', instruments: ['a'], writing: 'tempo', process: { kind: 'proportion', factors: ['1', '3/2'], entries: 'successive' } }],
    });
    expect(clicks(document, { countIn: 0 }).text).toBe('0| 1 2 3 4| 11/2 7 17/2');
  });

  it('law: in order, none twice, one at each bar line, all before the end; the demos too', () => {
    const holds = (document: StudyInput): void => {
      const parsed = parseStudy(document);
      const built = buildStudy(parsed);
      const { events, lead } = clickEvents(parsed, built);
      const clock = clockOf(parsed, built);
      for (let n = 1; n < events.length; n += 1) expect(events[n]!.seconds.compare(events[n - 1]!.seconds)).toBe(1);
      const at = new Set(events.map(({ seconds }) => seconds.toFraction()));
      for (const { start } of planMeasures(parsed, built)) expect(at.has(lead.add(clock.secondsAt(start)).toFraction())).toBe(true);
      expect(events.at(-1)!.seconds.compare(lead.add(clock.total))).toBe(-1);
    };
    for (const { study: demo } of demoStudies) holds(demo);
    fc.assert(
      fc.property(arbitraryStudy, (document) => {
        const parsed = parseStudy(document);
        try {
          if (planMeasures(parsed, buildStudy(parsed)).length === 0) return;
        } catch {
          return;
        }
        holds(document);
      }),
      { numRuns: 60 },
    );
  });
});
