import type { BuiltStudy } from '../study/types';
import { type PlannedMeasure, measureAt } from '../views/measures';
import type { Repeat } from '../views/repeats';

/** The most measures between two rehearsal marks (Quince, adrianquince.com, part preparation for composers, 2015). */
export const LETTER_EVERY = 24;

const letterName = (n: number): string => String.fromCharCode(65 + (n % 26)).repeat(1 + Math.floor(n / 26));

/**
 * Rehearsal letters: one where each section begins, and within a long section more, with a number, where statements begin on
 * a bar line or else every twenty-four measures. None stands on a measure that a repeat leaves out.
 * @returns the letter of each measure that has one, by index
 */
export function rehearsalLetters(measures: readonly PlannedMeasure[], built: Pick<BuiltStudy, 'sections' | 'statements'>, repeats: readonly Repeat[]): Map<number, string> {
  const isPrinted = (index: number): boolean => !repeats.some(({ first, length, times }) => index >= first + length && index < first + length * times);
  const letters = new Map<number, string>();
  const starts: number[] = [];
  for (const { start, length } of built.sections) {
    const index = length.n === 0n ? undefined : measureAt(measures, start)?.index;
    if (index !== undefined && index !== starts.at(-1) && isPrinted(index)) starts.push(index);
  }
  const barStarts = new Set(
    built.statements.flatMap(({ start }) => {
      const measure = measureAt(measures, start);
      return measure?.start.equals(start) && isPrinted(measure.index) ? [measure.index] : [];
    }),
  );
  starts.forEach((first, n) => {
    const name = letterName(n);
    letters.set(first, name);
    const end = starts[n + 1] ?? measures.length;
    let at = first;
    for (let number = 2; end - at > LETTER_EVERY; number += 1) {
      const reach = Array.from({ length: LETTER_EVERY }, (_, step) => at + LETTER_EVERY - step).filter(isPrinted);
      const next = reach.find((index) => barStarts.has(index)) ?? reach[0];
      if (next === undefined || next >= end) break;
      letters.set(next, `${name}${number}`);
      at = next;
    }
  });
  return letters;
}
