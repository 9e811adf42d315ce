import type { PrintCell, PrintNote, PrintStaff } from '@/engine';
import { lineReach, staffShape, stepsOf } from './shape';

/** Drawing units, ten a staff space: how far a row reaches above and below its middle line. */
export type Reach = { readonly above: number; readonly below: number };

const FIVE_LINES = 22;
/** The number over measures of rest. */
export const RUN_ABOVE = 46;
const STEM = 36;
/** Stems grow by so much for each beam or flag beyond the second. */
const LEVEL = 9;
const ACCENT = { accent: 13, strong: 17 } as const;
const FERMATA = 24;
/** A bracket stands so high where nothing stands under it, and a line of ten for each sign under it (VexFlow's tuplets). */
const BRACKET = 50;
const BRACKET_TEXT = 20;
const INNER = 16;
/** Lines of text that VexFlow counts for a sign. */
const TEXT_LINES = { accent: 2, strong: 2.5, fermata: 4 } as const;
export const CHOKE = 20;

/** From the middle line to the top of a note's head or stem. */
function stemTop({ symbol, fermata }: PrintNote, steps: number): number {
  if (symbol.rest) return fermata ? 26 : 18;
  if (symbol.base === '1' || symbol.base === '2') return steps * 5 + 16;
  const levels = Math.max(0, Math.log2(Number(symbol.base.split('/')[1] ?? 1)) - 4);
  return steps * 5 + STEM + levels * LEVEL;
}

const over = ({ accent, fermata, ends }: PrintNote): number => (accent === undefined ? 0 : ACCENT[accent]) + (fermata ? FERMATA : 0) + (ends === 'choke' ? CHOKE : 0);

/** The tops of notes: under one beam, all stems reach as high as the highest. */
function tops(notes: readonly PrintNote[], stepsAt: (note: PrintNote) => number): number[] {
  const found = notes.map((note) => stemTop(note, stepsAt(note)));
  let first: number | null = null;
  notes.forEach(({ symbol }, index) => {
    if (symbol.beams[0] === 'begin') first = index;
    if (symbol.beams[0] !== 'end' || first === null) return;
    const highest = Math.max(...found.slice(first, index + 1));
    found.fill(highest, first, index + 1);
    first = null;
  });
  return found;
}

/** The top of the figure over a note in brackets. */
function bracketTop({ symbol, accent, fermata, ends }: PrintNote, top: number): number {
  const nesting = symbol.tuplets.length;
  if (nesting === 0) return 0;
  const lines = (accent === undefined ? 0 : TEXT_LINES[accent]) + (fermata ? TEXT_LINES.fermata : 0);
  const overSigns = lines === 0 ? 0 : top + 5 * (lines + 1) + 20;
  return Math.max(top + 10, BRACKET + 10 * lines, overSigns) + BRACKET_TEXT + (nesting - 1) * INNER + (ends === 'choke' ? CHOKE : 0);
}

/** How far a measure reaches, everything about its notes counted. */
export function cellReach({ notes, silent }: PrintCell, sounds: number): Reach {
  const shape = staffShape(sounds);
  const lines = lineReach(shape);
  // Bar lines and signatures stand as tall as five lines on every staff.
  if (silent) return { above: FIVE_LINES + (notes.some(({ fermata }) => fermata) ? FERMATA : 0), below: FIVE_LINES };
  let above: number = FIVE_LINES;
  let below = Math.max(FIVE_LINES, lines.below + 4);
  const stepsAt = ({ symbol, sound }: PrintNote): number => (symbol.rest ? 0 : stepsOf(shape.keys[Math.min(sound - 1, shape.keys.length - 1)]!));
  const reached = tops(notes, stepsAt);
  notes.forEach((note, index) => {
    above = Math.max(above, reached[index]! + over(note), bracketTop(note, reached[index]!));
    below = Math.max(below, (note.symbol.rest ? 18 : 8) - stepsAt(note) * 5);
  });
  return { above, below };
}

/** How many sounds an instrument is drawn with. */
export const soundsOf = (staff: PrintStaff, instrument: string): number => staff.instruments.find(({ id }) => id === instrument)?.sounds ?? 1;

/** From the lowest thing of a row down to the baseline of its dynamics, and on to their lower edge. */
export const DYNAMICS = { baseline: 15, room: 24 } as const;
/** Over a row, where a change of instrument or a cue is named. */
export const NAMED = 18;
