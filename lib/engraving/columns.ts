import { type PrintScore, restRuns } from '@/engine';

/** What stands between two bar lines: a measure, or several of rest. */
export type Column = {
  /** index of its first measure */
  readonly measure: number;
  /** measures of rest that it stands for; 1 where it is one measure */
  readonly length: number;
};

/** The columns of a print, measures of rest gathered in a part. */
export function columnsOf(score: PrintScore, gatherRests: boolean): Column[] {
  const runs = gatherRests ? restRuns(score) : [];
  const ahead = [...runs];
  const columns: Column[] = [];
  for (let n = 0; n < score.printed.length; ) {
    const run = ahead[0]?.first === n ? ahead.shift() : undefined;
    columns.push({ measure: score.printed[n]!, length: run?.length ?? 1 });
    n += run?.length ?? 1;
  }
  return columns;
}
