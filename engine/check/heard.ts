import type { Rhythm, Value } from '../rhythm/types';

/** A rhythm as it is heard: rests side by side are one, marks left out. Time is judged, not spelling. */
export function heard(rhythm: Rhythm): Value[] {
  const result: { length: Value['length']; rest: boolean }[] = [];
  for (const { length, rest } of rhythm) {
    const last = result.at(-1);
    if (rest && last?.rest) last.length = last.length.add(length);
    else result.push({ length, rest });
  }
  return result;
}

export const isSame = (a: Value, b: Value): boolean => a.rest === b.rest && a.length.equals(b.length);
export const isSameRhythm = (a: readonly Value[], b: readonly Value[]): boolean => a.length === b.length && a.every((value, index) => isSame(value, b[index]!));
