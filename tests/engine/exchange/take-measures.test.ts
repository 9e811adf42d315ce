import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Fraction, attacks, formatRhythm, parseRhythm, takeMeasures, totalLength, type ReadMeasure } from '@/engine';
import { arbitraryRhythm } from '../rhythm/arbitrary-rhythm';

const measuresOf = (...lengths: string[]): ReadMeasure[] => {
  let start = new Fraction(0);
  return lengths.map((text, index) => {
    const measure = { number: String(index + 1), start, length: new Fraction(text), metre: '4/4' };
    start = start.add(measure.length);
    return measure;
  });
};
const take = (text: string, lengths: string[], from: number, to: number) => {
  const { rhythm, ...cuts } = takeMeasures({ rhythm: parseRhythm(text), measures: measuresOf(...lengths) }, from, to);
  return [formatRhythm(rhythm), ...Object.values(cuts)];
};

describe('takeMeasures', () => {
  it.each<[string, string[], number, number, [string, boolean, boolean]]>([
    ['1/2 1/2 1/4 3/4 1', ['1', '1', '1'], 0, 2, ['1/2 1/2 1/4 3/4 1', false, false]],
    ['1/2 1/2 1/4 3/4 1', ['1', '1', '1'], 1, 1, ['1/4 3/4', false, false]],
    ['1/2 3/4> 1/4 1/2 1', ['1', '1', '1'], 1, 1, ['(1/4) 1/4 1/2', true, false]],
    ['1/2 3/4> 1/4 1/2 1', ['1', '1', '1'], 0, 0, ['1/2 1/2>', false, true]],
    ['1/2 (1) 1/2', ['1', '1'], 1, 1, ['(1/2) 1/2', false, false]],
    ['3', ['1', '1', '1'], 1, 1, ['(1)', true, false]],
    ['1/2 3/4 (1/4) 1/2', ['1', '1'], 1, 1, ['(1/2) 1/2', true, false]],
    ['1/4 1/2', ['1/4', '1'], 1, 1, ['1/2', false, false]],
  ])('%s in %j, %s to %s', (text, lengths, from, to, expected) => expect(take(text, lengths, from, to)).toEqual(expected));

  it.each([[1, 0], [-1, 0], [0, 3], [0.5, 1]])('%s to %s are no measures', (from, to) => expect(() => take('1 1 1', ['1', '1', '1'], from, to)).toThrow('this line has 3'));

  it('every attack of the measures is there, at its place, and no other', () => {
    fc.assert(
      fc.property(arbitraryRhythm, fc.array(fc.constantFrom('1', '3/4', '5/8', '1/3'), { minLength: 1, maxLength: 12 }), fc.nat(11), fc.nat(11), (rhythm, lengths, a, b) => {
        const measures = measuresOf(...lengths).filter(({ start }) => start.compare(totalLength(rhythm)) < 0);
        const [from, to] = [Math.min(a, b, measures.length - 1), Math.min(Math.max(a, b), measures.length - 1)];
        const [start, end] = [measures[from]!.start, measures[to]!.start.add(measures[to]!.length)];
        const taken = takeMeasures({ rhythm, measures }, from, to);
        const expected = attacks(rhythm).filter((at) => at.compare(start) >= 0 && at.compare(end) < 0).map((at) => at.sub(start).toFraction());
        expect(attacks(taken.rhythm).map((at) => at.toFraction())).toEqual(expected);
        const last = end.compare(totalLength(rhythm)) < 0 ? end : totalLength(rhythm);
        expect(totalLength(taken.rhythm).toFraction()).toBe(last.sub(start).toFraction());
      }),
    );
  });
});
