/** Lines that are drawn of a five-line staff, from the lowest, and the place of each sound, for so many sounds. */
export type StaffShape = {
  readonly lines: readonly boolean[];
  /** as in a treble clef: `b/4` is the middle line */
  readonly keys: readonly string[];
  /** as MusicXML writes it, whose staves of few lines begin with the lowest line of five, E4 */
  readonly display: { readonly lines: number; readonly keys: readonly string[] };
};

const only = (...visible: number[]): boolean[] => [0, 1, 2, 3, 4].map((line) => visible.includes(line));
const five = (keys: readonly string[]): StaffShape => ({ lines: only(0, 1, 2, 3, 4), keys, display: { lines: 5, keys: keys.map((key) => key.replace('/', '').toUpperCase()) } });

/** Places of sounds, 1 the lowest: lines for few, lines or spaces for more (Freund and Cutler: lines as few as will do, placement consistent). */
export function staffShape(sounds: number): StaffShape {
  if (sounds <= 1) return { lines: only(2), keys: ['b/4'], display: { lines: 1, keys: ['E4'] } };
  if (sounds === 2) return { lines: only(1, 3), keys: ['g/4', 'd/5'], display: { lines: 2, keys: ['E4', 'G4'] } };
  if (sounds === 3) return { lines: only(1, 2, 3), keys: ['g/4', 'b/4', 'd/5'], display: { lines: 3, keys: ['E4', 'G4', 'B4'] } };
  if (sounds === 4) return five(['f/4', 'a/4', 'c/5', 'e/5']);
  if (sounds === 5) return five(['e/4', 'g/4', 'b/4', 'd/5', 'f/5']);
  return five(['c/4', 'd/4', 'e/4', 'f/4', 'g/4', 'a/4', 'b/4', 'c/5', 'd/5', 'e/5', 'f/5', 'g/5']);
}
