import type * as Vex from 'vexflow/bravura';
import type { NotationSymbol, PrintCell, PrintNote } from '@/engine';
import { CHOKE } from './reach';
import type { StaffShape } from './shape';

export type VexFlow = typeof Vex;

const DURATIONS: Record<NotationSymbol['base'], string> = {
  '2': '1/2',
  '1': '1',
  '1/2': '2',
  '1/4': '4',
  '1/8': '8',
  '1/16': '16',
  '1/32': '32',
  '1/64': '64',
  '1/128': '128',
  '1/256': '256',
};

/** The ratios that a bracket shows as one figure; others are written out, such as 5:3. */
const PLAIN_RATIOS = new Set(['3:2', '5:4', '6:4', '7:4', '9:8', '2:3', '4:3']);

/** A note as VexFlow draws it, with what it came from. */
export type MadeNote = { readonly note: Vex.StaveNote; readonly from: PrintNote };
/** A measure of a staff, ready to be placed. */
export type MadeCell = {
  readonly cell: PrintCell;
  readonly notes: readonly MadeNote[];
  readonly beams: readonly Vex.Beam[];
  readonly tuplets: readonly Vex.Tuplet[];
  readonly voice: Vex.Voice;
};

/** VexFlow 5.0.0 knows nothing shorter than a 128th: it would draw a 256th as a quarter. Flags and rest are SMuFL's (1.4, U+E24A, U+E4EB). */
function giveSixFlags(vf: VexFlow, note: Vex.StaveNote, rest: boolean): void {
  if (rest) {
    Reflect.set(note, 'glyphProps', { ...note.getGlyphProps(), codeHead: '\uE4EB' });
    for (const head of note.noteHeads) head.setText('\uE4EB');
    return;
  }
  // Its own copy: what VexFlow hands out is shared by all quarters.
  Reflect.set(note, 'glyphProps', { ...note.getGlyphProps(), beamCount: 6, stemBeamExtension: 30, codeFlagUp: '\uE24A' });
  note.setStemDirection(vf.Stem.UP);
}

function makeNote(vf: VexFlow, from: PrintNote, { keys }: StaffShape, isCue: boolean): Vex.StaveNote {
  const { symbol } = from;
  const Note = isCue ? vf.GraceNote : vf.StaveNote;
  const note = new Note({
    keys: [symbol.rest ? 'b/4' : keys[Math.min(from.sound - 1, keys.length - 1)]!],
    duration: `${DURATIONS[symbol.base]}${symbol.rest ? 'r' : ''}`,
    dots: symbol.dots,
    stemDirection: vf.Stem.UP,
  });
  if (symbol.base === '1/256') giveSixFlags(vf, note, symbol.rest);
  for (let dot = 0; dot < symbol.dots; dot += 1) vf.Dot.buildAndAttach([note], { all: true });
  const above = (type: string): void => {
    const articulation = new vf.Articulation(type).setPosition(vf.ModifierPosition.ABOVE);
    // VexFlow puts it onto the head of a note without a stem.
    if (!symbol.rest && (symbol.base === '1' || symbol.base === '2')) articulation.setYShift(-8);
    note.addModifier(articulation, 0);
  };
  if (from.accent) above(from.accent === 'accent' ? 'a>' : 'a^');
  if (from.fermata) above('a@a');
  if (from.roll) note.addModifier(new vf.Tremolo(3), 0);
  return note;
}

/** A measure in which nothing sounds: one rest in its middle. */
export function makeSilence(vf: VexFlow, cell: PrintCell): MadeCell {
  const from = cell.notes[0]!;
  const note = new vf.StaveNote({ keys: ['b/4'], duration: '1r', alignCenter: true });
  if (cell.notes.some(({ fermata }) => fermata)) note.addModifier(new vf.Articulation('a@a').setPosition(vf.ModifierPosition.ABOVE), 0);
  return { cell, notes: [{ note, from }], beams: [], tuplets: [], voice: voiceOf(vf, [note]) };
}

const voiceOf = (vf: VexFlow, notes: Vex.StaveNote[]): Vex.Voice => new vf.Voice({ numBeats: 4, beatValue: 4 }).setMode(vf.VoiceMode.SOFT).addTickables(notes);

function makeTuplets(vf: VexFlow, notes: readonly MadeNote[]): Vex.Tuplet[] {
  const tuplets: Vex.Tuplet[] = [];
  const open: MadeNote[][] = [];
  for (const one of notes) {
    one.from.symbol.tuplets.forEach((mark, depth) => {
      if (mark.starts) open[depth] = [];
      open[depth]?.push(one);
      const group = open[depth];
      if (!mark.stops || group === undefined) return;
      const isBeamed = group.length > 1 && group.every(({ from }) => from.symbol.beams.length > 0) && group[0]!.from.symbol.beams[0] === 'begin' && group.at(-1)!.from.symbol.beams[0] === 'end';
      tuplets.push(
        new vf.Tuplet(group.map(({ note }) => note), {
          numNotes: mark.actual,
          notesOccupied: mark.normal,
          bracketed: !isBeamed,
          ratioed: !PLAIN_RATIOS.has(`${mark.actual}:${mark.normal}`),
          location: 1,
          // VexFlow does not know of the sign over a note that is stopped short.
          ...(group.some(({ from }) => from.ends === 'choke') ? { yOffset: -CHOKE } : {}),
        }),
      );
    });
  }
  return tuplets;
}

function makeBeams(vf: VexFlow, notes: readonly MadeNote[]): Vex.Beam[] {
  const beams: Vex.Beam[] = [];
  let group: MadeNote[] = [];
  for (const one of notes) {
    const first = one.from.symbol.beams[0];
    if (first === undefined) continue;
    if (first === 'begin') group = [];
    group.push(one);
    // Of six beams VexFlow draws five: notes so short keep their flags.
    if (first !== 'end' || group.length < 2 || group.some(({ from }) => from.symbol.base === '1/256')) continue;
    const beam = new vf.Beam(group.map(({ note }) => note));
    beam.renderOptions.flatBeams = true;
    beams.push(beam);
    // A level that ends and begins again between two symbols is a secondary break.
    const breaks = group.flatMap(({ from }, index) => (from.symbol.beams[1] === 'end' && group[index + 1]?.from.symbol.beams[1] === 'begin' ? [index + 1] : []));
    if (breaks.length > 0) beam.breakSecondaryAt(breaks);
    group.forEach(({ from }, index) =>
      from.symbol.beams.forEach((mark, level) => {
        if (mark === 'forward hook') beam.setPartialBeamSideAt(index, 'R');
        if (mark === 'backward hook' && level > 0) beam.setPartialBeamSideAt(index, 'L');
      }),
    );
  }
  return beams;
}

/** A measure of a staff: notes, brackets and beams, not yet placed. */
export function makeCell(vf: VexFlow, cell: PrintCell, shape: StaffShape, isCue = false): MadeCell {
  if (cell.silent) return makeSilence(vf, cell);
  const notes = cell.notes.map((from): MadeNote => ({ note: makeNote(vf, from, shape, isCue), from }));
  const tuplets = makeTuplets(vf, notes);
  const beams = makeBeams(vf, notes);
  return { cell, notes, tuplets, beams, voice: voiceOf(vf, notes.map(({ note }) => note)) };
}
