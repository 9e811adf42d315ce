import { describe, expect, it } from 'vitest';
import {
  type StudyInput, alignment, attacks, augment, buildStudy, formatFraction, formatRhythm, ladder, parseRhythm, toFraction, totalLength,
} from '@/engine';
import { inUnits } from './rhythms';

type Entries = 'successive' | 'together' | 'ending-together' | { every: string };

/** A canon of one subject at several factors, each on an instrument of its own. */
function canon(rhythm: string, factors: readonly string[], entries: Entries) {
  const instruments = factors.map((factor, k) => ({ id: `i${k}`, name: `Voice ${k + 1}`, family: 'wood' as const }));
  const document: StudyInput = {
    title: 'Canon', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, instruments,
    subjects: [{ id: 's', name: 'Subject', rhythm }],
    sections: [
      {
        id: 'canon', name: 'Canon', role: 'exposition', kind: 'process', subject: 's', instruments: instruments.map(({ id }) => id),
        process: { kind: 'proportion', factors: [...factors], entries },
      },
    ],
  };
  return buildStudy(document);
}

const texts = (values: readonly ReturnType<typeof toFraction>[]) => values.map(formatFraction);

describe('Grove, A Dictionary of Music and Musicians, "Augmentation" (Ouseley): Cooke’s canon by double augmentation, 1:2:4', () => {
  it('three voices of the printed incipit', () => {
    const built = canon('3/8 1/8 1/4 1/4', ['1', '2', '4'], 'together');
    expect(built.statements.map((s) => formatRhythm(s.rhythm))).toEqual(['3/8 1/8 1/4 1/4', '3/4 1/4 1/2 1/2', '3/2 1/2 1 1']);
    expect(texts(built.statements.map((s) => s.start))).toEqual(['0', '0', '0']);
  });
});

describe('Bach, The Art of Fugue, Contrapunctus VI and VII (jeffreychall.com): the subject halved, as it is, doubled', () => {
  it('three scalings at once, 1:2 and 1:4', () => {
    const built = canon('1/2 1/2 1/4 1/4 1/2', ['1/2', '1', '2'], 'together');
    expect(texts(ladder(built.statements.map((s) => s.length)).steps)).toEqual(['2', '2']);
    expect(texts(ladder(built.statements.map((s) => s.length)).toFirst)).toEqual(['1', '2', '4']);
  });
});

describe('Ockeghem, Missa prolationum, Agnus II (Taruskin): the slower voice has reached only part when the faster ends', () => {
  it.each([['2', '1/2'], ['3/2', '2/3']])('ratio %s: %s of the subject', (ratio, part) => {
    const built = canon('[1/4]x12', ['1', ratio], 'together');
    const [fast, slow] = built.statements;
    expect(formatFraction(fast!.length.div(slow!.length))).toBe(part);
    const before = attacks(slow!.rhythm).filter((at) => at.compare(fast!.length) < 0);
    expect(before).toHaveLength(12 * Number(toFraction(part)));
  });
});

describe('Josquin, L’homme armé super voces musicales, Agnus II (themusicsalon.blogspot.com): speeds 1:2:3', () => {
  it('the voices meet on their attacks at the least common multiple', () => {
    const built = canon('1 1 1 1 1 1', ['1', '1/2', '1/3'], 'together');
    const meet = alignment(built.statements.map((s) => s.rhythm[0]!.length));
    expect(formatFraction(meet)).toBe('1');
    for (const { rhythm, length } of built.statements) {
      if (length.compare(meet) > 0) expect(texts(attacks(rhythm))).toContain(formatFraction(meet));
    }
    expect(texts(built.statements.map((s) => s.length))).toEqual(['6', '3', '2']);
  });
});

describe('Pärt, Cantus in Memoriam Benjamin Britten (de.zxc.wiki; mikedickson.org.uk): five layers 1:2:4:8:16', () => {
  it('value n of layer j is 2^j times that of layer 0; the lowest is 16 times as slow', () => {
    const layers = canon('[1/2 1/4]x4', ['1', '2', '4', '8', '16'], 'together').statements;
    const top = layers[0]!.rhythm;
    layers.forEach(({ rhythm }, j) => {
      rhythm.forEach((value, n) => {
        expect(value.length.equals(top[n]!.length.mul(2 ** j))).toBe(true);
      });
    });
    expect(formatFraction(layers[4]!.length.div(layers[0]!.length))).toBe('16');
  });
});

describe('Bach, BWV 1087 no. 14, from memory: four speeds 1:2:4:8', () => {
  it('each step is 2', () => {
    expect(ladder(canon('1/8 1/8 1/4', ['1', '2', '4', '8'], 'together').statements.map((s) => s.length))).toMatchObject({ equalSteps: true });
  });
});

