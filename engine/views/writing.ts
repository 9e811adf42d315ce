import { EngineError } from '../errors';
import { type Fraction, ONE, formatFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { type Metre, parseMetre } from '../rhythm/metre';
import type { Section, Study } from '../study/schema';
import type { BuiltStudy, Statement } from '../study/types';
import { metreOf, writingOf } from './metre-of';

export type Writing = 'values' | 'tempo' | 'metre';

/** A stretch of time that is written in one way. */
export type WrittenSpan = {
  /** from the study's start, in whole notes that sound */
  readonly start: Fraction;
  readonly metre: Metre;
  /** how much longer it sounds than it is written: 1 but where a stretch is written as a slower tempo */
  readonly scale: Fraction;
};

const refuse = (section: Section, message: string): never => {
  throw new EngineError('cannot_write', message, { section: section.id });
};

/**
 * The metre whose measure is `factor` times as long, its beats stretched with it: 4/4 at 3/2 is 12/8, a dotted quarter a beat.
 * @throws EngineError `invalid_metre` where there is none, as for 4/3
 */
export function stretchedMetre(metre: Metre, factor: Fraction): Metre {
  const { unit, groups, count } = parseMetre(metre);
  // A unit that lasts `times / under` of a whole note: so many of a written unit.
  const under = factor.d * BigInt(unit);
  const shift = factor.n % 2n === 0n && under % 2n === 0n ? common(factor.n, under) : 1n;
  const times = Number(factor.n / shift);
  const written = Number(under / shift);
  if (!Number.isInteger(Math.log2(written)) || written > LIMITS.metreUnit || count * times > LIMITS.metreBeats) {
    throw new EngineError('invalid_metre', `${formatFraction(factor)} times ${metre} is no metre that can be written.`);
  }
  const stretched = groups.map((group) => group * times);
  const plain = `${count * times}/${written}`;
  const own = parseMetre(plain).groups;
  const isOwn = own.length === stretched.length && own.every((group, index) => group === stretched[index]);
  const isPlain = isOwn || stretched.length === 1 || stretched.every((group) => group === 1);
  return isPlain && !metre.includes('+') ? plain : `${stretched.join('+')}/${written}`;
}

/** The greatest power of two in both. */
function common(a: bigint, b: bigint): bigint {
  let power = 1n;
  while (a % (power * 2n) === 0n && b % (power * 2n) === 0n) power *= 2n;
  return power;
}

type Cluster = { readonly start: Fraction; readonly end: Fraction; readonly factor: Fraction };

/**
 * Stretches of a section in which all that sounds is at one factor.
 * @throws EngineError `cannot_write` where statements at different factors, or a line at its own length, sound at once
 */
function clustersOf(section: Section, statements: readonly Statement[], what: 'tempo' | 'metre'): Cluster[] {
  const clusters: Cluster[] = [];
  for (const { start, length, factor, subject } of statements.toSorted((a, b) => a.start.compare(b.start))) {
    const end = start.add(length);
    if (subject === null && what === 'metre') continue;
    const last = clusters.at(-1);
    if (last === undefined || start.compare(last.end) >= 0) {
      clusters.push({ start, end, factor });
      continue;
    }
    if (!last.factor.equals(factor)) {
      const [a, b] = [formatFraction(last.factor), formatFraction(factor)];
      refuse(section, `In “${section.name}” lines at ${a} and at ${b} times their length sound at once: they cannot share a ${what}. Write it in longer values.`);
    }
    clusters[clusters.length - 1] = { ...last, end: last.end.compare(end) < 0 ? end : last.end };
  }
  return clusters;
}

/**
 * How a section is written: its own metre throughout, or for each statement a tempo or a metre that lets it be written as the
 * subject is.
 * @throws EngineError `cannot_write` with the reason
 */
export function sectionSpans(study: Study, built: Pick<BuiltStudy, 'sections' | 'statements'>, section: Section, writing: Writing): WrittenSpan[] {
  const { start } = built.sections.find(({ id }) => id === section.id)!;
  const metre = metreOf(study, section);
  const plain: WrittenSpan = { start, metre, scale: ONE };
  if (writing === 'values') return [plain];
  const clusters = clustersOf(section, built.statements.filter((statement) => statement.section === section.id), writing);
  const spans = clusters.map(({ start: at, factor }): WrittenSpan => {
    if (writing === 'tempo') return { start: at, metre, scale: factor };
    try {
      return { start: at, metre: stretchedMetre(metre, factor), scale: ONE };
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      return refuse(section, `“${section.name}” cannot be written in new metres: ${error.message}`);
    }
  });
  return spans[0]?.start.equals(start) ? spans : [plain, ...spans];
}

/** How the whole study is written; a section whose way is impossible is written in longer values, and the reason kept. */
export function writtenSpans(study: Study, built: Pick<BuiltStudy, 'sections' | 'statements'>): { spans: WrittenSpan[]; refusals: EngineError[] } {
  const refusals: EngineError[] = [];
  const spans = study.sections.flatMap((section) => {
    try {
      return sectionSpans(study, built, section, writingOf(study, section));
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      refusals.push(error);
      return sectionSpans(study, built, section, 'values');
    }
  });
  return { spans, refusals };
}
