import { EngineError } from '../errors';
import { type Fraction, formatFraction, toFraction } from '../exact/fraction';
import { buildStudy } from '../study/build';
import { type Section, type Study, type StudyInput, parseStudy } from '../study/schema';
import type { BuiltStudy, Palindrome, Statement } from '../study/types';
import { type Clock, clockOf, formatClock, spokenClock } from '../views/clock';
import { type PlannedMeasure, measureAt, metreOf, planMeasures, tempoOf } from '../views/measures';
import { sectionSentence } from './sentence';
import { readingWords, rotationWords } from './sentence-parts';
import { sectionRemarks, sectionSum, studyMetres, studySum, sumWords } from './sums';
import { type DescribeOptions, capital, inSentence, listWords, measureWords, plural, times, valueName } from './words';

/** “quarter = 84”, with the user's names of values. */
export const tempoWords = (tempo: Study['tempo'], { valueNames }: DescribeOptions = {}): string =>
  `${valueName(toFraction(tempo.beat), valueNames)} = ${formatFraction(toFraction(tempo.perMinute))}`;

const sentenceText = (study: Study, section: Section): string =>
  sectionSentence(study, section)
    .map(({ text }) => text)
    .join('');

function sectionText(study: Study, built: BuiltStudy, section: Section, options: DescribeOptions): string {
  const own: string[] = [];
  if (section.metre !== undefined && section.metre !== study.metre) own.push(`In ${section.metre}.`);
  if (section.tempo !== undefined) own.push(`${capital(tempoWords(tempoOf(study, section), options))}.`);
  const sum = `${capital(sumWords(sectionSum(study, built, section)))}.`;
  const remarks = sectionRemarks(study, built, section).map(({ text }) => text);
  return [sentenceText(study, section), ...own, sum, ...remarks].join(' ');
}

/**
 * A section in plain sentences: its process, its length with the sum, and what does not hold.
 * @throws EngineError `unknown_section`, and whatever `buildStudy` throws
 */
export function describeSection(document: StudyInput, id: string, options: DescribeOptions = {}): string {
  const study = parseStudy(document);
  const section = study.sections.find((one) => one.id === id);
  if (section === undefined) throw new EngineError('unknown_section', `There is no section “${id}”.`);
  return sectionText(study, buildStudy(study), section, options);
}

/** In which senses a study is a palindrome, in plain sentences; always all three, so that none is taken for another. */
export function palindromeWords(palindrome: Palindrome, pairs: number): string[] {
  const { form, values, attacks } = palindrome;
  const sentences: string[] = [];
  if (pairs > 0) sentences.push(form.holds ? 'The form mirrors: its sections pair up from outside in.' : `The form does not mirror. ${form.failure}`);
  sentences.push(values.holds ? 'The values mirror: every line read backwards is itself.' : `The values do not mirror. ${values.failure}`);
  sentences.push(
    attacks.holds ? 'The attacks mirror: they are heard the same from either end.' : `The attacks do not mirror. ${attacks.failure}`,
  );
  return sentences;
}

/**
 * A whole study in plain sentences: its size, each section, and in which senses it is a palindrome.
 * @throws EngineError whatever `buildStudy` throws
 */
export function describeStudy(document: StudyInput, options: DescribeOptions = {}): string {
  const study = parseStudy(document);
  const built = buildStudy(study);
  const seconds = clockOf(study, built).total;
  const opening =
    `“${study.title}” has ${plural(study.sections.length, 'section')} and lasts ${sumWords(studySum(study, built))} of ${listWords(studyMetres(study))}` +
    `, ${spokenClock(seconds)} at ${tempoWords(study.tempo, options)}.`;
  const players =
    study.players.length === 0
      ? `It has ${plural(study.instruments.length, 'instrument')}: ${listWords(study.instruments.map(({ name }) => inSentence(name)))}.`
      : `It is for ${plural(study.players.length, 'player')} with ${plural(study.instruments.length, 'instrument')}: ${listWords(study.instruments.map(({ name }) => inSentence(name)))}.`;
  const sections = study.sections.map((section) => `${section.name}: ${sectionText(study, built, section, options)}`);
  return [opening, players, ...sections, ...palindromeWords(built.palindrome, Math.floor(study.sections.length / 2))].join('\n');
}

/** What a statement is described from: built once for a whole study. */
export type DescribeContext = { readonly study: Study; readonly built: BuiltStudy; readonly measures: readonly PlannedMeasure[]; readonly clock: Clock };

export function describeContext(study: Study, built: BuiltStudy): DescribeContext {
  return { study, built, measures: planMeasures(study, built), clock: clockOf(study, built) };
}

function spanWords({ measures, clock }: DescribeContext, start: Fraction, length: Fraction): string {
  const first = measureAt(measures, start)?.number ?? 1;
  const end = start.add(length);
  const after = measureAt(measures, end);
  const last = after === undefined ? first : after.start.equals(end) && after.number > first ? after.number - 1 : after.number;
  const where = first === last ? `measure ${first}` : `measures ${first} to ${last}`;
  return `${where}, from ${formatClock(clock.secondsAt(start))} to ${formatClock(clock.secondsAt(end))}`;
}

/** Whoever plays a statement: one instrument, or several in turn. */
function playersWords(study: Study, { instrument, assigned }: Statement): string {
  const nameOf = (id: string | null) => study.instruments.find((one) => one.id === id)?.name ?? '';
  if (assigned === undefined) return nameOf(instrument);
  const names = [...new Set(assigned)].map(nameOf);
  return `${listWords([names[0] ?? 'Nobody', ...names.slice(1).map(inSentence)])}${names.length > 1 ? ' in turn' : ''}`;
}

/** One statement in a plain sentence, for a screen reader and for a table. */
export function describeStatement(context: DescribeContext, statement: Statement): string {
  const { study, built } = context;
  const name = playersWords(study, statement);
  const attacks = plural(statement.rhythm.filter((v) => !v.rest).length, 'attack');
  const where = spanWords(context, statement.start, statement.length);
  const section = study.sections.find(({ id }) => id === statement.section)!;
  const long = `${measureWords(statement.length, metreOf(study, section))} long`;
  if (statement.subject === null) return `${name}: a free line, ${attacks}, ${long}, ${where}.`;
  const all = built.statements.filter((s) => s.section === statement.section && s.subject !== null);
  const details = [
    statement.factor.equals(1) ? 'at its own length' : `at ${formatFraction(statement.factor)} times its length`,
    readingWords(statement.reading) + (statement.mirrored ? ', then mirrored' : ''),
    ...(statement.repeats === undefined ? [] : [`${times(statement.repeats)} through`]),
    ...(statement.rotation === 0 ? [] : [`rotated by ${rotationWords(statement.rotation, statement.rotationBy ?? 'values')}`]),
    attacks,
    long,
    where,
  ];
  return `Statement ${all.indexOf(statement) + 1} of ${all.length}, ${inSentence(name)}: ${details.join(', ')}.`;
}

