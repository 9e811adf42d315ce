import { describe, expect, it } from 'vitest';
import { type CheckInput, type Step, RhythmTextError, checkAnswer, formatRhythm } from '@/engine';

const by = (factor: string): Step => ({ kind: 'augment', factor });
const reverse = (how: 'values' | 'attacks'): Step => ({ kind: 'retrograde', by: how });
const turn = (steps: number, how: 'values' | 'attacks' = 'values'): Step => ({ kind: 'rotate', steps, by: how });
const check = (subject: string, steps: Step[], answer: string, metre?: string) => checkAnswer({ subject, steps, answer, ...(metre === undefined ? {} : { metre }) } satisfies CheckInput);
const codes = (...args: Parameters<typeof check>) => check(...args).diagnoses.map(({ code }) => code);

describe('right answers', () => {
  it.each([
    // nathanmuehl.com/objectives/ob24.3: quarter quarter eighth, augmented: half half quarter; diminished: eighth eighth sixteenth
    ['1/4 1/4 1/8', [by('2')], '1/2 1/2 1/4'],
    ['1/4 1/4 1/8', [{ kind: 'diminish', factor: '2' } as Step], '1/8 1/8 1/16'],
    // openknowledgegraph.com: quarter eighth eighth half doubled is half quarter quarter whole
    ['1/4 1/8 1/8 1/2', [by('2')], '1/2 1/4 1/4 1'],
    // Feron, universalis.fr: the retrograde of quarter sixteenth quarter quarter
    ['1/4 1/16 1/4 1/4', [reverse('values')], '1/4 1/4 1/16 1/4'],
    // spelling is not judged: a tie for a dot, rests apart or together
    ['1/4 (1/4)', [by('3/2')], '1/4+1/8 (1/4) (1/8)'],
    ['1/4 (1/8) (1/8)', [by('1')], '1/4 (1/4)'],
  ])('%s %j: %s', (subject, steps, answer) => {
    const checked = check(subject, steps, answer);
    expect(checked).toMatchObject({ correct: true, diagnoses: [] });
    expect(checked.marks.got).toBe(checked.marks.of);
    expect(checked.values.every(({ verdict }) => verdict === 'right')).toBe(true);
  });
});

describe('named mistakes', () => {
  const S = '3/8 1/8 (1/4) 1/4';
  it.each<[string, Step[], string, string]>([
    ['factor-inverted', [by('3/2')], '1/4 1/12 (1/6) 1/6', 'The factor is upside down'],
    ['wrong-factor', [by('3/2')], '9/8 3/8 (3/4) 3/4', 'by another factor'],
    ['rests-not-stretched', [by('2')], '3/4 1/4 (1/4) 1/2', 'the rests are not'],
    ['only-rests-stretched', [by('2')], '3/8 1/8 (1/2) 1/4', 'Only the rests are stretched'],
    ['nothing-done', [reverse('values')], S, 'This is the subject itself'],
    ['not-reversed', [by('2'), reverse('values')], '3/4 1/4 (1/2) 1/2', 'The order is not reversed'],
    ['reversed-by-attacks', [reverse('values')], '1/8 (1/4) 3/8 1/4', 'The attacks are reversed, not the values'],
    ['reversed-by-values', [reverse('attacks')], '1/4 (1/4) 1/8 3/8', 'The values are reversed, not the attacks'],
    ['rotated-the-wrong-way', [turn(1)], '1/4 3/8 1/8 (1/4)', 'rotated the other way'],
    ['rotated-too-far', [turn(1)], '(1/4) 1/4 3/8 1/8', 'one too far'],
    ['rotated-too-little', [turn(2)], '1/8 (1/4) 1/4 3/8', 'one too little'],
    ['rotated-by-attacks', [turn(2)], '1/4 3/8 1/8 (1/4)', 'by attacks, not by values'],
    ['not-stretched', [by('2'), reverse('values')], '1/4 (1/4) 1/8 3/8', 'not stretched'],
    ['taken-away-instead', [{ kind: 'add', amount: '1/16' }], '5/16 1/16 (1/4) 3/16', 'the other way'],
    ['added-to-rests', [{ kind: 'add', amount: '1/16' }], '7/16 3/16 (5/16) 5/16', 'to the rests too'],
    ['other-unit', [reverse('values')], '1/2 (1/2) 1/4 3/4', 'right in another unit'],
    ['value-wrong', [by('2')], '3/4 1/4 (1/2) 3/8', 'One value is wrong'],
    ['value-missing', [by('2')], '3/4 (1/2) 1/2', 'A value is missing'],
    ['value-added', [by('2')], '3/4 1/4 1/8 (1/2) 1/2', 'A value is too many'],
    ['kind-wrong', [by('2')], '3/4 1/4 1/2 1/2', 'A rest stands for an attack'],
    ['struck-again', [by('2')], '1/2 1/4 1/4 (1/2) 1/2', 'struck again'],
    ['held-on', [by('2')], '1 (1/2) 1/2', 'held as one'],
    ['steps-in-another-order', [turn(1), reverse('values')], '(1/4) 1/8 3/8 1/4', 'in another order'],
  ])('%s', (code, steps, answer, words) => {
    const { correct, diagnoses } = check(S, steps, answer);
    expect(correct).toBe(false);
    expect(diagnoses.map((one) => one.code)).toContain(code);
    expect(diagnoses.find((one) => one.code === code)!.message).toContain(words);
  });

  it('where: measure, beat and value, what was expected, and the habit that avoids it', () => {
    const [first] = check('1/4 1/4 1/4 1/4 1/4 1/4 1/2', [by('1')], '1/4 1/4 1/4 1/4 | 1/4 1/8 1/2', '4/4').diagnoses;
    expect(first).toEqual({
      code: 'value-wrong',
      at: { value: 5, measure: 1, beat: '1' },
      message: 'One value is wrong: measure 2, beat 2, value 6, 1/4 was expected, 1/8 is given. Check each value against the one that it comes from.',
    });
  });

  it('a measure that does not add up is told by its number', () => {
    const { correct, diagnoses } = check('1/4 1/4 1/2 1/2 1/2', [by('1')], '1/4 1/4 | 1/2 1/2 1/2', '4/4');
    expect(correct).toBe(true);
    expect(diagnoses.map(({ code, at }) => [code, at.measure])).toEqual([['measure-does-not-add-up', 0]]);
    expect(diagnoses[0]!.message).toContain('Measure 1 lasts 1/2; in 4/4 it should last 1.');
  });

  it('a text that cannot be read is refused at its place', () => expect(() => check('1/4', [by('2')], '1/4 zwei')).toThrow(RhythmTextError));

  it('a misreading with a slip besides is still named, and the slip too', () => {
    const subject = '1/4 1/8 3/8 1/16 1/2 (1/4) 1/4 1/8';
    // by 1/2 instead of 2, and one value wrong
    const found = codes(subject, [by('2')], '1/8 1/16 3/16 1/32 1/4 (1/8) 1/8 1/4');
    expect(found[0]).toBe('factor-inverted');
  });
});

