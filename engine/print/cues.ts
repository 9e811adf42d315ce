import type { Staff } from '../views/score';
import { cellOf, isSilent } from './cells';
import type { Cue, PrintStaff } from './types';

/** Defaults of ours, no source: a cue of two measures after eight or more of rest. */
export const CUES = { after: 8, length: 2 } as const;

/** How much somebody plays in a stretch, so that the cue is one that can be heard. */
const attacksIn = (staff: Staff, first: number, length: number): number => {
  let attacks = 0;
  for (let index = first; index < first + length; index += 1) {
    attacks += staff.measures[index]?.symbols.filter(({ rest, tiedFromBefore }) => !rest && !tiedFromBefore).length ?? 0;
  }
  return attacks;
};

/** Cues before the entries of a part's staff: what sounds most of what others play just before. */
export function cuesFor(staff: Pick<PrintStaff, 'isSilent'>, others: readonly Staff[], measures: number, isPrinted: (index: number) => boolean): Cue[] {
  const cues: Cue[] = [];
  let silentFrom = 0;
  for (let index = 0; index < measures; index += 1) {
    if (staff.isSilent(index)) continue;
    const first = index - CUES.length;
    const isLong = index - silentFrom >= CUES.after;
    silentFrom = index + 1;
    if (!isLong || !Array.from({ length: CUES.length }, (_, n) => first + n).every(isPrinted)) continue;
    const [best] = others
      .map((other) => ({ other, attacks: attacksIn(other, first, CUES.length) }))
      .filter(({ attacks, other }) => attacks > 0 && !isSilent(other, index - 1))
      .toSorted((a, b) => b.attacks - a.attacks);
    if (best === undefined) continue;
    cues.push({ first, length: CUES.length, instrument: best.other.instrument.id, name: best.other.instrument.name, cells: Array.from({ length: CUES.length }, (_, n) => cellOf(best.other, first + n, false)) });
  }
  return cues;
}
