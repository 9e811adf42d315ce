import { EngineError } from '../errors';
import { type Exact, type Fraction, ONE, ZERO, toFraction } from '../exact/fraction';
import { readLengths } from './ladder';

export type CanonVoice = {
  readonly speed: Fraction;
  /** how long the subject lasts in this voice */
  readonly length: Fraction;
  /** how long it waits before it enters */
  readonly delay: Fraction;
  /** when it ends */
  readonly end: Fraction;
};

/**
 * When each voice of a canon must enter so that all are at the same place of the subject at one moment.
 * @param speeds - of the voices; at speed 1 the subject lasts `length`, at speed 2 half as long
 * @param meet - the place of the subject where they meet, from 0 for its beginning to 1 for its end
 * @returns voices in the order given; the slowest does not wait
 * @throws EngineError `invalid_argument`, `too_large`
 * @see L. Polansky, Four Voice Canons: a voice that lasts b/a of another enters 1 − b/a later to end with it
 */
export function canonEntries(length: Exact, speeds: readonly Exact[], meet: Exact = ONE): CanonVoice[] {
  const [subject] = readLengths([length]);
  const place = toFraction(meet);
  if (place.compare(ZERO) < 0 || place.compare(ONE) > 0) throw new EngineError('invalid_argument', 'Voices meet between the beginning of the subject, 0, and its end, 1.');
  const voices = readLengths(speeds).map((speed) => ({ speed, length: subject!.div(speed) }));
  const meeting = voices.reduce((latest, { length: own }) => (own.mul(place).compare(latest) > 0 ? own.mul(place) : latest), ZERO);
  return voices.map((voice) => {
    const delay = meeting.sub(voice.length.mul(place));
    return { ...voice, delay, end: delay.add(voice.length) };
  });
}
