import { type Fraction, isFactor, sum } from '../exact/fraction';
import type { RetrogradeBy, Rhythm, Value } from '../rhythm/types';
import { retrograde } from '../transform/retrograde';
import { primitive } from './primitive';

/** What turns one rhythm into another: stretched, then reversed, then rotated. */
export type Transformation = {
  readonly factor: Fraction;
  readonly retrograde: false | RetrogradeBy;
  /** in values, from 0 */
  readonly rotation: number;
};

/** Most that are given: an even rhythm can be turned into itself in as many ways as it has values. */
const MOST = 24;
export const REVERSALS: readonly Transformation['retrograde'][] = [false, 'values', 'attacks'];

export const reversed = <T extends Value>(rhythm: readonly T[], by: Transformation['retrograde']): readonly T[] => (by === false ? rhythm : retrograde(rhythm, by));

/** For each place, how much of the beginning is repeated up to it. @see D. E. Knuth, J. H. Morris, V. R. Pratt, SIAM J. Comput. 6 (1977) */
function borders(pattern: readonly number[]): number[] {
  const found = [0];
  for (let index = 1, length = 0; index < pattern.length; index += 1) {
    while (length > 0 && pattern[index] !== pattern[length]) length = found[length - 1]!;
    if (pattern[index] === pattern[length]) length += 1;
    found.push(length);
  }
  return found;
}

/** The rotations of a cycle that give `wanted`: where it stands in the cycle gone through twice. Both are of one size. */
function rotationsTo(cycle: readonly number[], wanted: readonly number[]): number[] {
  const size = cycle.length;
  const back = borders(wanted);
  const found: number[] = [];
  for (let index = 0, length = 0; index < 2 * size - 1; index += 1) {
    const value = cycle[index % size]!;
    while (length > 0 && (length === size || value !== wanted[length])) length = back[length - 1]!;
    if (value === wanted[length]) length += 1;
    if (length === size) found.push(index - size + 1);
  }
  return found;
}

const operations = ({ factor, retrograde: by, rotation }: Transformation): number => Number(!factor.equals(1)) + Number(by !== false) + Number(rotation !== 0);

/**
 * Every transformation that turns one rhythm into another: a stretch, then a retrograde, then a rotation by values. Marks are
 * not looked at; rests and attacks are told apart.
 * @returns fewest operations first, then no retrograde, by values, by attacks, then the smaller rotation; at most 24; empty
 *   where there is none
 * @throws EngineError `too_fine`
 */
export function findTransformations(from: Rhythm, to: Rhythm): Transformation[] {
  if (from.length === 0 || from.length !== to.length) return [];
  const factor = sum(to.map(({ length }) => length)).div(sum(from.map(({ length }) => length)));
  if (!isFactor(factor)) return [];
  const wanted = primitive(to);
  const found = REVERSALS.flatMap((by) => rotationsTo(primitive(reversed(from, by)), wanted).map((rotation): Transformation => ({ factor, retrograde: by, rotation })));
  // The list is in order of retrograde and rotation already, and sorting keeps that.
  return found.sort((a, b) => operations(a) - operations(b)).slice(0, MOST);
}
