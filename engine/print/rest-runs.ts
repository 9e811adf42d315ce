import type { PrintScore } from './types';

/** Measures of rest that a part shows as one. */
export type RestRun = {
  /** its place among `printed` */
  readonly first: number;
  readonly length: number;
};

/**
 * Runs of two or more measures in which nothing sounds on any staff: they end where something must be read over a measure (a
 * letter, a tempo, another metre, a change of instrument, a cue, a repeat, a fermata).
 */
export function restRuns({ measures, printed, staves }: PrintScore): RestRun[] {
  const said = new Set(staves.flatMap(({ changes }) => changes.map((change) => change.said)));
  const cued = new Set(staves.flatMap(({ cues }) => cues.flatMap(({ first, length }) => Array.from({ length }, (_, n) => first + n))));
  const isEmpty = (index: number): boolean =>
    staves.length > 0 && !cued.has(index) && staves.every((staff) => staff.isSilent(index) && !staff.cell(index).notes.some(({ fermata }) => fermata));
  const isRead = (index: number): boolean => {
    const { letter, tempo, signature, sections, begins } = measures[index]!;
    return letter !== null || tempo !== null || signature !== null || sections.length > 0 || begins === true || said.has(index);
  };
  const runs: RestRun[] = [];
  let first: number | null = null;
  const end = (at: number): void => {
    if (first !== null && at - first > 1) runs.push({ first, length: at - first });
    first = null;
  };
  printed.forEach((index, n) => {
    const isPickup = measures[index]!.number === 0;
    if (!isEmpty(index) || isPickup || isRead(index)) end(n);
    if (isEmpty(index) && !isPickup) first ??= n;
    if (measures[index]!.times !== undefined) end(n + 1);
  });
  end(printed.length);
  return runs;
}
