import { describe, expect, it } from 'vitest';
import { euclidean, rotate } from '@/engine';
import { fromBox, inUnits, toBox } from './rhythms';

/** Toussaint, "The Euclidean algorithm generates traditional musical rhythms", Proc. BRIDGES, Banff 2005, pp. 47-56. */
const TOUSSAINT: [attacks: number, pulses: number, box: string, gaps: string, name: string][] = [
  [2, 3, 'x.x', '21', 'West Africa, Latin America'],
  [2, 5, 'x.x..', '23', 'Khafif-e-ramal'],
  [3, 4, 'x.xx', '211', 'Cumbia, Calypso'],
  [3, 5, 'x.x.x', '221', 'Rumanian and Persian necklaces'],
  [3, 7, 'x.x.x..', '223', 'Ruchenitza'],
  [3, 8, 'x..x..x.', '332', 'tresillo'],
  [4, 7, 'x.x.x.x', '2221', 'Ruchenitza'],
  [4, 9, 'x.x.x.x..', '2223', 'Aksak'],
  [5, 6, 'x.xxxx', '21111', 'York-Samai'],
  [5, 7, 'x.xx.xx', '21211', 'Nawakhat'],
  [5, 8, 'x.xx.xx.', '21212', 'cinquillo'],
  [5, 9, 'x.x.x.x.x', '22221', 'Agsag-Samai'],
  [5, 11, 'x.x.x.x.x..', '22223', 'unnamed'],
  [5, 16, 'x..x..x..x..x...', '33334', 'bossa-nova necklace (T13: printed with one dot too many in one copy)'],
  [7, 8, 'x.xxxxxx', '2111111', 'Tuareg'],
  [7, 12, 'x.xx.x.xx.x.', '2122122', 'West African bell'],
  [11, 24, 'x..x.x.x.x.x..x.x.x.x.x.', '32222322222', 'Aka'],
];

describe('Toussaint, The Euclidean algorithm generates traditional musical rhythms (BRIDGES 2005)', () => {
  it.each(TOUSSAINT)('E(%d,%d) is %s, gaps %s: %s', (attacks, pulses, box, gaps) => {
    const found = euclidean(attacks, pulses);
    expect(found.join('')).toBe(gaps);
    expect(toBox(inUnits(found, 8), pulses)).toBe(box);
  });

  /** T13: plain Bjorklund gives these four from another start; a later paper prints E(2,3) as xx. */
  it.each([[2, 3, 'xx.'], [3, 4, 'xxx.'], [5, 6, 'xxxxx.'], [7, 8, 'xxxxxxx.']])('T13: E(%d,%d) is a rotation of %s', (attacks, pulses, plain) => {
    const box = toBox(inUnits(euclidean(attacks, pulses), 8), pulses);
    expect(box).not.toBe(plain);
    const rotations = Array.from({ length: pulses }, (_, k) => toBox(rotate(fromBox(plain), k, { pulse: '1/8' }), pulses));
    expect(rotations).toContain(box);
  });
});

describe('Bjorklund, The theory of rep-rate pattern generation in the SNS timing system (SNS Tech note, 2003)', () => {
  it('5 pulses in 13 slots: x..x.x..x.x..', () => {
    expect(euclidean(5, 13)).toEqual([3, 2, 3, 2, 3]);
    expect(toBox(inUnits(euclidean(5, 13), 8), 13)).toBe('x..x.x..x.x..');
  });
});

describe('Toussaint 2005, named changes of starting point (a public table of the paper)', () => {
  it('the bossa nova as played is E(5,16) from its third attack', () => {
    expect(toBox(rotate(inUnits(euclidean(5, 16), 16), 2, 'attacks'), 16, 16)).toBe('x..x..x...x..x..');
  });
  it('the samba as played is E(7,16) from its last attack', () => {
    expect(toBox(rotate(inUnits(euclidean(7, 16), 16), -1, 'attacks'), 16, 16)).toBe('x.x..x.x.x..x.x.');
  });
});

describe('evenness, for every number of attacks in up to 48 pulses', () => {
  it('as many gaps as attacks, adding up to the pulses, of two neighbouring sizes at most', () => {
    for (let pulses = 1; pulses <= 48; pulses += 1) {
      for (let attacks = 1; attacks <= pulses; attacks += 1) {
        const gaps = euclidean(attacks, pulses);
        expect(gaps).toHaveLength(attacks);
        expect(gaps.reduce((a, b) => a + b, 0)).toBe(pulses);
        expect(Math.max(...gaps) - Math.min(...gaps)).toBeLessThanOrEqual(1);
      }
    }
  });

  it('spreads the long gaps themselves evenly', () => {
    for (let pulses = 2; pulses <= 32; pulses += 1) {
      for (let attacks = 1; attacks < pulses; attacks += 1) {
        const gaps = euclidean(attacks, pulses);
        const short = Math.min(...gaps);
        // Any so many neighbouring gaps add up to one of two neighbouring numbers: the mark of the evenest spread.
        for (let width = 1; width < attacks; width += 1) {
          const spans = gaps.map((_, i) => Array.from({ length: width }, (_, k) => gaps[(i + k) % attacks]!).reduce((a, b) => a + b, 0));
          expect(Math.max(...spans) - Math.min(...spans)).toBeLessThanOrEqual(1);
        }
        expect(short).toBe(Math.floor(pulses / attacks));
      }
    }
  });
});
