import { EngineError } from '../../errors';
import { type Metre, parseMetre } from '../../rhythm/metre';
import { type XmlNode, childOf } from '../read-xml';

/**
 * The metre of a `time` element; several pairs of beats are one metre of their groups, on the finest unit.
 * @returns null where it is without a metre, undefined where it cannot be kept
 */
export function metreOf(time: XmlNode): Metre | null | undefined {
  if (childOf(time, 'senza-misura')) return null;
  const pairs: { groups: number[]; unit: number }[] = [];
  let groups: number[] | null = null;
  for (const { name, text } of time.children) {
    if (name === 'beats') groups = /^\s*\d{1,3}(\s*\+\s*\d{1,3})*\s*$/.test(text) ? text.split('+').map(Number) : null;
    if (name === 'beat-type' && groups) {
      pairs.push({ groups, unit: Number(text) });
      groups = null;
    }
  }
  if (pairs.length === 0) return undefined;
  const unit = Math.max(...pairs.map((pair) => pair.unit));
  const all = pairs.flatMap((pair) => pair.groups.map((group) => (group * unit) / pair.unit));
  try {
    return parseMetre(`${all.join('+')}/${unit}`).text;
  } catch (error) {
    if (error instanceof EngineError) return undefined;
    throw error;
  }
}
