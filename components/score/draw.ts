import type * as Vex from 'vexflow/bravura';
import type { NotationSymbol } from '@/engine';
import { REPEAT_SIGN, SYSTEM_TOP, onsets } from './layout';
import type { DrawnScore, DrawnStaff, SystemSpec } from './spec';

type VexFlow = typeof Vex;
let loading: Promise<VexFlow> | null = null;

/** VexFlow and its fonts, loaded once, before the first staff is drawn. */
export function loadVexFlow(): Promise<VexFlow> {
  loading ??= import('vexflow/bravura').then(async (vexflow) => {
    await Promise.all([document.fonts.load('30px Bravura'), document.fonts.load('30px Academico'), document.fonts.load('bold 30px Academico')]);
    return vexflow;
  });
  return loading;
}

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

/** Lines of a five-line staff that are drawn, and the place of each sound, for so many sounds. */
function staffShape(sounds: number): { lines: boolean[]; keys: string[] } {
  const only = (...visible: number[]) => [0, 1, 2, 3, 4].map((line) => visible.includes(line));
  if (sounds <= 1) return { lines: only(2), keys: ['b/4'] };
  if (sounds === 2) return { lines: only(1, 3), keys: ['g/4', 'd/5'] };
  if (sounds === 3) return { lines: only(1, 2, 3), keys: ['g/4', 'b/4', 'd/5'] };
  if (sounds === 4) return { lines: only(0, 1, 2, 3, 4), keys: ['f/4', 'a/4', 'c/5', 'e/5'] };
  if (sounds === 5) return { lines: only(0, 1, 2, 3, 4), keys: ['e/4', 'g/4', 'b/4', 'd/5', 'f/5'] };
  return { lines: only(0, 1, 2, 3, 4), keys: ['c/4', 'd/4', 'e/4', 'f/4', 'g/4', 'a/4', 'b/4', 'c/5', 'd/5', 'e/5', 'f/5', 'g/5'] };
}

/** The ratios that a bracket shows as one figure; others are written out, such as 5:3. */
const PLAIN_RATIOS = new Set(['3:2', '5:4', '6:4', '7:4', '9:8', '2:3', '4:3']);

type Note = { note: Vex.StaveNote; symbol: NotationSymbol; at: number };

function makeNotes(vf: VexFlow, staff: DrawnStaff, measureIndex: number): Note[] {
  const measure = staff.measures[measureIndex]!;
  const { keys } = staffShape(staff.sounds);
  if (measure.symbols.every((symbol) => symbol.rest)) {
    const note = new vf.StaveNote({ keys: ['b/4'], duration: '1r', alignCenter: true });
    return [{ note, symbol: measure.symbols[0]!, at: 0 }];
  }
  const at = onsets(measure);
  return measure.symbols.map((symbol, index) => {
    const value = symbol.value === null ? undefined : staff.values[symbol.value];
    const key = symbol.rest ? 'b/4' : keys[Math.min((value?.sound ?? 1) - 1, keys.length - 1)]!;
    const note = new vf.StaveNote({
      keys: [key],
      duration: `${DURATIONS[symbol.base]}${symbol.rest ? 'r' : ''}`,
      dots: symbol.dots,
      stemDirection: vf.Stem.UP,
    });
    for (let dot = 0; dot < symbol.dots; dot += 1) vf.Dot.buildAndAttach([note], { all: true });
    if (!symbol.rest && value?.accent && !symbol.tiedFromBefore) {
      const accent = new vf.Articulation(value.accent === 'accent' ? 'a>' : 'a^');
      note.addModifier(accent.setPosition(vf.ModifierPosition.ABOVE), 0);
    }
    if (!symbol.rest && value?.roll) note.addModifier(new vf.Tremolo(3), 0);
    return { note, symbol, at: at[index]! };
  });
}

