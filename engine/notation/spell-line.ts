import type { Rhythm } from '../rhythm/types';
import { canWrite } from './can-write';
import { nearestForLine } from './nearest';
import { type MeasurePieces, countLine, piecesOf } from './pieces';
import { readPlan } from './plan';
import { type SpelledSymbol, measureSpeller } from './spell-measure';
import { SpellingError } from './spelling-error';
import type { MetrePlan, NotationMeasure, NotationSymbol } from './types';

/**
 * Spells a line of music in a metre, or in changes of metre: ties, dots, rests, tuplets, beams.
 * @param plan - a metre, or metres with the places where each begins a new measure, in any order; a measure cut short by a
 *   change is written in a metre of its own length. A change to the same metre cuts too: so a pickup is written
 * @returns measures whose symbols add up exactly, the last filled with rests; no measures for a line of no values, which has
 *   nothing to write. A silent measure holds rests that add up to it: drawing may show them as one measure's rest. Rests side
 *   by side in the rhythm are spelled each for itself
 * @throws SpellingError `unspellable` with the measure, the value, and the nearest factors that can be written
 * @throws EngineError `too_large`, `too_fine`, `invalid_metre`, `invalid_argument`
 * @example spellLine(parseRhythm('5/16'), '4/4') // a quarter tied to a sixteenth, then rests
 */
export function spellLine(rhythm: Rhythm, plan: MetrePlan): NotationMeasure[] {
  const changes = readPlan(plan);
  const line = countLine(rhythm, changes);
  const { spell } = measureSpeller(line.grid.denominator);
  const measures: NotationMeasure[] = [];
  for (const pieces of piecesOf(line, changes)) {
    const { frame, first, ends, rests } = pieces;
    const spelled = spell(frame.metre, ends, rests);
    if (typeof spelled === 'number') {
      const value = Math.min(first + spelled, rhythm.length - 1);
      throw new SpellingError(measures.length, value, rhythm[value]!.length, nearestForLine(line, changes, value));
    }
    measures.push({
      start: line.grid.fraction(frame.start),
      metre: frame.metre,
      symbols: spelled.map((symbol) => toSymbol(symbol, pieces, rhythm.length)),
    });
  }
  return measures;
}

/** Whether a line can be spelled: the same question without the symbols. @throws EngineError as `spellLine`, but for `unspellable` */
export function canSpell(rhythm: Rhythm, plan: MetrePlan): boolean {
  const changes = readPlan(plan);
  return canWrite(countLine(rhythm, changes), changes);
}

function toSymbol({ piece, isFirst, isLast, symbol }: SpelledSymbol, { first, ends, tiedIn, tiedOut }: MeasurePieces, values: number): NotationSymbol {
  const value = first + piece;
  const { base, dots, rest, tuplets, beams } = symbol;
  return {
    base,
    dots,
    rest,
    tuplets,
    beams,
    tiedFromBefore: !rest && (!isFirst || (piece === 0 && tiedIn)),
    tiedOn: !rest && (!isLast || (piece === ends.length - 1 && tiedOut)),
    value: value < values ? value : null,
  };
}
