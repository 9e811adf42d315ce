import { type Exact, Fraction, toFraction } from '../exact/fraction';
import { type Tempo, parseTempo } from '../rhythm/tempo';
import { readLengths } from './ladder';

/** A change of tempo by a value that goes on: what was `before` in the old tempo is `after` in the new one. */
export type Pivot = { readonly before: Exact; readonly after: Exact };

export type ChainedTempo = {
  /** of the same value as the first tempo */
  readonly perMinute: Fraction;
  /** what the tempo before is multiplied with: after to before; 1 for the first */
  readonly factor: Fraction;
  /** what a metronome of whole numbers shows */
  readonly metronome: Fraction;
  /** how many beats that metronome would be ahead, or behind below 0, after a minute */
  readonly off: Fraction;
};

const shown = (perMinute: Fraction, factor: Fraction): ChainedTempo => {
  const rounded = perMinute.round();
  const metronome = rounded.compare(1) < 0 ? new Fraction(1) : rounded;
  return { perMinute, factor, metronome, off: metronome.sub(perMinute) };
};

/**
 * Tempos that follow from one another by equivalences, exact throughout.
 * @returns the first tempo and one for each pivot
 * @throws EngineError `invalid_tempo`, `invalid_argument`
 * @see A. Winold in DeLone et al., Aspects of Twentieth-Century Music (1975), 230-231: new to old tempo as new to old pivot values
 * @example tempoChain({ beat: '1/4', perMinute: '84' }, [{ before: '3/8', after: '1/4' }]) // 84, then 56
 */
export function tempoChain(tempo: Tempo, pivots: readonly Pivot[]): ChainedTempo[] {
  const { perMinute } = parseTempo(tempo);
  const chain = [shown(perMinute, new Fraction(1))];
  for (const pivot of pivots) {
    const [before, after] = readLengths([pivot.before, pivot.after]);
    const factor = after!.div(before!);
    chain.push(shown(chain.at(-1)!.perMinute.mul(factor), factor));
  }
  return chain;
}

/** The value that goes on where a stretch by `factor` is written as a new tempo: `factor` of a value before is that value after. */
export const pivotFor = (factor: Exact, value: Exact = '1/4'): { before: Fraction; after: Fraction } => ({ before: toFraction(value).mul(toFraction(factor)), after: toFraction(value) });
