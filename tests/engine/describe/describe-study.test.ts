import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  EngineError, Fraction, type StudyInput, buildStudy, describeContext, describeSection, describeStatement, describeStudy, mirrorWords, parseStudy, sectionRemarks, toFactor, toFraction,
} from '@/engine';
import { arbitraryFactor, arbitraryLength } from '../rhythm/arbitrary-rhythm';
import { free, mirror, stating, study } from '../study/make-study';

const section = (input: StudyInput['sections'][number], rest: Partial<StudyInput> = {}) => describeSection(study([input], rest), input.id);

/** Every sum in a text, `1 + 1 1/4 = 2 1/4 measures`, as its terms and its total. */
function sumsIn(text: string): { terms: Fraction[]; total: Fraction; written: string }[] {
  const number = String.raw`\d+(?: \d+/\d+|/\d+)?`;
  return [...text.matchAll(new RegExp(String.raw`(${number}(?: \+ ${number})+) = (${number}) measures?`, 'g'))].map(([written, terms, total]) => ({
    terms: terms!.split(' + ').map((term) => toFraction(term)),
    total: toFraction(total!),
    written,
  }));
}

describe('describeSection', () => {
  it('says the process in a sentence, the sum, and what does not hold', () => {
    expect(section(stating({ factors: ['1', '5/4', '3/2', '2'] }))).toBe(
      'The subject is stated 4 times, one after another, at 1, 5/4, 3/2, 2 times its length, forwards, by bell, block, drum and pot. ' +
        '1 + 1 1/4 + 1 1/2 + 2 = 5 3/4 measures. ' +
        'Each statement is 5/4, 6/5, then 4/3 of the one before it: the steps are not equal. ' +
        'Statement 2 ends 1/4 into a measure.',
    );
  });

  it.each([
    ['successive' as const, /one after another/],
    ['together' as const, /all beginning together/],
    ['ending-together' as const, /all ending together/],
    [{ every: '1' }, /entering every measure/],
    [{ every: '1/2' }, /entering every 1\/2 measure/],
    [{ every: '2' }, /entering every 2 measures/],
  ])('says when they enter: %j', (entries, says) => {
    expect(section(stating({ factors: ['1', '2'], entries }))).toMatch(says);
  });

  it.each([
    ['forwards' as const, /forwards/],
    ['backwards-values' as const, /backwards by values/],
    ['backwards-attacks' as const, /backwards by attacks/],
  ])('says how it is read: %s', (reading, says) => {
    expect(section(stating({ factors: ['1', '2'], reading }))).toMatch(says);
  });

  it('says a ratio, readings in turn, rotations, what comes before, and what plays under it', () => {
    const text = section(
      stating(
        { ratio: '3/2', count: 3, readings: ['forwards', 'backwards-attacks'], rotations: [0, 2] },
        { instruments: ['bell', 'block', 'drum'], before: [{ kind: 'add', amount: '1/8' }], under: [{ instrument: 'pot', rhythm: '1/4' }] },
      ),
    );
    for (const says of [/each 3\/2 times as long as the one before/, /forwards and backwards by attacks in turn/, /rotated by 0, 2/, /longer by 1\/8/, /Under it: pot/]) {
      expect(text).toMatch(says);
    }
  });

  it('says one statement in the singular', () => {
    expect(section(stating({ factors: ['1'] }, { instruments: ['bell'] }))).toMatch(/stated once, at 1 time its length, forwards, by bell\. 1 measure\./);
    expect(section(stating({ factors: ['2', '2'] }, { instruments: ['bell'] }))).toMatch(/stated twice/);
  });

  it('names the subject where there are several', () => {
    const subjects = [{ id: 's', name: 'Ripple', rhythm: '1/4' }, { id: 't', name: 'Wave', rhythm: '1/2' }];
    expect(section(stating({ factors: ['1'] }), { subjects })).toMatch(/^“Ripple” is stated/);
  });

  it('counts no measure of a section in which nothing is played as several', () => {
    expect(section(free('f', []))).toMatch(/\b0 measures\./);
  });

  it('says what a mirror mirrors, and how', () => {
    const document = study([stating({ factors: ['1'] }), mirror('m', 'a', 'attacks'), mirror('n', 'a')]);
    expect(describeSection(document, 'm')).toMatch(/“A” is played from its end, its attacks reversed\./);
    expect(describeSection(document, 'n')).toMatch(/“A” is played from its end, its values reversed\./);
  });

  it('says a metre and a tempo of its own, in the user’s names of values', () => {
    const own = free('f', [{ instrument: 'bell', rhythm: '3/4' }], { metre: '3/4', tempo: { beat: '3/8', perMinute: '66' } });
    expect(section(own)).toMatch(/In 3\/4\. Dotted quarter = 66\. 1 measure\./);
    expect(describeSection(study([own]), 'f', { valueNames: 'british' })).toMatch(/Dotted crotchet = 66/);
  });

  it('refuses an unknown section', () => {
    expect(() => describeSection(study([free('f', [])]), 'g')).toThrow(expect.objectContaining({ code: 'unknown_section' }));
    expect(() => describeSection(study([free('f', [])]), 'g')).toThrow(EngineError);
  });
});

