import { type ValueNames, valueName } from '../describe/words';
import { type Fraction, toFraction } from '../exact/fraction';
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
  /** what lasts as long before and after the change, both as written; null at the start, and where no two values do */
  readonly equivalence: { readonly before: Fraction; readonly after: Fraction } | null;
};

/** Values that an equivalence is written with, the likeliest first: plain and once dotted (common practice, no source). */
const PLAIN = ['1/4', '3/8', '1/2', '1/8', '3/4', '1', '3/16', '1/16', '3/2', '1/32', '3/32', '2'].map((text) => toFraction(text));
/** Where no two plain values last as long, one of them is two tied together. */
const TIED = ['5/16', '5/8', '5/32', '7/16', '7/8', '9/16', '9/8'].map((text) => toFraction(text));
const isOneOf = (list: readonly Fraction[], length: Fraction): boolean => list.some((one) => one.equals(length));

/** @param ratio - of a written whole note's time after the change to before it */
function equivalenceOf(beat: Fraction, ratio: Fraction): TempoMark['equivalence'] {
  for (const [afters, befores] of [[[beat, ...PLAIN], PLAIN], [[beat, ...PLAIN], TIED], [TIED, PLAIN]] as const) {
    for (const after of afters) {
      const before = after.mul(ratio);
      if (isOneOf(afters, after) && isOneOf(befores, before) && (isOneOf(PLAIN, after) || isOneOf(TIED, after))) return { before, after };
    }
  }
  return null;
}

/** A length in words: the name of a value, or of the two that are tied to make it. */
function lengthWords(length: Fraction, names: ValueNames): string {
  if (isOneOf(PLAIN, length)) return valueName(length, names);
  const first = PLAIN.filter((one) => one.compare(length) < 0 && isOneOf(PLAIN, length.sub(one))).toSorted((a, b) => b.compare(a))[0];
  return first === undefined ? valueName(length, names) : `${valueName(first, names)} tied to ${valueName(length.sub(first), names)}`;
}

/** A tempo mark in words: “dotted quarter = quarter, quarter = 56”. */
export function tempoMarkWords({ beat, perMinute, equivalence }: TempoMark, names: ValueNames = 'american'): string {
  const metronome = `${valueName(beat, names)} = ${perMinute.toFraction(true)}`;
  return equivalence === null ? metronome : `${lengthWords(equivalence.before, names)} = ${lengthWords(equivalence.after, names)}, ${metronome}`;
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
