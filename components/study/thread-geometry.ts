import { type Statement, type ThreadRow, type Threads, formatFraction, rotationWords } from '@/engine';

export type ThreadGeometry = {
  readonly left: number;
  readonly scale: number;
  readonly top: number;
  readonly pitch: number;
};

/** Half the height of a tick, in CSS pixels. */
export const TICK = 12;

export const rowY = ({ top, pitch }: ThreadGeometry, row: number): number => top + row * pitch;
export const tickX = ({ left, scale }: ThreadGeometry, at: number): number => left + at * scale;

const bend = (pitch: number): number => Math.min(46, (pitch - 2 * TICK) * 0.575);

/** Thread from (x1, row) to (x2, row + 1), as an SVG path. */
export function threadPath(geometry: ThreadGeometry, row: number, x1: number, x2: number): string {
  const ya = rowY(geometry, row) + TICK;
  const yb = rowY(geometry, row + 1) - TICK;
  const b = bend(geometry.pitch);
  return `M${x1.toFixed(1)} ${ya}C${x1.toFixed(1)} ${ya + b},${x2.toFixed(1)} ${yb - b},${x2.toFixed(1)} ${yb}`;
}

/** The ticks of a row: one path for each instrument that they are handed to, null for the row's own. */
export function ticksPaths({ statement: { assigned }, ticks }: ThreadRow, geometry: ThreadGeometry, index: number): [instrument: string | null, path: string][] {
  const y = rowY(geometry, index);
  const paths = new Map<string | null, string>();
  ticks.forEach(({ at }, attack) => {
    const instrument = assigned?.[attack] ?? null;
    paths.set(instrument, `${paths.get(instrument) ?? ''}M${tickX(geometry, at.valueOf()).toFixed(1)} ${y - TICK}v${2 * TICK}`);
  });
  return [...paths];
}

export function threadsPath(threads: Threads, geometry: ThreadGeometry, origin: number | null): string {
  return threads.threads
    .filter((thread) => origin === null || thread.origin === origin)
    .map(({ row, from, to }) =>
      threadPath(
        geometry,
        row,
        tickX(geometry, threads.rows[row]!.ticks[from]!.at.valueOf()),
        tickX(geometry, threads.rows[row + 1]!.ticks[to]!.at.valueOf()),
      ),
    )
    .join('');
}

/** What fits beside a row, in characters. */
const ROOM = 17;

/** Beside a row: what is done to the subject in it; what has no room there is told in the table of statements. */
export function rowWords({ subject, factor, rotation, rotationBy, repeats }: Statement): string {
  if (subject === null) return 'no subject';
  const words = [
    ...(factor.equals(1) && (rotation !== 0 || repeats !== undefined) ? [] : [`times ${formatFraction(factor)}`]),
    ...(rotation === 0 ? [] : [`by ${rotationWords(rotation, rotationBy ?? 'values').replace(/ of .*/, '')}`]),
    ...(repeats === undefined ? [] : [`${repeats} times`]),
  ];
  while (words.length > 1 && words.join(', ').length > ROOM) words.pop();
  return words.join(', ');
}

/** How far along its curve a thread is at a height between two rows: the curve's parameter, found by halving. */
function parameterAt(geometry: ThreadGeometry, row: number, y: number): number {
  const ya = rowY(geometry, row) + TICK;
  const yb = rowY(geometry, row + 1) - TICK;
  const b = bend(geometry.pitch);
  const at = (t: number) => (1 - t) ** 3 * ya + 3 * (1 - t) ** 2 * t * (ya + b) + 3 * (1 - t) * t ** 2 * (yb - b) + t ** 3 * yb;
  let low = 0;
  let high = 1;
  for (let n = 0; n < 20; n += 1) {
    const middle = (low + high) / 2;
    if (at(middle) < y) low = middle;
    else high = middle;
  }
  return low;
}

/** What lies under a point: a tick of a row, or a thread; null where nothing is near. */
export function hit(threads: Threads, geometry: ThreadGeometry, x: number, y: number): { row: number; tick: number } | null {
  const row = Math.round((y - geometry.top) / geometry.pitch);
  const nearest = (row: number, reach: number) => {
    const ticks = threads.rows[row]?.ticks ?? [];
    let best = -1;
    let distance = reach;
    ticks.forEach(({ at }, index) => {
      const d = Math.abs(tickX(geometry, at.valueOf()) - x);
      if (d < distance) [best, distance] = [index, d];
    });
    return best === -1 ? null : { row, tick: best };
  };
  if (Math.abs(y - rowY(geometry, row)) <= TICK + 4) return nearest(row, 14);
  const above = Math.floor((y - geometry.top) / geometry.pitch);
  const t = parameterAt(geometry, above, y);
  // A cubic whose ends stand upright runs sideways by 3t² − 2t³.
  const share = 3 * t ** 2 - 2 * t ** 3;
  let best: { row: number; tick: number } | null = null;
  let distance = 8;
  for (const thread of threads.threads) {
    if (thread.row !== above) continue;
    const x1 = tickX(geometry, threads.rows[above]!.ticks[thread.from]!.at.valueOf());
    const x2 = tickX(geometry, threads.rows[above + 1]!.ticks[thread.to]!.at.valueOf());
    const d = Math.abs(x1 + (x2 - x1) * share - x);
    if (d < distance) [best, distance] = [{ row: above, tick: thread.from }, d];
  }
  return best;
}
