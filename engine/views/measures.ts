import { EngineError } from '../errors';
import { type Fraction, ZERO, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { type Metre, metreOfLength, parseMetre } from '../rhythm/metre';
import type { Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { writtenSpans } from './writing';

export { metreOf, tempoOf, writingOf } from './metre-of';

/** What decides time: the sections and the whole length. */
export type Extent = Pick<BuiltStudy, 'sections' | 'totalLength'>;
/** What decides measures: also the statements, which may be written in metres or tempos of their own. */
export type Written = Extent & Pick<BuiltStudy, 'statements'>;

export type MetreChange = {
  /** from the study's start, in whole notes that sound */
  readonly at: Fraction;
  readonly metre: Metre;
  /** how much longer it sounds than it is written */
  readonly scale: Fraction;
};

/**
 * The metres of a study: a pickup is a first measure cut short; a section in another metre, and a stretch that is written as
 * another tempo, begin a new measure.
 */
export function metrePlan(study: Study, built: Written): MetreChange[] {
  const changes: MetreChange[] = [];
  for (const { start: at, metre, scale } of writtenSpans(study, built).spans) {
    const last = changes.at(-1);
    if (last !== undefined && last.metre === metre && last.scale.equals(scale)) continue;
    // A section of no length leaves two changes at one place: the later one holds.
    if (last?.at.equals(at)) changes.pop();
    const before = changes.at(-1);
    if (before !== undefined && before.metre === metre && before.scale.equals(scale)) continue;
    changes.push({ at, metre, scale });
  }
  const pickup = study.pickup === undefined ? ZERO : toFraction(study.pickup);
  if (pickup.compare(ZERO) > 0) {
    const first = changes[0]!;
    const isCut = changes[1] !== undefined && changes[1].at.compare(pickup) <= 0;
    if (!isCut) changes.splice(1, 0, { ...first, at: pickup });
  }
  return changes;
}

export type PlannedMeasure = {
  /** counted from 0 */
  readonly index: number;
  /** as printed: from 1, a pickup being 0 */
  readonly number: number;
  /** in whole notes that sound, from the study's start */
  readonly start: Fraction;
  /** in whole notes that sound */
  readonly length: Fraction;
  /** how much longer it sounds than it is written: 1 but where a stretch is written as a slower tempo */
  readonly scale: Fraction;
  /** the metre that it is written in */
  readonly metre: Metre;
  /** the time signature that is printed before it, null where the one before still holds */
  readonly signature: Metre | null;
};

/** The metre of a measure cut short; where no metre has that length, the one that was cut: spelling then says why it fails. */
function cutMetre(length: Fraction, metre: Metre): Metre {
  try {
    return metreOfLength(length, metre);
  } catch (error) {
    if (error instanceof EngineError) return parseMetre(metre).text;
    throw error;
  }
}

/** A pickup is printed under the metre that it leads into; every other change of metre is printed where it happens. */
function withSignatures(measures: readonly PlannedMeasure[], pickupMetre: Metre | null): PlannedMeasure[] {
  let current: Metre | null = null;
  return measures.map((measure, index) => {
    const shown = index === 0 && pickupMetre !== null ? parseMetre(pickupMetre).text : measure.metre;
    const signature = shown === current ? null : shown;
    current = shown;
    return { ...measure, signature };
  });
}

/** Every measure of a study, in order. The last may reach beyond the end of the piece. */
export function planMeasures(study: Study, built: Written): PlannedMeasure[] {
  const plan = metrePlan(study, built);
  const measures: PlannedMeasure[] = [];
  const first = study.pickup !== undefined && plan.length > 1 && plan[1]!.metre === plan[0]!.metre ? 0 : 1;
  plan.forEach(({ at, metre, scale }, change) => {
    const end = plan[change + 1]?.at ?? built.totalLength;
    const length = parseMetre(metre).length.mul(scale);
    const isLast = change === plan.length - 1;
    const whole = end.sub(at).div(length);
    const count = Number(whole.ceil().n);
    if (measures.length + count > LIMITS.measures) throw new EngineError('too_large', `A study may have ${LIMITS.measures} measures.`);
    for (let n = 0; n < count; n += 1) {
      const start = at.add(length.mul(n));
      const isCut = !isLast && n === count - 1 && start.add(length).compare(end) > 0;
      const own = isCut ? end.sub(start) : length;
      const index = measures.length;
      measures.push({
        index,
        number: index + first,
        start,
        length: own,
        scale,
        metre: isCut ? cutMetre(own.div(scale), metre) : parseMetre(metre).text,
        signature: null,
      });
    }
  });
  return withSignatures(measures, first === 0 ? plan[0]!.metre : null);
}

/** The measure that a position falls in: the last that begins at or before it. */
export function measureAt(measures: readonly PlannedMeasure[], position: Fraction): PlannedMeasure | undefined {
  let low = 0;
  let high = measures.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (measures[middle]!.start.compare(position) <= 0) low = middle;
    else high = middle - 1;
  }
  return measures[low];
}

/** A position in words: “measure 5, beat 2 1/2”. */
export function placeWords(measures: readonly PlannedMeasure[], position: Fraction): string {
  const measure = measureAt(measures, position);
  if (measure === undefined) return 'the beginning';
  const beat = position.sub(measure.start).div(measure.scale).mul(parseMetre(measure.metre).unit).add(1);
  return `measure ${measure.number}, beat ${beat.toFraction(true)}`;
}
