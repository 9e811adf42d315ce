import { type Fraction, ZERO } from '../exact/fraction';
import type { Value } from '../rhythm/types';
import type { LineSource } from '../study/line';
import type { MetreChange } from './measures';

/** A line as it is written: values at their written lengths, and where they come from. */
export type WrittenLine = { readonly values: readonly Value[]; readonly sources: readonly LineSource[] };

/** Whether everything is written as long as it sounds. */
export const isUnscaled = (plan: readonly MetreChange[]): boolean => plan.every(({ scale }) => scale.equals(1));

/** The plan in written lengths, for `spellLine`. */
export function writtenPlan(plan: readonly MetreChange[]): { at: Fraction; metre: string }[] {
  let at = ZERO;
  return plan.map((change, index) => {
    const before = plan[index - 1];
    if (before !== undefined) at = at.add(change.at.sub(before.at).div(before.scale));
    return { at, metre: change.metre };
  });
}

/**
 * A line in written lengths. What is held or silent over a change of scale is cut there: only rests are, since a statement
 * is written at one scale throughout.
 */
export function writtenLine(values: readonly Value[], sources: readonly LineSource[], plan: readonly MetreChange[]): WrittenLine {
  const written: Value[] = [];
  const from: LineSource[] = [];
  let change = 0;
  let at = ZERO;
  values.forEach((value, index) => {
    const end = at.add(value.length);
    while (at.compare(end) < 0) {
      while (plan[change + 1] !== undefined && plan[change + 1]!.at.compare(at) <= 0) change += 1;
      const next = plan[change + 1]?.at;
      const isCut = next !== undefined && next.compare(end) < 0 && !plan[change + 1]!.scale.equals(plan[change]!.scale);
      const until = isCut ? next : end;
      written.push({ ...value, length: until.sub(at).div(plan[change]!.scale) });
      from.push(sources[index] ?? null);
      at = until;
    }
  });
  return { values: written, sources: from };
}
