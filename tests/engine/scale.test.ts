import { describe, expect, it } from 'vitest';
import {
  EngineError, LIMITS, type EngineErrorCode, attacks, augment, buildStudy, checkAnswer, findTransformations, formatRhythm, parseRhythm, parseStudy, playEvents, scoreOf, spellLine, totalLength,
} from '@/engine';
import { stating, study } from './study/make-study';

const SUBJECT = '3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 3/8 1/8 1/2 (1/4) 1/4 1/4 1/4 1/2';

function codeOf(act: () => unknown): EngineErrorCode | 'none' {
  try {
    act();
    return 'none';
  } catch (error) {
    if (error instanceof EngineError) return error.code;
    throw error;
  }
}

/** Ten sections of so many statements by four instruments in turn. */
const large = (sections: number, statements: number) =>
  parseStudy(
    study(
      Array.from({ length: sections }, (_, index) => ({
        ...stating({ factors: Array.from({ length: statements }, (__, k) => ['1', '5/4', '3/2', '2'][k % 4]!) }),
        id: `s${index}`,
        name: `S${index}`,
      })),
      { subjects: [{ id: 's', name: 'S', rhythm: SUBJECT }] },
    ),
  );

describe('large pieces', () => {
  it('100,000 attacks are built, spelled and played, every one of them', () => {
    const document = large(60, 129);
    const built = buildStudy(document);
    const count = built.lines.reduce((n, { rhythm }) => n + attacks(rhythm).length, 0);
    expect(count).toBeGreaterThan(100_000);
    const { staves, measures } = scoreOf(document, built);
    expect(measures.length).toBeGreaterThan(5_000);
    for (const { error, measures: own } of staves) expect([error, own.length]).toEqual([undefined, measures.length]);
    const struck = staves.reduce((n, staff) => n + staff.measures.reduce((m, { symbols }) => m + symbols.filter(({ rest, tiedFromBefore }) => !rest && !tiedFromBefore).length, 0), 0);
    expect(struck).toBe(count);
    expect(playEvents(document, built)).toHaveLength(count);
  }, 60_000);

  it('a line of 5,000 measures of triplets and quintuplets adds up to the last', () => {
    const rhythm = parseRhythm(`[1/12 1/12 1/12 1/20 1/20 1/20 1/20 1/20 1/2]x5000`);
    const measures = spellLine(rhythm, '4/4');
    expect(measures).toHaveLength(5_000);
    expect(measures.at(-1)!.symbols).toEqual(measures[0]!.symbols.map((symbol) => ({ ...symbol, value: symbol.value! + 4_999 * 9 })));
  }, 60_000);

  it('finder and checker take a thousand values', () => {
    const subject = parseRhythm(Array.from({ length: 1_000 }, (_, index) => ['1/4', '1/8', '(1/8)', '3/16'][(index * index) % 4]).join(' '));
    const answer = augment(subject, '3/2');
    expect(findTransformations(subject, answer)).not.toEqual([]);
    expect(checkAnswer({ subject, steps: [{ kind: 'augment', factor: '3/2' }], answer: answer.toSpliced(500, 1) }).marks).toMatchObject({ of: expect.any(Number) as number });
  });
});

describe('up to the limits, and the clear error beyond them', () => {
  it.each<[string, EngineErrorCode | 'none', () => unknown]>([
    ['the longest text', 'none', () => parseRhythm('1/4'.padEnd(LIMITS.rhythmTextLength))],
    ['a character more', 'too_large', () => parseRhythm('1/4'.padEnd(LIMITS.rhythmTextLength + 1))],
    ['the most repeats', 'none', () => parseRhythm(`[1/4]x${LIMITS.repeatCount}`)],
    ['one more', 'invalid_rhythm', () => parseRhythm(`[1/4]x${LIMITS.repeatCount + 1}`)],
    ['the finest fraction', 'none', () => parseRhythm(`1/${LIMITS.fractionTerm}`)],
    ['a finer one', 'invalid_rhythm', () => parseRhythm(`1/${LIMITS.fractionTerm + 1}`)],
    ['lengths whose common denominator can be counted', 'none', () => parseRhythm('1/999999937 1/2')],
    ['lengths whose common denominator cannot', 'too_fine', () => parseRhythm('1/999999937 1/999999929')],
    ['the most measures of one line', 'none', () => spellLine(parseRhythm(`[1/4]x${LIMITS.repeatCount} [1/4]x${LIMITS.repeatCount}`), '1/4')],
    ['more measures than a line may have', 'too_large', () => spellLine(parseRhythm(`[1/64]x10000 [7]x10000`), '1/64')],
    ['the most statements of a section', 'none', () => buildStudy(large(1, LIMITS.statements))],
    ['one more', 'too_large', () => large(1, LIMITS.statements + 1)],
    ['more values than a study may have', 'too_large', () => buildStudy(large(LIMITS.sections, LIMITS.statements))],
    ['the greatest factor', 'none', () => augment(parseRhythm('1/4'), LIMITS.factor)],
    ['a greater one', 'invalid_factor', () => augment(parseRhythm('1/4'), LIMITS.factor + 1)],
  ])('%s: %s', (_, code, act) => expect(codeOf(act)).toBe(code), 60_000);

  it('an error beyond a limit names the limit', () => {
    expect(() => large(1, LIMITS.statements + 1)).toThrow(String(LIMITS.statements));
    expect(() => parseRhythm('1/4'.padEnd(LIMITS.rhythmTextLength + 1))).toThrow(String(LIMITS.rhythmTextLength));
  });

  it('lengths stay exact over a hundred thousand values', () => {
    const rhythm = parseRhythm('[1/3 1/7 1/11]x10000');
    expect(totalLength(rhythm).toFraction()).toBe('1310000/231');
    expect(formatRhythm(rhythm).length).toBeGreaterThan(100_000);
  });
});
