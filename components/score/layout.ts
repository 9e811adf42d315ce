import type { NotationMeasure, NotationSymbol } from '@/engine';
import type { DrawnScore, DrawnStaff, SystemSpec } from './spec';

/** CSS pixels: what a system begins with, and the room about a staff. */
export const OPENING = 36;
export const SIGNATURE = 34;
export const REPEAT_SIGN = 18;
/** from one staff to the next where names stand beside them, and where they stand beneath */
export const STAFF_PITCH = { beside: 80, beneath: 94 } as const;
export const SYSTEM_TOP = 34;
export const SYSTEM_GAP = 26;

/** Pixels are floating point: from here on, lengths are plain numbers. */
const pixelLength = ({ base, dots, tuplets }: NotationSymbol): number => {
  const [n = '1', d = '1'] = base.split('/');
  const written = (Number(n) / Number(d)) * (2 - 2 ** -dots);
  return tuplets.reduce((length, { actual, normal }) => (length * normal) / actual, written);
};

/** Where symbols begin within their measure, as plain numbers for the page. */
export function onsets(measure: NotationMeasure): number[] {
  let at = 0;
  return measure.symbols.map((symbol) => {
    const start = at;
    at += pixelLength(symbol);
    return start;
  });
}

const isSilent = (measure: NotationMeasure): boolean => measure.symbols.every((symbol) => symbol.rest);

/** The room that a measure asks for: every distinct onset of any staff, more for longer gaps. */
export function measureWidth(score: DrawnScore, index: number): number {
  const planned = score.measures[index]!;
  const starts = new Map<number, number>();
  for (const staff of score.staves) {
    const measure = staff.measures[index];
    if (measure === undefined || isSilent(measure)) continue;
    const at = onsets(measure);
    measure.symbols.forEach((symbol, n) => {
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
  const { begins, times, room: above = 0 } = score.signs?.[index] ?? {};
  return Math.max(times === undefined ? 58 : 96, above, room + 26) + signature + (begins ? REPEAT_SIGN : 0) + (times === undefined ? 0 : REPEAT_SIGN);
}

/** Breaks measures into systems that fill the width; a system keeps at least one measure. */
export function breakSystems(score: DrawnScore, width: number, options: { hideSilent: boolean; pitch: number }): SystemSpec[] {
  const natural = score.measures.map((_, index) => measureWidth(score, index));
  const systems: SystemSpec[] = [];
  let first = 0;
  while (first < natural.length) {
    let end = first;
    let room = OPENING;
    while (end < natural.length && (end === first || room + natural[end]! <= width)) {
      room += natural[end]!;
      end += 1;
    }
    const isLast = end === natural.length;
    const stretch = (width - OPENING) / (room - OPENING);
    const factor = isLast ? Math.min(stretch, 1.35) : stretch;
    const widths = natural.slice(first, end).map((one, index) => one * factor + (index === 0 ? OPENING : 0));
    const staves = systems.length === 0 || !options.hideSilent ? score.staves : sounding(score.staves, first, end);
    systems.push({ first, end, widths, staves, pitch: options.pitch, height: SYSTEM_TOP + staves.length * options.pitch + SYSTEM_GAP });
    first = end;
  }
  return systems;
}

function sounding(staves: readonly DrawnStaff[], first: number, end: number): readonly DrawnStaff[] {
  const heard = staves.filter((staff) => staff.measures.slice(first, end).some((measure) => !isSilent(measure)));
  return heard.length > 0 ? heard : staves.slice(0, 1);
}

/** What a system looks like, as text: the same text needs no new drawing. */
export function signatureOf(spec: SystemSpec, { measures, signs }: Pick<DrawnScore, 'measures' | 'signs'>): string {
  const parts: string[] = [spec.widths.map((width) => width.toFixed(1)).join()];
  for (let index = spec.first; index < spec.end; index += 1) parts.push(`${measures[index]!.number}:${measures[index]!.signature ?? ''}:${signs?.[index]?.begins ?? ''}:${signs?.[index]?.times ?? ''}`);
  for (const staff of spec.staves) {
    parts.push(`${staff.id}/${staff.name}/${staff.sounds}`);
    for (const measure of staff.measures.slice(spec.first, spec.end)) {
      for (const { base, dots, rest, tuplets, tiedFromBefore, tiedOn, beams, value } of measure.symbols) {
        const own = value === null ? undefined : staff.values[value];
        const source = value === null ? null : staff.sources[value];
        parts.push(
          [base, dots, rest ? 'r' : 'n', tuplets.map((t) => `${t.actual}${t.starts ? '[' : ''}${t.stops ? ']' : ''}`).join('.'), tiedFromBefore, tiedOn, beams.join('.'), own?.accent, own?.roll, own?.sound, source?.statement, source?.origin].join(),
        );
      }
    }
  }
  return parts.join('|');
}
