import type * as Vex from 'vexflow/bravura';
import type { PrintScore, StaffPlace } from '@/engine';
import type { Column } from './columns';
import { CLOSING, type MadeColumn, REPEAT_SIGN, openingOf } from './made-column';
import { type MadeCell, type MadeNote, type VexFlow, makeSilence } from './notes';
import { soundsOf } from './reach';
import { staffShape } from './shape';
import type { Row, SystemRows } from './system-rows';
import { addLine, addText, dynamicGlyphs, textWidth } from './text';
import { drawSaid } from './said';

/** A system that has been given its place. */
export type PlacedSystem = {
  readonly columns: readonly Column[];
  readonly made: readonly MadeColumn[];
  readonly widths: readonly number[];
  readonly rows: SystemRows;
  /** left edge of the staves */
  readonly x: number;
  readonly y: number;
};

/** Where everything of a drawn system is, in drawing units. */
export type DrawnSystem = {
  /** [position in whole notes that sound, x], in order, for the moving place */
  readonly places: readonly (readonly [number, number])[];
  readonly lefts: readonly number[];
  readonly right: number;
  readonly notes: readonly { readonly made: MadeNote; readonly staff: number; readonly middle: number }[];
  readonly beams: readonly Vex.Beam[];
  readonly tuplets: readonly Vex.Tuplet[];
};

/** “Damp” (SMuFL 1.4, percussion playing techniques, U+E7F9). */
const CHOKE = '\uE7F9';

type Spot = { readonly x: number; readonly at: number };
/** For each column, where its moments are, by offset in written whole notes. */
type Spots = readonly (readonly Spot[])[];

function xOf(spots: readonly Spot[], offset: number): number {
  const after = spots.findIndex(({ at }) => at >= offset - 1e-9);
  if (after === -1) return spots.at(-1)!.x;
  const b = spots[after]!;
  if (after === 0 || Math.abs(b.at - offset) < 1e-9) return b.x;
  const a = spots[after - 1]!;
  return a.x + ((b.x - a.x) * (offset - a.at)) / (b.at - a.at);
}

/** Bar lines, clef and signature of one staff in one column. */
function drawStave(vf: VexFlow, context: Vex.RenderContext, score: PrintScore, column: Column, index: number, sounds: number, x: number, middle: number, width: number): Vex.Stave {
  const { signature, begins, times } = score.measures[column.measure]!;
  const stave = new vf.Stave(x, middle - 60, width, { leftBar: index > 0 });
  stave.setConfigForLines(staffShape(sounds).lines.toReversed().map((visible) => ({ visible })));
  if (index === 0) stave.addClef('percussion');
  if (signature !== null) stave.addTimeSignature(signature);
  if (begins) stave.setBegBarType(vf.BarlineType.REPEAT_BEGIN);
  if (times !== undefined) stave.setEndBarType(vf.BarlineType.REPEAT_END);
  else if (column.measure + column.length === score.measures.length || column.measure === score.printed.at(-1)) stave.setEndBarType(vf.BarlineType.END);
  return stave.setContext(context);
}

