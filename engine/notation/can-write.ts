import { type CountedLine, piecesOf } from './pieces';
import type { Change } from './plan';
import { measureSpeller } from './spell-measure';

/** Whether a line can be written, looked at from one value on, for so many measures. */
export function canWrite(line: CountedLine, changes: readonly Change[], from = 0, measures = Infinity): boolean {
  const { canSpell } = measureSpeller(line.grid.denominator);
  let seen = 0;
  for (const { frame, ends } of piecesOf(line, changes, from)) {
    if (!canSpell(frame.metre, ends)) return false;
    seen += 1;
    if (seen === measures) break;
  }
  return true;
}
