/** Lines that are drawn of a five-line staff, from the lowest, and the place of each sound, for so many sounds. */
export type StaffShape = { readonly lines: readonly boolean[]; readonly keys: readonly string[] };

const only = (...visible: number[]): boolean[] => [0, 1, 2, 3, 4].map((line) => visible.includes(line));

/** Places of sounds, 1 the lowest: lines for few, lines or spaces for more (Freund and Cutler: lines as few as will do, placement consistent). */
export function staffShape(sounds: number): StaffShape {
  if (sounds <= 1) return { lines: only(2), keys: ['b/4'] };
  if (sounds === 2) return { lines: only(1, 3), keys: ['g/4', 'd/5'] };
  if (sounds === 3) return { lines: only(1, 2, 3), keys: ['g/4', 'b/4', 'd/5'] };
  if (sounds === 4) return { lines: only(0, 1, 2, 3, 4), keys: ['f/4', 'a/4', 'c/5', 'e/5'] };
  if (sounds === 5) return { lines: only(0, 1, 2, 3, 4), keys: ['e/4', 'g/4', 'b/4', 'd/5', 'f/5'] };
  return { lines: only(0, 1, 2, 3, 4), keys: ['c/4', 'd/4', 'e/4', 'f/4', 'g/4', 'a/4', 'b/4', 'c/5', 'd/5', 'e/5', 'f/5', 'g/5'] };
}

const LETTERS = 'cdefgab';
/** Steps above the middle line. */
export const stepsOf = (key: string): number => LETTERS.indexOf(key[0]!) - 6 + 7 * (Number(key.at(-1)) - 4);

/** Drawing units, ten a staff space: from the middle line to the outermost line drawn, upwards. */
export const lineReach = ({ lines }: StaffShape): { above: number; below: number } => ({ above: (lines.lastIndexOf(true) - 2) * 10, below: (2 - lines.indexOf(true)) * 10 });
