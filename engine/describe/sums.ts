import { type Fraction, formatFraction, isFactor, sum } from '../exact/fraction';
import { proportionFactors } from '../process/proportion';
import { ladder } from '../proportion/ladder';
import { rulesOf } from '../process/registry';
import { parseMetre } from '../rhythm/metre';
import { parseRhythm } from '../rhythm/parse';
import type { Rhythm } from '../rhythm/types';
import type { ProcessSection, Section, Study } from '../study/schema';
import type { BuiltStudy, Statement } from '../study/types';
import { applySteps } from '../transform/steps';
import { type PlannedMeasure, measureAt, metreOf, planMeasures } from '../views/measures';
import { listWords, measureNumber, measureWord, measureWords } from './words';

/** A total with the sum that makes it: `4 + 5 + 6 + 8 = 23 measures`. */
export type Sum = {
  /** `4 + 5 + 6 + 8`, or empty where there is nothing to add */
  readonly terms: string;
  /** `23 measures` */
  readonly total: string;
};

/** Whether spans follow one another without gap or overlap. */
function isChain(spans: readonly { start: Fraction; length: Fraction }[]): boolean {
  return spans.every((span, index) => index === 0 || spans[index - 1]!.start.add(spans[index - 1]!.length).equals(span.start));
}

const sumOf = (lengths: readonly Fraction[], total: Fraction, metre: string): Sum => ({
  terms: lengths.length < 2 ? '' : lengths.map((length) => measureNumber(length, metre)).join(' + '),
  total: measureWords(total, metre),
});

/** The length of a section with its sum, where its statements follow one another. */
export function sectionSum(study: Study, built: BuiltStudy, section: Section): Sum {
  const metre = metreOf(study, section);
  const { length } = built.sections.find(({ id }) => id === section.id)!;
  const statements = built.statements.filter((s) => s.section === section.id && s.subject !== null);
  // A line under the section may outlast its statements: then they do not add up to it, and no sum is shown.
  const isWhole = isChain(statements) && sum(statements.map((s) => s.length)).equals(length);
  return sumOf(isWhole ? statements.map((s) => s.length) : [], length, metre);
}

/** The length of the study with its sum over the sections, each in measures of its own metre. */
export function studySum(study: Study, built: BuiltStudy): Sum {
  const counts = study.sections.map((section, index) => built.sections[index]!.length.div(parseMetre(metreOf(study, section)).length));
  const total = sum(counts);
  return {
    terms: counts.length < 2 ? '' : counts.map((count) => count.toFraction(true)).join(' + '),
    total: `${total.toFraction(true)} ${measureWord(total)}`,
  };
}

/** The metres of a study in order of first use. */
export const studyMetres = (study: Study): string[] => [...new Set(study.sections.map((section) => metreOf(study, section)))];

export const sumWords = ({ terms, total }: Sum): string => (terms === '' ? total : `${terms} = ${total}`);

/** What does not hold in a section, in words, and the factors that would mend it. */
export type Remark = {
  readonly code: 'unequal-steps' | 'ends-inside' | 'proportions';
  readonly text: string;
  /** the statement at fault, by number, where there is one */
  readonly statement?: number;
  /** what would mend it: a label, and the factors (or ratio and count) to put in place */
  readonly mend?: { readonly label: string; readonly factors: readonly string[]; readonly ratio?: string };
};

const MOST_STEPS_SHOWN = 8;

function stepsRemark(factors: readonly Fraction[]): Remark | null {
  if (factors.length < 3) return null;
  const { steps, equalSteps } = ladder(factors);
  const first = steps[0]!;
  if (equalSteps || first.equals(1)) return null;
  const broken = steps.findIndex((step) => !step.equals(first));
  const shown = steps.map(formatFraction);
  const text =
    steps.length <= MOST_STEPS_SHOWN
      ? `Each statement is ${shown.slice(0, -1).join(', ')}, then ${shown.at(-1)} of the one before it: the steps are not equal.`
      : `Each statement is ${shown[0]} of the one before it up to statement ${broken + 1}; statement ${broken + 2} is ${shown[broken]}: the steps are not equal.`;
  const equal = factors.map((_, index) => first.pow(index)!.mul(factors[0]!));
  // Many steps grow or shrink beyond what can be typed: then nothing is offered.
  if (!equal.every(isFactor)) return { code: 'unequal-steps', text };
  return { code: 'unequal-steps', text, mend: { label: 'Make every step equal', factors: equal.map(formatFraction), ratio: formatFraction(first) } };
}

