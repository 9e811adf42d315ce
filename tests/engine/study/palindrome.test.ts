import { describe, expect, it } from 'vitest';
import { type StudyInput, buildStudy } from '@/engine';
import { free, mirror, stating, study } from './make-study';

const senses = (document: StudyInput) => {
  const { form, values, attacks } = buildStudy(document).palindrome;
  return { form: form.holds, values: values.holds, attacks: attacks.holds };
};
const line = (rhythm: string, instrument = 'bell') => free('a', [{ instrument, rhythm }]);

describe('a palindrome of one line', () => {
  it.each([
    // T2 (from the check values): 3 1 3 is its own reversal, but is heard as gaps 3 1
    ['3/8 1/8 3/8', true, false],
    // … with one attack more the gaps 3 1 3 are symmetrical, and the values 3 1 3 1 are not
    ['3/8 1/8 3/8 1/8', false, true],
    // T1: 3 1 2 2 is neither
    ['3/8 1/8 1/4 1/4', false, false],
    ['1/4 1/4 1/4', true, true],
    ['1/4', true, true],
    // 4 1 1 4 in sixteenths (universalis.fr, A. Feron): values only
    ['1/4 1/16 1/16 1/4', true, false],
    // rests about it: lead and tail count for values, not for attacks
    ['(1/4) 1/8 1/4', false, true],
    ['(1/4) 1/8 1/4 1/8 (1/4)', true, false],
    ['(1/8) 1/4 (1/8) 1/4 (1/8)', true, true],
    // adjacent rests are taken together
    ['(1/8) (1/8) 1/4 (1/4)', true, true],
    ['1/4 (1/8) (1/4) 1/4', true, true],
    ['1/4 (1/4) (1/8) 1/8 (1/8) (1/4) 1/4', true, false],
    ['1/4 (1/4) 1/4 (1/8) (1/8) 1/4', true, true],
    // a note and a rest of the same length are not the same
    ['1/4 1/8 (1/4)', false, true],
    // marks count for values, not for attack times
    ['1/4> 1/8 1/4', false, false],
    ['1/4> 1/4 1/4', false, true],
    ['1/4>@2 1/8 1/4>@2', true, false],
    ['1/4@1 1/4 1/4@2', false, true],
    ['(1)', true, true],
  ])('%s: values %s, attacks %s', (rhythm, values, attacks) => {
    expect(senses(study([line(rhythm)]))).toEqual({ form: true, values, attacks });
  });
});

describe('a palindrome of several lines', () => {
  it('is symmetrical about the middle of the piece, not of each line', () => {
    // each line alone is symmetrical, the piece is not: bell 0 1/4, drum 0 1/2
    expect(senses(study([free('a', [{ instrument: 'bell', rhythm: '1/4 1/4' }, { instrument: 'drum', rhythm: '1/2 1/2' }])])).attacks).toBe(false);
    // bell 1/4 and drum 0 1/2 share the middle 1/4
    expect(senses(study([free('a', [{ instrument: 'bell', rhythm: '(1/4) 1/4' }, { instrument: 'drum', rhythm: '1/2 1/2' }])])).attacks).toBe(true);
  });

  it('may have instruments that never play', () => {
    expect(senses(study([line('1/4 1/4')]))).toEqual({ form: true, values: true, attacks: true });
  });

  it('reads a line as long as the piece: a rest to its end counts', () => {
    const lines = [{ instrument: 'bell', rhythm: '1/4 1/4' }, { instrument: 'drum', rhythm: '1/4 1/4 1/4' }];
    expect(senses(study([free('a', lines)])).values).toBe(false);
  });
});

describe('a palindrome of form', () => {
  const a = stating({ factors: ['1', '3/2'] });
  const b = free('b', [{ instrument: 'pot', rhythm: '1/4 1/8 1/4' }]);
  const x = free('x', [{ instrument: 'bell', rhythm: '1/4 1/8' }]);

  it.each<[string, StudyInput['sections'], boolean]>([
    ['one section alone, the middle', [x], true],
    ['a and its mirror', [a, mirror('m', 'a')], true],
    ['the middle left free', [a, x, mirror('m', 'a')], true],
    ['nested pairs', [a, b, x, mirror('n', 'b'), mirror('m', 'a')], true],
    ['the mirror first', [mirror('m', 'a'), x, a], true],
    ['a mirror and the mirror of the mirror', [a, mirror('m', 'a'), x, mirror('n', 'm'), mirror('o', 'a')], true],
    ['a mirror of a mirror, which is the source again', [a, mirror('m', 'a'), mirror('n', 'm')], false],
    ['pairs the wrong way about', [a, b, mirror('m', 'a'), mirror('n', 'b')], false],
    ['no mirrors', [a, x], false],
    ['two mirrors of one section', [mirror('m', 'a'), a, mirror('n', 'a')], false],
  ])('%s', (_what, sections, holds) => {
    expect(senses(study(sections)).form).toBe(holds);
  });

  it('with a symmetrical middle is one of values too; struck sounds reversed by values are none of attacks', () => {
    expect(senses(study([a, b, mirror('m', 'a')]))).toEqual({ form: true, values: true, attacks: false });
  });

  it('with a middle that is not symmetrical is none of values', () => {
    expect(senses(study([a, x, mirror('m', 'a')]))).toEqual({ form: true, values: false, attacks: false });
  });

  it('can be missing where the values or the attacks are symmetrical', () => {
    const document = study([free('a', [{ instrument: 'bell', rhythm: '1/4 1/8 1/4' }]), free('b', [{ instrument: 'bell', rhythm: '1/8 1/4' }])]);
    // 2 1 2 | 1 2 in eighths: the values are symmetrical, the attacks 0 2 3 5 6 are not
    expect(senses(document)).toEqual({ form: false, values: true, attacks: false });
    const closed = study([free('a', [{ instrument: 'bell', rhythm: '1/4 1/8' }]), free('b', [{ instrument: 'bell', rhythm: '1/4 1/8' }])]);
    // attacks 0 2 3 5
    expect(senses(closed)).toEqual({ form: false, values: false, attacks: true });
  });
});

describe('a failure names the first place', () => {
  it('of values and attacks by instrument, measure and beat', () => {
    const { values, attacks } = buildStudy(study([free('a', [{ instrument: 'drum', rhythm: '1 1/4 1/4 1/2 3/4 1/4' }])])).palindrome;
    expect(values.failure).toMatch(/Drum.*measure 1, beat 1\b/);
    expect(attacks.failure).toMatch(/Drum.*measure 2, beat 1\b|Drum.*measure 2, beat 2\b/);
  });

  it('of form by both sections', () => {
    const { form } = buildStudy(study([free('a', []), free('b', [])])).palindrome;
    expect(form.failure).toMatch(/“A”.*“B”/);
  });

  it('and says nothing where the sense holds', () => {
    const { form, values, attacks } = buildStudy(study([line('1/4 1/4')])).palindrome;
    expect([form, values, attacks]).toEqual([{ holds: true }, { holds: true }, { holds: true }]);
  });
});
