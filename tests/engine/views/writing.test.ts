import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  EngineError, Fraction, type Study, type StudyInput, type Writing,
  buildStudy, compareWritings, formatFraction, formatRhythm, legibilityOf, legibilityWords, parseMetre, parseRhythm, parseStudy, playEvents, scoreOf, secondsOf, spellLine, stretchedMetre, symbolLength, tempoMarkWords, tempoMarks, toFraction,
} from '@/engine';
import { plainRhythm } from '../notation/arbitrary-line';
import { shorthand } from '../notation/shorthand';
import { free, mirror, stating, study } from '../study/make-study';

const f = formatFraction;

function written(factors: string[], writing: Writing, rest: Partial<StudyInput> = {}): Study {
  return parseStudy(study([stating({ factors }, { writing })], rest));
}

/**
 * What somebody hears who reads the score alone: symbols at their written lengths, at the tempo that is printed; the
 * document is not looked at.
 */
function readBack(document: Study): Map<string, string[]> {
  const built = buildStudy(document);
  const { measures, staves } = scoreOf(document, built);
  const marks = new Map(tempoMarks(document, built).map((mark) => [mark.measure, mark]));
  const heard = new Map<string, string[]>();
  for (const staff of staves) {
    expect(staff.error).toBeUndefined();
    const times: string[] = [];
    let now = new Fraction(0);
    let whole = new Fraction(0);
    measures.forEach(({ index }) => {
      const mark = marks.get(index);
      if (mark) whole = secondsOf('1', { beat: mark.beat, perMinute: mark.perMinute });
      for (const symbol of staff.measures[index]?.symbols ?? []) {
        if (!symbol.rest && !symbol.tiedFromBefore) times.push(f(now));
        now = now.add(symbolLength(symbol).mul(whole));
      }
    });
    heard.set(staff.instrument.id, times);
  }
  return heard;
}

const sounding = (document: Study): Map<string, string[]> => {
  const events = playEvents(document, buildStudy(document));
  return new Map(document.instruments.map(({ id }) => [id, events.filter(({ instrument }) => instrument === id).map(({ seconds }) => f(seconds))]));
};

describe('three ways to write a stretch sound the same to the last fraction', () => {
  it.each(['values', 'tempo', 'metre'] as const)('%s: 1, 5/4, 3/2, 2', (writing) => {
    const document = written(['1', '5/4', '3/2', '2'], writing);
    expect(readBack(document)).toEqual(sounding(document));
    expect(sounding(document)).toEqual(sounding(written(['1', '5/4', '3/2', '2'], 'values')));
  });

  const factor = fc.constantFrom('1', '1/2', '3/4', '5/4', '3/2', '2', '3', '4/3', '2/3', '7/8');
  it('law: whatever the subject and the factors, and under a mirror', () => {
    const subject = plainRhythm.map((r) => formatRhythm(r.slice(0, 6))).filter((text) => text !== '');
    let compared = 0;
    fc.assert(
      fc.property(subject, fc.array(factor, { minLength: 1, maxLength: 4 }), fc.constantFrom<Writing>('tempo', 'metre'), (rhythm, factors, writing) => {
        const document = parseStudy(study([stating({ factors }, { writing }), mirror('m', 'a')], { subjects: [{ id: 's', name: 'S', rhythm }] }));
        const built = buildStudy(document);
        const score = scoreOf(document, built);
        fc.pre(score.refusals.length === 0 && score.staves.every(({ error }) => error === undefined));
        expect(readBack(document)).toEqual(sounding(document));
        compared += 1;
      }),
      { numRuns: 150 },
    );
    expect(compared).toBeGreaterThan(40);
  });
});

describe('a new tempo with its equivalence', () => {
  const document = written(['1', '3/2', '2'], 'tempo');
  it('the notation is that of the subject each time; the tempo tells the stretch', () => {
    const { staves } = scoreOf(document, buildStudy(document));
    const [bell, block, drum] = staves.map(({ measures }) => shorthand(measures.filter(({ symbols }) => symbols.some(({ rest }) => !rest))));
    expect([bell, block, drum]).toEqual(['q e (e) h', 'q e (e) h', 'q e (e) h']);
  });
  it('60, then 40 with dotted quarter = quarter, then 30 with dotted quarter = … none plain, quarter tied', () => {
    const marks = tempoMarks(document, buildStudy(document));
    expect(marks.map(({ measure, beat, perMinute, equivalence }) => [measure, f(beat), f(perMinute), equivalence && `${f(equivalence.before)} = ${f(equivalence.after)}`])).toEqual([
      [0, '1/4', '60', null],
      [1, '1/4', '40', '3/8 = 1/4'],
      // 2 to 3/2 is 4/3: a dotted quarter lasts as long as a half did
      [2, '1/4', '30', '1/2 = 3/8'],
    ]);
  });
});

describe('tempo marks in words', () => {
  const words = (factors: string[], names?: 'british') => {
    const document = written(factors, 'tempo');
    return tempoMarks(document, buildStudy(document)).map((mark) => tempoMarkWords(mark, names));
  };
  it('where no two plain values last as long, two are tied', () => {
    expect(words(['1', '5/4', '3/2'])).toEqual(['quarter = 60', 'quarter tied to sixteenth = quarter, quarter = 48', 'dotted quarter = quarter tied to sixteenth, quarter = 40']);
  });
  it('in British names; and where nothing does, the metronome alone', () => {
    expect(words(['1', '3/2', '1/7'], 'british')).toEqual(['crotchet = 60', 'dotted crotchet = crotchet, crotchet = 40', 'crotchet = 420']);
  });
});

