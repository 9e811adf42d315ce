import type { BeamMark, NotationSymbol } from './types';
import { BEAM_LEVELS } from './written';

/** A symbol with the beam group that it falls in; symbols of different groups are not beamed together. */
export type Beamable = { readonly symbol: Omit<NotationSymbol, 'beams'>; readonly group: number };

function marksOf(levels: readonly number[], index: number): BeamMark[] {
  const own = levels[index]!;
  const before = levels[index - 1] ?? 0;
  const after = levels[index + 1] ?? 0;
  return Array.from({ length: own }, (_, n): BeamMark => {
    const level = n + 1;
    const left = before >= level;
    const right = after >= level;
    if (left && right) return 'continue';
    if (left) return 'end';
    if (right) return 'begin';
    return index === 0 ? 'forward hook' : 'backward hook';
  });
}

/**
 * Beams by beat group, broken at rests and at the edges of brackets (check values 11.5: one beam group a beat).
 * @returns the marks of each symbol, the first beam level first
 */
export function beamsOf(items: readonly Beamable[]): BeamMark[][] {
  const result: BeamMark[][] = items.map(() => []);
  let from = 0;
  const close = (to: number) => {
    if (to - from > 1) {
      const levels = items.slice(from, to).map(({ symbol }) => BEAM_LEVELS[symbol.base]);
      for (let index = from; index < to; index += 1) result[index] = marksOf(levels, index - from);
    }
    from = to;
  };
  items.forEach(({ symbol, group }, index) => {
    const can = !symbol.rest && BEAM_LEVELS[symbol.base] > 0;
    const last = items[index - 1];
    const joins = index > from && last !== undefined && last.group === group && !symbol.tuplets[0]?.starts && !last.symbol.tuplets[0]?.stops;
    if (!can) {
      close(index);
      from = index + 1;
    } else if (!joins) close(index);
  });
  close(items.length);
  return result;
}