describe('a sum is written only where it adds up', () => {
  it.each([
    ['a line under it outlasts the statements', stating({ factors: ['1', '1'] }, { instruments: ['bell'], under: [{ instrument: 'pot', rhythm: '5' }] })],
    ['statements follow with gaps', stating({ factors: ['1', '1'], entries: { every: '3' } })],
    ['statements sound together', stating({ factors: ['1', '1'], entries: 'together' })],
  ])('where %s', (_what, input) => {
    const document = study([input, mirror('m', 'a')]);
    for (const { terms, total, written } of [...sumsIn(describeSection(document, 'a')), ...sumsIn(describeSection(document, 'm'))]) {
      expect(terms.reduce((a, b) => a.add(b)).equals(total), written).toBe(true);
    }
  });

  it('in any section and any study', () => {
    const process = fc.record({
      factors: fc.array(arbitraryFactor.map((x) => x.toFraction()), { minLength: 1, maxLength: 4 }),
      entries: fc.oneof(fc.constantFrom('successive' as const, 'together' as const, 'ending-together' as const), arbitraryLength.map((x) => ({ every: x.toFraction() }))),
    });
    fc.assert(
      fc.property(process, arbitraryLength, fc.constantFrom('4/4', '7/8', '3+2+2/8', '6/8'), (one, line, metre) => {
        const text = describeStudy(study([stating(one), free('b', [{ instrument: 'bell', rhythm: line.toFraction() }], { metre }), mirror('m', 'a')]));
        const sums = sumsIn(text);
        expect(sums.length).toBeGreaterThan(0);
        for (const { terms, total, written } of sums) expect(terms.reduce((a, b) => a.add(b)).equals(total), written).toBe(true);
      }),
    );
  });
});

describe('what a section’s end is measured by', () => {
  it('is the measure it falls in, also where the section begins inside one', () => {
    const document = study([free('x', [{ instrument: 'pot', rhythm: '1/4' }]), stating({ factors: ['1', '1'] })]);
    // the statements last a whole measure each, from 1/4 into one: each ends 1/4 into a measure
    expect(describeSection(document, 'a')).toMatch(/ends 1\/4 into a measure/);
    const mended = study([free('x', [{ instrument: 'pot', rhythm: '1/4' }]), stating({ factors: ['3/4'] })]);
    expect(describeSection(mended, 'a')).not.toMatch(/into a measure/);
  });
});

