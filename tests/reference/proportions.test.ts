import { describe, expect, it } from 'vitest';
import {
  type Exact, alignment, attacks, augment, diminish, formatFraction, formatRhythm, ladder, measuresOf, parseRhythm, secondsOf, tempoFor, toFraction, totalLength,
} from '@/engine';

describe('Gaffurius, Practica musicae (Milan 1496), as in the LilyPond music glossary, node "proportion"', () => {
  it.each([
    ['dupla', ['2', '1'], ['4', '2'], ['6', '3']],
    ['tripla', ['3', '1'], ['6', '2'], ['9', '3']],
    ['quadrupla', ['4', '1'], ['8', '2'], ['12', '3']],
  ])('%s is one ratio however it is written, and its inverse cancels it', (_name, ...pairs) => {
    const ratios = pairs.map(([over, under]) => ladder([under!, over!]).steps[0]!);
    expect(new Set(ratios.map(formatFraction)).size).toBe(1);
    const inverse = ladder([pairs[0]![0]!, pairs[0]![1]!]).steps[0]!;
    expect(formatFraction(ratios[0]!.mul(inverse))).toBe('1');
  });
});

/** Stainer and Barrett, A Dictionary of Musical Terms (as transcribed at u2.lege.net/John_Keely/svpvril.com). */
describe('Stainer and Barrett, A Dictionary of Musical Terms: names of ratios', () => {
  it.each([
    ['sesquialtera', '3:2', '3/2'],
    ['sesquitertia', '4:3', '4/3'],
    ['sesquiquarta', '5:4', '5/4'],
    ['superbipartiens tertias', '5:3', '5/3'],
    ['supertripartiens quartas', '7:4', '7/4'],
    ['tripla superbipartiens quintas', '17:5', '17/5'],
    ['tripla supertripartiens quartas', '15:4', '15/4'],
  ])('%s, %s, stretches a whole note to %s, and sub- turns it over', (_name, pair, length) => {
    const [over, under] = pair.split(':');
    const factor = `${over}/${under}`;
    expect(formatRhythm(augment(parseRhythm('1'), factor))).toBe(length);
    expect(formatRhythm(diminish(parseRhythm(length), factor))).toBe('1');
  });

  it('T15: 27:8 is 3 and 3/8, so supertripartiens octavas, not quartas', () => {
    expect(toFraction('27/8').equals(toFraction('3 3/8'))).toBe(true);
    expect(toFraction('15/4').equals(toFraction('3 3/4'))).toBe(true);
  });
});

describe('hemiola, 3:2 (LilyPond music glossary, node "hemiola")', () => {
  it('three equal notes last as long as two of the stretched', () => {
    expect(totalLength(parseRhythm('[1/4]x3')).equals(totalLength(augment(parseRhythm('[1/4]x2'), '3/2')))).toBe(true);
    expect(measuresOf('1/4', '6/8').mul(3).equals(measuresOf('3/8', '6/8').mul(2))).toBe(true);
  });
});

describe('T3: each half as long again is a geometric run', () => {
  it('4, 6, 9, 27/2: every step 3/2', () => {
    const run = ladder(['4', '6', '9', '27/2']);
    expect(run.steps.map(formatFraction)).toEqual(['3/2', '3/2', '3/2']);
    expect(run.equalSteps).toBe(true);
    expect(run.toFirst.map(formatFraction)).toEqual(['1', '3/2', '9/4', '27/8']);
    expect(formatFraction(run.total)).toBe('65/2');
  });

  it('4 6 8 12: steps 3/2, 4/3, 3/2, not equal', () => {
    const run = ladder([4, 6, 8, 12]);
    expect(run.steps.map(formatFraction)).toEqual(['3/2', '4/3', '3/2']);
    expect(run.equalSteps).toBe(false);
    expect(formatFraction(run.total)).toBe('30');
  });

  it('4 6 8 10: equal differences, unequal steps', () => {
    const run = ladder([4, 6, 8, 10]);
    expect(run.equalSteps).toBe(false);
    expect(run.steps.map(formatFraction)).toEqual(['3/2', '4/3', '5/4']);
  });
});

describe('Winold in DeLone et al., Aspects of Twentieth-Century Music (1975), ch. 3, pp. 230-231: Carter, Fantasy, mm. 16-17', () => {
  it('at quarter = 84, two halves become three: 126', () => {
    const faster = tempoFor({ beat: '1/4', perMinute: '84' }, '2/3');
    expect([formatFraction(faster.perMinute), formatFraction(faster.beat)]).toEqual(['126', '1/4']);
  });

  it('the dotted quarter of the new tempo is the old quarter, 84', () => {
    expect(secondsOf('3/8', { beat: '1/4', perMinute: '126' }).equals(secondsOf('1/4', { beat: '1/4', perMinute: '84' }))).toBe(true);
  });

  it('T10: upside down it would be 56, which tempoFor gives for the inverse factor only', () => {
    expect(formatFraction(tempoFor({ beat: '1/4', perMinute: '84' }, '3/2').perMinute)).toBe('56');
  });
});

describe('Benadon, as in a public article on metric modulation: a septuplet pivot', () => {
  it('a sixteenth counted as one of seven in the place of four: 4/7', () => {
    expect(formatRhythm(augment(parseRhythm('1/16'), '4/7'))).toBe('1/28');
    expect(ladder(['7', '4']).steps.map(formatFraction)).toEqual(['4/7']);
  });
  it('the eighth to the sixteenth goes from 2:1 to 7:2', () => {
    const pivot = augment(parseRhythm('1/16'), '4/7')[0]!.length;
    expect(formatFraction(toFraction('1/8').div(toFraction('1/16')))).toBe('2');
    expect(formatFraction(toFraction('1/8').div(pivot))).toBe('7/2');
  });
});

