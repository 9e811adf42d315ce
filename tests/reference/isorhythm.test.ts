import { describe, expect, it } from 'vitest';
import { alignment, attacks, augment, buildStudy, formatFraction, ladder, measuresOf, parseRhythm, toFraction, totalLength } from '@/engine';

describe('Dufay, Nuper rosarum flores (dtv-Atlas zur Musik 1977, vol. 1, pp. 238-239): four statements, 6:4:2:3', () => {
  const built = buildStudy({
    title: 'Four statements', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' },
    // 14 measures of rest and 14 of music at factor 1/6 of the first
    subjects: [{ id: 't', name: 'Tenor', rhythm: '(14) [1]x14' }],
    instruments: [{ id: 'i', name: 'Bell', family: 'metal' }],
    sections: [
      {
        id: 'a', name: 'A', role: 'exposition', kind: 'process', subject: 't', instruments: ['i'],
        process: { kind: 'proportion', factors: ['6', '4', '2', '3'] },
      },
    ],
  });

  it('lengths in 6:4:2:3, steps 2/3, 1/2, 3/2', () => {
    const run = ladder(built.statements.map((s) => s.length));
    expect(run.toFirst.map((x) => formatFraction(x.mul(6)))).toEqual(['6', '4', '2', '3']);
    expect(run.steps.map(formatFraction)).toEqual(['2/3', '1/2', '3/2']);
    expect(run.equalSteps).toBe(false);
  });

  it('each begins where the one before ends, though they do not grow steadily', () => {
    const unit = toFraction(28);
    expect(built.statements.map((s) => formatFraction(s.start.div(unit)))).toEqual(['0', '6', '10', '12']);
    expect(formatFraction(built.totalLength.div(unit))).toBe('15');
  });

  it('each is 28 measures of its own, half of them silent', () => {
    built.statements.forEach((s) => {
      const measure = s.factor;
      expect(formatFraction(s.length.div(measure))).toBe('28');
      expect(formatFraction(s.rhythm[0]!.length.div(measure))).toBe('14');
      expect(s.rhythm[0]!.rest).toBe(true);
    });
  });
});

describe('Machaut, De bon espoir / Puis que / Speravi, M4 (bestmusicteacher.com): color 18, talea 12', () => {
  it('meet after 36 values: 3 taleae are 2 colores', () => {
    const meet = alignment([18, 12]);
    expect(formatFraction(meet)).toBe('36');
    expect([meet.div(12), meet.div(18)].map(formatFraction)).toEqual(['3', '2']);
  });
  it('and are then halved', () => {
    const talea = parseRhythm('[1/2 1/4]x6');
    expect(totalLength(augment(talea, '1/2')).mul(2).equals(totalLength(talea))).toBe(true);
  });
});

describe('Machaut, Quant en moy / Amour / Amara valde, M1 (machaut.exeter.ac.uk, after Boogaart): repeated three times as fast', () => {
  it('the second statement lasts a third; a long is 3 breves, 9 semibreves, 27 minims', () => {
    const color = parseRhythm('[27]x30');
    expect(formatFraction(totalLength(augment(color, '1/3')).div(totalLength(color)))).toBe('1/3');
    expect(ladder(['27', '9', '3', '1']).steps.map(formatFraction)).toEqual(['1/3', '1/3', '1/3']);
  });
});

describe('Machaut, Messe de Nostre Dame, Kyrie I, from memory: color 28, talea 4', () => {
  it('7 taleae fill the color', () => {
    expect(formatFraction(alignment([28, 4]).div(4))).toBe('7');
  });
});

/** T18 (Messiaen, Liturgie de cristal): 17 and 29 meet after 493 events, which last 377 quarters; that 17 values last 13 quarters, from memory. */
describe('T18: the least common multiple of counts is not that of times', () => {
  // 17 values of our own that last 13 quarters
  const talea = parseRhythm('[1/4]x9 [1/8]x8');

  it('17 values and 29 chords begin together again after 493 events', () => {
    expect(talea).toHaveLength(17);
    expect(formatFraction(alignment([talea.length, 29]))).toBe('493');
  });

  it('which last 377 quarters', () => {
    expect(formatFraction(totalLength(talea).mul(4))).toBe('13');
    const whole = parseRhythm('[1/4 1/4 1/4 1/4 1/4 1/4 1/4 1/4 1/4 1/8 1/8 1/8 1/8 1/8 1/8 1/8 1/8]x29');
    expect(attacks(whole)).toHaveLength(493);
    expect(formatFraction(totalLength(whole).mul(4))).toBe('377');
    expect(formatFraction(measuresOf(totalLength(whole), '13/4'))).toBe('29');
  });
});
