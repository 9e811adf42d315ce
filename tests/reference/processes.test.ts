import { describe, expect, it } from 'vitest';
import { type StudyInput, attacks, buildStudy, describeSection, formatFraction, formatRhythm, totalLength } from '@/engine';
import { inUnits } from './rhythms';

type Process = Extract<StudyInput['sections'][number], { kind: 'process' }>['process'];
const INSTRUMENTS = ['one', 'two', 'three'].map((id) => ({ id, name: id, family: 'wood' as const }));

const document = (process: Process, rhythm: string, instruments = ['one', 'two']): StudyInput => ({
  title: 'Weir', metre: '12/8', tempo: { beat: '3/8', perMinute: '60' }, instruments: INSTRUMENTS,
  subjects: [{ id: 's', name: 'Subject', rhythm }],
  sections: [{ id: 'a', name: 'A', role: 'exposition', kind: 'process', subject: 's', instruments, process }],
});
const build = (...args: Parameters<typeof document>) => buildStudy(document(...args));
/** In units of so many to a whole note. */
const units = (text: string, unit: number) => formatRhythm(inUnits(text, unit));

describe('phase: the twelve-pulse clapping pattern (Haack, College Math. J. 22(3), 1991, pp. 224-227; counts recomputed)', () => {
  // x x x . x x . x . x x . as eighths, each clap with the rest after it
  const CLAPPING = '1/8 1/8 1/8 (1/8) 1/8 1/8 (1/8) 1/8 (1/8) 1/8 1/8 (1/8)';
  const built = build({ kind: 'phase', pulse: '1/8', shift: 1, repeatsPerShift: 12, shifts: 12 }, CLAPPING);
  const strings = built.statements.filter((s) => s.instrument === 'two').map((s) => {
    const claps = new Set(attacks(s.rhythm).map((a) => Number(a.mul(8)) ));
    return Array.from({ length: 12 }, (_, pulse) => (claps.has(pulse) ? 'x' : '.')).join('');
  });

  it('thirteen blocks of twelve repeats: 156 measures, 1872 pulses', () => {
    expect(built.statements).toHaveLength(26);
    expect(f(built.totalLength.div('12/8'))).toBe('156');
    expect(f(built.totalLength.mul(8))).toBe('1872');
  });
  it('the twelve rotations to the left, then the first again', () => {
    expect(strings).toEqual([
      'xxx.xx.x.xx.', 'xx.xx.x.xx.x', 'x.xx.x.xx.xx', '.xx.x.xx.xxx', 'xx.x.xx.xxx.', 'x.x.xx.xxx.x', '.x.xx.xxx.xx',
      'x.xx.xxx.xx.', '.xx.xxx.xx.x', 'xx.xxx.xx.x.', 'x.xxx.xx.x.x', '.xxx.xx.x.xx', 'xxx.xx.x.xx.',
    ]);
  });
  it('claps at once in each block: 8 4 5 6 5 6 4 6 5 6 5 4 8', () => {
    const together = Array.from({ length: 13 }, (_, k) => {
      const [stays, moves] = built.statements.slice(2 * k, 2 * k + 2).map((s) => new Set(attacks(s.rhythm).map((a) => f(a.add(s.start)))));
      return [...stays!].filter((time) => moves!.has(time)).length / 12;
    });
    expect(together).toEqual([8, 4, 5, 6, 5, 6, 4, 6, 5, 6, 5, 4, 8]);
  });
});

const f = formatFraction;

describe('rotation', () => {
  it('a cycle entered one value later each time comes home after as many statements as it has values (from memory)', () => {
    const built = build({ kind: 'rotation', steps: 1, by: 'values', count: 5, entries: 'successive' }, '1/8 1/4 3/8 1/2');
    expect(built.statements.map((s) => formatRhythm(s.rhythm))).toEqual([
      '1/8 1/4 3/8 1/2', '1/4 3/8 1/2 1/8', '3/8 1/2 1/8 1/4', '1/2 1/8 1/4 3/8', '1/8 1/4 3/8 1/2',
    ]);
    expect(built.statements.map((s) => s.rotation)).toEqual([0, 1, 2, 3, 4]);
  });
});