function makeTuplets(vf: VexFlow, notes: readonly Note[]): Vex.Tuplet[] {
  const tuplets: Vex.Tuplet[] = [];
  const open: Vex.StaveNote[][] = [];
  for (const { note, symbol } of notes) {
    symbol.tuplets.forEach((mark, depth) => {
      if (mark.starts) open[depth] = [];
      open[depth]?.push(note);
      if (mark.stops && open[depth]) {
        const group = open[depth]!;
        const isBeamed = group.length > 1 && notes.filter((one) => group.includes(one.note)).every((one) => one.symbol.beams.length > 0);
        tuplets.push(
          new vf.Tuplet(group, {
            numNotes: mark.actual,
            notesOccupied: mark.normal,
            bracketed: !isBeamed,
            ratioed: !PLAIN_RATIOS.has(`${mark.actual}:${mark.normal}`),
            location: 1,
          }),
        );
      }
    });
  }
  return tuplets;
}

function makeBeams(vf: VexFlow, notes: readonly Note[]): Vex.Beam[] {
  const beams: Vex.Beam[] = [];
  let group: Note[] = [];
  for (const one of notes) {
    const first = one.symbol.beams[0];
    if (first === undefined) continue;
    if (first === 'begin') group = [];
    group.push(one);
    if (first === 'end' && group.length > 1) {
      const beam = new vf.Beam(group.map(({ note }) => note));
      beam.renderOptions.flatBeams = true;
      beams.push(beam);
      // A level that ends and begins again between two symbols is a secondary break.
      const breaks = group.flatMap(({ symbol }, index) => {
        const next = group[index + 1]?.symbol;
        const ends = symbol.beams[1] === 'end' && next?.beams[1] === 'begin';
        return ends ? [index + 1] : [];
      });
      if (breaks.length > 0) beam.breakSecondaryAt(breaks);
      group.forEach(({ symbol }, index) => {
        symbol.beams.forEach((mark, level) => {
          if (mark === 'forward hook') beam.setPartialBeamSideAt(index, 'R');
          if (mark === 'backward hook' && level > 0) beam.setPartialBeamSideAt(index, 'L');
        });
      });
    }
  }
  return beams;
}

export type SystemDrawing = {
  /** [position in whole notes, x in CSS pixels], in order, for the moving place */
  readonly places: readonly (readonly [number, number])[];
  /** left edge of each measure, in CSS pixels */
  readonly measureLefts: readonly number[];
  /** right edge, in CSS pixels */
  readonly width: number;
};

/**
 * Draws one system into `host`, which is emptied first. VexFlow asks for the least width of each measure before it is
 * placed; a system that needs more than the page has is drawn wider and scaled down, so that nothing collides.
 */
