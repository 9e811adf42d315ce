import type { NotationSymbol, PrintCell } from '@/engine';
import { soundsOf } from '@/lib/engraving/reach';
import { systemRows } from '@/lib/engraving/system-rows';
import type { DrawnScore, SystemSpec } from './spec';

/** CSS pixels: what a system begins with. */
const OPENING = 36;
const SIGNATURE = 34;
const REPEAT_SIGN = 18;
/** Pixels of a letter over the staff, and of the measure's number beside it. */
const LETTER = 6.4;
const NUMBER = 34;
/** under each staff where its name stands beneath it */
const NAME_BENEATH = 16;

/** Pixels are floating point: from here on, lengths are plain numbers. */
const pixelLength = ({ base, dots, tuplets }: NotationSymbol): number => {
  const [n = '1', d = '1'] = base.split('/');
  const written = (Number(n) / Number(d)) * (2 - 2 ** -dots);
  return tuplets.reduce((length, { actual, normal }) => (length * normal) / actual, written);
};

/** Where symbols begin within their measure, as plain numbers for the page. */
function onsets({ notes }: PrintCell): number[] {
  let at = 0;
  return notes.map(({ symbol }) => {
    const start = at;
    at += pixelLength(symbol);
    return start;
  });
}

/** The room that a measure asks for: every distinct onset of any staff, more for longer gaps, and what is said over it. */
function measureWidth(score: DrawnScore, index: number, words: number): number {
  const planned = score.measures[index]!;
  const starts = new Map<number, number>();
  for (const staff of score.staves) {
    if (staff.isSilent(index)) continue;
    const cell = staff.cell(index);
    const at = onsets(cell);
    cell.notes.forEach(({ symbol }, n) => {
      const key = Math.round(at[n]! * 1e7);
      starts.set(key, Math.max(starts.get(key) ?? 0, symbol.dots * 7 + (symbol.beams.length === 0 && symbol.base.length > 3 && !symbol.rest ? 6 : 0)));
    });
  }
  const sorted = [...starts.keys()].sort((a, b) => a - b);
  const length = planned.length.div(planned.scale).valueOf();
  const room = sorted.reduce((sum, key, n) => {
    const gap = ((sorted[n + 1] ?? length * 1e7) - key) / 1e7;
    return sum + 15 + 7 * Math.log2(1 + 32 * Math.max(gap, 0)) + starts.get(key)!;
  }, 0);
  const signature = planned.signature === null ? 0 : SIGNATURE;
  const { begins, times } = planned;
  const over = words === 0 ? 0 : NUMBER + words * LETTER;
  return Math.max(times === undefined ? 58 : 96, over, room + 26) + signature + (begins ? REPEAT_SIGN : 0) + (times === undefined ? 0 : REPEAT_SIGN);
}

export type BreakOptions = { readonly hideSilent: boolean; readonly namesBeneath: boolean; /** letters that are said over a measure, by its index */ readonly words: ReadonlyMap<number, number> };

/** Breaks measures into systems that fill the width, one at a time; a system keeps at least one measure. */
export function* breakSystems(score: DrawnScore, width: number, options: BreakOptions): Generator<SystemSpec, void, void> {
  const all = score.staves.map((_, index) => index);
  const count = score.printed.length;
  const natural: number[] = [];
  const naturalOf = (n: number): number => (natural[n] ??= measureWidth(score, score.printed[n]!, options.words.get(score.printed[n]!) ?? 0));
  let first = 0;
  while (first < count) {
    let end = first;
    let room = OPENING;
    while (end < count && (end === first || room + naturalOf(end) <= width)) {
      room += naturalOf(end);
      end += 1;
    }
    const isLast = end === count;
    const stretch = (width - OPENING) / (room - OPENING);
    const factor = isLast ? Math.min(stretch, 1.35) : stretch;
    const widths = natural.slice(first, end).map((one, index) => one * factor + (index === 0 ? OPENING : 0));
    const columns = score.printed.slice(first, end).map((measure) => ({ measure, length: 1 }));
    const heard = first === 0 || !options.hideSilent ? all : all.filter((staff) => columns.some(({ measure }) => !score.staves[staff]!.isSilent(measure)));
    const rows = systemRows(score, columns, heard.length > 0 ? heard : all.slice(0, 1), { saysTempos: false, beneath: options.namesBeneath ? NAME_BENEATH : 0 });
    yield { first, end, columns, widths, rows };
    first = end;
  }
}

/** What a system looks like, as text: the same text needs no new drawing. */
export function signatureOf({ columns, widths, rows }: SystemSpec, { measures, staves }: DrawnScore): string {
  const parts: string[] = [widths.map((width) => width.toFixed(1)).join(), String(measures.length)];
  const [from, to] = [columns[0]!.measure, columns.at(-1)!.measure];
  for (const { measure } of columns) {
    const { number, signature, begins, times } = measures[measure]!;
    parts.push(`${number}:${signature ?? ''}:${begins ?? ''}:${times ?? ''}`);
  }
  for (const { staff: number, middle } of rows.rows) {
    const staff = staves[number]!;
    parts.push(`${staff.id}/${middle}`);
    for (const { measure } of columns) {
      const { instrument, notes } = staff.cell(measure);
      parts.push(String(soundsOf(staff, instrument)));
      for (const { symbol: { base, dots, rest, tuplets, tiedFromBefore, tiedOn, beams }, accent, roll, sound, ends, fermata, statement, origin } of notes) {
        parts.push([base, dots, rest ? 'r' : 'n', tuplets.map((t) => `${t.actual}${t.starts ? '[' : ''}${t.stops ? ']' : ''}`).join('.'), tiedFromBefore, tiedOn, beams.join('.'), accent, roll, sound, ends, fermata, statement, origin].join());
      }
    }
    for (const one of staff.dynamics) {
      if (one.kind === 'level' && one.place.measure >= from && one.place.measure <= to) parts.push(`${one.text}${one.place.measure}+${one.place.offset.toFraction()}`);
      if (one.kind === 'hairpin' && one.from.measure <= to && one.to.measure >= from) parts.push(`${one.direction}${one.from.measure}+${one.from.offset.toFraction()}-${one.to.measure}+${one.to.offset.toFraction()}`);
    }
  }
  return parts.join('|');
}