describe('a new metre with the same number of measures', () => {
  it.each([
    ['4/4', '3/2', '12/8'], ['4/4', '2', '4/2'], ['4/4', '1/2', '4/8'], ['4/4', '5/4', '5+5+5+5/16'], ['4/4', '3/4', '12/16'], ['3/4', '3/2', '9/8'],
    ['6/8', '2', '6/4'], ['2/4', '3/2', '6/8'], ['3+2/8', '2', '3+2/4'], ['7/8', '1', '7/8'], ['4/4', '1', '4/4'],
  ])('%s at %s', (metre, factor, expected) => {
    const stretched = stretchedMetre(metre, toFraction(factor));
    expect(parseMetre(stretched).length.equals(parseMetre(metre).length.mul(factor))).toBe(true);
    expect(stretched).toBe(expected);
  });
  it('6/8 at 2/3 would be 6/12: no metre', () => {
    expect(() => stretchedMetre('6/8', toFraction('2/3'))).toThrow(EngineError);
  });
  it('4/3 of 4/4 is no metre: refused with the reason, and written in longer values', () => {
    const document = written(['1', '4/3'], 'metre');
    const { refusals, measures } = scoreOf(document, buildStudy(document));
    expect(refusals.map(({ code, message }) => [code, message])).toEqual([['cannot_write', '“A” cannot be written in new metres: 4/3 times 4/4 is no metre that can be written.']]);
    expect(measures.every(({ metre }) => metre === '4/4')).toBe(true);
  });
  it('each statement takes as many measures as the subject', () => {
    const document = written(['1', '3/2', '2'], 'metre');
    const { measures } = scoreOf(document, buildStudy(document));
    expect(measures.map(({ metre, signature }) => [metre, signature])).toEqual([['4/4', '4/4'], ['12/8', '12/8'], ['4/2', '4/2']]);
  });
});

describe('where a way is impossible it is refused with the reason', () => {
  it('statements at different factors at once share neither tempo nor metre', () => {
    const document = parseStudy(study([stating({ factors: ['1', '3/2'], entries: 'together' })]));
    const choices = compareWritings(document, buildStudy(document), 'a');
    expect(choices.map((choice) => ('refused' in choice ? [choice.writing, choice.refused] : [choice.writing, choice.isEasiest]))).toEqual([
      ['values', true],
      ['tempo', 'In “A” lines at 1 and at 3/2 times their length sound at once: they cannot share a tempo. Write it in longer values.'],
      ['metre', 'In “A” lines at 1 and at 3/2 times their length sound at once: they cannot share a metre. Write it in longer values.'],
    ]);
  });
  it('a line under the section keeps its own length, and so no tempo is shared with it', () => {
    const document = parseStudy(study([stating({ factors: ['3/2'] }, { instruments: ['bell'], under: [{ instrument: 'pot', rhythm: '1/4 1/4 1/4 1/4' }] }), free('b', [])]));
    const [, tempo] = compareWritings(document, buildStudy(document), 'a');
    expect(tempo).toMatchObject({ writing: 'tempo', refused: expect.stringContaining('they cannot share a tempo') as string });
  });
});

describe('legibility', () => {
  it('counts what a reader takes in, and is worse for each', () => {
    const of = (rhythm: string, metre = '4/4') => legibilityOf(spellLine(parseRhythm(rhythm), metre));
    expect(of('1/4 1/4 1/4 1/4')).toMatchObject({ symbols: 4, ties: 0, dots: 0, tuplets: 0, nested: 0 });
    expect(of('3/8 5/8')).toMatchObject({ symbols: 3, ties: 1, dots: 1 });
    expect(of('1/12 1/12 1/12 3/4')).toMatchObject({ tuplets: 1, nested: 0 });
    expect(of('1/60 1/60 1/60 1/60 1/60 1/6 3/4')).toMatchObject({ tuplets: 1, nested: 1 });
    const costs = ['1/4 1/4 1/4 1/4', '3/8 1/8 1/4 1/4', '1/4 3/8 3/8', '1/12 1/12 1/12 1/4 1/2', '1/60 1/60 1/60 1/60 1/60 1/6 3/4'].map((rhythm) => of(rhythm).cost);
    expect(costs).toEqual(costs.toSorted((a, b) => a - b));
    expect(costs[0]).toBeLessThan(costs.at(-1)!);
    expect(legibilityWords(of('3/8 5/8'))).toBe('3 symbols, 1 tie, 1 dot');
  });

  it('a subject at 5/4 reads more easily at a new tempo, with the reason in counts', () => {
    const document = parseStudy(study([stating({ factors: ['1', '5/4', '5/4'] })], { subjects: [{ id: 's', name: 'S', rhythm: '3/8 1/8 1/4 (1/4) | 1/8 1/8 1/4 3/8 1/8' }] }));
    const choices = compareWritings(document, buildStudy(document), 'a');
    const easiest = choices.filter((choice) => 'isEasiest' in choice && choice.isEasiest);
    expect(easiest.map(({ writing }) => writing)).toEqual(['tempo']);
    const [values, tempo] = choices.map((choice) => ('legibility' in choice ? choice.legibility : null));
    expect(values!.ties).toBeGreaterThan(tempo!.ties);
    expect(tempo!.tempoChanges).toBe(1);
  });
});