describe('additive: a line of n notes played 1, 1-2, 1-2-3 … n, then shrinking (Rzewski, 1969: 65 notes, 2145 of them growing)', () => {
  const line = Array.from({ length: 65 }, () => '1/8').join(' ');
  it('65 notes growing from the front: 65 × 66 / 2 = 2145 notes', () => {
    const built = build({ kind: 'additive', direction: 'growing', from: 'front', repeatsEach: 1 }, line, ['one']);
    expect(built.statements).toHaveLength(65);
    expect(built.statements.reduce((n, s) => n + attacks(s.rhythm).length, 0)).toBe(2145);
  });
  it('growing, the whole once more, then 2..65, 3..65 … 65: 4290 notes', () => {
    const back = build({ kind: 'additive', direction: 'shrinking', from: 'back', repeatsEach: 1 }, line, ['one']);
    const notes = back.statements.map((s) => attacks(s.rhythm).length);
    // shrinking begins with the whole line: that is the “once more”
    expect(notes.slice(0, 3)).toEqual([65, 64, 63]);
    expect(2145 + notes.reduce((a, b) => a + b, 0)).toBe(4290);
  });
  it('from the front and from the back hold other values', () => {
    const of = (from: 'front' | 'back', direction: 'growing' | 'shrinking') =>
      build({ kind: 'additive', direction, from, repeatsEach: 2 }, '1/8 1/4 (1/8)', ['one']).statements.map((s) => formatRhythm(s.rhythm));
    expect(of('front', 'growing')).toEqual(['1/8 1/8', '1/8 1/4 1/8 1/4', '1/8 1/4 (1/8) 1/8 1/4 (1/8)']);
    expect(of('back', 'growing')).toEqual(['(1/8) (1/8)', '1/4 (1/8) 1/4 (1/8)', '1/8 1/4 (1/8) 1/8 1/4 (1/8)']);
    expect(of('front', 'shrinking')).toEqual([...of('front', 'growing')].reverse());
  });
});

describe('filling-in: a pattern of m attacks takes m steps, each a superset of the last (Reich, 1973, as described at tekpercussion.com)', () => {
  const pattern = '1/8 1/8 (1/8) 1/8 (1/8) 1/8';
  const built = build({ kind: 'filling-in', order: [2, 0, 3, 1], repeatsEach: 1 }, pattern, ['one']);
  it('four attacks: a silent stage and four steps', () => {
    expect(built.statements.map((s) => formatRhythm(s.rhythm))).toEqual([
      '(1/8) (1/8) (1/8) (1/8) (1/8) (1/8)', '(1/8) (1/8) (1/8) 1/8 (1/8) (1/8)', '1/8 (1/8) (1/8) 1/8 (1/8) (1/8)',
      '1/8 (1/8) (1/8) 1/8 (1/8) 1/8', '1/8 1/8 (1/8) 1/8 (1/8) 1/8',
    ]);
    expect(built.statements.map((s) => s.origins.filter((origin) => origin !== null))).toEqual([[], [2], [0, 2], [0, 2, 3], [0, 1, 2, 3]]);
  });
  it('an attack that is not there, or named twice, is refused by its number', () => {
    expect(() => build({ kind: 'filling-in', order: [4], repeatsEach: 1 }, pattern)).toThrow('The subject has 4 attacks; there is no attack 5 to fill in.');
    expect(() => build({ kind: 'filling-in', order: [0, 1, 0], repeatsEach: 1 }, pattern)).toThrow('Attack 1 is filled in twice.');
  });
});

describe('cycle: colour and talea', () => {
  // Values of one length: only the counts are published.
  const talea = (values: number) => Array.from({ length: values }, () => '1/4').join(' ');
  const colour = (notes: number) => Array.from({ length: notes }, (_, k) => ['one', 'two', 'three'][k % 3]!);
  const rounds = (values: number, notes: number) => build({ kind: 'cycle', colour: colour(notes), until: 'alignment' }, talea(values)).statements;

  it('Machaut, M4: a colour of 18 and a talea of 12 end together after 36 notes, three taleae (bestmusicteacher.com, mindmap isorhythm)', () => {
    const statements = rounds(12, 18);
    expect(statements).toHaveLength(3);
    expect(statements.flatMap((s) => s.assigned!)).toHaveLength(36);
  });
  it('Machaut, Kyrie I: a colour of 28 and a talea of 4: seven taleae (from memory)', () => {
    expect(rounds(4, 28)).toHaveLength(7);
  });
  it('attack j goes to colour j modulo its number, also over the rounds; each instrument rests meanwhile', () => {
    const built = build({ kind: 'cycle', colour: ['one', 'two', 'three'], until: 2 }, '1/4 (1/8) 1/8');
    expect(built.statements.map((s) => s.assigned)).toEqual([['one', 'two'], ['three', 'one']]);
    expect(built.lines.map((line) => formatRhythm(line.rhythm))).toEqual([
      '1/4 (1/8) (1/8) (1/4) (1/8) 1/8', '(1/4) (1/8) 1/8 (1/2)', '(1/2) 1/4 (1/8) (1/8)',
    ]);
  });
});

