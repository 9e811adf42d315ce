import { EngineError } from '../errors';
import { readPulses } from './resultant';

/**
 * The evenest spread of attacks over pulses, as integer gaps, after Bjorklund: strings of one attack and strings of one
 * rest are paired off until at most one string is left over. Where `attacks = pulses − 1` the long gap comes first, as the
 * paper prints it.
 * @throws EngineError `invalid_argument`
 * @see G. Toussaint, "The Euclidean algorithm generates traditional musical rhythms", Proc. BRIDGES, Banff 2005, 47–56
 * @example euclidean(3, 8) //=> [3, 3, 2]
 */
export function euclidean(attacks: number, pulses: number): number[] {
  readPulses(pulses, 'The number of pulses');
  readPulses(attacks, 'The number of attacks');
  if (attacks > pulses) throw new EngineError('invalid_argument', `${attacks} attacks do not fit into ${pulses} pulses.`);
  if (attacks === pulses - 1) return [2, ...Array<number>(attacks - 1).fill(1)];
  let heads: number[][] = Array.from({ length: attacks }, () => [1]);
  let tails: number[][] = Array.from({ length: pulses - attacks }, () => [0]);
  while (tails.length > 1) {
    const pairs = Math.min(heads.length, tails.length);
    const joined = heads.slice(0, pairs).map((head, index) => [...head, ...tails[index]!]);
    tails = heads.length > pairs ? heads.slice(pairs) : tails.slice(pairs);
    heads = joined;
  }
  const gaps: number[] = [];
  for (const pulse of [...heads, ...tails].flat()) {
    if (pulse === 1) gaps.push(1);
    else gaps[gaps.length - 1]! += 1;
  }
  return gaps;
}
