import { type Fraction, formatFraction } from '../../exact/fraction';
import type { Tempo } from '../../rhythm/tempo';
import { type XmlNode, childOf, childrenOf, textIn } from '../read-xml';
import { decimalOf, valueOf } from './lengths';

export type TempoAt = { readonly at: Fraction; readonly tempo: Tempo };

/** A mark such as ♩. = 84; undefined where it is none that can be counted (an equivalence, a word). */
function metronomeTempo(metronome: XmlNode): Tempo | undefined {
  const unit = metronome.children.findIndex(({ name }) => name === 'beat-unit');
  const after = metronome.children.slice(unit + 1);
  const dots = after.findIndex(({ name }) => name !== 'beat-unit-dot');
  const beat = valueOf(metronome.children[unit]?.text.trim(), dots === -1 ? after.length : dots);
  const perMinute = decimalOf(textIn(metronome, 'per-minute'));
  if (unit === -1 || beat === undefined || perMinute === undefined || perMinute.n === 0n) return undefined;
  return { beat: formatFraction(beat), perMinute: formatFraction(perMinute) };
}

/** The tempo of a direction or of a `sound`: what is printed before what is only heard. */
export function tempoOf(node: XmlNode): Tempo | undefined {
  const marks = childrenOf(node, 'direction-type').flatMap((one) => childrenOf(one, 'metronome'));
  for (const mark of marks) {
    const tempo = metronomeTempo(mark);
    if (tempo) return tempo;
  }
  const sound = node.name === 'sound' ? node : childOf(node, 'sound');
  const perMinute = decimalOf(sound?.attributes.tempo);
  return perMinute === undefined || perMinute.n === 0n ? undefined : { beat: '1/4', perMinute: formatFraction(perMinute) };
}

const JUMPS = ['dacapo', 'dalsegno', 'tocoda', 'forward-repeat'];

/** Whether a direction or `sound` leads elsewhere. */
export function isJump(node: XmlNode): boolean {
  const sound = node.name === 'sound' ? node : childOf(node, 'sound');
  return sound !== undefined && JUMPS.some((name) => sound.attributes[name] !== undefined);
}
