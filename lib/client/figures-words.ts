import { formatClock, toFraction } from '@/engine';

/** `77 measures, 5:38` from what a list tells of a study; empty where it has not been worked out. */
export function lengthWords({ measures, seconds }: { readonly measures: string; readonly seconds: number }): string {
  if (measures === '') return '';
  return `${measures} ${measures === '1' ? 'measure' : 'measures'}, ${formatClock(toFraction(seconds.toFixed(3)))}`;
}