describe('Polansky, Four Voice Canons: start times of voices that end together, S = 1 − b/a', () => {
  it.each([
    ['2:3', ['1/3', '0']],
    ['2:5', ['3/5', '0']],
    ['2:8', ['3/4', '0']],
  ])('%s', (pair, starts) => {
    const [short, long] = pair.split(':');
    const built = canon('1/4 1/2 1/4', [short!, long!], 'ending-together');
    expect(texts(built.statements.map((s) => s.start.div(built.totalLength)))).toEqual(starts);
  });

  it('2 3 5 8, as printed for each against 2: by their own whole, 8', () => {
    const built = canon('1', ['8', '5', '3', '2'], 'ending-together');
    expect(texts(built.statements.map((s) => s.start.div(built.totalLength)))).toEqual(['0', '3/8', '5/8', '3/4']);
  });

  it.each(['4:5:6:7', '6:7:8:9', '8:9:10:11', '6:7:8:9:10:11:12', '4:5:6:8:12', '12:17:29:43', '30:36:42:50:55:60', '6:7:8:10'])(
    'the set %s ends together, each voice starting at 1 − its share of the longest',
    (set) => {
      const factors = set.split(':');
      const built = canon('1/8 1/4 1/8', factors, 'ending-together');
      built.statements.forEach((s, k) => {
        expect(s.start.add(s.length).equals(built.totalLength)).toBe(true);
        expect(formatFraction(s.start.div(built.totalLength))).toBe(formatFraction(toFraction(1).sub(toFraction(`${factors[k]}/${factors.at(-1)}`))));
      });
    },
  );
});

/** Recomputed from the same rule: lengths N/r for N beats at tempo r, delays N/slowest − N/r. */
describe('delays of voices that converge at the end, by tempo (recomputed; 12:15:20 in print, Callender, MTO 20.1)', () => {
  it.each([
    ['4:5', 20, ['5', '4'], ['0', '1'], ['0', '1/5']],
    ['3:4:5', 60, ['20', '15', '12'], ['0', '5', '8'], ['0', '1/4', '2/5']],
    ['12:15:20', 60, ['5', '4', '3'], ['0', '1', '2'], ['0', '1/5', '2/5']],
  ])('%s over %d beats', (tempi, beats, lengths, delays, shares) => {
    const built = canon(`[1]x${beats}`, tempi.split(':').map((r) => `1/${r}`), 'ending-together');
    expect(texts(built.statements.map((s) => s.length))).toEqual(lengths);
    expect(texts(built.statements.map((s) => s.start))).toEqual(delays);
    expect(texts(built.statements.map((s) => s.start.div(built.totalLength)))).toEqual(shares);
  });
});

describe('Thomas in Nemire, Convergence Points in Conlon Nancarrow’s Tempo Canons (MTO 20.1, 2014): converging and diverging', () => {
  it('a converging canon is a diverging one from its end', () => {
    const diverging = canon('1/4 1/8 1/8', ['3', '2'], 'together');
    const converging = canon('1/4 1/8 1/8', ['3', '2'], 'ending-together');
    converging.statements.forEach((s, k) => {
      const other = diverging.statements[k]!;
      expect(s.start.equals(diverging.totalLength.sub(other.start).sub(other.length))).toBe(true);
    });
  });

  /** 3:2, each voice playing half at each speed: they switch at 2/5 and 3/5, so 1/5 of the piece is at one speed (fig. 4). */
  it('diverging and converging at 3:2, both move at one speed for 1/5 of the piece', () => {
    const half = inUnits('2 1 1 2', 8);
    const first = [...augment(half, '2'), ...augment(half, '3')];
    const second = [...augment(half, '3'), ...augment(half, '2')];
    const whole = totalLength(first);
    expect(whole.equals(totalLength(second))).toBe(true);
    const switches = [totalLength(augment(half, '2')), totalLength(augment(half, '3'))].map((at) => at.div(whole));
    expect(texts(switches)).toEqual(['2/5', '3/5']);
    expect(formatFraction(switches[1]!.sub(switches[0]!))).toBe('1/5');
  });
});

describe('tiling canons: every pulse is struck once', () => {
  const tile = (voices: readonly (readonly [start: number, spacing: number])[]) =>
    voices.flatMap(([start, spacing]) => attacks(augment(parseRhythm('1 1 1'), spacing)).map((at) => start + Number(at))).sort((a, b) => a - b);

  it('OEIS A261516; T. Johnson (IRCAM 2004): five triples, spacings 1 2 4 5 7, tile 0 to 14, and their mirror too', () => {
    const voices = [[2, 1], [8, 2], [5, 4], [1, 5], [0, 7]] as const;
    expect(tile(voices)).toEqual(Array.from({ length: 15 }, (_, k) => k));
    expect(tile(voices.map(([start, spacing]) => [14 - start - 2 * spacing, spacing] as const))).toEqual(Array.from({ length: 15 }, (_, k) => k));
  });

  it('the pattern 0 1 4 with its double tiles 15 (recomputed; Amiot, from memory)', () => {
    const at = (start: number, factor: number) => attacks(augment(parseRhythm('1 3 1'), factor)).map((a) => start + Number(a));
    expect([at(0, 1), at(2, 1), at(8, 1), at(10, 1), at(5, 2)].flat().sort((a, b) => a - b)).toEqual(Array.from({ length: 15 }, (_, k) => k));
  });

  it('a Vuza canon of period 72 (from memory, verified to tile)', () => {
    const inner = [0, 3, 6, 12, 23, 27, 36, 42, 47, 48, 51, 71];
    const gaps = inner.map((at, k) => (inner[k + 1] ?? 72) - at);
    const voice = attacks(inUnits(gaps, 1)).map(Number);
    const all = [0, 8, 10, 18, 26, 64].flatMap((entry) => voice.map((at) => (at + entry) % 72)).sort((a, b) => a - b);
    expect(all).toEqual(Array.from({ length: 72 }, (_, k) => k));
  });
});
