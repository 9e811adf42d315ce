import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type Rhythm, type Transformation,
  augment, findTransformations, formatFraction, formatRhythm, nearestTransformation, parseRhythm, retrograde, rotate, toFraction,
} from '@/engine';
import { arbitraryFactor, arbitraryRhythm } from '../rhythm/arbitrary-rhythm';

const apply = (rhythm: Rhythm, { factor, retrograde: by, rotation }: Transformation): Rhythm => {
  const stretched = augment(rhythm, factor);
  return rotate(by === false ? stretched : retrograde(stretched, by), rotation, 'values');
};
const unmarked = (rhythm: Rhythm): string => formatRhythm(rhythm.map(({ length, rest }) => ({ length, rest })));
const words = ({ factor, retrograde: by, rotation }: Transformation): string => `${formatFraction(factor)} ${by} ${rotation}`;
const find = (from: string, to: string): string[] => findTransformations(parseRhythm(from), parseRhythm(to)).map(words);

describe('findTransformations', () => {
  it.each([
    // nathanmuehl.com/objectives/ob24.3: quarter quarter eighth, augmented and diminished
    ['1/4 1/4 1/8', '1/2 1/2 1/4', ['2 false 0', '2 attacks 0', '2 values 1']],
    ['1/4 1/4 1/8', '1/8 1/8 1/16', ['1/2 false 0', '1/2 attacks 0', '1/2 values 1']],
    // Feron, universalis.fr: q s q q is retrogradable, q q s q its retrograde
    ['1/4 1/16 1/4 1/4', '1/4 1/4 1/16 1/4', ['1 false 3', '1 values 0', '1 attacks 3']],
    // Messiaen, Technique, ch. IV: adding a quarter of each value is the factor 5/4
    ['1/4 1/8 1/4', '5/16 5/32 5/16', ['5/4 false 0', '5/4 values 0', '5/4 attacks 2']],
    // Open Music Theory, metrical dissonance: the same cycle entered later
    ['3/8 1/8 1/4', '1/8 1/4 3/8', ['1 false 1']],
  ])('%s to %s', (from, to, expected) => {
    const found = find(from, to);
    expect(found).toEqual(expected);
    for (const one of findTransformations(parseRhythm(from), parseRhythm(to))) expect(unmarked(apply(parseRhythm(from), one))).toBe(unmarked(parseRhythm(to)));
  });

  it('T1 (Mazzola et al., epOs 2004, 9.2): values and attacks reversed are told apart', () => {
    expect(find('3/8 1/8 1/4 1/4', '1/4 1/4 1/8 3/8')).toEqual(['1 values 0', '1 attacks 3']);
    expect(find('3/8 1/8 1/4 1/4', '1/4 1/8 3/8 1/4')).toEqual(['1 attacks 0', '1 values 1']);
  });

  it('T5: what adds an amount to each value is no stretch', () => expect(find('1/4 1/8 1/4', '3/8 1/4 3/8')).toEqual([]));
  it('rests are no attacks', () => expect(find('1/4 (1/8)', '1/4 1/8')).toEqual([]));
  it('another number of values, or none', () => expect([find('1/4 1/4', '1/2'), findTransformations([], [])]).toEqual([[], []]));
  it('nothing was done: that comes first', () => expect(find('1/4 1/8', '1/4 1/8')[0]).toBe('1 false 0'));
  it('at most 24, fewest operations first, then none, values, attacks, then the smaller rotation', () => {
    const even = Array.from({ length: 30 }, () => '1/8').join(' ');
    const found = find(even, even);
    expect(found.slice(0, 5)).toEqual(['1 false 0', '1 false 1', '1 false 2', '1 false 3', '1 false 4']);
    expect(found).toHaveLength(24);
  });

  it('law: finds what was planted, and nothing false', () => {
    fc.assert(
      fc.property(arbitraryRhythm, arbitraryFactor, fc.constantFrom(false as const, 'values' as const, 'attacks' as const), fc.nat(40), (rhythm, factor, by, turn) => {
        fc.pre(rhythm.length > 0);
        const planted = { factor, retrograde: by, rotation: turn % rhythm.length };
        const to = apply(rhythm, planted);
        const found = findTransformations(rhythm, to);
        for (const one of found) expect(unmarked(apply(rhythm, one))).toBe(unmarked(to));
        const fewest = Number(!factor.equals(1)) + Number(by !== false) + Number(planted.rotation !== 0);
        const first = found[0]!;
        expect(Number(!first.factor.equals(1)) + Number(first.retrograde !== false) + Number(first.rotation !== 0)).toBeLessThanOrEqual(fewest);
        if (found.length < 24) expect(found.map(words)).toContain(words(planted));
      }),
      { numRuns: 300 },
    );
  });

  it('a thousand values', () => {
    const rhythm = parseRhythm(Array.from({ length: 1_000 }, (_, index) => ['1/4', '1/8', '(1/8)', '3/16'][(index * index) % 4]).join(' ') + ' 1/3');
    const to = apply(rhythm, { factor: toFraction('7/5'), retrograde: 'attacks', rotation: 321 });
    expect(findTransformations(rhythm, to).map(words)).toContain('7/5 attacks 321');
  });
});

describe('nearestTransformation', () => {
  const near = (from: string, to: string) => nearestTransformation(parseRhythm(from), parseRhythm(to));
  it('the ratios value by value, where no one stretch fits (check values 1.4: inexact augmentation)', () => {
    const { ratios, stretch } = near('1/4 1/8 1/4 1/2', '1/2 1/4 3/8 3/4');
    expect(ratios.map((ratio) => ratio && formatFraction(ratio))).toEqual(['2', '2', '3/2', '3/2']);
    expect(stretch).toMatchObject({ from: 0, to: 0, length: 2, retrograde: false });
    expect(formatFraction(stretch!.factor)).toBe('2');
  });
  it('the longest stretch that does fit, reversed if need be', () => {
    const { stretch } = near('1/4 1/8 3/8 1/16 1/2', '1/3 1/8 3/4 1/4 1/2');
    expect(stretch).toMatchObject({ retrograde: 'values', from: 1, to: 1, length: 4 });
    expect(formatFraction(stretch!.factor)).toBe('2');
  });
  it('kinds that differ have no ratio', () => expect(near('1/4 (1/4)', '1/4 1/4').ratios[1]).toBeNull());
});