describe('describeStudy', () => {
  it('opens with size, metre, clock time and tempo, and says each sense of palindrome', () => {
    const text = describeStudy(study([stating({ factors: ['1', '2'] }), free('x', [{ instrument: 'pot', rhythm: '1/2 1/2' }]), mirror('m', 'a')]));
    const lines = text.split('\n');
    expect(lines[0]).toBe('“Weir” has 3 sections and lasts 3 + 1 + 3 = 7 measures of 4/4, 28 seconds at quarter = 60.');
    expect(lines[1]).toMatch(/4 instruments: bell, block, drum and pot\./);
    expect(text).toMatch(/The form mirrors/);
    expect(text).toMatch(/The values mirror/);
    expect(text).toMatch(/The attacks do not mirror\. .*measure/);
  });

  it('never exclaims, leaves no blank and no unfinished word', () => {
    const texts = [
      describeStudy(study([stating({ factors: ['1'] })])),
      describeStudy(study([free('f', [])]), { valueNames: 'british' }),
      describeStudy(study([stating({ ratio: '2/3', count: 4, entries: 'ending-together' }), mirror('m', 'a')])),
    ];
    for (const text of texts) expect(text).not.toMatch(/!|undefined|null|NaN|\[object|\s\s\s|“”/);
  });

  it('is the same text each time, in JSON or not', () => {
    const document = study([stating({ factors: ['1', '2'] }), mirror('m', 'a')]);
    expect(describeStudy(JSON.parse(JSON.stringify(document)))).toBe(describeStudy(document));
  });
});

describe('describeStatement', () => {
  it('says number, instrument, factor, reading, attacks, measures and clock', () => {
    const document = parseStudy(study([stating({ factors: ['1', '2'], readings: ['forwards', 'backwards-values'], rotations: [0, 1] }), mirror('m', 'a')]));
    const context = describeContext(document, buildStudy(document));
    const texts = context.built.statements.map((s) => describeStatement(context, s));
    expect(texts).toEqual([
      'Statement 1 of 2, bell: at its own length, forwards, 3 attacks, 1 measure long, measure 1, from 0′00″ to 0′04″.',
      'Statement 2 of 2, block: at 2 times its length, backwards by values, rotated by 1 value, 3 attacks, 2 measures long, measures 2 to 3, from 0′04″ to 0′12″.',
      'Statement 1 of 2, block: at 2 times its length, backwards by values, then mirrored, rotated by 1 value, 3 attacks, 2 measures long, measures 4 to 5, from 0′12″ to 0′20″.',
      'Statement 2 of 2, bell: at its own length, forwards, then mirrored, 3 attacks, 1 measure long, measure 6, from 0′20″ to 0′24″.',
    ]);
  });
});

describe('mirrorWords', () => {
  it('names every pair from outside in, and what they mirror about', () => {
    const lines = [{ instrument: 'pot', rhythm: '1/2 1/2' }];
    const words = (sections: StudyInput['sections']) => {
      const document = parseStudy(study(sections));
      return mirrorWords(document, buildStudy(document));
    };
    const [a, b, c] = [stating({ factors: ['1'] }), free('b', lines), free('c', lines)];
    expect(words([a, b, c, mirror('d', 'b'), mirror('e', 'a')])).toBe('A with E and B with D mirror about C');
    expect(words([a, mirror('e', 'a')])).toBe('A with E mirrors about the middle');
    expect(words([a, b])).toBeNull();
  });
});

describe('a study that can be built can be described', () => {
  it('thirty unequal steps: the steps that would mend them are out of reach, and none are offered', () => {
    const document = parseStudy(study([stating({ factors: Array.from({ length: 30 }, (_, n) => ['1', '5/4', '3/2', '2'][n % 4]!) })]));
    const [remark] = sectionRemarks(document, buildStudy(document), document.sections[0]!);
    expect(remark).toEqual({
      code: 'unequal-steps',
      text: 'Each statement is 5/4 of the one before it up to statement 2; statement 3 is 6/5: the steps are not equal.',
    });
  });

  const factor = fc.tuple(fc.integer({ min: 1, max: 999 }), fc.integer({ min: 1, max: 999 })).map(([n, d]) => `${n}/${d}`);
  it('whatever its factors', () => {
    fc.assert(
      fc.property(fc.array(factor, { minLength: 1, maxLength: 40 }), (factors) => {
        const document = parseStudy(study([stating({ factors }), mirror('m', 'a')]));
        let built;
        try {
          built = buildStudy(document);
        } catch (error) {
          // Factors whose common denominator cannot be counted are refused when it is built.
          expect(error).toBeInstanceOf(EngineError);
          return;
        }
        expect(describeStudy(document)).toMatch(/^“Weir” has 2 sections/);
        for (const { mend } of sectionRemarks(document, built, document.sections[0]!)) {
          expect(() => mend?.factors.map((one) => toFactor(one))).not.toThrow();
        }
      }),
      { numRuns: 200 },
    );
  });
});