function drawDynamics(vf: VexFlow, group: Element, score: PrintScore, { columns, rows, y }: PlacedSystem, spots: Spots): void {
  const last = columns.at(-1)!;
  const [from, to] = [columns[0]!.measure, last.measure + last.length - 1];
  const columnOf = (measure: number): number => columns.findLastIndex((column) => column.measure <= measure);
  const x = ({ measure, offset }: StaffPlace): number => xOf(spots[Math.max(0, columnOf(measure))]!, offset.valueOf());
  for (const { staff, middle, dynamics } of rows.rows) {
    const baseline = y + middle + dynamics;
    const ends: { left: number; right: number }[] = [];
    for (const one of score.staves[staff]!.dynamics) {
      if (one.kind !== 'level' || one.place.measure < from || one.place.measure > to) continue;
      const text = one.isMark ? dynamicGlyphs(one.text) : one.text;
      const style = one.isMark ? { size: 40, isMusic: true } : { size: 15, style: 'italic' as const };
      const width = textWidth(vf, text, style);
      const measure = score.measures[one.place.measure]!;
      const isAtEnd = one.place.offset.equals(measure.length.div(measure.scale));
      const left = Math.min(Math.max(x(one.place) - (isAtEnd ? width : one.isMark ? 3 : 0), spots[0]![0]!.x - 8), spots.at(-1)!.at(-1)!.x + 8 - width);
      addText(group, left, baseline, text, style).setAttribute('data-dynamic', one.text);
      ends.push({ left, right: left + width });
    }
    for (const one of score.staves[staff]!.dynamics) {
      if (one.kind !== 'hairpin' || one.from.measure > to || one.to.measure < from) continue;
      const [isOpenLeft, isOpenRight] = [one.from.measure < from, one.to.measure > to];
      let left = isOpenLeft ? spots[0]![0]!.x : x(one.from);
      let right = isOpenRight ? spots.at(-1)!.at(-1)!.x : x(one.to);
      for (const end of ends) {
        if (end.left <= left + 12 && end.right > left - 4) left = Math.max(left, end.right + 4);
        if (end.right >= right - 12 && end.left < right + 4 && end.left > left) right = Math.min(right, end.left - 4);
      }
      if (right - left < 8) continue;
      const wide = 5.5;
      // Broken over two systems, it goes on as wide as it was left.
      const [a, b] = one.direction === 'louder' ? [isOpenLeft ? wide * 0.5 : 0, isOpenRight ? wide * 0.6 : wide] : [isOpenLeft ? wide * 0.5 : wide, isOpenRight ? wide * 0.6 : 0];
      const middleLine = baseline - 5;
      addLine(group, left, middleLine - a, right, middleLine - b);
      addLine(group, left, middleLine + a, right, middleLine + b);
    }
  }
}

/** Ties, ringing on and stopped short: what leads from one note to the next or away from it. */
function drawLinks(vf: VexFlow, context: Vex.RenderContext, group: Element, notes: readonly MadeNote[], before: MadeNote | null): MadeNote | null {
  let previous = before;
  for (const one of notes) {
    const { symbol, ends } = one.from;
    if (symbol.tiedFromBefore) {
      new vf.StaveTie({ firstNote: previous?.note ?? null, lastNote: one.note, firstIndexes: [0], lastIndexes: [0] }).setDirection(1).setContext(context).draw();
    }
    const [headY = 0] = one.note.getYs();
    if (ends === 'let-ring') {
      const x = one.note.getTieRightX() + 2;
      const arc = `M${x} ${headY + 5}C${x + 5} ${headY + 11} ${x + 12} ${headY + 11} ${x + 18} ${headY + 7}C${x + 12} ${headY + 13} ${x + 5} ${headY + 13} ${x} ${headY + 5}Z`;
      const path = group.ownerDocument.createElementNS('http://www.w3.org/2000/svg', 'path');
      path.setAttribute('d', arc);
      path.setAttribute('fill', 'currentColor');
      path.setAttribute('data-let-ring', '');
      group.appendChild(path);
    }
    if (ends === 'choke') {
      const top = one.note.hasStem() ? one.note.getStemExtents().topY : headY - 6;
      addText(group, one.note.getAbsoluteX() + 6, top - (one.from.accent ? 20 : 5), CHOKE, { size: 40, isMusic: true, anchor: 'middle' }).setAttribute('data-choke', '');
    }
    previous = one;
  }
  return previous;
}

/**
 * Draws one system.
 * @param group - takes what is not VexFlow's own
 * @param options.says - whether numbers, letters, names and tempos are drawn too
 */
