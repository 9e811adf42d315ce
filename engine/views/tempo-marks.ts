import { type Fraction, formatFraction, toFraction } from '../exact/fraction';
import { secondsOfWhole } from '../rhythm/tempo';
import type { Study } from '../study/schema';
import { type PlannedMeasure, type Written, planMeasures, tempoOf } from './measures';

/** A tempo that is printed over the beginning of a measure. */
export type TempoMark = {
  /** index of the measure */
  readonly measure: number;
  /** the value that is counted, in whole notes as written */
  readonly beat: Fraction;
  readonly perMinute: Fraction;
  /** what lasts as long before and after the change, both as written; null at the start, and where no two plain values do */
  readonly equivalence: { readonly before: Fraction; readonly after: Fraction } | null;
};

/** Values that an equivalence is written with, the likeliest first: plain and once dotted (common practice, no source). */
const PLAIN = ['1/4', '3/8', '1/2', '1/8', '3/4', '1', '3/16', '1/16', '3/2', '1/32', '3/32', '2'].map((text) => toFraction(text));
const isPlain = (length: Fraction): boolean => PLAIN.some((one) => one.equals(length));

/** @param ratio - of a written whole note's time after the change to before it */
function equivalenceOf(beat: Fraction, ratio: Fraction): TempoMark['equivalence'] {
  for (const after of [beat, ...PLAIN]) {
    const before = after.mul(ratio);
    if (isPlain(after) && isPlain(before)) return { before, after };
  }
  return null;
}

/**
 * Every tempo that a reader must be told: at the start, and where a written whole note begins to last longer or shorter.
 * The new tempo is to the old as the old written value to the new one that lasts as long.
 */
export function tempoMarks(study: Study, built: Written, measures: readonly PlannedMeasure[] = planMeasures(study, built)): TempoMark[] {
  const marks: TempoMark[] = [];
  let before: Fraction | null = null;
  let section = 0;
  for (const { index, start, scale } of measures) {
    while (built.sections[section + 1] && built.sections[section + 1]!.start.compare(start) <= 0) section += 1;
    const tempo = tempoOf(study, study.sections[section]!);
    const whole = secondsOfWhole(tempo).mul(scale);
    if (before?.equals(whole)) continue;
    const beat = toFraction(tempo.beat);
    marks.push({
      measure: index,
      beat,
      perMinute: toFraction(tempo.perMinute).div(scale),
      equivalence: before === null ? null : equivalenceOf(beat, whole.div(before)),
    });
    before = whole;
  }
  return marks;
}

/** A number of beats a minute as it is printed: exact, as a mixed number. */
export const perMinuteText = (perMinute: Fraction): string => (perMinute.d === 1n ? formatFraction(perMinute) : perMinute.toFraction(true));
