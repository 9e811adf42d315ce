import type { Fraction } from '../exact/fraction';
import { formatFraction } from '../exact/fraction';
import type { Study } from '../study/schema';
import type { BuiltStudy, Statement } from '../study/types';
import { type PlannedMeasure, measureAt, planMeasures } from './measures';

export type StatementEnd = {
  readonly statement: Statement;
  /** the measure that it ends in or before whose bar line it ends */
  readonly measure: PlannedMeasure;
  /** how much of that measure has gone by: above 0, 1 at its bar line */
  readonly within: Fraction;
};

/** Where a position falls that ends something: at a bar line it is the end of the measure before. */
function endAt(measures: readonly PlannedMeasure[], end: Fraction): Pick<StatementEnd, 'measure' | 'within'> | null {
  const found = measureAt(measures, end);
  if (found === undefined) return null;
  const measure = found.start.equals(end) && found.index > 0 ? measures[found.index - 1]! : found;
  return { measure, within: end.sub(measure.start).div(measure.length) };
}

/** Where every statement ends within its measure. @param measures - what `planMeasures` gives for the same study */
export function statementEnds(study: Study, built: BuiltStudy, measures: readonly PlannedMeasure[] = planMeasures(study, built)): StatementEnd[] {
  return built.statements.flatMap((statement) => {
    const end = endAt(measures, statement.start.add(statement.length));
    return end === null ? [] : [{ statement, ...end }];
  });
}

/** “ends with measure 9”, “ends 5/8 into measure 9”. */
export const endWords = ({ measure, within }: Pick<StatementEnd, 'measure' | 'within'>): string =>
  within.equals(1) ? `ends with measure ${measure.number}` : `ends ${formatFraction(within)} into measure ${measure.number}`;
