import { describe, expect, it } from 'vitest';
import { type StudyInput, buildStudy, describeSection, formatFraction, formatRhythm, measuresOf, secondsOf, studySchema } from '@/engine';

const SUBJECT = '3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 3/8 1/8 1/2 (1/4) 1/4 1/4 1/4 1/2';

/** The study printed in the contract, its instruments declared. */
const LOCK_GATES: StudyInput = {
  format: 1, title: 'Lock Gates', metre: '4/4', tempo: { beat: '1/4', perMinute: '84' },
  subjects: [{ id: 's', name: 'Subject', rhythm: SUBJECT }],
  instruments: [
    { id: 'crotales', name: 'Crotales', family: 'metal', sound: 'crotales' },
    { id: 'temple-blocks', name: 'Temple blocks', family: 'wood' },
    { id: 'log-drum', name: 'Log drum', family: 'wood' },
    { id: 'tam-tam', name: 'Tam-tam', family: 'metal' },
    { id: 'flower-pots', name: 'Flower pots', family: 'found' },
  ],
  players: [{ id: 'p1', name: 'Player 1', instruments: ['crotales'] }],
  sections: [
    {
      id: 'filling', name: 'Filling', role: 'exposition', kind: 'process', subject: 's',
      process: { kind: 'proportion', factors: ['1', '5/4', '3/2', '2'], reading: 'forwards', entries: 'successive' },
      instruments: ['crotales', 'temple-blocks', 'log-drum', 'tam-tam'],
    },
    { id: 'sluice', name: 'Sluice', role: 'episode', kind: 'free', lines: [{ instrument: 'flower-pots', rhythm: '1/4 (1/4) 1/8 1/8 1/4' }] },
    { id: 'emptying', name: 'Emptying', role: 'recapitulation', kind: 'mirror', of: 'filling' },
  ],
};

describe('the study printed in the contract', () => {
  const built = buildStudy(LOCK_GATES);

  it('passes the schema and is kept as it is', () => {
    expect(studySchema.parse(LOCK_GATES)).toEqual(LOCK_GATES);
  });

  it('has statements of 4, 5, 6 and 8 measures, 23 in all', () => {
    const filling = built.statements.filter((s) => s.section === 'filling');
    expect(filling.map((s) => formatFraction(measuresOf(s.length, '4/4')))).toEqual(['4', '5', '6', '8']);
    expect(formatFraction(measuresOf(built.sections[0]!.length, '4/4'))).toBe('23');
    expect(describeSection(LOCK_GATES, 'filling')).toContain('4 + 5 + 6 + 8 = 23 measures');
  });

  it('has 47 measures: 23, 1 and 23', () => {
    expect(built.sections.map((s) => formatFraction(s.length))).toEqual(['23', '1', '23']);
    expect(formatFraction(built.totalLength)).toBe('47');
    expect(formatFraction(secondsOf(built.totalLength, LOCK_GATES.tempo))).toBe('940/7');
  });

  it('begins the emptying with the tam-tam, twice as long and from its end', () => {
    const [first] = built.statements.filter((s) => s.section === 'emptying');
    expect([first!.instrument, formatFraction(first!.start), formatFraction(first!.factor), first!.mirrored]).toEqual(['tam-tam', '24', '2', true]);
    expect(formatRhythm(first!.rhythm)).toBe('1 1/2 1/2 1/2 (1/2) 1 1/4 3/4 1/2 1/4 1/4 (1/2) 1/2 1/4 3/4');
    expect(first!.origins).toEqual([12, 11, 10, 9, null, 8, 7, 6, 5, 4, 3, null, 2, 1, 0]);
  });

  it('mirrors in form; not in values, for the sluice does not; not in attacks', () => {
    const { form, values, attacks } = built.palindrome;
    expect([form.holds, values.holds, attacks.holds]).toEqual([true, false, false]);
    expect(values.failure).toMatch(/Flower pots.*measure 24/);
  });
});

/** 77 measures at quarter = 84, from the design's account of the demo. */
describe('the demo’s clock time', () => {
  it('77 measures of 4/4 at quarter = 84 last 3′40″ exactly', () => {
    expect(formatFraction(secondsOf('77', { beat: '1/4', perMinute: '84' }))).toBe('220');
  });
});
