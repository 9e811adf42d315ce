import { EngineError } from '../errors';
import { type Fraction, ZERO, toFraction } from '../exact/fraction';
import type { Grid } from '../exact/grid';
import { LIMITS } from '../limits';
import { metreOfLength, parseMetre } from '../rhythm/metre';
import type { MetrePlan } from './types';

/** A metre, its measure's length, and where it begins. */
export type Change = { readonly at: Fraction; readonly metre: string; readonly length: Fraction };

/**
 * The metres of a line in order of their place; of two at one place the later in the plan holds.
 * @throws EngineError `invalid_metre` where there is none or one cannot be read, `invalid_argument` where none begins at 0 or
 *   one begins before it
 */
export function readPlan(plan: MetrePlan): Change[] {
  const given = typeof plan === 'string' ? [{ at: ZERO, metre: plan }] : plan;
  const changes = given
    .map(({ at, metre }): Change => {
      const { text, length } = parseMetre(metre);
      return { at: toFraction(at), metre: text, length };
    })
    .sort((a, b) => a.at.compare(b.at));
  if (changes.length === 0) throw new EngineError('invalid_metre', 'A line needs a metre.');
  if (!changes[0]!.at.equals(ZERO)) throw new EngineError('invalid_argument', 'The first metre of a line begins at 0.');
  return changes.filter(({ at }, index) => !changes[index + 1]?.at.equals(at));
}

/** One measure to be filled; places are ticks from the start of the line. */
export type Frame = { readonly start: number; readonly end: number; readonly metre: string };

/**
 * The measures that hold a line of so many ticks, one after another.
 * @throws EngineError `too_large` beyond the limit of measures, `invalid_metre` where a measure is cut to a length of no metre
 */
export function* framesOf(changes: readonly Change[], grid: Grid, total: number): Generator<Frame, void, undefined> {
  let count = 0;
  for (const [index, change] of changes.entries()) {
    const next = changes[index + 1];
    const length = grid.ticks(change.length);
    const until = next === undefined ? Infinity : grid.ticks(next.at);
    for (let start = grid.ticks(change.at); start < total && start < until; start += length) {
      count += 1;
      if (count > LIMITS.measures) throw new EngineError('too_large', `A line may have ${LIMITS.measures} measures.`);
      const end = Math.min(start + length, until);
      yield { start, end, metre: end < start + length ? cutMetre(grid.fraction(end - start), change.metre, count) : change.metre };
    }
  }
}

/** @throws EngineError `invalid_metre`, naming the measure */
function cutMetre(length: Fraction, metre: string, measure: number): string {
  try {
    return metreOfLength(length, metre);
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    throw new EngineError(error.code, `Measure ${measure} is cut short by a change of metre. ${error.message}`);
  }
}
