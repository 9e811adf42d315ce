import type { Fraction } from '../exact/fraction';
import { type Grid, gridFor } from '../exact/grid';
import type { Value } from '../rhythm/types';
import { silenced } from '../transform/rotate';
import type { Statement } from './types';

/** Where a value of a line comes from; null for the rests between statements. */
export type LineSource = { readonly statement: Statement; readonly value: number } | null;

/** One grid for where all statements of a study begin and end. @throws EngineError `too_fine` */
export const placesOf = (statements: readonly Statement[], totalLength: Fraction): Grid =>
  gridFor([totalLength, ...statements.flatMap(({ start, length }) => [start, length])], totalLength.mul(2));

/** Where a statement ends, in ticks from the study's start. */
export const endOf = ({ start, length }: Statement, places: Grid): number => places.ticks(start) + places.ticks(length);

/** A statement that is shared out, as one of its instruments plays it: the others' attacks are rests. */
function partOf(statement: Statement, instrument: string): Statement {
  let attack = 0;
  const rhythm = statement.rhythm.map((value) => (value.rest || statement.assigned![attack++] === instrument ? value : silenced(value)));
  return { ...statement, rhythm };
}

/** The statements that an instrument plays, alone or with others, in order of time. */
export const statementsOf = (statements: readonly Statement[], instrument: string, places: Grid): Statement[] =>
  statements
    .filter((s) => (s.instrument === instrument || s.assigned?.includes(instrument)) && s.rhythm.length > 0)
    .map((s) => (s.assigned === undefined ? s : partOf(s, instrument)))
    .sort((a, b) => places.ticks(a.start) - places.ticks(b.start));

type Gap = { readonly rest: Fraction };

/** What a line is made of, in order: statements, and the gaps before, between and after them. They must not overlap. */
function spansOf(statements: readonly Statement[], totalLength: Fraction, places: Grid): (Statement | Gap)[] {
  const spans: (Statement | Gap)[] = [];
  let at = 0;
  const restUntil = (position: number) => {
    if (position > at) spans.push({ rest: places.fraction(position - at) });
  };
  for (const statement of statements) {
    restUntil(places.ticks(statement.start));
    spans.push(statement);
    at = endOf(statement, places);
  }
  restUntil(places.ticks(totalLength));
  return spans;
}

/** The whole piece of one instrument: its statements with rests between, all of `totalLength`. */
export function assembleLine(statements: readonly Statement[], totalLength: Fraction, places: Grid): Value[] {
  const values: Value[] = [];
  for (const span of spansOf(statements, totalLength, places)) {
    if ('rest' in span) values.push({ length: span.rest, rest: true });
    else for (const value of span.rhythm) values.push(value);
  }
  return values;
}

/** Where each value of `assembleLine` comes from. */
export function lineSources(statements: readonly Statement[], totalLength: Fraction, places: Grid): LineSource[] {
  const sources: LineSource[] = [];
  for (const span of spansOf(statements, totalLength, places)) {
    if ('rest' in span) sources.push(null);
    else span.rhythm.forEach((_, value) => sources.push({ statement: span, value }));
  }
  return sources;
}
