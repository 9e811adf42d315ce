import { EngineError } from '../errors';
import type { RetrogradeBy, Value } from '../rhythm/types';
import { attackGroups } from './groups';

/**
 * The rhythm read from its end.
 *
 * By `values`, the textbook's retrograde: the values in reverse order, marks with their value. By `attacks`, the gaps
 * between attacks run backwards: rests before the first attack stay first, the attack groups before the last come in
 * reverse order, then the last group; attack i takes the marks of attack n − 1 − i. Either, twice, gives the original.
 * @throws EngineError `invalid_argument`
 * @see T1 of the check values: reversing values is not mirroring attacks (Mazzola et al., epOs 2004, 9.2)
 */
export function retrograde<T extends Value>(rhythm: readonly T[], by: RetrogradeBy): T[] {
  if (by === 'values') return [...rhythm].reverse();
  if (by !== 'attacks') throw new EngineError('invalid_argument', 'A retrograde goes by values or by attacks.');
  const { lead, groups } = attackGroups(rhythm);
  const last = groups.pop();
  if (last === undefined) return [...rhythm];
  const sounding = rhythm.filter((v) => !v.rest);
  const moved = [...groups.reverse(), last].flatMap((group, attack) =>
    group.map((value, index) => (index === 0 ? { ...sounding[sounding.length - 1 - attack]!, length: value.length } : value)),
  );
  return [...lead, ...moved];
}
