import { EngineError } from '../errors';
import { type Fraction, ZERO, formatFraction, toFraction } from '../exact/fraction';
import type { Grid } from '../exact/grid';
import type { Placed } from '../process/types';
import { parseMetre } from '../rhythm/metre';
import { parseTempo } from '../rhythm/tempo';
import type { Value } from '../rhythm/types';
import { metreOf } from '../views/measures';
import { assembleLine, endOf, placesOf, statementsOf } from './line';
import { locate } from './locate';
import { findPalindrome } from './palindrome';
import { type Study, type StudyInput, parseStudy } from './schema';
import { SectionBuilder } from './sections';
import type { BuiltSection, BuiltStudy, Statement } from './types';

function checkIds(study: Study): void {
  const lists = { subjects: study.subjects, instruments: study.instruments, players: study.players, sections: study.sections };
  for (const [list, items] of Object.entries(lists)) {
    const seen = new Set<string>();
    items.forEach(({ id }, index) => {
      if (seen.has(id)) throw new EngineError('duplicate_id', `Two of the ${list} have the same id, “${id}”.`, { path: `${list}.${index}.id` });
      seen.add(id);
    });
  }
  const instruments = new Set(study.instruments.map(({ id }) => id));
  study.players.forEach((player, p) =>
    player.instruments.forEach((id, i) => {
      if (!instruments.has(id)) {
        throw new EngineError('unknown_instrument', `${player.name} is to play “${id}”, which is not in the list of instruments.`, {
          path: `players.${p}.instruments.${i}`,
        });
      }
    }),
  );
}

function checkMetresAndTempos(study: Study): void {
  if (study.pickup !== undefined) {
    locate({ path: 'pickup' }, () => {
      const pickup = toFraction(study.pickup!);
      const first = parseMetre(metreOf(study, study.sections[0]!));
      if (pickup.compare(ZERO) > 0 && pickup.compare(first.length) < 0) return;
      throw new EngineError('invalid_argument', `A pickup lasts some time and is shorter than a measure of ${first.text}; ${formatFraction(pickup)} is not.`);
    });
  }
  locate({ path: 'metre' }, () => parseMetre(study.metre));
  locate({ path: 'tempo' }, () => parseTempo(study.tempo));
  study.sections.forEach((section, index) => {
    const where = { section: section.id };
    if (section.metre !== undefined) locate({ ...where, path: `sections.${index}.metre` }, () => parseMetre(section.metre!));
    if (section.tempo !== undefined) locate({ ...where, path: `sections.${index}.tempo` }, () => parseTempo(section.tempo!));
  });
}

/** A value without its trace. */
function untraced({ length, rest, accent, roll, sound, ends }: Value): Value {
  const value: { -readonly [K in keyof Value]: Value[K] } = { length, rest };
  if (accent !== undefined) value.accent = accent;
  if (roll !== undefined) value.roll = roll;
  if (sound !== undefined) value.sound = sound;
  if (ends !== undefined) value.ends = ends;
  return value;
}

type Untraced = Pick<Statement, 'rhythm' | 'origins'>;

/** Rhythms made before: statements that share their values share their rhythm. */
const untracedOf = new WeakMap<Placed['values'], Untraced>();

function separate(values: Placed['values']): Untraced {
  let known = untracedOf.get(values);
  if (known === undefined) {
    known = { rhythm: values.map(untraced), origins: values.map((value) => (value.rest ? null : value.origin)) };
    untracedOf.set(values, known);
  }
  return known;
}

function toStatement(placed: Placed, section: string, index: number, sectionStart: Fraction): Statement {
  const { rhythm, origins } = separate(placed.values);
  const statement: { -readonly [K in keyof Statement]: Statement[K] } = {
    id: `${section}.${index}`,
    section,
    index,
    start: sectionStart.add(placed.start),
    length: placed.length,
    instrument: placed.instrument,
    subject: placed.subject,
    factor: placed.factor,
    reading: placed.reading,
    rotation: placed.rotation,
    mirrored: placed.mirrored,
    rhythm,
    origins,
  };
  // Fields that few statements have are put in afterwards: a spread for each would cost more than the rest of the statement.
  if (placed.assigned !== undefined) statement.assigned = placed.assigned;
  if (placed.rotationBy !== undefined) statement.rotationBy = placed.rotationBy;
  if (placed.repeats !== undefined && placed.repeats > 1) statement.repeats = placed.repeats;
  return statement;
}

const ordinal = (study: Study, statement: Statement): string => {
  const section = study.sections.find(({ id }) => id === statement.section)!;
  const what = statement.subject === null ? 'line' : 'statement';
  return `${what} ${statement.index + 1} of “${section.name}”`;
};

function refuseOverlaps(study: Study, name: string, own: readonly Statement[], places: Grid): void {
  own.forEach((next, index) => {
    const before = own[index - 1];
    if (before === undefined || endOf(before, places) <= places.ticks(next.start)) return;
    throw new EngineError(
      'overlap',
      `${name} would have to play two things at once: ${ordinal(study, before)} and ${ordinal(study, next)}. Give one of them to another instrument, or let it enter later.`,
      { section: next.section },
    );
  });
}

/**
 * Builds a study: what is played, when, and by what, all exact.
 * @param document - a study document; it is checked by `studySchema` first
 * @returns sections, statements and lines, every `start` from the study's start in whole notes
 * @throws EngineError with a code, a sentence, and the `section` or `path` at fault
 */
export function buildStudy(document: StudyInput): BuiltStudy {
  const study = parseStudy(document);
  checkIds(study);
  checkMetresAndTempos(study);
  const builder = new SectionBuilder(study);
  const sections: BuiltSection[] = [];
  const statements: Statement[] = [];
  let at = ZERO;
  for (const { id } of study.sections) {
    const { placed, length } = builder.content(id);
    sections.push({ id, start: at, length });
    placed.forEach((one, index) => statements.push(toStatement(one, id, index, at)));
    at = at.add(length);
  }
  const places = placesOf(statements, at);
  const lines = study.instruments.map(({ id, name }) => {
    const own = statementsOf(statements, id, places);
    refuseOverlaps(study, name, own, places);
    return { instrument: id, rhythm: assembleLine(own, at, places) };
  });
  const built = { sections, statements, lines, totalLength: at };
  return { ...built, palindrome: findPalindrome(study, built) };
}
