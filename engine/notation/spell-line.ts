import { EngineError } from '../errors';
import { Fraction, ONE, ZERO, sum, toFraction } from '../exact/fraction';
import { type Grid, gridFor } from '../exact/grid';
import { LIMITS } from '../limits';
import { metreOfLength, parseMetre } from '../rhythm/metre';
import type { Rhythm } from '../rhythm/types';
import { nearestFactors } from './nearest';
import { type SpelledSymbol, measureSpeller } from './spell-measure';
import { SpellingError } from './spelling-error';
import type { MetrePlan, NotationMeasure, NotationSymbol } from './types';

const LEAST = new Fraction(1, LIMITS.shortestSymbol);

type Change = { readonly at: Fraction; readonly metre: string };

/** The metres of a line, in order of their place. @throws EngineError `invalid_metre`, `invalid_argument` */
function readPlan(plan: MetrePlan): Change[] {
  if (typeof plan === 'string') return [{ at: ZERO, metre: parseMetre(plan).text }];
  const changes = plan.map(({ at, metre }) => ({ at: toFraction(at), metre: parseMetre(metre).text })).sort((a, b) => a.at.compare(b.at));
  if (changes.length === 0) throw new EngineError('invalid_metre', 'A line needs a metre.');
  if (!changes[0]!.at.equals(ZERO)) throw new EngineError('invalid_argument', 'The first metre of a line begins at 0.');
  return changes.filter(({ at }, index) => !changes[index + 1]?.at.equals(at));
}

type Frame = { readonly start: number; readonly end: number; readonly metre: string };

/** The measures that hold a line of so many ticks. */
function frames(changes: readonly Change[], grid: Grid, total: number): Frame[] {
  const result: Frame[] = [];
  changes.forEach(({ at, metre }, index) => {
    const next = changes[index + 1];
    const length = grid.ticks(parseMetre(metre).length);
    const limit = next === undefined ? total : Math.min(grid.ticks(next.at), total);
    for (let start = grid.ticks(at); start < limit; start += length) {
      if (result.length >= LIMITS.measures) throw new EngineError('too_large', `A line may have ${LIMITS.measures} measures.`);
      const cut = next !== undefined && grid.ticks(next.at) < start + length;
      const end = cut ? grid.ticks(next.at) : start + length;
      result.push({ start, end, metre: cut ? metreOfLength(grid.fraction(end - start), metre) : metre });
    }
  });
  return result;
}

/**
 * Spells a line of music in a metre, or in changes of metre: ties, dots, rests, tuplets, beams.
 * @param plan - a metre, or metres with the places where each begins a new measure; a measure cut short by a change is
 *   written in a metre of its own length
 * @returns measures whose symbols add up exactly, the last filled with rests
 * @throws SpellingError `unspellable` with the measure, the value, and the nearest factors that can be written
 * @throws EngineError `too_large`, `too_fine`, `invalid_metre`
 * @example spellLine(parseRhythm('5/16'), '4/4') // a quarter tied to a sixteenth, then rests
 */
export function spellLine(rhythm: Rhythm, plan: MetrePlan): NotationMeasure[] {
  const result = trySpelling(rhythm, readPlan(plan));
  if ('measures' in result) return result.measures;
  const { measure, value } = result;
  const nearest = nearestFactors(rhythm, (stretched) => 'measures' in trySpelling(stretched, readPlan(plan)));
  throw new SpellingError(measure, value, rhythm[value]!.length, nearest);
}

/** Whether a line can be spelled: the same question without the search for what else could. @throws EngineError as `spellLine`, but for `unspellable` */
export const canSpell = (rhythm: Rhythm, plan: MetrePlan): boolean => 'measures' in trySpelling(rhythm, readPlan(plan));

type Spelling = { readonly measures: NotationMeasure[] } | { readonly measure: number; readonly value: number };

function trySpelling(rhythm: Rhythm, changes: readonly Change[]): Spelling {
  const lengths = rhythm.map(({ length }) => length);
  const longestMeasure = changes.reduce((most, { metre }) => (parseMetre(metre).length.compare(most) > 0 ? parseMetre(metre).length : most), ONE);
  const longest = sum(lengths).add(longestMeasure);
  // Room for the units of every bracket: positions within one are multiplied by its figure, at most 9.
  const grid = gridFor([...lengths, LEAST, ...changes.flatMap(({ at, metre }) => [at, parseMetre(metre).length])], longest.mul(9 * LIMITS.shortestSymbol));
  const speller = measureSpeller(grid.denominator);
  const ticks = lengths.map((length) => grid.ticks(length));
  const total = ticks.reduce((a, b) => a + b, 0);
  const measures: NotationMeasure[] = [];
  let value = 0;
  let valueStart = 0;
  for (const [index, frame] of frames(changes, grid, total).entries()) {
    const ends: number[] = [];
    const rests: boolean[] = [];
    const first = value;
    let tiedIn = false;
    let at = frame.start;
    while (at < frame.end) {
      const length = ticks[value];
      if (length === undefined) {
        ends.push(frame.end - frame.start);
        rests.push(true);
        break;
      }
      const own = rhythm[value]!;
      if (at === frame.start && valueStart < frame.start && !own.rest) tiedIn = true;
      const end = Math.min(valueStart + length, frame.end);
      ends.push(end - frame.start);
      rests.push(own.rest);
      at = end;
      if (valueStart + length > frame.end) break;
      valueStart += length;
      value += 1;
    }
    const tiedOut = value < ticks.length && valueStart < frame.end && !rhythm[value]!.rest;
    const spelled = speller(frame.metre, ends, rests);
    if (typeof spelled === 'number') return { measure: index, value: Math.min(first + spelled, rhythm.length - 1) };
    measures.push({
      start: grid.fraction(frame.start),
      metre: frame.metre,
      symbols: spelled.map((symbol) => toSymbol(symbol, { first, values: rhythm.length, pieces: ends.length, tiedIn, tiedOut })),
    });
  }
  return { measures };
}

type Place = {
  /** the value that the measure's first piece belongs to */
  readonly first: number;
  readonly values: number;
  readonly pieces: number;
  readonly tiedIn: boolean;
  readonly tiedOut: boolean;
};

function toSymbol({ piece, isFirst, isLast, symbol }: SpelledSymbol, { first, values, pieces, tiedIn, tiedOut }: Place): NotationSymbol {
  const value = first + piece;
  return {
    ...symbol,
    tiedFromBefore: !symbol.rest && (!isFirst || (piece === 0 && tiedIn)),
    tiedOn: !symbol.rest && (!isLast || (piece === pieces - 1 && tiedOut)),
    value: value < values ? value : null,
  };
}
