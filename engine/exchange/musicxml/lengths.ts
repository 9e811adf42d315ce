import { Fraction, ONE } from '../../exact/fraction';
import { unreadable } from '../refuse';
import { type XmlNode, childOf, childrenOf, textIn } from '../read-xml';

/** Names of written values. @see MusicXML 4.0, note-type-value */
const TYPES: Readonly<Record<string, Fraction>> = {
  maxima: new Fraction(8), long: new Fraction(4), breve: new Fraction(2), whole: ONE, half: new Fraction(1, 2), quarter: new Fraction(1, 4), eighth: new Fraction(1, 8),
  '16th': new Fraction(1, 16), '32nd': new Fraction(1, 32), '64th': new Fraction(1, 64), '128th': new Fraction(1, 128), '256th': new Fraction(1, 256), '512th': new Fraction(1, 512), '1024th': new Fraction(1, 1024),
};

/** A number of MusicXML: decimal, exact. undefined where it is none. */
export function decimalOf(text: string | undefined): Fraction | undefined {
  const match = /^\+?(\d{1,12})?(?:\.(\d{0,9}))?$/.exec(text?.trim() ?? '');
  if (!match || (!match[1] && !match[2])) return undefined;
  const [, whole = '', part = ''] = match;
  return new Fraction(BigInt(`${whole}${part}`), 10n ** BigInt(part.length));
}

/** A number of divisions, as a length in whole notes. @throws EngineError `unreadable_music` */
export function durationOf(node: XmlNode, divisions: Fraction, where: string): Fraction | undefined {
  const text = textIn(node, 'duration');
  if (text === undefined) return undefined;
  const count = decimalOf(text);
  if (count === undefined) return unreadable(`${where}: a duration is no number above 0.`);
  return count.div(divisions).div(4);
}

/** A written value with its dots. @returns undefined where there is none */
export function valueOf(type: string | undefined, dots: number): Fraction | undefined {
  const base = type !== undefined && Object.hasOwn(TYPES, type) ? TYPES[type] : undefined;
  if (base === undefined || dots > 10) return undefined;
  return base.mul(new Fraction(2 ** (dots + 1) - 1, 2 ** dots));
}

/** What a note is written as: its type, dots and place in a tuplet. @returns undefined where it is not said */
export function writtenLength(note: XmlNode): Fraction | undefined {
  const value = valueOf(textIn(note, 'type'), childrenOf(note, 'dot').length);
  const modification = childOf(note, 'time-modification');
  const [actual, normal] = [decimalOf(textIn(modification, 'actual-notes')), decimalOf(textIn(modification, 'normal-notes'))];
  if (value === undefined || actual === undefined || normal === undefined || actual.n === 0n || normal.n === 0n) return value;
  return value.mul(normal).div(actual);
}
