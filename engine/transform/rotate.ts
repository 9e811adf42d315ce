import { EngineError } from '../errors';
import { type Exact, type Fraction, ZERO, sum, toFraction } from '../exact/fraction';
import type { Value } from '../rhythm/types';
import { attackGroups } from './groups';

/** What a rotation counts: values, attack groups, or a pulse of its own. */
export type RotateBy = 'values' | 'attacks' | { readonly pulse: Exact };

const modulo = (n: number, by: number): number => ((n % by) + by) % by;

function turn<T>(items: readonly T[], steps: number): T[] {
  if (items.length === 0) return [];
  const first = modulo(steps, items.length);
  return [...items.slice(first), ...items.slice(0, first)];
}

/** A value as a rest, which keeps whatever else travels with it but its marks. */
export function silenced<T extends Value>(value: T, length = value.length): T {
  const rest: T = { ...value, length, rest: true };
  for (const mark of ['accent', 'roll', 'sound', 'ends'] as const) delete (rest as { -readonly [K in keyof T]?: T[K] })[mark];
  return rest;
}

function enterLater<T extends Value>(rhythm: readonly T[], steps: number, pulse: Fraction): T[] {
  const total = sum(rhythm.map((v) => v.length));
  if (total.equals(0)) return [...rhythm];
  const turns = pulse.mul(steps).div(total);
  const entry = turns.sub(turns.floor()).mul(total);
  let at = ZERO;
  for (const [index, value] of rhythm.entries()) {
    if (at.equals(entry)) return turn(rhythm, index);
    const end = at.add(value.length);
    if (end.compare(entry) > 0) {
      const kept = { ...value, length: entry.sub(at) };
      return [silenced(value, end.sub(entry)), ...rhythm.slice(index + 1), ...rhythm.slice(0, index), kept];
    }
    at = end;
  }
  return [...rhythm];
}

/**
 * The cycle entered later.
 *
 * By `values`, the first `steps` values move to the end; by `attacks`, rests before the first attack stay first and the
 * attack groups rotate; by `{ pulse }`, the cycle is entered `steps × pulse` later: a value cut by the entry keeps its
 * attack, shortened, at the end, and its remainder opens the result as a rest. Negative steps go the other way; all modulo.
 * @param steps - an integer
 * @throws EngineError `invalid_argument`
 */
export function rotate<T extends Value>(rhythm: readonly T[], steps: number, by: RotateBy): T[] {
  if (!Number.isSafeInteger(steps)) throw new EngineError('invalid_argument', `A rotation goes by whole steps; ${steps} is none.`);
  if (by === 'values') return turn(rhythm, steps);
  if (by === 'attacks') {
    const { lead, groups } = attackGroups(rhythm);
    return [...lead, ...turn(groups, steps).flat()];
  }
  if (typeof by !== 'object' || by === null) {
    throw new EngineError('invalid_argument', 'A rotation goes by values, by attacks, or by a pulse.');
  }
  const pulse = toFraction(by.pulse);
  if (pulse.compare(ZERO) <= 0) throw new EngineError('invalid_argument', 'The pulse of a rotation must be above 0.');
  return enterLater(rhythm, steps, pulse);
}
