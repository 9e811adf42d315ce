import { EngineError } from '../errors';
import { ZERO } from '../exact/fraction';
import type { Value } from '../rhythm/types';
import type { Candidate } from './types';

export type TakenMeasures = {
  readonly rhythm: Value[];
  /** whether something struck earlier sounds on into the first measure: it is a rest there */
  readonly isCutBefore: boolean;
  /** whether the last attack sounds on beyond the last measure: it is shortened */
  readonly isCutAfter: boolean;
};

/**
 * Some measures of what was read.
 * @param from - place of the first among `measures`, from 0
 * @param to - place of the last, included
 * @throws EngineError `invalid_argument` where there are no such measures
 */
export function takeMeasures({ rhythm, measures }: Pick<Candidate, 'rhythm' | 'measures'>, from: number, to: number): TakenMeasures {
  const [first, last] = [measures[from], measures[to]];
  if (!first || !last || to < from) throw new EngineError('invalid_argument', `There are no such measures: this line has ${measures.length}.`);
  const [start, end] = [first.start, last.start.add(last.length)];
  const values: Value[] = [];
  let [isCutBefore, isCutAfter, at] = [false, false, ZERO];
  const rest = (length: Value['length']) => {
    const before = values.at(-1);
    if (before?.rest) values[values.length - 1] = { length: before.length.add(length), rest: true };
    else values.push({ length, rest: true });
  };
  for (const value of rhythm) {
    const [begins, ends] = [at, at.add(value.length)];
    at = ends;
    if (ends.compare(start) <= 0) continue;
    if (begins.compare(end) >= 0) break;
    const isLate = begins.compare(start) < 0;
    const isLong = ends.compare(end) > 0;
    const length = (isLong ? end : ends).sub(isLate ? start : begins);
    if (value.rest || isLate) rest(length);
    else values.push({ ...value, length });
    if (!value.rest && isLate) isCutBefore = true;
    if (!value.rest && isLong && !isLate) isCutAfter = true;
  }
  return { rhythm: values, isCutBefore, isCutAfter };
}
