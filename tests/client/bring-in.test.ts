import { describe, expect, it } from 'vitest';
import { type Candidate, Fraction, type StudyInput, buildStudy, parseRhythm, parseStudy } from '@/engine';
import { type Destination, bringIn, canBeHeld, firstMeasures, firstRange, taken, typedRange } from '@/lib/client/bring-in';
import { blankStudy } from '@/lib/client/new-study';

const line = (text: string, numbers: readonly string[]): Candidate => ({
  name: 'Claves', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, rhythm: parseRhythm(text), warnings: [],
  measures: numbers.map((number, index) => ({ number, start: new Fraction(index), length: new Fraction(1), metre: '4/4' })),
});
const numbers = (count: number) => Array.from({ length: count }, (_, n) => String(n + 1));

describe('measures of a line', () => {
  it.each([
    ['1/2 1/2 1', 2, [0, 1]],
    ['1/2 1/2 (1) (1)', 4, [0, 0]],
    ['3', 3, [0, 0]],
    ['[1/4 3/4]x15', 15, [0, 14]],
    ['[1/4 3/4]x40', 40, [0, 7]],
  ])('%s at first', (text, count, [from, to]) => expect(firstRange(line(text, numbers(count)))).toEqual({ from, to }));

  it.each<[string, string, unknown]>([
    ['2', '3', { from: 1, to: 2 }],
    [' 1 ', '1', { from: 0, to: 0 }],
    ['0', '2', 'There is no measure “0”: this line has measures 1 to 4.'],
    ['1', 'x', 'There is no measure “x”: this line has measures 1 to 4.'],
    ['3', '2', 'Measure 2 comes before measure 3.'],
  ])('%s to %s, as typed', (from, to, expected) => expect(typedRange(line('[1]x4', numbers(4)), from, to)).toEqual(expected));

  it('numbers as they are printed: a pickup, a measure that has its number twice', () => {
    expect(typedRange(line('[1]x4', ['0', '1', '2', '2']), '0', '2')).toEqual({ from: 0, to: 3 });
    expect(typedRange(line('1', ['7']), '1', '1')).toBe('There is no measure “1”: this line has measure 7 only.');
  });

  it('taken, held, and as they stand in a list', () => {
    const drums = line('(1/2) 1/8 (3/8) 1/8 (7/8) 1', numbers(3));
    expect(taken(drums, { from: 0, to: 1 }, false).text).toBe('(1/2) 1/8 (3/8) 1/8 (7/8)');
    expect(taken(drums, { from: 0, to: 1 }, true).text).toBe('(1/2) 1/2 1');
    expect(firstMeasures(drums)).toBe('(1/2) 1/8 (3/8) 1/8 (7/8) …');
    expect([canBeHeld(drums.rhythm), canBeHeld(parseRhythm('(1/2) 1/2'))]).toEqual([true, false]);
  });
});

describe('what a line becomes', () => {
  const study = parseStudy(blankStudy);
  const after = (destination: Destination, of: StudyInput = study) => {
    const changed = parseStudy(bringIn('1/4 1/2 1/4', destination)(parseStudy(of)));
    buildStudy(changed);
    return changed;
  };
  it('a subject of its own, stated or not', () => {
    const kept = after({ kind: 'subject', name: 'Claves', statedBy: null });
    expect(kept.subjects.map(({ id, rhythm }) => [id, rhythm])).toEqual([['subject', study.subjects[0]!.rhythm], ['claves', '1/4 1/2 1/4']]);
    expect(kept.sections).toEqual(study.sections);
    expect(after({ kind: 'subject', name: 'Subject', statedBy: 'opening' }).sections[0]).toMatchObject({ subject: 'subject-2' });
  });
  it('in place of a subject, whose name and statements stay', () => {
    const changed = after({ kind: 'replace', subject: 'subject' });
    expect(changed.subjects).toEqual([{ id: 'subject', name: 'Subject', rhythm: '1/4 1/2 1/4' }]);
    expect(changed.sections).toEqual(study.sections);
  });
  it('a line of a new episode, after a section', () => {
    expect(after({ kind: 'episode', name: 'Weir', after: 'opening', instrument: 'claves' }).sections[1]).toEqual({ id: 'weir', name: 'Weir', role: 'episode', kind: 'free', lines: [{ instrument: 'claves', rhythm: '1/4 1/2 1/4' }] });
  });
  it('a line of a free section, in place of the instrument’s own', () => {
    const free = after({ kind: 'episode', name: 'Weir', after: 'opening', instrument: 'claves' });
    const more = after({ kind: 'line', section: 'weir', instrument: 'frame-drum' }, free);
    expect(more.sections[1]).toMatchObject({ lines: [{ instrument: 'claves' }, { instrument: 'frame-drum', rhythm: '1/4 1/2 1/4' }] });
    expect(parseStudy(bringIn('1', { kind: 'line', section: 'weir', instrument: 'claves' })(more)).sections[1]).toMatchObject({ lines: [{ instrument: 'claves', rhythm: '1' }, { instrument: 'frame-drum' }] });
  });
});
