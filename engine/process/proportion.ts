import { type Fraction, ONE, formatFraction, sum, toFactor } from '../exact/fraction';
import type { Reading } from '../rhythm/types';
import { locate } from '../study/locate';
import type { ProportionProcess } from '../study/schema';
import { augment } from '../transform/augment';
import { retrograde } from '../transform/retrograde';
import { rotate } from '../transform/rotate';
import { entrySpans } from './entries';
import type { ProcessRules, TracedValue } from './types';

/** The factors of a proportion, written or as powers of its ratio. @throws EngineError with the path of the factor */
export function proportionFactors(process: ProportionProcess, path = 'process'): Fraction[] {
  if (process.factors !== undefined) {
    return process.factors.map((factor, index) => locate({ path: `${path}.factors.${index}` }, () => toFactor(factor)));
  }
  const ratio = locate({ path: `${path}.ratio` }, () => toFactor(process.ratio ?? '1'));
  const factors: Fraction[] = [];
  for (let power = ONE; factors.length < (process.count ?? 1); power = power.mul(ratio)) {
    factors.push(locate({ path: `${path}.ratio` }, () => toFactor(power)));
  }
  return factors;
}

/** One item a statement, repeated in turn. */
const inTurn = <T>(list: readonly T[] | undefined, index: number, otherwise: T): T =>
  list === undefined || list.length === 0 ? otherwise : list[index % list.length]!;

export const readingOf = (process: ProportionProcess, index: number): Reading =>
  inTurn(process.readings, index, process.reading ?? 'forwards');

export const rotationOf = (process: ProportionProcess, index: number): number => inTurn(process.rotations, index, 0);

/** Statements made before, by subject: equal statements of a piece share one rhythm. */
const made = new WeakMap<readonly TracedValue[], Map<string, readonly TracedValue[]>>();

/** A subject stretched, then read, then rotated by values: the order that `findTransformations` names. */
export function state(subject: readonly TracedValue[], factor: Fraction, reading: Reading, rotation: number): readonly TracedValue[] {
  const key = `${formatFraction(factor)} ${reading} ${rotation}`;
  let known = made.get(subject);
  if (known === undefined) made.set(subject, (known = new Map()));
  let values = known.get(key);
  if (values === undefined) known.set(key, (values = transform(subject, factor, reading, rotation)));
  return values;
}

function transform(subject: readonly TracedValue[], factor: Fraction, reading: Reading, rotation: number): TracedValue[] {
  const stretched = factor.equals(ONE) ? [...subject] : augment(subject, factor);
  const read = reading === 'forwards' ? stretched : retrograde(stretched, reading === 'backwards-values' ? 'values' : 'attacks');
  return rotation === 0 ? read : rotate(read, rotation, 'values');
}

/** The subject at one factor after another: augmentation, diminution, canon in proportion. */
export const proportion: ProcessRules<ProportionProcess> = {
  kind: 'proportion',
  size: ({ process, subject }) => (process.factors?.length ?? process.count ?? 1) * subject.length,
  statements({ section, process, path, subject, instruments }) {
    const factors = proportionFactors(process, path);
    const once = sum(subject.map((v) => v.length));
    const byFactor = new Map<Fraction, Fraction>();
    const lengths = factors.map((factor) => {
      const length = byFactor.get(factor) ?? once.mul(factor);
      byFactor.set(factor, length);
      return length;
    });
    const spans = locate({ path: `${path}.entries` }, () => entrySpans(lengths, process.entries ?? 'successive'));
    return factors.map((factor, index) => {
      const reading = readingOf(process, index);
      const rotation = rotationOf(process, index);
      return {
        ...spans[index]!,
        length: lengths[index]!,
        instrument: instruments[index % instruments.length]!,
        subject: section.subject ?? null,
        factor,
        reading,
        rotation,
        mirrored: false,
        values: state(subject, factor, reading, rotation),
      };
    });
  },
};
