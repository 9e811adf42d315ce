import type { Bracket } from './brackets';
import { type MetreNode, innerNode, unitNodes } from './tree';

/**
 * The tree of what a bracket holds: its units, in its own coordinates, where positions are multiplied by `actual`. Six units
 * are three pairs, nine are three threes, five and seven have nothing between bracket and unit.
 * @param least - the shortest symbol, in the bracket's coordinates
 */
export function bracketTree({ start, end, actual, normal }: Bracket, whole: number, least: number): MetreNode {
  const span = end - start;
  // Written units shorter than a quarter are beamed as one group, longer ones each for itself.
  const isShort = span * 4 < whole * normal;
  if (actual === 2 || actual === 4) return innerNode(0, actual * span, least, true);
  if (actual === 6 || actual === 9) {
    const size = actual === 6 ? 2 : 3;
    const thirds = Array.from({ length: 3 }, (_, n): MetreNode => {
      const at = n * size * span;
      return size === 2
        ? innerNode(at, at + 2 * span, least, !isShort)
        : { kind: 'units', start: at, end: at + 3 * span, parts: unitNodes(at, span, 3, least, false), dottedRest: true, beamed: !isShort };
    });
    return { kind: 'units', start: 0, end: actual * span, parts: thirds, dottedRest: false, beamed: isShort };
  }
  return { kind: 'units', start: 0, end: actual * span, parts: unitNodes(0, span, actual, least, !isShort), dottedRest: true, beamed: isShort };
}
