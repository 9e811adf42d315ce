import type { PrintScore } from '@/engine';
import type { Column } from './columns';
import { cueAt } from './made-column';
import { DYNAMICS, NAMED, RUN_ABOVE, type Reach, cellReach, soundsOf } from './reach';

/** A staff as it stands in a system. */
export type Row = {
  /** number of the staff among the score's */
  readonly staff: number;
  /** from the system's top to its middle line */
  readonly middle: number;
  /** from the middle line to the baseline of its dynamics */
  readonly dynamics: number;
  /** from the system's top to the lower edge of all that is its own */
  readonly bottom: number;
};
export type SystemRows = {
  readonly rows: readonly Row[];
  /** from the system's top: baselines of what is said over it */
  readonly tempo: number;
  readonly letters: number;
  readonly height: number;
};

const LETTERS_ROOM = 24;
const TEMPO_ROOM = 24;
const BETWEEN = 9;

/** The instrument that a part begins with, where its staff is for several. */
export function namedFirst({ part, staves }: PrintScore, staff: number, measure: number): string | null {
  const own = staves[staff]!;
  if (part === null || measure !== 0 || own.instruments.length < 2) return null;
  return own.instruments.find(({ id }) => id === own.cell(0).instrument)?.name ?? null;
}

/** Whether any dynamic of a staff stands in these columns. */
function hasDynamics(score: PrintScore, staff: number, from: number, to: number): boolean {
  return score.staves[staff]!.dynamics.some((one) => (one.kind === 'level' ? one.place.measure >= from && one.place.measure <= to : one.from.measure <= to && one.to.measure >= from));
}

function rowReach(score: PrintScore, staff: number, columns: readonly Column[]): Reach & { dynamics: number } {
  const own = score.staves[staff]!;
  let [above, below, isNamed] = [0, 0, false];
  for (const { measure, length } of columns) {
    const cell = own.cell(measure);
    const reach = cellReach(cell, soundsOf(own, cell.instrument));
    above = Math.max(above, length > 1 ? RUN_ABOVE : reach.above);
    below = Math.max(below, reach.below);
    const cue = cueAt(own, measure);
    if (cue !== null) above = Math.max(above, 34);
    isNamed ||= cue?.index === 0 || own.changes.some(({ said, entry }) => (said >= measure && said < measure + length) || entry === measure) || namedFirst(score, staff, measure) !== null;
  }
  const first = columns[0]!.measure;
  const last = columns.at(-1)!;
  const dynamics = below + DYNAMICS.baseline;
  const isMarked = hasDynamics(score, staff, first, last.measure + last.length - 1);
  return { above: above + (isNamed ? NAMED : 0), below: isMarked ? below + DYNAMICS.room : below, dynamics };
}

/** Places the rows of a system one below another so that nothing of one reaches into the next. */
export function systemRows(
  score: PrintScore,
  columns: readonly Column[],
  staves: readonly number[],
  { saysTempos = true, beneath = 0 }: { saysTempos?: boolean; /** room for names under each row */ beneath?: number } = {},
): SystemRows {
  const said = columns.map(({ measure }) => score.measures[measure]!);
  const tempo = saysTempos && said.some((measure) => measure.tempo !== null) ? TEMPO_ROOM : 0;
  let y = tempo + LETTERS_ROOM;
  const rows = staves.map((staff): Row => {
    const { above, below, dynamics } = rowReach(score, staff, columns);
    const middle = y + above;
    y = middle + below + beneath + BETWEEN;
    return { staff, middle, dynamics, bottom: middle + below };
  });
  return { rows, tempo: tempo === 0 ? 0 : TEMPO_ROOM - 8, letters: tempo + LETTERS_ROOM - 8, height: y };
}
