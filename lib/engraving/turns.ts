import type { PrintScore } from '@/engine';

/** Seconds of rest that a page turn needs (Quince, adrianquince.com, part preparation for composers, 2015). */
export const TURN_SECONDS = 3;

/** How long nothing is played about the beginning of a measure, in seconds. */
export function silenceAbout({ measures, staves, duration }: PrintScore, measure: number): number {
  const secondsAt = (index: number): number => (measures[index]?.seconds ?? duration).valueOf();
  const timeOf = (index: number, offset: number): number => {
    const { length, scale } = measures[index]!;
    return secondsAt(index) + ((secondsAt(index + 1) - secondsAt(index)) * offset) / length.div(scale).valueOf();
  };
  let ended = 0;
  for (let index = measure - 1; index >= 0; index -= 1) {
    const sounding = staves.flatMap((staff) => (staff.isSilent(index) ? [] : staff.cell(index).notes));
    if (sounding.length === 0) continue;
    for (const staff of staves) {
      const { notes } = staff.cell(index);
      notes.forEach(({ symbol }, n) => {
        if (symbol.rest) return;
        const next = notes[n + 1];
        ended = Math.max(ended, next === undefined ? secondsAt(index + 1) : timeOf(index, next.at.valueOf()));
      });
    }
    break;
  }
  let begins = duration.valueOf();
  for (let index = measure; index < measures.length; index += 1) {
    const attacks = staves.flatMap((staff) => (staff.isSilent(index) ? [] : staff.cell(index).notes.filter(({ symbol }) => !symbol.rest)));
    if (attacks.length === 0) continue;
    begins = Math.min(...attacks.map(({ at }) => timeOf(index, at.valueOf())));
    break;
  }
  return begins - ended;
}
