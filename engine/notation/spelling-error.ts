import { EngineError } from '../errors';
import { type Fraction, formatFraction } from '../exact/fraction';

/** A value that cannot be written in its measure. Counting is from 0; the message counts from 1. */
export class SpellingError extends EngineError {
  /** index of the measure */
  readonly measure: number;
  /** index of the value in the rhythm */
  readonly value: number;
  /** factors by which the whole rhythm could be stretched so that it can be written, the nearest to 1 first */
  readonly nearest: readonly Fraction[];

  constructor(measure: number, value: number, length: Fraction, nearest: readonly Fraction[]) {
    const offer =
      nearest.length === 0
        ? 'Stretch the rhythm, or let it begin elsewhere.'
        : `Stretched ${nearest.map(formatFraction).join(' or ')} times, it can be written.`;
    super('unspellable', `Value ${value + 1}, of ${formatFraction(length)}, cannot be written in measure ${measure + 1} with notes, ties and tuplets. ${offer}`);
    this.name = 'SpellingError';
    this.measure = measure;
    this.value = value;
    this.nearest = nearest;
  }
}
