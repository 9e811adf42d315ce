import v8 from 'node:v8';
import vm from 'node:vm';

v8.setFlagsFromString('--expose-gc');
const collect = vm.runInNewContext('gc') as () => void;

/** Growth that is allowed for each tenfold of attacks. */
export const LIMIT = 12;

/**
 * Median time of several runs in milliseconds, after runs that do not count; the result is kept, so that no run is spared.
 * Memory is cleared before each run, outside of the time: a run pays for its own garbage, not for that of the one before.
 */
export function medianOf(run: () => unknown, runs = 9, warmUp = 4): number {
  const times: number[] = [];
  let kept: unknown = null;
  for (let n = 0; n < warmUp + runs; n += 1) {
    kept = null;
    collect();
    const before = performance.now();
    kept = run();
    if (n >= warmUp) times.push(performance.now() - before);
  }
  if (kept === null) throw new Error('the run gave nothing');
  return times.sort((a, b) => a - b)[Math.floor(runs / 2)]!;
}

export type Sized = { readonly attacks: number; readonly ms: number; readonly plainMs: number };

const ms = (value: number): string => `${value < 10 ? value.toFixed(2) : value.toFixed(1)} ms`;

/**
 * Prints a table of one measurement by size.
 * @returns whether it grows within the limit
 */
export function report(title: string, sizes: readonly Sized[]): boolean {
  console.log(`\n${title}`);
  let isWithin = true;
  sizes.forEach(({ attacks, ms: time, plainMs }, index) => {
    const before = sizes[index - 1];
    // Sizes are not tenfold to the attack: growth is scaled to what tenfold would be, in proportion.
    const growth = before === undefined ? null : (time / before.ms) * (10 / (attacks / before.attacks));
    if (growth !== null && growth > LIMIT) isWithin = false;
    console.log(
      [
        `${attacks.toLocaleString('en')} attacks`.padStart(16),
        ms(time).padStart(11),
        growth === null ? ''.padEnd(34) : `  growth for tenfold ${growth.toFixed(1)} (limit ${LIMIT})`.padEnd(34),
        `  plain numbers ${ms(plainMs)}, ratio ${(time / plainMs).toFixed(1)}`,
      ].join(''),
    );
  });
  return isWithin;
}
