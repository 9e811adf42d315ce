import type { PrintScore } from '@/engine';
import { breakBest } from './break';
import { type Column, columnsOf } from './columns';
import { type MadeColumn, columnWidth, makeColumn } from './made-column';
import type { VexFlow } from './notes';
import { type SystemRows, systemRows } from './system-rows';

/** A system that has its columns and rows, and waits for a page. */
export type WaitingSystem = {
  readonly columns: readonly Column[];
  /** made anew each time: all the notes of a long score, and what is drawn of them, would fill a process's memory */
  readonly made: readonly MadeColumn[];
  readonly widths: readonly number[];
  readonly rows: SystemRows;
};

/** Stretched more than this, the last system is left short. */
const LAST_STRETCH = 1.3;
/** How much a break before a section is liked, beside the square of a stretch. */
const AT_SECTION = 0.35;

const isSilentIn = (score: PrintScore, staff: number, columns: readonly Column[]): boolean =>
  columns.every(({ measure, length }) => length > 1 || (score.staves[staff]!.isSilent(measure) && !score.staves[staff]!.cues.some((cue) => measure >= cue.first && measure < cue.first + cue.length)));

/** Gives the columns of a system their widths: as much over the least as there is, shared by what they like. */
function share(widths: readonly { least: number; natural: number }[], room: number, isLast: boolean): number[] {
  const natural = widths.reduce((sum, one) => sum + one.natural, 0);
  const least = widths.reduce((sum, one) => sum + one.least, 0);
  if (natural <= room) {
    const stretch = isLast ? Math.min(room / natural, LAST_STRETCH) : room / natural;
    return widths.map((one) => one.natural * stretch);
  }
  const part = natural === least ? 0 : Math.max(0, (room - least) / (natural - least));
  const given = widths.map((one) => one.least + (one.natural - one.least) * part);
  // A single measure that is wider than the page is pressed together: the page says so.
  return least > room ? given.map((one) => (one * room) / least) : given;
}

/**
 * Breaks a print into systems of a width: evenly, at sections where that costs little.
 * @param room - drawing units
 * @returns the systems, and the numbers of measures too wide for the page at this size
 */
export function layOutSystems(vf: VexFlow, score: PrintScore, room: number, options: { gatherRests: boolean; hideSilent: boolean }): { systems: WaitingSystem[]; tooWide: number[] } {
  const columns = columnsOf(score, options.gatherRests);
  const measured = columns.map((column) => {
    const made = makeColumn(vf, score, column);
    return { inner: columnWidth(vf, score, column, made, false), opening: columnWidth(vf, score, column, made, true) };
  });
  const inner = measured.map((one) => one.inner);
  const opening = measured.map((one) => one.opening);
  const sums: Record<'least' | 'natural', number[]> = { least: [0], natural: [0] };
  inner.forEach(({ least, natural }, index) => {
    sums.least.push(sums.least[index]! + least);
    sums.natural.push(sums.natural[index]! + natural);
  });
  const widthOf = (kind: 'least' | 'natural', first: number, end: number): number => opening[first]![kind] + sums[kind][end]! - sums[kind][first + 1]!;
  const isSection = (index: number): boolean => index === 0 || (score.measures[columns[index]!.measure]?.sections.length ?? 0) > 0;
  const cost = (first: number, end: number): number => {
    if (widthOf('least', first, end) > room) return Infinity;
    const natural = widthOf('natural', first, end);
    const isLast = end === columns.length;
    const stretch = room / natural;
    const badness = stretch >= 1 ? (isLast ? 0 : (stretch - 1) ** 2 * 2) : (1 / stretch - 1) ** 2 * 6;
    return badness + 0.05 - (isSection(first) ? AT_SECTION : 0);
  };
  const starts = breakBest(columns.length, cost);
  const systems = starts.map((first, n): WaitingSystem => {
    const end = starts[n + 1] ?? columns.length;
    const own = columns.slice(first, end);
    const staves = score.staves.map((_, index) => index);
    const heard = n === 0 || !options.hideSilent ? staves : staves.filter((staff) => !isSilentIn(score, staff, own));
    const widths = share(own.map((_, index) => (index === 0 ? opening[first]! : inner[first + index]!)), room, end === columns.length);
    const rows = systemRows(score, own, heard.length > 0 ? heard : staves.slice(0, 1));
    return {
      columns: own,
      get made() {
        return own.map((column) => makeColumn(vf, score, column));
      },
      widths,
      rows,
    };
  });
  const tooWide = starts.filter((first, n) => (starts[n + 1] ?? columns.length) - first === 1 && opening[first]!.least > room).map((first) => score.measures[columns[first]!.measure]!.number);
  return { systems, tooWide };
}