/** The factor nearest to `factor` at which a statement of `once` lasts whole measures, at least one. */
function wholeFactor(factor: Fraction, once: Fraction, measure: Fraction): Fraction {
  const rounded = once.mul(factor).div(measure).round();
  return (rounded.compare(1) < 0 ? rounded.add(1) : rounded).mul(measure).div(once);
}

function endRemark(study: Study, section: Section, statements: readonly Statement[], measures: readonly PlannedMeasure[], factors: readonly Fraction[]): Remark | null {
  const metre = metreOf(study, section);
  const measure = parseMetre(metre).length;
  const within = (position: Fraction) => position.sub(measureAt(measures, position)?.start ?? position).div(measure);
  for (const [index, statement] of statements.entries()) {
    const whole = within(statement.start.add(statement.length));
    const over = whole.sub(whole.floor());
    if (over.n === 0n) continue;
    const text = `Statement ${index + 1} ends ${formatFraction(over)} into a measure.`;
    const factor = factors[index];
    if (factor === undefined || within(statement.start).n !== 0n) return { code: 'ends-inside', text, statement: index };
    const mended = wholeFactor(factor, statement.length.div(factor), measure);
    if (!isFactor(mended)) return { code: 'ends-inside', text, statement: index };
    const next = factors.map((one, n) => formatFraction(n === index ? mended : one));
    return { code: 'ends-inside', text, statement: index, mend: { label: `Make it ${measureWords(statement.length.div(factor).mul(mended), metre)}, at ${formatFraction(mended)}`, factors: next } };
  }
  return null;
}

/** The subject of a section as its process finds it. */
function subjectOf(study: Study, section: ProcessSection): Rhythm {
  const subject = study.subjects.find(({ id }) => id === section.subject);
  return subject === undefined ? [] : applySteps(parseRhythm(subject.rhythm), section.before ?? []);
}

/** What a composer would want to be told about the proportions of a section. */
export function sectionRemarks(study: Study, built: BuiltStudy, section: Section): Remark[] {
  if (section.kind !== 'process') return [];
  const own = rulesOf(section.process).remarks?.({ process: section.process, subject: subjectOf(study, section) }) ?? [];
  const told = own.length === 0 ? [] : [{ code: 'proportions' as const, text: own.join(' ') }];
  if (section.process.kind !== 'proportion' || (section.process.entries ?? 'successive') !== 'successive') return told;
  const factors = proportionFactors(section.process);
  const statements = built.statements.filter((s) => s.section === section.id && s.subject !== null);
  const remarks = [stepsRemark(factors), endRemark(study, section, statements, planMeasures(study, built), factors)];
  return [...told, ...remarks.filter((remark) => remark !== null)];
}

/** Which sections mirror which, in words: “Filling and Emptying, Sluice and Sluice reversed mirror about Pound”. */
export function mirrorWords(study: Study, built: BuiltStudy): string | null {
  const { sections } = study;
  const pairs = Math.floor(sections.length / 2);
  if (!built.palindrome.form.holds || pairs === 0) return null;
  const middle = sections.length % 2 === 1 ? sections[pairs]! : null;
  const first = sections.slice(0, pairs).map(({ name }, index) => `${name} with ${sections[sections.length - 1 - index]!.name}`);
  return `${listWords(first)} ${pairs === 1 ? 'mirrors' : 'mirror'} about ${middle ? middle.name : 'the middle'}`;
}
