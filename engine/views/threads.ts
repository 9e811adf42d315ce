import { type Fraction, ZERO } from '../exact/fraction';
import { attacks } from '../rhythm/measure';
import type { Statement } from '../study/types';

/** `in-time` places statements where they sound; the others lay them from one start, or to one end. */
export type ThreadReading = 'in-time' | 'from-one-start' | 'to-one-end';

export type ThreadTick = {
  /** from the left edge, in whole notes */
  readonly at: Fraction;
  /** from the start of the statement, in whole notes */
  readonly within: Fraction;
  /** index of its value in the statement's rhythm */
  readonly value: number;
  /** the subject's attack number, or null */
  readonly origin: number | null;
};

export type ThreadRow = {
  readonly statement: Statement;
  /** from the left edge, in whole notes */
  readonly start: Fraction;
  readonly ticks: readonly ThreadTick[];
};

/** The same attack in a statement and in the next: indexes into the ticks of both rows. */
export type Thread = { readonly row: number; readonly from: number; readonly to: number; readonly origin: number };

export type Threads = {
  readonly rows: readonly ThreadRow[];
  readonly threads: readonly Thread[];
  /** from the left edge to the farthest end, in whole notes */
  readonly extent: Fraction;
};

function leftEdge(statements: readonly Statement[], reading: ThreadReading): (statement: Statement) => Fraction {
  if (reading === 'from-one-start') return () => ZERO;
  if (reading === 'to-one-end') {
    const longest = statements.reduce((most, s) => (s.length.compare(most) > 0 ? s.length : most), ZERO);
    return (s) => longest.sub(s.length);
  }
  const first = statements.reduce((least, s) => (s.start.compare(least) < 0 ? s.start : least), statements[0]?.start ?? ZERO);
  return (s) => s.start.sub(first);
}

function link(row: number, above: ThreadRow, below: ThreadRow): Thread[] {
  const places = new Map<number, number[]>();
  below.ticks.forEach(({ origin }, index) => {
    if (origin !== null) places.set(origin, [...(places.get(origin) ?? []), index]);
  });
  return above.ticks.flatMap(({ origin }, from) => {
    const to = origin === null ? undefined : places.get(origin)?.shift();
    return origin === null || to === undefined ? [] : [{ row, from, to, origin }];
  });
}

/**
 * Statements as rows of ticks, each attack tied to the same attack of the next statement of the same subject.
 * @param statements - in order, e.g. those of one section
 */
export function threadsOf(statements: readonly Statement[], reading: ThreadReading): Threads {
  const left = leftEdge(statements, reading);
  const rows = statements.map((statement): ThreadRow => {
    const start = left(statement);
    const sounding = statement.rhythm.flatMap((value, index) => (value.rest ? [] : [index]));
    const times = attacks(statement.rhythm);
    return {
      statement,
      start,
      ticks: sounding.map((value, n) => ({
        at: start.add(times[n]!),
        within: times[n]!,
        value,
        origin: statement.origins[value] ?? null,
      })),
    };
  });
  const threads = rows.slice(1).flatMap((below, row) => {
    const above = rows[row]!;
    const isSame = above.statement.subject !== null && above.statement.subject === below.statement.subject;
    return isSame ? link(row, above, below) : [];
  });
  const extent = rows.reduce((most, { start, statement }) => {
    const end = start.add(statement.length);
    return end.compare(most) > 0 ? end : most;
  }, ZERO);
  return { rows, threads, extent };
}
