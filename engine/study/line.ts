import { type Fraction, ZERO } from '../exact/fraction';
import type { Value } from '../rhythm/types';
import type { Statement } from './types';

/** Where a value of a line comes from; null for the rests between statements. */
export type LineSource = { readonly statement: Statement; readonly value: number } | null;

/** The statements that an instrument plays, in order of time. */
export const statementsOf = (statements: readonly Statement[], instrument: string): Statement[] =>
  statements
    .filter((s) => s.instrument === instrument && s.rhythm.length > 0)
    .sort((a, b) => a.start.compare(b.start));

/**
 * The whole piece of one instrument: its statements with rests between, all of `totalLength`, and where each value comes
 * from. The statements must not overlap.
 */
export function assembleLine(
  statements: readonly Statement[],
  totalLength: Fraction,
): { values: Value[]; sources: LineSource[] } {
  const values: Value[] = [];
  const sources: LineSource[] = [];
  let at = ZERO;
  const restUntil = (position: Fraction) => {
    if (position.compare(at) <= 0) return;
    values.push({ length: position.sub(at), rest: true });
    sources.push(null);
  };
  for (const statement of statements) {
    restUntil(statement.start);
    statement.rhythm.forEach((value, index) => {
      values.push(value);
      sources.push({ statement, value: index });
    });
    at = statement.start.add(statement.length);
  }
  restUntil(totalLength);
  return { values, sources };
}
