import type { PlannedMeasure, Repeat } from '@/engine';

/** How the measures of a piece and those that are printed correspond. */
export type Fold = {
  /** a measure of the piece as the printed one that stands for it, counted among the printed ones */
  readonly printed: (index: number) => number;
  /** a position in the piece, in whole notes, as the place where it is printed */
  readonly place: (position: number) => number;
};

type Block = { readonly from: number; readonly to: number; readonly length: number };

/** The way from a piece to its print, in which the figure of each repeat stands once. */
export function foldOf({ measures, printed, repeats }: { readonly measures: readonly PlannedMeasure[]; readonly printed: readonly number[]; readonly repeats: readonly Repeat[] }): Fold {
  const places = new Map(printed.map((index, place) => [index, place]));
  for (const { first, length, times } of repeats) {
    for (let n = length; n < length * times; n += 1) places.set(first + n, places.get(first + (n % length))!);
  }
  const startOf = (index: number): number => {
    const measure = measures[index] ?? measures.at(-1)!;
    return measure.start.valueOf() + (index < measures.length ? 0 : measure.length.valueOf());
  };
  const blocks = repeats.map(({ first, length, times }): Block => {
    const from = startOf(first);
    return { from, to: startOf(first + length * times), length: startOf(first + length) - from };
  });
  return {
    printed: (index) => places.get(index) ?? index,
    place: (position) => {
      const block = blocks.find(({ from, to }) => position >= from && position < to);
      return block ? block.from + ((position - block.from) % block.length) : position;
    },
  };
}
