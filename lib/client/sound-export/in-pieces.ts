import { breathe } from '../player/slices';

/** Samples gone through before the page gets its turn: some milliseconds of work. */
const PIECE = 1 << 17;

/** Goes through so many samples, giving the page its turn on the way. */
export async function inPieces(count: number, work: (from: number, to: number) => void): Promise<void> {
  for (let from = 0; from < count; from += PIECE) {
    work(from, Math.min(count, from + PIECE));
    await breathe();
  }
}
