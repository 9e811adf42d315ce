import type { Value } from '../rhythm/types';

/** A sounding value and the rests after it. */
export type AttackGroup<T extends Value> = readonly T[];

/** A rhythm as the rests before its first attack, and its attack groups. */
export function attackGroups<T extends Value>(rhythm: readonly T[]): { lead: T[]; groups: T[][] } {
  const lead: T[] = [];
  const groups: T[][] = [];
  for (const value of rhythm) {
    if (!value.rest) groups.push([value]);
    else (groups.at(-1) ?? lead).push(value);
  }
  return { lead, groups };
}
