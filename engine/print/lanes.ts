import type { Staff } from '../views/score';
import type { InstrumentChange } from './types';
import { isSilent } from './cells';

/**
 * Shares a player's instruments out among as few staves as will do: instruments that sound in the same measure stand on
 * staves of their own.
 */
export function lanesOf(staves: readonly Staff[], measures: number): Staff[][] {
  const lanes: { staves: Staff[]; taken: Set<number> }[] = [];
  for (const staff of staves) {
    const sounding: number[] = [];
    for (let index = 0; index < measures; index += 1) if (!isSilent(staff, index)) sounding.push(index);
    const lane = lanes.find(({ taken }) => sounding.every((index) => !taken.has(index)));
    if (lane === undefined) lanes.push({ staves: [staff], taken: new Set(sounding) });
    else {
      lane.staves.push(staff);
      for (const index of sounding) lane.taken.add(index);
    }
  }
  return lanes.map((lane) => lane.staves);
}

/**
 * Who plays on a shared staff, measure by measure: in rests, the one who comes next is made ready as soon as the one before
 * has ended.
 * @returns for each measure the number of the staff within the lane, and the changes
 */
export function turnsOf(lane: readonly Staff[], measures: number): { turns: Uint8Array; changes: InstrumentChange[] } {
  const turns = new Uint8Array(measures);
  const entries: { at: number; who: number }[] = [];
  for (let index = 0; index < measures; index += 1) {
    const who = lane.findIndex((staff) => !isSilent(staff, index));
    if (who === -1) continue;
    if (who !== entries.at(-1)?.who) entries.push({ at: index, who });
  }
  const changes: InstrumentChange[] = [];
  let ended = 0;
  entries.forEach(({ at, who }, n) => {
    const before = entries[n - 1];
    if (before !== undefined) {
      ended = at;
      while (ended > 0 && lane.every((staff) => isSilent(staff, ended - 1))) ended -= 1;
    }
    const end = entries[n + 1]?.at ?? measures;
    turns.fill(who, before === undefined ? 0 : ended, end);
    if (before !== undefined) changes.push({ instrument: lane[who]!.instrument.id, said: ended, entry: at });
  });
  return { turns, changes };
}
