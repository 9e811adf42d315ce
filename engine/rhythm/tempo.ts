import { EngineError } from '../errors';
import { type Exact, Fraction, ZERO, toFraction } from '../exact/fraction';

/** So many beats a minute, a beat being a length in whole notes. */
export type Tempo = { readonly beat: Exact; readonly perMinute: Exact };

/** Reads a tempo. @throws EngineError `invalid_tempo` unless both are above 0 */
export function parseTempo(tempo: Tempo): { beat: Fraction; perMinute: Fraction } {
  const beat = toFraction(tempo.beat);
  const perMinute = toFraction(tempo.perMinute);
  if (beat.compare(ZERO) <= 0 || perMinute.compare(ZERO) <= 0) {
    throw new EngineError('invalid_tempo', 'A tempo needs a beat and a number of beats a minute, both above 0.');
  }
  return { beat, perMinute };
}

/** Seconds of one whole note, exact. */
export function secondsOfWhole(tempo: Tempo): Fraction {
  const { beat, perMinute } = parseTempo(tempo);
  return new Fraction(60).div(perMinute).div(beat);
}

/**
 * @param length - in whole notes
 * @returns exact seconds
 * @example secondsOf('1', { beat: '1/4', perMinute: '60' }) //=> 4
 */
export const secondsOf = (length: Exact, tempo: Tempo): Fraction => toFraction(length).mul(secondsOfWhole(tempo));
