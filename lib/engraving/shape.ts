import type { StaffShape } from '@/engine';

export { staffShape } from '@/engine';
export type { StaffShape };

const LETTERS = 'cdefgab';
/** Steps above the middle line. */
export const stepsOf = (key: string): number => LETTERS.indexOf(key[0]!) - 6 + 7 * (Number(key.at(-1)) - 4);

/** Drawing units, ten a staff space: from the middle line to the outermost line drawn, upwards. */
export const lineReach = ({ lines }: StaffShape): { above: number; below: number } => ({ above: (lines.lastIndexOf(true) - 2) * 10, below: (2 - lines.indexOf(true)) * 10 });
