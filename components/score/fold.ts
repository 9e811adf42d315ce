import type { PlannedMeasure, Repeat } from '@/engine';
import type { DrawnScore, MeasureSigns } from './spec';

/** How the measures of a piece and those that are printed correspond. */
export type Fold = {
  /** a measure of the piece as the printed one that stands for it, counted among the printed ones */
  readonly printed: (index: number) => number;
  /** a position in the piece, in whole notes, as the place where it is printed */
  readonly place: (position: number) => number;
};

type Block = { readonly from: number; readonly to: number; readonly length: number };

/** Pixels of a letter over the staff, and of the measure's number beside it. */
const LETTER = 6.4;
const NUMBER = 34;

/**
 * Leaves out what is printed already: the figure of each repeat stands once, between repeat signs.
 * @param words - what stands over a measure, by its index, so that it is given room
 */
export function foldScore(score: DrawnScore, repeats: readonly Repeat[], words: ReadonlyMap<number, string> = new Map()): { score: DrawnScore; fold: Fold } {
  const kept: number[] = [];
  const signs: MeasureSigns[] = [];
  const printed: number[] = [];
  const ahead = [...repeats];
  const roomFor = (index: number): MeasureSigns => (words.has(index) ? { room: NUMBER + words.get(index)!.length * LETTER } : {});
  for (let index = 0; index < score.measures.length; ) {
    const repeat = ahead[0]?.first === index ? ahead.shift() : undefined;
    if (repeat === undefined) {
      printed[index] = kept.length;
      kept.push(index);
      signs.push(roomFor(index));
      index += 1;
      continue;
    }
    const base = kept.length;
    for (let n = 0; n < repeat.length; n += 1) {
      kept.push(index + n);
      signs.push({ ...roomFor(index + n), ...(n === 0 ? { begins: true } : {}), ...(n === repeat.length - 1 ? { times: repeat.times } : {}) });
    }
    for (let n = 0; n < repeat.length * repeat.times; n += 1) printed[index + n] = base + (n % repeat.length);
    index += repeat.length * repeat.times;
  }
  const startOf = (measures: readonly PlannedMeasure[], index: number): number => {
    const measure = measures[index] ?? measures.at(-1)!;
    return measure.start.valueOf() + (index < measures.length ? 0 : measure.length.valueOf());
  };
  const blocks = repeats.map(({ first, length, times }): Block => {
    const from = startOf(score.measures, first);
    return { from, to: startOf(score.measures, first + length * times), length: startOf(score.measures, first + length) - from };
  });
  const place = (position: number): number => {
    const block = blocks.find(({ from, to }) => position >= from && position < to);
    return block ? block.from + ((position - block.from) % block.length) : position;
  };
  const staves = repeats.length === 0 ? score.staves : score.staves.map((staff) => ({ ...staff, measures: staff.measures.length === 0 ? [] : kept.map((index) => staff.measures[index]!) }));
  return {
    score: repeats.length === 0 && words.size === 0 ? score : { measures: kept.map((index) => score.measures[index]!), staves, signs },
    fold: { printed: (index) => printed[index] ?? index, place },
  };
}
