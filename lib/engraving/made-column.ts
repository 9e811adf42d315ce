import type * as Vex from 'vexflow/bravura';
import type { Cue, PrintScore, PrintStaff } from '@/engine';
import type { Column } from './columns';
import { type MadeCell, type VexFlow, makeCell } from './notes';
import { soundsOf } from './reach';
import { staffShape } from './shape';
import { textWidth } from './text';

/** A column's music, asked for its least width, not yet placed. */
export type MadeColumn = {
  /** one for each staff of the score; null where it is silent */
  readonly cells: readonly (MadeCell | null)[];
  /** small notes of somebody else, for each staff */
  readonly cues: readonly (MadeCell | null)[];
  readonly formatter: Vex.Formatter;
  readonly voices: readonly Vex.Voice[];
  /** the least that VexFlow asks for, without what stands before the first note */
  readonly least: number;
};

export const cueAt = ({ cues }: PrintStaff, measure: number): { cue: Cue; index: number } | null => {
  const cue = cues.find(({ first, length }) => measure >= first && measure < first + length);
  return cue === undefined ? null : { cue, index: measure - cue.first };
};

/** @param soundsBy - how many sounds an instrument of the study has, for cues */
export function makeColumn(vf: VexFlow, { staves }: PrintScore, { measure, length }: Column): MadeColumn {
  const cells = staves.map((staff) => (length > 1 || staff.isSilent(measure) ? null : makeCell(vf, staff.cell(measure), staffShape(soundsOf(staff, staff.cell(measure).instrument)))));
  const cues = staves.map((staff) => {
    const at = length > 1 ? null : cueAt(staff, measure);
    const cell = at?.cue.cells[at.index];
    return cell === undefined || cell.silent ? null : makeCell(vf, cell, staffShape(1), true);
  });
  const formatter = new vf.Formatter();
  const voices = [...cells, ...cues].flatMap((cell) => (cell === null ? [] : [cell.voice]));
  for (const voice of voices) formatter.joinVoices([voice]);
  return { cells, cues, formatter, voices, least: voices.length === 0 ? 0 : formatter.preCalculateMinTotalWidth([...voices]) };
}

/** What stands before the first note of a column. */
export function openingOf(vf: VexFlow, score: PrintScore, { measure }: Column, isFirst: boolean): number {
  const probe = new vf.Stave(0, 0, 100);
  if (isFirst) probe.addClef('percussion');
  const { signature, begins } = score.measures[measure]!;
  if (signature !== null) probe.addTimeSignature(signature);
  if (begins) probe.setBegBarType(vf.BarlineType.REPEAT_BEGIN);
  return probe.getNoteStartX();
}

const REST_RUN = 96;
/** After the last note. */
export const CLOSING = 12;
export const REPEAT_SIGN = 10;

/** The letter and the names of sections over a column. */
export const SECTION_TEXT = { size: 15, weight: 'bold' } as const;
export const LETTER_TEXT = { size: 15, weight: 'bold' } as const;
export const NUMBER_TEXT = { size: 11 } as const;
export const NUMBER_ROOM = 22;

/** Room for what is said over a column, so that it never runs into what is said over the next. */
function saidWidth(vf: VexFlow, score: PrintScore, { measure }: Column): number {
  const { letter, sections, tempo, number } = score.measures[measure]!;
  const letterWidth = letter === null ? 0 : textWidth(vf, letter, LETTER_TEXT) + 14;
  const names = sections.map(({ name }) => name).join(' · ');
  const over = (number > 0 ? NUMBER_ROOM : 0) + letterWidth + (names === '' ? 0 : textWidth(vf, names, SECTION_TEXT) + 16);
  const changes = score.staves.flatMap((staff) =>
    staff.changes.flatMap(({ instrument, said, entry }) => {
      const name = staff.instruments.find(({ id }) => id === instrument)?.name ?? '';
      return said === measure && said !== entry ? [`To ${name}`] : entry === measure ? [name] : [];
    }),
  );
  return Math.max(over, tempo === null ? 0 : 150, ...changes.map((text) => textWidth(vf, text, { size: 13, style: 'italic' }) + 20));
}

/**
 * The least width of a column and the one it would like, its opening not counted.
 * @param shortest - how much more than VexFlow's least a column likes to have
 */
export function columnWidth(vf: VexFlow, score: PrintScore, column: Column, made: MadeColumn, isFirst: boolean): { least: number; natural: number } {
  const { times } = score.measures[column.measure]!;
  const opening = openingOf(vf, score, column, isFirst);
  const closing = CLOSING + (times === undefined ? 0 : REPEAT_SIGN);
  const timesRoom = times === undefined ? 0 : 40 + NUMBER_ROOM;
  const body = column.length > 1 ? REST_RUN : Math.max(made.voices.length === 0 ? 46 : 0, made.least * 1.12 + 8);
  const least = Math.max(opening + body + closing, saidWidth(vf, score, column) + timesRoom);
  return { least, natural: Math.max(least, opening + body * 1.28 + closing) };
}
