import { EngineError } from '../../errors';
import { Fraction } from '../../exact/fraction';
import { LIMITS } from '../../limits';
import { type Metre, parseMetre } from '../../rhythm/metre';
import type { Odd } from '../odd';
import { tooLarge } from '../refuse';
import type { ReadMeasure } from '../types';
import type { MidiEvent } from './read-midi';

export type MetreAt = { readonly at: number; readonly metre: Metre };

/** The metres of a file in order; at its start 4/4 where none is said. */
export function metresOf(events: Iterable<MidiEvent>, odd: Odd): MetreAt[] {
  const changes: MetreAt[] = [];
  for (const event of events) {
    if (event.kind !== 'metre') continue;
    try {
      changes.push({ at: event.at, metre: parseMetre(`${event.beats}/${event.unit}`).text });
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      odd.note(`The metre ${event.beats}/${event.unit} cannot be kept: the one before was kept`);
    }
  }
  const sorted = changes.sort((a, b) => a.at - b.at).filter(({ at }, index, all) => all[index + 1]?.at !== at);
  if (sorted[0]?.at === 0) return sorted;
  if (sorted.length === 0) odd.note('The file does not say a metre: 4/4 was assumed');
  return [{ at: 0, metre: '4/4' }, ...sorted];
}

/**
 * The measures up to a tick; one that a change of metre cuts short is as long as it lasts.
 * @throws EngineError `too_large`
 */
export function measuresUpTo(end: number, metres: readonly MetreAt[], ticksPerWhole: number): ReadMeasure[] {
  const measures: ReadMeasure[] = [];
  const whole = new Fraction(ticksPerWhole);
  for (const [index, { at, metre }] of metres.entries()) {
    const until = Math.min(end, metres[index + 1]?.at ?? end);
    const length = parseMetre(metre).length.mul(whole);
    let start = new Fraction(at);
    while (start.compare(until) < 0) {
      if (measures.length >= LIMITS.measures) tooLarge(`This MIDI file has more than ${LIMITS.measures} measures, which is the limit.`);
      const next = start.add(length);
      const isLast = index === metres.length - 1;
      const stop = isLast || next.compare(until) <= 0 ? next : new Fraction(until);
      measures.push({ number: String(measures.length + 1), start: start.div(whole), length: stop.sub(start).div(whole), metre });
      start = stop;
    }
  }
  return measures;
}

/** The measures that begin before a place; the same list for the same number of them. */
export function measuresBefore(all: readonly ReadMeasure[]): (end: Fraction) => readonly ReadMeasure[] {
  const known = new Map<number, readonly ReadMeasure[]>();
  return (end) => {
    let [low, high] = [0, all.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (all[middle]!.start.compare(end) < 0) low = middle + 1;
      else high = middle;
    }
    const list = known.get(low) ?? all.slice(0, low);
    known.set(low, list);
    return list;
  };
}