describe('resultant (Schillinger, The Schillinger System of Musical Composition, 1946, Book I; strings recomputed)', () => {
  it.each([
    [2, 1, '1 1'], [3, 2, '2 1 1 2'], [4, 3, '3 1 2 2 1 3'], [5, 2, '2 2 1 1 2 2'], [5, 3, '3 2 1 3 1 2 3'], [5, 4, '4 1 3 2 2 3 1 4'],
    [7, 4, '4 3 1 4 2 2 4 1 3 4'], [8, 5, '5 3 2 5 1 4 4 1 5 2 3 5'],
  ])('%i against %i: %s', (a, b, gaps) => {
    const built = build({ kind: 'resultant', a, b, unit: '1/8' }, '1/4', ['one']);
    expect(built.statements).toHaveLength(1);
    const [statement] = built.statements;
    expect(statement!.subject).toBeNull();
    expect(formatRhythm(statement!.rhythm)).toBe(units(gaps, 8));
    expect(f(totalLength(statement!.rhythm).mul(8))).toBe(String(a * b));
  });
  it('needs no subject', () => {
    const whole = document({ kind: 'resultant', a: 3, b: 2, unit: '1/8' }, '1/4');
    const section = { ...whole.sections[0]!, subject: undefined };
    expect(buildStudy({ ...whole, subjects: [], sections: [section] }).statements).toHaveLength(1);
  });
});

describe('where cycles come together again', () => {
  it.each<[string, Process, string, string]>([
    ['the twelve-pulse clapping pattern after twelve shifts (Haack, 1991)', { kind: 'phase', pulse: '1/8', shift: 1, repeatsPerShift: 1, shifts: 12 }, '1/8 1/8 1/8 (1/8) 1/8 1/8 (1/8) 1/8 (1/8) 1/8 1/8 (1/8)', 'Both are together again after 12 shifts.'],
    ['in steps of five pulses of twelve too, since they have no common divisor', { kind: 'phase', pulse: '1/8', shift: -5, repeatsPerShift: 1, shifts: 4 }, '1/2 1/2 1/2', 'Both are together again after 12 shifts; here there are 4.'],
    ['Machaut, M4: colour 18, talea 12 (bestmusicteacher.com)', { kind: 'cycle', colour: Array.from({ length: 18 }, () => 'one'), until: 1 }, Array.from({ length: 12 }, () => '1/4').join(' '), '12 attacks and 18 colours end together after 3 rounds, 36 attacks in all.'],
    ['3 against 2 (Schillinger, 1946)', { kind: 'resultant', a: 3, b: 2, unit: '1/8' }, '1/4', 'Both pulses are together again after 6 units, 4 attacks.'],
    ['a rotation by two of five values', { kind: 'rotation', steps: 2, by: 'values', count: 2 }, '1/8 1/8 1/4 1/4 1/4', 'It is back where it began after 5 statements.'],
  ])('%s', (_, process, rhythm, remark) => {
    expect(describeSection(document(process, rhythm), 'a')).toContain(remark);
  });
});

describe('each process in a sentence', () => {
  it.each<[Process, string[] | undefined, string]>([
    [{ kind: 'rotation', steps: 1, by: { pulse: '1/8' }, count: 3 }, undefined, 'The subject is rotated by 1 pulse of 1/8 from each statement to the next, stated 3 times, one after another, forwards, by one and two.'],
    [{ kind: 'rotation', steps: -2, by: 'attacks', count: 2 }, undefined, 'The subject is rotated by -2 attacks from each statement to the next, stated twice, one after another, forwards, by one and two.'],
    [{ kind: 'phase', pulse: '1/8', shift: 1, repeatsPerShift: 12, shifts: 12 }, undefined, 'The subject is shifted against itself: one keeps to it, two enters it later by 1 pulse of 1/8 after every 12 times through, shifted 12 times, forwards.'],
    [{ kind: 'additive', direction: 'growing', from: 'front', repeatsEach: 4 }, ['one'], 'The subject is built up value by value, growing, with its beginning in every stage, each stage 4 times, forwards, by one.'],
    [{ kind: 'filling-in', order: [1, 0], repeatsEach: 2 }, ['one'], 'The subject is filled in out of silence, its attacks in the order 2, 1, each stage twice, forwards, by one.'],
    [{ kind: 'cycle', colour: ['one', 'three'], until: 'alignment', reading: 'backwards-values' }, undefined, 'The subject goes round, its attacks passed from hand to hand through one and three, until both end together, backwards by values.'],
    [{ kind: 'resultant', a: 4, b: 3, unit: '1/16' }, ['two'], 'A pulse of 4 and one of 3, in units of 1/16, are heard as one rhythm, by two.'],
  ])('%j', (process, instruments, sentence) => {
    expect(describeSection(document(process, '1/4 1/8 1/8', instruments), 'a')).toContain(sentence);
  });
});
