import { z } from 'zod';
import { type SentencePart, entriesWords, plain, playersParts, readingWords, subjectParts, word } from '../describe/sentence-parts';
import { listWords, times } from '../describe/words';
import { type Fraction, ONE, formatFraction, sum, toFactor, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import type { Reading } from '../rhythm/types';
import { count, entriesSchema, exactText, reading, turn } from '../study/fields';
import { locate } from '../study/locate';
import { augment } from '../transform/augment';
import { rotate } from '../transform/rotate';
import { metreOf } from '../views/metre-of';
import { entrySpans } from './entries';
import { read } from './read';
import type { ProcessRules, TracedValue } from './types';

const schema = z
  .strictObject({
    kind: z.literal('proportion'),
    factors: z.array(exactText).min(1).max(LIMITS.statements).optional(),
    ratio: exactText.optional(),
    count: count.optional(),
    entries: entriesSchema.optional(),
    reading: reading.optional(),
    readings: z.array(reading).min(1).max(LIMITS.statements).optional(),
    rotations: z.array(turn).min(1).max(LIMITS.statements).optional(),
  })
  .refine(
    ({ factors, ratio, count: statements }) =>
      factors === undefined ? ratio !== undefined && statements !== undefined : ratio === undefined && statements === undefined,
    { message: 'A proportion has either a list of factors, or a ratio and a count.' },
  );
export type ProportionProcess = z.output<typeof schema>;

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

function transform(subject: readonly TracedValue[], factor: Fraction, reading: Reading, rotation: number): readonly TracedValue[] {
  const stretched = factor.equals(ONE) ? [...subject] : augment(subject, factor);
  const figure = read(stretched, reading);
  return rotation === 0 ? figure : rotate(figure, rotation, 'values');
}

function factorParts(process: ProportionProcess): SentencePart[] {
  const factors = proportionFactors(process).map(formatFraction);
  if (process.factors === undefined && factors.length > 1) {
    const ratio = formatFraction(toFraction(process.ratio ?? '1'));
    return [plain(', each '), word(ratio, 'factors'), plain(' times as long as the one before, ')];
  }
  return [plain(', at '), word(factors.join(', '), 'factors'), plain(factors.join() === '1' ? ' time its length, ' : ' times its length, ')];
}

function readingsPart(process: ProportionProcess, statements: number): SentencePart {
  const readings = (process.readings ?? [process.reading ?? 'forwards']).slice(0, statements);
  const distinct = readings.every((one) => one === readings[0]) ? readings.slice(0, 1) : readings;
  const words = listWords(distinct.map(readingWords));
  return word(distinct.length > 1 ? `${words} in turn` : words, 'reading');
}

function rotationParts(process: ProportionProcess, statements: number): SentencePart[] {
  const turns = process.rotations?.slice(0, statements) ?? [];
  if (turns.every((one) => one === 0)) return [];
  return [plain(', rotated by '), word(turns.join(', '), 'rotations'), plain(turns.join() === '1' ? ' value' : ' values')];
}

/** The subject at one factor after another: augmentation, diminution, canon in proportion. */
export const proportion: ProcessRules<typeof schema> = {
  schema,
  label: 'stated at one factor after another',
  begin: () => ({ kind: 'proportion', factors: ['1', '3/2'], reading: 'forwards', entries: 'successive' }),
  takesSubject: true,
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
      const { start, end } = spans[index]!;
      return {
        start,
        end,
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
  sentence({ study, section, process }) {
    const statements = proportionFactors(process).length;
    return [
      ...subjectParts(study, section),
      plain(' is '),
      word('stated', 'process'),
      plain(' '),
      word(times(statements), 'count'),
      ...(statements > 1 ? [plain(', '), word(entriesWords(process.entries ?? 'successive', metreOf(study, section)), 'entries')] : []),
      ...factorParts(process),
      readingsPart(process, statements),
      ...rotationParts(process, statements),
      ...playersParts(study, section.instruments, statements),
    ];
  },
};
