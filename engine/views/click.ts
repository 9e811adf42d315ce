import { EngineError } from '../errors';
import { Fraction, ZERO } from '../exact/fraction';
import { parseMetre } from '../rhythm/metre';
import type { Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { clockOf } from './clock';
import { type PlannedMeasure, measureAt, planMeasures } from './measures';

export const CLICK = {
  /** seconds: beats farther apart cannot be kept together with (Repp 2006, doi 10.2478/v10053-008-0053-9: 1800 ms) */
  slowest: new Fraction(9, 5),
  /** seconds: beats closer than this cannot either (the same source: 100 to 125 ms) */
  fastest: new Fraction(1, 10),
  /** measures of rest after which an entry is announced; a default of ours, no source */
  readyAfter: 4,
  /** seconds: a count-in is no shorter, or has two measures; a default of ours, no source */
  countIn: new Fraction(2),
} as const;

/** `bar` begins a measure, `beat` a beat of it, `part` divides a slow beat; `ready` stands for a beat of the measure before an entry. */
export type ClickKind = 'bar' | 'beat' | 'part' | 'ready';
export type ClickEvent = { /** exact, from the beginning of the count-in */ readonly seconds: Fraction; readonly kind: ClickKind };
export type ClickTrack = {
  readonly events: readonly ClickEvent[];
  /** exact seconds of the count-in: where the music begins */
  readonly lead: Fraction;
};

type Beat = { readonly at: Fraction; readonly kind: 'bar' | 'beat' | 'part' };

/**
 * The clicks of one measure, from its start in written whole notes.
 * @param whole - seconds of a written whole note
 */
function beatsOf(metre: string, length: Fraction, whole: Fraction): Beat[] {
  const { groups, unit, kind } = parseMetre(metre);
  const beats: Beat[] = [];
  const shortest = groups.reduce((least, group) => Math.min(least, group), Infinity);
  const isTooFast = new Fraction(shortest, unit).mul(whole).compare(CLICK.fastest) < 0;
  let at = ZERO;
  for (const [index, group] of (isTooFast ? [groups.reduce((sum, one) => sum + one, 0)] : groups).entries()) {
    const beat = new Fraction(group, unit);
    let parts = 1;
    if (!isTooFast) {
      while (beat.div(parts).mul(whole).compare(CLICK.slowest) > 0) parts *= parts === 1 && (kind === 'compound' || group === 3) ? 3 : 2;
    }
    for (let part = 0; part < parts; part += 1) {
      const place = at.add(beat.div(parts).mul(part));
      if (place.compare(length) >= 0) return beats;
      beats.push({ at: place, kind: part > 0 ? 'part' : index === 0 ? 'bar' : 'beat' });
    }
    at = at.add(beat);
  }
  return beats;
}

/** The measures in which a player sounds, by index. */
function soundingMeasures(built: Pick<BuiltStudy, 'lines'>, instruments: readonly string[], measures: readonly PlannedMeasure[]): Set<number> {
  const sounding = new Set<number>();
  for (const { instrument, rhythm } of built.lines) {
    if (!instruments.includes(instrument)) continue;
    let at = ZERO;
    for (const { length, rest } of rhythm) {
      const end = at.add(length);
      if (!rest) {
        for (let index = measureAt(measures, at)!.index; index < measures.length && measures[index]!.start.compare(end) < 0; index += 1) sounding.add(index);
      }
      at = end;
    }
  }
  return sounding;
}

/** The measures before entries that follow a long rest. */
function readyMeasures(sounding: ReadonlySet<number>, count: number): Set<number> {
  const ready = new Set<number>();
  let silent = 0;
  for (let index = 0; index < count; index += 1) {
    if (!sounding.has(index)) silent += 1;
    else {
      if (silent >= CLICK.readyAfter) ready.add(index - 1);
      silent = 0;
    }
  }
  return ready;
}

/**
 * A click to play to: what is printed, beat by beat, from a count-in on. Slow beats are divided until they can be kept together
 * with; beats too fast for that are left out but the first of each measure. For a player, the clicks of the measure before an
 * entry after a long rest are others.
 * @param options.player - id of a player
 * @param options.countIn - measures; one, or two where one lasts less than two seconds
 * @throws EngineError `unknown_player`, `invalid_argument`
 */
export function clickEvents(study: Study, built: BuiltStudy, { player, countIn }: { player?: string; countIn?: number } = {}): ClickTrack {
  const who = player === undefined ? null : study.players.find(({ id }) => id === player);
  if (who === undefined) throw new EngineError('unknown_player', `There is no player “${player}” in this study.`);
  if (countIn !== undefined && !(Number.isInteger(countIn) && countIn >= 0 && countIn <= 16)) throw new EngineError('invalid_argument', 'A count-in has from 0 to 16 measures.');
  const measures = planMeasures(study, built);
  const clock = clockOf(study, built);
  const first = measures[0];
  if (first === undefined) return { events: [], lead: ZERO };
  const ready = who === null ? new Set<number>() : readyMeasures(soundingMeasures(built, who.instruments, measures), measures.length);
  const secondsAt = (index: number): Fraction => clock.secondsAt(measures[index]?.start ?? built.totalLength);
  const wholeOf = ({ index, start, length, scale }: PlannedMeasure): Fraction => {
    // The last measure may reach beyond the end of the piece: its tempo is that of its beginning.
    const span = clock.spans.findLast((one) => one.start.compare(start) <= 0)!;
    const isWhole = measures[index + 1] !== undefined;
    return isWhole ? secondsAt(index + 1).sub(secondsAt(index)).div(length.div(scale)) : span.secondsOfWhole.mul(scale);
  };
  const counted = measures.find(({ number }) => number > 0) ?? first;
  const whole = wholeOf(counted);
  const written = parseMetre(counted.signature ?? counted.metre);
  const measure = written.length.mul(whole);
  const count = countIn ?? (measure.compare(CLICK.countIn) < 0 ? 2 : 1);
  // A pickup ends the last measure of the count-in.
  const before = first.number === 0 && count > 0 ? written.length.sub(first.length.div(first.scale)) : ZERO;
  const lead = measure.mul(count).add(before.mul(whole));
  const events: ClickEvent[] = [];
  for (let n = 0; n < count; n += 1) for (const { at, kind } of beatsOf(written.text, written.length, whole)) events.push({ seconds: measure.mul(n).add(at.mul(whole)), kind });
  if (before.n !== 0n) for (const { at, kind } of beatsOf(written.text, before, whole)) events.push({ seconds: measure.mul(count).add(at.mul(whole)), kind });
  for (const one of measures) {
    const own = wholeOf(one);
    const start = lead.add(secondsAt(one.index));
    const end = lead.add(clock.total);
    const isPickup = one.number === 0;
    for (const { at, kind } of beatsOf(one.metre, one.length.div(one.scale), own)) {
      const seconds = start.add(at.mul(own));
      if (seconds.compare(end) >= 0) continue;
      events.push({ seconds, kind: ready.has(one.index) && kind !== 'part' ? 'ready' : isPickup && kind === 'bar' ? 'beat' : kind });
    }
  }
  return { events, lead };
}
