import { EngineError } from '../errors';
import { Fraction, ONE, formatFraction, isZero, sum } from '../exact/fraction';
import { type Grid, gridFor } from '../exact/grid';
import { LIMITS } from '../limits';
import type { Rhythm } from '../rhythm/types';
import { type Change, type Frame, framesOf } from './plan';

/** A line counted in ticks. */
export type CountedLine = { readonly grid: Grid; readonly ticks: readonly number[]; readonly rests: readonly boolean[]; readonly total: number };

const LEAST = new Fraction(1, LIMITS.shortestSymbol);
/** Positions within a bracket are multiplied by its figure, at most 9, once more within a nested one, and compared with the shortest symbol. */
const HEADROOM = 9 * 9 * LIMITS.shortestSymbol;

/**
 * Counts a line on a grid that also holds its measures and the shortest symbol.
 * @throws EngineError `invalid_argument` where a value does not last longer than 0, `too_fine`
 */
export function countLine(rhythm: Rhythm, changes: readonly Change[]): CountedLine {
  const lengths = rhythm.map(({ length }, index) => {
    if (length.s < 0n || isZero(length)) {
      throw new EngineError('invalid_argument', `Value ${index + 1} lasts ${formatFraction(length)}. Every value must last longer than 0.`);
    }
    return length;
  });
  const measure = changes.reduce((most, { length }) => (length.compare(most) > 0 ? length : most), ONE);
  const grid = gridFor([...lengths, LEAST, ...changes.flatMap(({ at, length }) => [at, length])], sum(lengths).add(measure).mul(HEADROOM));
  const ticks = lengths.map((length) => grid.ticks(length));
  return { grid, ticks, rests: rhythm.map(({ rest }) => rest), total: ticks.reduce((a, b) => a + b, 0) };
}

/** The line with every value times the factor, on a finer grid; null where that grid is too fine. */
export function stretchLine({ grid, ticks, rests, total }: CountedLine, factor: Fraction): CountedLine | null {
  const n = Number(factor.n);
  const d = Number(factor.d);
  const denominator = grid.denominator * d;
  if ((total * n + denominator * LIMITS.metreBeats) * HEADROOM > LIMITS.commonDenominator) return null;
  const finer: Grid = {
    denominator,
    ticks: (value) => grid.ticks(value) * d,
    fraction: (at) => new Fraction(BigInt(at), BigInt(denominator)),
  };
  return { grid: finer, ticks: ticks.map((length) => length * n), rests, total: total * n };
}

/** What of a line lies in one measure. */
export type MeasurePieces = {
  readonly frame: Frame;
  /** where its pieces end, in ticks from the measure's start; the last fills the measure */
  readonly ends: readonly number[];
  /** whether each piece is a rest */
  readonly rests: readonly boolean[];
  /** the value that the first piece belongs to */
  readonly first: number;
  /** whether the first piece goes on from the measure before, and the last into the next, both sounding */
  readonly tiedIn: boolean;
  readonly tiedOut: boolean;
};

/**
 * Cuts a line at its bar lines.
 * @param from - the value whose measure is given first
 */
export function* piecesOf({ grid, ticks, rests: isRest, total }: CountedLine, changes: readonly Change[], from = 0): Generator<MeasurePieces, void, undefined> {
  let value = 0;
  let valueStart = 0;
  let wanted = 0;
  for (let n = 0; n < from; n += 1) wanted += ticks[n]!;
  for (const frame of framesOf(changes, grid, total)) {
    const length = frame.end - frame.start;
    if (frame.end <= wanted) continue;
    while (value < ticks.length && valueStart + ticks[value]! <= frame.start) {
      valueStart += ticks[value]!;
      value += 1;
    }
    const ends: number[] = [];
    const rests: boolean[] = [];
    const first = value;
    const tiedIn = valueStart < frame.start && !isRest[value]!;
    while (value < ticks.length && valueStart < frame.end) {
      rests.push(isRest[value]!);
      const end = valueStart + ticks[value]!;
      ends.push(Math.min(end, frame.end) - frame.start);
      if (end > frame.end) break;
      valueStart = end;
      value += 1;
    }
    const tiedOut = value < ticks.length && valueStart < frame.end && !isRest[value]!;
    if (ends.at(-1)! < length) {
      ends.push(length);
      rests.push(true);
    }
    yield { frame, ends, rests, first, tiedIn, tiedOut };
  }
}
