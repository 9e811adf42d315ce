import { type Exact, type Fraction, toFactor } from '../exact/fraction';
import { type Tempo, parseTempo } from '../rhythm/tempo';

/**
 * The tempo at which the unstretched notation lasts `factor` times as long, in the same beat.
 * @throws EngineError `invalid_factor`, `invalid_tempo`
 * @example tempoFor({ beat: '1/4', perMinute: '84' }, '2/3').perMinute //=> 126
 */
export function tempoFor(tempo: Tempo, factor: Exact): { beat: Fraction; perMinute: Fraction } {
  const { beat, perMinute } = parseTempo(tempo);
  return { beat, perMinute: perMinute.div(toFactor(factor)) };
}