describe('marks', () => {
  const subject = '1/4 1/8 3/8 1/16 1/2 (1/4) 1/4 1/8';
  it.each([
    ['right', '1/2 1/4 3/4 1/8 1 (1/2) 1/2 1/4', 8],
    ['one value wrong', '1/2 1/4 1 1/8 1 (1/2) 1/2 1/4', 7],
    ['one missing: what follows is right', '1/2 3/4 1/8 1 (1/2) 1/2 1/4', 7],
    ['one too many: what follows is right', '1/2 1/4 3/4 1/8 1/16 1 (1/2) 1/2 1/4', 7],
    ['one struck again', '1/2 1/4 1/4 1/2 1/8 1 (1/2) 1/2 1/4', 7],
    ['two slips', '1/2 1/4 1 1/8 1 (1/2) 1/4', 6],
  ])('%s', (_, answer, got) => expect(check(subject, [by('2')], answer).marks).toEqual({ got, of: 8 }));

  it('values beside those of the key', () => {
    const { values } = check('1/4 1/8 (1/8)', [by('2')], '1/2 1/4 1/16 (1/8)');
    expect(values.map(({ expected, given, verdict }) => [expected && formatRhythm([expected]), given && formatRhythm([given]), verdict])).toEqual([
      ['1/2', '1/2', 'right'], ['1/4', '1/4', 'right'], [undefined, '1/16', 'extra'], ['(1/4)', '(1/8)', 'wrong-length'],
    ]);
  });
});

describe('spelling is told apart from the marks', () => {
  const spelling = (answer: string, metre = '4/4') => check('1/4 (1/4)', [], answer, metre).spelling.map(({ message }) => message);
  it.each([
    ['1/4+1/8 (1/4) 3/8', ['Value 1, of 3/8, is tied together from 2 parts; here one does.']],
    // Where beat 3 must show (Berklee, Imaginary bar lines) the tie is needed.
    ['1/4 1/4+1/8 3/8', []],
    ['1/4 1/4+1/16+1/16 3/8', ['Value 2, of 3/8, is tied together from 3 parts; here 2 do.']],
    ['1/2 (1/4) (1/4)', ['Value 2, a silence of 1/2, is written in 2 rests; here one does.']],
    // In simple time each beat has its own rest but for a half of the measure (grade-4 page on rests).
    ['1/4 (1/4) (1/4) 1/4', []],
    ['3/4 1/4+|1/4 3/4', []],
    ['[1/4]x4', []],
    ['3/8> 1/8///@2 1/2^', []],
  ])('%s', (answer, remarks) => expect(spelling(answer)).toEqual(remarks));
  it('and costs nothing', () => {
    expect(check('3/8 1/8 1/2', [], '1/4+1/8 1/8 1/2', '4/4')).toMatchObject({ correct: true, marks: { got: 3, of: 3 }, diagnoses: [], spelling: [{ value: 0 }] });
    expect(check('3/8 1/8 1/2', [], '1/4+1/8 1/8 1/2').spelling).toEqual([]);
  });
});