describe('Cowell, New Musical Resources (1930): a whole note in n', () => {
  it.each([3, 5, 7, 9, 11, 13])('n = %d notes of 1/n make exactly one whole', (n) => {
    expect(formatFraction(totalLength(parseRhythm(`[1/${n}]x${n}`)))).toBe('1');
  });
});

/** Table of least common multiples, recomputed; 3 and 4 meet after 12, at 0 only. */
describe('cycles that meet again', () => {
  const TABLE: Record<number, number[]> = {
    2: [2, 6, 4, 10, 6, 14, 8, 18],
    3: [6, 3, 12, 15, 6, 21, 24, 9],
    4: [4, 12, 4, 20, 12, 28, 8, 36],
    5: [10, 15, 20, 5, 30, 35, 40, 45],
    6: [6, 6, 12, 30, 6, 42, 24, 18],
    7: [14, 21, 28, 35, 42, 7, 56, 63],
    8: [8, 24, 8, 40, 24, 56, 8, 72],
    9: [18, 9, 36, 45, 18, 63, 72, 9],
  };
  it.each(Object.entries(TABLE))('of %s against 2 to 9', (a, row) => {
    expect([2, 3, 4, 5, 6, 7, 8, 9].map((b) => formatFraction(alignment([a, b])))).toEqual(row.map(String));
  });

  it('3 against 5: after 15 (openknowledgegraph.com, polymeter analysis)', () => {
    expect(formatFraction(alignment([3, 5]))).toBe('15');
  });

  it('3 against 4: hits at 0 4 8 and 0 3 6 9 of 12', () => {
    const hits = (every: number) => attacks(parseRhythm(`[${every}]x${12 / every}`)).map(formatFraction);
    expect([hits(4), hits(3)]).toEqual([['0', '4', '8'], ['0', '3', '6', '9']]);
    expect(hits(4).filter((at) => hits(3).includes(at))).toEqual(['0']);
  });

  it.each<[Exact[], string]>([
    [['3/4', '5/8'], '15/4'],
    [['1/3', '1/4'], '1'],
    [['1/12', '1/10'], '1/2'],
    [['7/8', '1'], '7'],
    [['3/2'], '3/2'],
    [[3, 4, 5], '60'],
  ])('fractions: %j meet after %s', (cycles, after) => {
    expect(formatFraction(alignment(cycles))).toBe(after);
  });
});

describe('worked examples of augmentation and diminution in teaching', () => {
  it('nathanmuehl.com, objective 24.3: quarter quarter eighth, augmented and diminished', () => {
    const subject = parseRhythm('1/4 1/4 1/8');
    expect(formatRhythm(augment(subject, 2))).toBe('1/2 1/2 1/4');
    expect(formatRhythm(diminish(subject, 2))).toBe('1/8 1/8 1/16');
  });

  it('openknowledgegraph.com, rhythmic development: quarter eighth eighth half doubled, two measures become four', () => {
    const subject = parseRhythm('1/4 1/8 1/8 1/2', { metre: '2/4' });
    const doubled = augment(subject, 2);
    expect(formatRhythm(doubled)).toBe('1/2 1/4 1/4 1');
    expect([measuresOf(totalLength(subject), '2/4'), measuresOf(totalLength(doubled), '2/4')].map(formatFraction)).toEqual(['2', '4']);
  });

  it('Hutchinson, Music Theory for the 21st-Century Classroom, 11.2: augmentation doubles, diminution halves; uneven change is neither', () => {
    const subject = parseRhythm('1/4 1/8 1/8');
    expect(formatRhythm(augment(subject, 2))).toBe('1/2 1/4 1/4');
    expect(formatRhythm(diminish(subject, 2))).toBe('1/8 1/16 1/16');
    const uneven = parseRhythm('1/2 1/8 1/8');
    expect(formatRhythm(augment(subject, totalLength(uneven).div(totalLength(subject))))).not.toBe(formatRhythm(uneven));
  });
});

describe('Kramer, The Fibonacci Series in Twentieth-Century Music (JMT 17(1), 1973): sums and steps', () => {
  it('89 = 55 + 34, 55 = 34 + 21, 34 = 21 + 13 (Lendvai, from memory)', () => {
    for (const [whole, long, short] of [[89, 55, 34], [55, 34, 21], [34, 21, 13]] as const) {
      expect(formatFraction(ladder([long, short]).total)).toBe(String(whole));
    }
  });

  it('1 1 2 3 … 144 adds up to 376, and its steps are not equal (recomputed)', () => {
    const run = ladder([1, 1, 2, 3, 5, 8, 13, 21, 34, 55, 89, 144]);
    expect(formatFraction(run.total)).toBe('376');
    expect(run.equalSteps).toBe(false);
    expect(run.steps.slice(0, 4).map(formatFraction)).toEqual(['1', '2', '3/2', '5/3']);
  });

  it('the xylophone rhythm 1 1 2 3 5 8 5 3 2 1 1 (from memory) or 1 2 3 5 8 5 3 2 1 (as printed): 32 and 30', () => {
    expect(formatFraction(ladder([1, 1, 2, 3, 5, 8, 5, 3, 2, 1, 1]).total)).toBe('32');
    expect(formatFraction(ladder([1, 2, 3, 5, 8, 5, 3, 2, 1]).total)).toBe('30');
  });
});
