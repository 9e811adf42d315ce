import type { PrintScore, TempoMark } from '@/engine';
import type { PlacedSystem } from './draw-system';
import { LETTER_TEXT, NUMBER_ROOM, NUMBER_TEXT, SECTION_TEXT, cueAt } from './made-column';
import type { VexFlow } from './notes';
import { RUN_ABOVE, cellReach, soundsOf } from './reach';
import { namedFirst } from './system-rows';
import { addElement, addText, textWidth, valueGlyphs } from './text';

const ENTRY_TEXT = { size: 13, weight: 'bold' } as const;
const CHANGE_TEXT = { size: 13, style: 'italic' } as const;
const TEMPO_TEXT = { size: 15, weight: 'bold' } as const;

/** Words and note values side by side. @returns where they end */
function run(vf: VexFlow, group: Element, x: number, y: number, pieces: readonly { text: string; isMusic?: boolean }[]): number {
  let at = x;
  for (const { text, isMusic = false } of pieces) {
    const style = isMusic ? { size: 26, isMusic } : TEMPO_TEXT;
    addText(group, at, y, text, style);
    at += textWidth(vf, text, style) + (isMusic ? 3 : 5);
  }
  return at;
}

const glyphPieces = (glyphs: readonly string[]) => glyphs.flatMap((text, index) => [...(index > 0 ? [{ text: 'tied to' }] : []), { text, isMusic: true }]);

/** “dotted quarter = quarter (quarter = 56)” in symbols. */
export function drawTempo(vf: VexFlow, group: Element, x: number, y: number, { beat, perMinute, equivalence }: TempoMark): number {
  const pieces: { text: string; isMusic?: boolean }[] = [];
  const before = equivalence === null ? null : valueGlyphs(equivalence.before);
  const after = equivalence === null ? null : valueGlyphs(equivalence.after);
  const isEquivalent = before !== null && after !== null;
  if (isEquivalent) pieces.push(...glyphPieces(before), { text: '=' }, ...glyphPieces(after), { text: '(' });
  pieces.push(...glyphPieces(valueGlyphs(beat) ?? []), { text: `= ${perMinute.toFraction(true)}${isEquivalent ? ')' : ''}` });
  return run(vf, group, x, y, pieces);
}

/** What stands over a system: measure numbers, rehearsal letters, sections, tempos, times of a repeat; and names of instruments within it. */
export function drawSaid(vf: VexFlow, group: Element, score: PrintScore, { columns, rows, y }: PlacedSystem, lefts: readonly number[], right: number): void {
  columns.forEach(({ measure, length }, index) => {
    const { letter, sections, tempo, number, times } = score.measures[measure]!;
    const left = lefts[index]!;
    const end = lefts[index + 1] ?? right;
    const letters = y + rows.letters;
    let x = left + 2;
    if (number > 0) {
      addText(group, x, letters, String(number), NUMBER_TEXT).setAttribute('data-measure', String(number));
      x += NUMBER_ROOM;
    }
    if (letter !== null) {
      const width = textWidth(vf, letter, LETTER_TEXT) + 8;
      addElement(group, 'rect', { x, y: letters - 14, width, height: 18, fill: 'none', stroke: 'currentColor', 'stroke-width': 1.1 });
      addText(group, x + 4, letters, letter, LETTER_TEXT).setAttribute('data-letter', letter);
      x += width + 6;
    }
    const names = sections.map(({ name }) => name).join(' · ');
    if (names !== '') addText(group, x, letters, names, SECTION_TEXT).setAttribute('data-section', sections[0]!.id);
    if (times !== undefined) addText(group, end - 4, letters, `${times} times`, { ...SECTION_TEXT, size: 13, anchor: 'end' });
    if (tempo !== null) drawTempo(vf, group, left + 2, y + rows.tempo, tempo);
    for (const { staff, middle } of rows.rows) {
      const own = score.staves[staff]!;
      const named = own.changes.find(({ said, entry }) => entry === measure || (said >= measure && said < measure + length));
      const cue = cueAt(own, measure);
      const first = namedFirst(score, staff, measure);
      const cell = own.cell(measure);
      const top = y + middle - Math.max(length > 1 ? RUN_ABOVE : 0, cellReach(cell, soundsOf(own, cell.instrument)).above) - 4;
      const nameOf = (id: string): string => own.instruments.find((one) => one.id === id)?.name ?? '';
      if (named !== undefined) {
        const isEntry = named.entry === measure;
        addText(group, left + 14, top, isEntry ? nameOf(named.instrument) : `To ${nameOf(named.instrument)}`, isEntry ? ENTRY_TEXT : CHANGE_TEXT);
      } else if (first !== null) {
        addText(group, left + 14, top, first, ENTRY_TEXT);
      } else if (cue?.index === 0) addText(group, left + 14, y + middle - 38, `(${cue.cue.name})`, { size: 11.5, style: 'italic' });
    }
  });
}
