import { describe, expect, it } from 'vitest';
import { EngineError, LIMITS, RhythmTextError, parseRhythm } from '@/engine';

/** What parseRhythm throws; fails where it throws nothing. */
function errorOf(text: string, metre?: string): RhythmTextError {
  try {
    parseRhythm(text, metre === undefined ? {} : { metre });
  } catch (error) {
    if (error instanceof RhythmTextError) return error;
    throw error;
  }
  throw new Error(`“${text.slice(0, 60)}” was read, though it should have been refused`);
}

type Row = [what: string, text: string, offset: number, length: number, says: RegExp];

const VALUES: Row[] = [
  ['division by zero', '1/4 1/0 1/8', 4, 3, /divides by zero/],
  ['a negative value', '1/8 -1/4', 4, 4, /negative/],
  ['a negative value with the minus sign of print', '\u22121/4', 0, 4, /negative/],
  ['two divisions', '1/3/4', 0, 5, /1\/3\/4/],
  ['zero', '1/4 0', 4, 1, /no length/],
  ['zero quarters', '0/4', 0, 3, /no length/],
  ['zero as a decimal', '0.0', 0, 3, /no length/],
  ['zero in a sum', '1/4+0', 4, 1, /no length/],
  ['a decimal that is not finished', '1.', 0, 2, /1\./],
  ['two points', '1.2.3', 0, 5, /1\.2\.3/],
  ['no numerator', '/4', 0, 2, /\/4/],
  ['no denominator', '1/ 1/4', 0, 2, /1\//],
  ['an exponent', '1e3', 1, 2, /e3/],
  ['letters', '1/4 abc 1/8', 4, 3, /abc/],
  ['digits of another script', '1/4 ٣/٤', 4, 3, /٣/],
  ['a comma for the point', '1/4, 1/8', 3, 1, /,/],
  ['a term beyond the limit', `1/4 1/${LIMITS.fractionTerm + 1}`, 4, 12, /too fine/],
  ['more digits than a fraction may have', `1/4 ${'1'.repeat(70)}`, 4, 70, /64/],
];

const SUMS: Row[] = [
  ['a sum that ends in +', '1/4+', 3, 1, /joins nothing/],
  ['a sum that begins with +', '+1/4', 0, 1, /\+/],
  ['two + in a row', '1/4++1/4', 3, 1, /joins nothing/],
  ['a + before a rest', '1/4+(1/8)', 3, 1, /joins nothing/],
  ['a + behind a bar line', '1/4|+1/4', 4, 1, /\+/],
  ['a mark inside a sum', '1/4>+1/8', 3, 5, />\+1\/8/],
  ['a bad term in a sum', '1/4+1/0', 4, 3, /divides by zero/],
  ['a bad term after a bar line', '1/4+| 1/0', 6, 3, /divides by zero/],
];

const MARKS: Row[] = [
  ['an accent that stands alone', '1/4 >', 4, 1, />/],
  ['two accents', '1/4>>', 3, 2, /order/],
  ['both accents', '1/4>^', 3, 2, /order/],
  ['a roll before the accent', '1/4///>', 3, 4, /order/],
  ['a sound before the roll', '1/4@2///', 3, 5, /order/],
  ['two strokes', '1/4//', 3, 2, /order/],
  ['four strokes', '1/4////', 3, 4, /order/],
  ['sound 0', '1/4@0', 3, 2, /from 1/],
  ['a sound beyond the limit', '1/4@13', 3, 3, /12/],
  ['a sound without its number', '1/4@', 3, 1, /@/],
  ['a negative sound', '1/4@-1', 3, 3, /@-1/],
  ['an accent on a rest', '(1/4)>', 5, 1, /rest/],
  ['a roll on a rest', '1/4 (1/4)///', 9, 3, /rest/],
  ['a sound on a rest', '(1/4)@2', 5, 2, /rest/],
  ['an accent within the brackets of a rest', '(1/4>)', 4, 1, /rest/],
];

const RESTS: Row[] = [
  ['a rest that is not closed', '1/8 (1/4', 4, 4, /not closed/],
  ['a rest that is not closed, more after it', '(1/4 1/8 (1/4)', 0, 4, /not closed/],
  ['a rest that was never opened', '1/4)', 3, 1, /opens|round brackets/],
  ['an empty rest', '1/4 ()', 4, 2, /round brackets/],
  ['two lengths in one rest', '(1/4 1/8)', 0, 9, /round brackets/],
  ['a negative rest', '(-1/4)', 1, 4, /negative/],
  ['a rest of zero', '(0)', 1, 1, /no length/],
  ['a rest within a rest', '((1/4))', 0, 1, /round brackets|not closed/],
  ['a bad length in a rest', '(1/0)', 1, 3, /divides by zero/],
  ['a repeat in a rest', '([1/4]x2)', 0, 1, /round brackets|not closed/],
];

const SPACES: Row[] = [
  ['a rest that touches the value before', '1/4(1/8)', 3, 5, /space/],
  ['a rest that touches the rest before', '(1/4)(1/8)', 5, 5, /space/],
  ['a value that touches the rest before', '(1/4)1/8', 5, 3, /space/],
  ['a repeat of two and a half', '[1/4]x2.5', 4, 5, /whole number|how often/i],
  ['a value that touches the repeat before', '[1/4]x2/4', 4, 5, /whole number|how often/i],
];

const REPEATS: Row[] = [
  ['a repeat inside a repeat', '[1/4 [1/8]x2]x2', 5, 1, /inside a repeat/],
  ['a repeat that is not closed', '1/4 [1/8 1/8', 4, 1, /not closed/],
  ['a repeat that was never opened', '1/4 ]x2', 4, 3, /closes no repeat/],
  ['a repeat without a number', '[1/4]', 4, 1, /how often/i],
  ['a repeat with x and no number', '[1/4]x 1/4', 4, 2, /how often/i],
  ['no times', '[1/4]x0', 4, 3, /1 to/],
  ['minus two times', '[1/4]x-2', 4, 4, /how often/i],
  ['an empty repeat', '1/4 []x3', 4, 4, /empty/],
  ['a repeat of bar lines alone', '[|]x3', 0, 5, /empty/],
];

const WHOLE: Row[] = [
  ['empty text', '', 0, 1, /empty/],
  ['white space alone', ' \t\r\n', 0, 4, /empty/],
  ['bar lines alone', '| |', 0, 3, /no values/],
];

const all: [string, Row[]][] = [
  ['lengths', VALUES],
  ['sums', SUMS],
  ['marks', MARKS],
  ['rests', RESTS],
  ['spaces', SPACES],
  ['repeats', REPEATS],
  ['whole texts', WHOLE],
];

describe.each(all)('parseRhythm refuses %s', (_group, rows) => {
  it.each(rows)('%s: %j', (_what, text, offset, length, says) => {
    const error = errorOf(text);
    expect(error).toBeInstanceOf(EngineError);
    expect(error.code).toBe('invalid_rhythm');
    expect([error.offset, error.length]).toEqual([offset, length]);
    expect(error.message).toMatch(says);
    expect(error.message).toMatch(/[.?]$/);
    expect(error.message).not.toContain('!');
  });
});

describe('parseRhythm with a metre', () => {
  it.each([
    ['a short measure', '1/4 1/4 1/4 | 1/4', '4/4', 12, /Measure 1 lasts 3\/4.*4\/4.*should last 1\b.*1\/4 too short/],
    ['a long measure', '1/2 3/8 | 1', '3/4', 8, /Measure 1 lasts 7\/8.*3\/4.*should last 3\/4.*1\/8 too long/],
    ['the second measure', '7/8 | 3/4 | 7/8', '3+2+2/8', 10, /Measure 2 lasts 3\/4.*3\+2\+2\/8.*should last 7\/8/],
    ['two bar lines in a row', '1 | | 1', '4/4', 4, /Measure 2 lasts 0.*should last 1\b/],
    ['a value held into a measure that is then short', '1/2 1/2+|1/4 |', '4/4', 13, /Measure 2 lasts 1\/4/],
    ['a value held over too early', '1/4+|3/4', '4/4', 4, /Measure 1 lasts 1\/4/],
    ['the second time round of a repeat', '[3/4 | 1/4]x2 |', '3/4', 5, /Measure 2 lasts 1; in 3\/4/],
    ['a last measure that is too long', '1 | 5/4', '4/4', 6, /Measure 2 lasts 5\/4/],
  ])('names %s, its length and what it should be', (_what, text, metre, offset, says) => {
    const error = errorOf(text, metre);
    expect(error.code).toBe('bar_not_full');
    expect(error.offset).toBe(offset);
    expect(error.length).toBeGreaterThan(0);
    expect(error.message).toMatch(says);
  });

  it('refuses a metre that cannot be read', () => {
    expect(() => parseRhythm('1/4', { metre: '4/3' })).toThrow(EngineError);
  });
});

describe('parseRhythm beyond the limits', () => {
  it('refuses a text that is too long', () => {
    const error = errorOf('1/4 '.repeat(LIMITS.rhythmTextLength / 4 + 1));
    expect(error.code).toBe('too_large');
    expect(error.message).toContain(String(LIMITS.rhythmTextLength));
  });

  it('refuses more values than a rhythm may have', () => {
    const error = errorOf('1 '.repeat(LIMITS.rhythmValues + 1));
    expect([error.code, error.offset, error.length]).toEqual(['too_large', 2 * LIMITS.rhythmValues, 1]);
  });

  it('measures a repeat before it is written out', () => {
    const body = '1/4 '.repeat(100);
    const error = errorOf(`1/8 [${body}]x9999`);
    expect([error.code, error.offset, error.length]).toEqual(['too_large', 5 + body.length, 6]);
    expect(error.message).toContain(String(1 + 100 * 9999));
  });

  it.each(['10001', '999999999999', '9'.repeat(400)])('refuses to repeat %s times', (times) => {
    const error = errorOf(`[1/4]x${times}`);
    expect([error.offset, error.length]).toEqual([4, 2 + times.length]);
    expect(error.message).toContain(String(LIMITS.repeatCount));
  });

  it('refuses a sum that grows too fine, and lengths that have no common measure left', () => {
    const primes = [999_999_937, 999_999_929, 999_999_893, 999_999_883, 999_999_797];
    const sum = errorOf(primes.map((p) => `1/${p}`).join('+'));
    expect(sum.code).toBe('too_fine');
    const row = errorOf(primes.map((p) => `1/${p}`).join(' '));
    expect(row.code).toBe('too_fine');
    expect(row.offset).toBeGreaterThan(0);
  });

  it('quotes no more of a long piece than can be read', () => {
    for (const junk of ['a'.repeat(10_000), '1'.repeat(10_000), `(1/4)${'>'.repeat(10_000)}`, `-${'1'.repeat(10_000)}`, `1/4${'@'.repeat(10_000)}`]) {
      const error = errorOf(junk);
      expect(error.message.length).toBeLessThan(300);
      expect(error.offset + error.length).toBe(junk.length);
    }
  });
});

/** Each of these once took, or could take, time that grows with the square of its length or worse: that they end is the test. */
describe('parseRhythm comes to an end on a megabyte of', () => {
  const long = LIMITS.rhythmTextLength - 32;
  it.each([
    ['digits', '1'.repeat(long)],
    ['plus signs', '+'.repeat(long)],
    ['plus signs after a value', `1/4${'+'.repeat(long)}`],
    ['digits and plus signs', '1+'.repeat(long / 2)],
    ['a sum in an open rest', `(${'1+'.repeat(long / 2)}`],
    ['white space after a plus', `1/4+${' '.repeat(long)})`],
    ['white space after a plus in a rest', `(1/4+${' '.repeat(long)}]`],
    ['white space in an open rest', `(${' '.repeat(long)}`],
    ['white space between value and plus', `1/4${' '.repeat(long)}+`],
    ['strokes before a digit', `1${'/'.repeat(long)}1`],
    ['strokes', `1${'/'.repeat(long)}`],
    ['opening round brackets', '('.repeat(long)],
    ['closing round brackets', ')'.repeat(long)],
    ['opening brackets', '['.repeat(long)],
    ['closing brackets', ']'.repeat(long)],
    ['points', '.'.repeat(long)],
    ['letters', 'x'.repeat(long)],
    ['letters and spaces', 'x '.repeat(long / 2)],
    ['emoji', '🥁'.repeat(long / 2)],
    ['a repeat’s spaces', `[1/4]${' '.repeat(long)}x`],
    ['sums of unlike denominators', Array.from({ length: 80_000 }, (_, k) => `1/${900_000_000 + 7 * k}`).join('+')],
    ['unlike denominators', Array.from({ length: 80_000 }, (_, k) => `1/${900_000_000 + 7 * k}`).join(' ')],
  ])('%s', (_what, text) => {
    expect(errorOf(text).message.length).toBeLessThan(300);
  });

  it('bar lines in a repeat', () => {
    expect(parseRhythm(`[1/4 ${'|'.repeat(long)}]x10000`)).toHaveLength(10_000);
  });

  it('a sum in a repeat, with a metre', () => {
    expect(parseRhythm(`[${Array<string>(200_000).fill('1/4').join('+')}]x10000`, { metre: '4/4' })).toHaveLength(10_000);
  });

  it('values held over bar lines in a repeat, with a metre', () => {
    expect(errorOf(`[${Array<string>(150_000).fill('1').join('+|')}+|1 |]x10000`, '4/4').code).toBe('too_large');
  });
});
