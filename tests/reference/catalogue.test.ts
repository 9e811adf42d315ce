import { describe, expect, it } from 'vitest';
import { CATALOGUE, attacks, augment, euclidean, formatFraction, formatRhythm, generateSubject, parseRhythm, resultant, retrograde, searchCatalogue, totalLength } from '@/engine';
import { inUnits, toBox } from './rhythms';

const one = (words: string) => {
  const found = searchCatalogue({ words });
  expect(found, words).toHaveLength(1);
  return parseRhythm(found[0]!.rhythm);
};

describe('the catalogue of published figures', () => {
  it.each(CATALOGUE.map((entry) => [entry.id, entry] as const))('%s can be read and names its source', (_id, entry) => {
    expect(formatRhythm(parseRhythm(entry.rhythm))).toBe(entry.rhythm);
    expect(entry.source).toMatch(/\w{4}/);
    expect(entry.id).toMatch(/^[a-z0-9]+(-[a-z0-9]+)*$/);
  });

  it('has no id twice', () => {
    expect(new Set(CATALOGUE.map(({ id }) => id)).size).toBe(CATALOGUE.length);
  });

  /** Toussaint 2005; box patterns as a public table of the paper's patterns prints them. */
  it.each([['tresillo', 8, 'x..x..x.'], ['cinquillo', 8, 'x.xx.xx.'], ['Khafif-e-ramal', 5, 'x.x..'], ['west african bell', 12, 'x.xx.x.xx.x.'], ['aka 24', 24, 'x..x.x.x.x.x..x.x.x.x.x.'], ['bossa played', 16, 'x..x..x...x..x..'], ['samba', 16, 'x.x..x.x.x..x.x.']])(
    '%s: %d pulses, %s',
    (words, pulses, box) => {
      expect(toBox(one(words), pulses)).toBe(box);
    },
  );

  it('Euclidean rhythms are what euclidean() gives for the numbers in their names', () => {
    const plain = CATALOGUE.filter(({ family, name }) => family === 'Euclidean rhythm' && !name.includes('from its'));
    expect(plain).toHaveLength(18);
    for (const { name, rhythm } of plain) {
      const [, k, n] = /^E\((\d+),(\d+)\)/.exec(name)!;
      expect(rhythm, name).toBe(formatRhythm(inUnits(euclidean(Number(k), Number(n)), 8)));
    }
  });

  it('resultants of two are what resultant() gives for the numbers in their names', () => {
    const two = CATALOGUE.filter(({ family, name }) => family === 'resultant' && /^\d against \d$/.test(name));
    expect(two).toHaveLength(20);
    for (const { name, rhythm } of two) {
      const [a, b] = name.split(' against ').map(Number);
      expect(rhythm, name).toBe(formatRhythm(inUnits(resultant(a!, b!), 8)));
    }
  });

  it('2 against 3 against 5 attacks where any of the three does, over 30 (recomputed)', () => {
    const struck = Array.from({ length: 30 }, (_, k) => k).filter((k) => [2, 3, 5].some((n) => k % n === 0));
    expect(attacks(one('2 against 3 against 5')).map((at) => Number(at.mul(8)))).toEqual(struck);
  });

  /** Messiaen, Technique, ch. IV, exx. 23-24 (a commentary): fourteen factors. */
  it('Messiaen’s table: each row is long, short, long under the factor it names', () => {
    const rows = CATALOGUE.filter(({ family, name }) => family === 'Messiaen’s augmentations' && name.includes('×'));
    expect(rows).toHaveLength(14);
    for (const { name, rhythm } of rows) expect(rhythm, name).toBe(formatRhythm(augment(parseRhythm('1/4 1/8 1/4'), name.split('× ')[1]!)));
  });

  /** vdoc.tips, "Messiaen chords": retrograde of Râgavardhana, then Candrakalâ, then Lakskmîça; 17 values. T18: 13 quarters. */
  it('the talea of Liturgie de cristal: 17 values in 13 quarters, three talas of the table', () => {
    const talea = one('liturgie');
    expect(talea).toHaveLength(17);
    expect(formatFraction(totalLength(talea).mul(4))).toBe('13');
    expect(formatRhythm(talea.slice(0, 6))).toBe(formatRhythm(one('ragavardhana messiaen')));
    expect(formatRhythm(talea.slice(3, 6))).toBe(formatRhythm(augment(retrograde(one('93 ragavardhana'), 'values').slice(1), 2)));
    expect(formatRhythm(talea.slice(6, 13))).toBe(formatRhythm(augment(one('candrakala'), '1/2')));
    expect(formatRhythm(talea.slice(13))).toBe(formatRhythm(augment(one('lakskmica'), 2)));
  });

  /** Grove, "Augmentation" (Ouseley): 1:2:4. */
  it('Cooke’s canon: three speeds, 1:2:4', () => {
    const [quick, middle, slow] = ['quickest', 'middle', 'slowest'].map((voice) => one(`cooke ${voice}`));
    expect(formatRhythm(quick!)).toBe('3/8 1/8 1/4 1/4');
    expect([augment(quick!, 2), augment(quick!, 4)]).toEqual([middle, slow]);
  });

  /** L. Poeppel, decitala, ProsodicMeters.csv: five dactyls and a spondee. */
  it('a dactylic hexameter is five dactyls and a spondee', () => {
    const [dactyl, spondee] = [one('dactyl foot'), one('spondee')];
    expect(one('hexameter')).toEqual([...Array.from({ length: 5 }, () => dactyl).flat(), ...spondee]);
  });
});

describe('a Vuza canon of 72 pulses (from memory; verified in the check values to tile)', () => {
  const ENTRIES = [0, 8, 10, 18, 26, 64];
  const covers = (at: readonly number[]) => new Set(at.flatMap((a) => ENTRIES.map((entry) => (a + entry) % 72))).size === 72;

  it('its inner rhythm tiles with its outer one', () => {
    expect(covers(attacks(one('vuza')).map((at) => Number(at.mul(8))))).toBe(true);
  });

  it('so does every subject generated for its entries, of which there are 216', () => {
    for (let seed = 0; seed < 8; seed += 1) {
      const { rhythm, solutions } = generateSubject({ length: 72, pulse: 1, entries: ENTRIES }, seed);
      expect(rhythm).toHaveLength(12);
      expect(covers(attacks(rhythm).map(Number))).toBe(true);
      // Counted by this engine, not published.
      expect(solutions).toBe(216n);
    }
  });
});