export function drawSystem(vf: VexFlow, context: Vex.RenderContext, group: Element, score: PrintScore, system: PlacedSystem, { says = true }: { says?: boolean } = {}): DrawnSystem {
  const { columns, made, widths, rows, x: left, y } = system;
  const drawn: { made: MadeNote; staff: number; middle: number }[] = [];
  const places: [number, number][] = [];
  const spots: Spot[][] = [];
  const lefts: number[] = [];
  const beams: Vex.Beam[] = [];
  const tuplets: Vex.Tuplet[] = [];
  const previous: (MadeNote | null)[] = rows.rows.map(() => null);
  let x = left;
  columns.forEach((column, index) => {
    const planned = score.measures[column.measure]!;
    const width = widths[index]!;
    const music = made[index]!;
    lefts.push(x);
    const soundsAt = ({ staff }: Row): number => soundsOf(score.staves[staff]!, score.staves[staff]!.cell(column.measure).instrument);
    const staves = rows.rows.map((row) => drawStave(vf, context, score, column, index, soundsAt(row), x, y + row.middle, width));
    const start = Math.max(x + openingOf(vf, score, column, index === 0), ...staves.map((stave) => stave.getNoteStartX()));
    for (const stave of staves) stave.setNoteStartX(start).draw();
    if (index === 0) drawBrackets(vf, context, score, rows.rows, staves);
    const closing = CLOSING + (planned.times === undefined ? 0 : REPEAT_SIGN);
    if (music.voices.length > 0) music.formatter.format([...music.voices], x + width - start - closing);
    const scale = planned.scale.valueOf();
    const from = planned.start.valueOf();
    const length = planned.length.valueOf() / scale;
    const own: Spot[] = [];
    rows.rows.forEach((row, n) => {
      const stave = staves[n]!;
      const staff = score.staves[row.staff]!;
      if (column.length > 1) {
        new vf.MultiMeasureRest(column.length, { numberOfMeasures: column.length, line: 2, numberLine: 0.4 }).setStave(stave).setContext(context).draw();
        previous[n] = null;
        return;
      }
      const cue = music.cues[row.staff] ?? null;
      const cell = music.cells[row.staff] ?? (cue === null ? makeSilence(vf, staff.cell(column.measure)) : null);
      if (cue !== null) placeCell(context, stave, cue);
      if (cell === null) return;
      if (music.cells[row.staff] === null) new vf.Formatter().format([cell.voice], x + width - start);
      placeCell(context, stave, cell);
      beams.push(...cell.beams);
      tuplets.push(...cell.tuplets);
      for (const one of cell.notes) {
        if (!cell.cell.silent) own.push({ at: one.from.at.valueOf(), x: one.note.getAbsoluteX() });
        if (!one.from.symbol.rest) places.push([from + one.from.at.valueOf() * scale, one.note.getAbsoluteX()]);
        drawn.push({ made: one, staff: row.staff, middle: y + row.middle });
      }
      previous[n] = cell.cell.silent ? null : drawLinks(vf, context, group, cell.notes, previous[n] ?? null);
    });
    places.push([from, start]);
    x += width;
    own.push({ at: 0, x: start }, { at: length, x: x - 10 });
    spots.push(own.sort((a, b) => a.at - b.at).filter((spot, n, all) => n === 0 || spot.at - all[n - 1]!.at > 1e-9));
  });
  for (const last of previous) {
    if (last?.from.symbol.tiedOn) new vf.StaveTie({ firstNote: last.note, lastNote: null, firstIndexes: [0], lastIndexes: [0] }).setDirection(1).setContext(context).draw();
  }
  drawDynamics(vf, group, score, system, spots);
  if (says) drawSaid(vf, group, score, system, lefts, x);
  const end = columns.at(-1)!;
  const lastMeasure = score.measures[end.measure + end.length - 1]!;
  places.push([lastMeasure.start.valueOf() + lastMeasure.length.valueOf(), x - 6]);
  return { places: places.sort((a, b) => a[0] - b[0]), lefts, right: x, notes: drawn, beams, tuplets };
}

/** Stems take their beamed lengths before accents are placed above them. */
function placeCell(context: Vex.RenderContext, stave: Vex.Stave, { notes, beams, tuplets, voice }: MadeCell): void {
  for (const { note } of notes) note.setStave(stave);
  for (const beam of beams) beam.postFormat();
  voice.draw(context, stave);
  for (const beam of beams) beam.setContext(context).draw();
  for (const tuplet of tuplets) tuplet.setContext(context).draw();
}

function drawBrackets(vf: VexFlow, context: Vex.RenderContext, score: PrintScore, rows: readonly Row[], staves: readonly Vex.Stave[]): void {
  if (staves.length < 2) return;
  const connect = (a: number, b: number, type: 'singleLeft' | 'bracket'): void => new vf.StaveConnector(staves[a]!, staves[b]!).setType(type).setContext(context).draw();
  connect(0, staves.length - 1, 'singleLeft');
  for (const { first, length } of score.groups) {
    const own = rows.flatMap(({ staff }, n) => (staff >= first && staff < first + length ? [n] : []));
    if (own.length > 1) connect(own[0]!, own.at(-1)!, 'bracket');
  }
}
