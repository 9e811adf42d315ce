import type { Rhythm, Value } from '../rhythm/types';

/** Puts a study's marks onto the attacks that they name; marks on attacks that are no longer there are left alone. */
export function marked(rhythm: Rhythm, marks: readonly { attack: number; ends: NonNullable<Value['ends']> }[] | undefined): Rhythm {
  if (marks === undefined || marks.length === 0) return rhythm;
  const ends = new Map(marks.map((mark) => [mark.attack, mark.ends]));
  let attack = 0;
  return rhythm.map((value) => {
    if (value.rest) return value;
    const end = ends.get(attack++);
    return end === undefined ? value : { ...value, ends: end };
  });
}
