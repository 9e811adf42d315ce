import { Fraction, formatFraction } from '../../exact/fraction';
import type { Tempo } from '../../rhythm/tempo';
import { type XmlNode, childOf, childrenOf, textIn } from '../read-xml';
import { decimalOf, valueOf } from './lengths';

export type TempoAt = { readonly at: Fraction; readonly tempo: Tempo };

/** A value with its dots: from a `beat-unit` on. */
function beatFrom(children: readonly XmlNode[], at: number): Fraction | undefined {
  let dots = 0;
  while (children[at + dots + 1]?.name === 'beat-unit-dot') dots += 1;
  return valueOf(children[at]?.text.trim(), dots);
}

/** A mark such as ♩. = 84, or two values tied = 84; undefined where it is none that can be counted (an equivalence, a word). */
function metronomeTempo({ children, ...mark }: XmlNode): Tempo | undefined {
  let beat = beatFrom(children, children.findIndex(({ name }) => name === 'beat-unit'));
  for (const { children: tied } of children.filter(({ name }) => name === 'beat-unit-tied')) {
    const more = beatFrom(tied, 0);
    beat = beat && more && beat.add(more);
  }
  const perMinute = countOf(textIn({ children, ...mark }, 'per-minute'));
  return beat === undefined || perMinute === undefined || perMinute.n === 0n ? undefined : { beat: formatFraction(beat), perMinute: formatFraction(perMinute) };
}

/** A number of beats: decimal, or whole with a fraction such as `90 2/3`. */
function countOf(text: string | undefined): Fraction | undefined {
  const mixed = /^(?:(\d{1,6})\s+)?(\d{1,9})\/([1-9]\d{0,8})$/.exec(text ?? '');
  return mixed ? new Fraction(BigInt(mixed[2]!), BigInt(mixed[3]!)).add(Number(mixed[1] ?? 0)) : decimalOf(text);
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
