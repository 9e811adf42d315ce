import type { BeamMark, NotationSymbol } from './types';
import { BEAM_LEVELS } from './written';

/** A symbol with its place; symbols of different groups are not beamed together. */
export type Beamable = {
  readonly symbol: Pick<NotationSymbol, 'base' | 'rest' | 'tuplets'>;
  readonly group: number;
  /** where it begins, in integers of its measure or bracket */
  readonly at: number;
  /** integers of one written whole note there */
  readonly whole: number;
};

/** A part of a beam points to the side with which its symbol makes up the next longer value. */
function hook({ at, whole }: Beamable, level: number, isFirst: boolean, isLast: boolean): BeamMark {
  if (isFirst || isLast) return isFirst ? 'forward hook' : 'backward hook';
  return at % (whole / 2 ** (level + 1)) === 0 ? 'forward hook' : 'backward hook';
}

function marksOf(group: readonly Beamable[], index: number): BeamMark[] {
  const levelsOf = (n: number): number => {
    const one = group[n];
    return one === undefined ? 0 : BEAM_LEVELS[one.symbol.base];
  };
  return Array.from({ length: levelsOf(index) }, (_, n): BeamMark => {
    const level = n + 1;
    const left = levelsOf(index - 1) >= level;
    const right = levelsOf(index + 1) >= level;
    if (left && right) return 'continue';
    if (left) return 'end';
    if (right) return 'begin';
    return hook(group[index]!, level, index === 0, index === group.length - 1);
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
      const group = items.slice(from, to);
      for (let index = from; index < to; index += 1) result[index] = marksOf(group, index - from);
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