export function drawSystem(vf: VexFlow, host: HTMLDivElement, score: DrawnScore, spec: SystemSpec): SystemDrawing {
  host.replaceChildren();
  const { staves, first, end } = spec;
  const columns = Array.from({ length: end - first }, (_, column) =>
    staves.map((staff) => {
      const notes = staff.measures[first + column] === undefined ? [] : makeNotes(vf, staff, first + column);
      const tuplets = makeTuplets(vf, notes);
      const beams = makeBeams(vf, notes);
      const voice = new vf.Voice({ numBeats: 4, beatValue: 4 }).setMode(vf.VoiceMode.SOFT).addTickables(notes.map(({ note }) => note));
      return { notes, tuplets, beams, voice };
    }),
  );
  const formatters = columns.map((cells) => {
    const formatter = new vf.Formatter();
    const voices = cells.filter(({ notes }) => notes.length > 0).map(({ voice }) => voice);
    for (const voice of voices) formatter.joinVoices([voice]);
    return { voices, formatter, least: voices.length === 0 ? 0 : formatter.preCalculateMinTotalWidth(voices) };
  });
  const openings = columns.map((_, column) => {
    const probe = new vf.Stave(0, 0, 100);
    if (column === 0) probe.addClef('percussion');
    const { signature } = score.measures[first + column]!;
    if (signature !== null) probe.addTimeSignature(signature);
    if (score.signs?.[first + column]?.begins) probe.setBegBarType(vf.BarlineType.REPEAT_BEGIN);
    return probe.getNoteStartX() + 14;
  });
  const widths = spec.widths.map((width, column) => Math.max(width, formatters[column]!.least * 1.08 + openings[column]! + 12));
  const asked = widths.reduce((a, b) => a + b, 0);
  const given = spec.widths.reduce((a, b) => a + b, 0);
  const scale = Math.min(1, given / asked);

  const renderer = new vf.Renderer(host, vf.Renderer.Backends.SVG);
  renderer.resize(given + 1, spec.height);
  const context = renderer.getContext();
  context.scale(scale, 1 === scale ? 1 : scale);
  context.setFillStyle('currentColor');
  context.setStrokeStyle('currentColor');

  const places: [number, number][] = [];
  const measureLefts: number[] = [];
  const previous: (Note | null)[] = staves.map(() => null);
  let x = 0;
  columns.forEach((cells, column) => {
    const planned = score.measures[first + column]!;
    const width = widths[column]!;
    measureLefts.push(x * scale);
    const drawn = staves.map((staff, row) => {
      const stave = new vf.Stave(x, SYSTEM_TOP / scale + (row * spec.pitch) / scale - 22, width, { leftBar: column > 0 });
      stave.setConfigForLines(staffShape(staff.sounds).lines.toReversed().map((visible) => ({ visible })));
      if (column === 0) stave.addClef('percussion');
      if (planned.signature !== null) stave.addTimeSignature(planned.signature);
      const { begins, times } = score.signs?.[first + column] ?? {};
      if (begins) stave.setBegBarType(vf.BarlineType.REPEAT_BEGIN);
      if (times !== undefined) stave.setEndBarType(vf.BarlineType.REPEAT_END);
      else if (first + column === score.measures.length - 1) stave.setEndBarType(vf.BarlineType.END);
      return stave;
    });
    const start = Math.max(...drawn.map((stave) => stave.getNoteStartX()));
    drawn.forEach((stave) => stave.setNoteStartX(start).setContext(context).draw());
    if (column === 0 && staves.length > 1) {
      const line = new vf.StaveConnector(drawn[0]!, drawn.at(-1)!);
      line.setType('singleLeft').setContext(context).draw();
    }
    const { formatter, voices } = formatters[column]!;
    if (voices.length > 0) formatter.format(voices, drawn[0]!.getNoteEndX() - start - 12 - (score.signs?.[first + column]?.times === undefined ? 0 : REPEAT_SIGN / 2));
    const from = planned.start.valueOf();
    // Written lengths last so much longer.
    const sounding = planned.scale.valueOf();
    places.push([from, start * scale]);
    cells.forEach(({ notes, voice, beams, tuplets }, row) => {
      if (notes.length === 0) return;
      const stave = drawn[row]!;
      for (const { note } of notes) note.setStave(stave);
      // Stems take their beamed lengths before accents are placed above them.
      for (const beam of beams) beam.postFormat();
      voice.draw(context, stave);
      for (const beam of beams) beam.setContext(context).draw();
      for (const tuplet of tuplets) tuplet.setContext(context).draw();
      for (const one of notes) {
        const { symbol, note } = one;
        mark(staves[row]!, one);
        if (!symbol.rest) places.push([from + one.at * sounding, note.getAbsoluteX() * scale]);
        if (symbol.tiedFromBefore) {
          new vf.StaveTie({ firstNote: previous[row]?.note ?? null, lastNote: note, firstIndexes: [0], lastIndexes: [0] })
            .setDirection(1)
            .setContext(context)
            .draw();
        }
        previous[row] = one;
      }
    });
    x += width;
  });
  previous.forEach((last) => {
    if (last?.symbol.tiedOn) {
      new vf.StaveTie({ firstNote: last.note, lastNote: null, firstIndexes: [0], lastIndexes: [0] }).setDirection(1).setContext(context).draw();
    }
  });
  const lastMeasure = score.measures[end - 1]!;
  places.push([lastMeasure.start.valueOf() + lastMeasure.length.valueOf(), x * scale - 6]);
  host.querySelector('svg')?.setAttribute('aria-hidden', 'true');
  return { places: places.sort((a, b) => a[0] - b[0]), measureLefts, width: x * scale };
}

/** Tells the page which statement and attack a drawn note belongs to. */
function mark(staff: DrawnStaff, { note, symbol }: Note): void {
  const element = note.getSVGElement();
  const source = symbol.value === null ? null : staff.sources[symbol.value];
  if (!element || !source || symbol.rest) return;
  element.dataset.statement = source.statement;
  if (source.origin !== null) element.dataset.origin = String(source.origin);
}

