import { describe, expect, test } from 'vitest';
import { demoStudies } from '@/db/demo';
import { type StudyInput, buildStudy, parseStudy, planMeasures, scoreOf, symbolLength } from '@/engine';

const study = (factors: string[], more: Partial<StudyInput> = {}): StudyInput => ({
  title: 'Weir',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '60' },
  subjects: [{ id: 's', name: 'Subject', rhythm: '1/4 1/8 1/8 1/2' }],
  instruments: [{ id: 'bell', name: 'Bell', family: 'metal' }],
  sections: [
    { id: 'a', name: 'Rise', role: 'exposition', kind: 'process', subject: 's', process: { kind: 'proportion', factors }, instruments: ['bell'] },
  ],
  ...more,
});

describe('scoreOf', () => {
  test.each(demoStudies.map(({ slug, study: document }) => [slug, document] as const))('%s: every staff has every measure, and each adds up', (_, document) => {
    const parsed = parseStudy(document);
    const built = buildStudy(parsed);
    const score = scoreOf(parsed, built);
    for (const staff of score.staves) {
      expect(staff.error).toBeUndefined();
      expect(staff.measures).toHaveLength(score.measures.length);
      staff.measures.forEach((measure, index) => {
        const planned = score.measures[index]!;
        expect(measure.metre).toBe(planned.metre);
        expect(measure.start.equals(planned.start)).toBe(true);
        const total = measure.symbols.map(symbolLength).reduce((a, b) => a.add(b));
        expect(total.toFraction()).toBe(planned.length.toFraction());
      });
    }
  });

  test('a symbol leads back to its statement and attack', () => {
    const parsed = parseStudy(study(['1', '2']));
    const { staves } = scoreOf(parsed, buildStudy(parsed));
    const { measures, sources } = staves[0]!;
    const second = measures[1]!.symbols[1]!;
    const source = sources[second.value!];
    expect(source?.statement.index).toBe(1);
    expect(source?.statement.origins[source.value]).toBe(1);
  });

  test('a factor that cannot be written is told by its statement, with the factors near it that can', () => {
    const parsed = parseStudy(study(['1', '13/11']));
    const { staves } = scoreOf(parsed, buildStudy(parsed));
    const { error } = staves[0]!;
    expect(error?.code).toBe('unspellable');
    expect(error?.section).toBe('a');
    expect(error?.message).toMatch(/^At 13\/11 times its length, statement 2 of “Rise” cannot be written with ties and tuplets: see measure 2, where a value lasts 13\/44\. Factors near it that can: /);
    const offered = /that can: (.*)\.$/.exec(error!.message)![1]!.split(', ');
    expect(offered.length).toBeGreaterThan(0);
    for (const factor of offered) {
      const mended = parseStudy(study(['1', factor]));
      expect(scoreOf(mended, buildStudy(mended)).staves[0]!.error, factor).toBeUndefined();
    }
  });
});

describe('planMeasures', () => {
  test('a pickup is measure 0 under the metre that it leads into', () => {
    const parsed = parseStudy(study(['1', '5/4'], { pickup: '1/4' }));
    const measures = planMeasures(parsed, buildStudy(parsed));
    expect(measures.map(({ number, metre, signature }) => [number, metre, signature])).toEqual([
      [0, '1/4', '4/4'],
      [1, '4/4', null],
      [2, '4/4', null],
    ]);
  });

  test('a change of metre inside a measure cuts it short', () => {
    const document = study(['1', '5/4']);
    const [first] = document.sections;
    const parsed = parseStudy({ ...document, sections: [first!, { id: 'b', name: 'Fall', role: 'episode', kind: 'free', metre: '3/4', lines: [{ instrument: 'bell', rhythm: '3/4 3/4' }] }] });
    const measures = planMeasures(parsed, buildStudy(parsed));
    expect(measures.map(({ metre, signature }) => [metre, signature])).toEqual([
      ['4/4', '4/4'],
      ['4/4', null],
      ['1/4', '1/4'],
      ['3/4', '3/4'],
      ['3/4', null],
    ]);
  });
});
