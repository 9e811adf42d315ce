import type { Strip } from '../schemas/studies';

type Parts = Strip[number]['parts'];
/** Starts and ends are rounded to this. */
const FINEST = 0.000_02;

/** Puts what sounds at once one under the other. @returns the lane of each part, from 0, and how many there are */
export function stripLanes(parts: Parts): { readonly lanes: readonly number[]; readonly count: number } {
  const ends: number[] = [];
  const lanes = new Array<number>(parts.length).fill(0);
  const inOrder = [...parts.keys()].sort((a, b) => parts[a]!.from - parts[b]!.from || a - b);
  for (const index of inOrder) {
    const { from, to } = parts[index]!;
    const free = ends.findIndex((end) => end <= from + FINEST);
    const lane = free === -1 ? ends.length : free;
    ends[lane] = to;
    lanes[index] = lane;
  }
  return { lanes, count: Math.max(1, ends.length) };
}
