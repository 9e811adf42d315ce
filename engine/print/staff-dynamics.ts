import type { Fraction } from '../exact/fraction';
import type { Statement } from '../study/types';
import { type PlannedMeasure, measureAt } from '../views/measures';
import type { Dynamic } from './dynamics';
import type { StaffDynamic, StaffPlace } from './types';

/** After so many measures of silence a level is said again, though it has not changed (common practice, no source for the number). */
const SAID_AGAIN_AFTER = 4;

export function placeOf(measures: readonly PlannedMeasure[], position: Fraction): StaffPlace {
  const measure = measureAt(measures, position)!;
  return { measure: measure.index, offset: position.sub(measure.start).div(measure.scale) };
}

/** Positions of a statement's first attack and of the end of its last, in whole notes that sound. */
function soundingSpan({ start, rhythm }: Statement, isOwn: (attack: number) => boolean): { first: Fraction; last: Fraction } | null {
  let at = start;
  let attack = 0;
  let first: Fraction | null = null;
  let last: Fraction | null = null;
  for (const { length, rest } of rhythm) {
    const end = at.add(length);
    if (!rest && isOwn(attack++)) {
      first ??= at;
      last = end;
    }
    at = end;
  }
  return first === null || last === null ? null : { first, last };
}

const later = (a: Fraction, b: Fraction): Fraction => (a.compare(b) < 0 ? b : a);
const earlier = (a: Fraction, b: Fraction): Fraction => (a.compare(b) < 0 ? a : b);

/**
 * The dynamics of one staff: each statement's, from its first attack to the end of its last, a level said once while it holds.
 * @param statements - those that the staff plays, in order of time
 */
export function staffDynamics(statements: readonly Statement[], instruments: ReadonlySet<string>, dynamics: ReadonlyMap<string, readonly Dynamic[]>, measures: readonly PlannedMeasure[]): StaffDynamic[] {
  const found: StaffDynamic[] = [];
  let said: string | null = null;
  let silentFrom: Fraction | null = null;
  const level = (at: Fraction, text: string, isMark: boolean): void => {
    const place = placeOf(measures, at);
    const gap = silentFrom === null ? 0 : place.measure - placeOf(measures, silentFrom).measure;
    if (text === said && gap <= SAID_AGAIN_AFTER) return;
    said = text;
    found.push({ kind: 'level', place, text, isMark });
  };
  for (const statement of statements) {
    const span = soundingSpan(statement, (attack) => statement.assigned === undefined || instruments.has(statement.assigned[attack]!));
    if (span === null) continue;
    const own = dynamics.get(statement.id) ?? [];
    let held: { text: string; isMark: boolean } | null = null;
    let isFirst = true;
    const sayHeld = (): void => {
      if (isFirst && held !== null) level(span.first, held.text, held.isMark);
      isFirst = false;
    };
    for (const one of own) {
      if (one.kind === 'level') {
        if (one.at.compare(span.first) <= 0) held = one;
        else if (one.at.compare(span.last) <= 0) {
          sayHeld();
          const place = placeOf(measures, one.at.equals(span.last) ? span.last : one.at);
          said = one.text;
          // What is reached where the sound ends stands at the end of the hairpin, in the last measure that sounds.
          found.push({ kind: 'level', place: one.at.equals(span.last) ? endOfSound(measures, span.last, place) : place, text: one.text, isMark: one.isMark });
        }
        continue;
      }
      const from = later(one.from, span.first);
      const to = earlier(one.to, span.last);
      if (from.compare(to) >= 0) continue;
      sayHeld();
      found.push({ kind: 'hairpin', from: placeOf(measures, from), to: endOfSound(measures, to, placeOf(measures, to)), direction: one.direction });
      said = null;
    }
    sayHeld();
    silentFrom = span.last;
  }
  return found;
}

/** A place at a bar line as the end of the measure before it. */
function endOfSound(measures: readonly PlannedMeasure[], position: Fraction, place: StaffPlace): StaffPlace {
  const before = measures[place.measure - 1];
  if (place.offset.n !== 0n || before === undefined) {
    const measure = measures[place.measure]!;
    return { measure: place.measure, offset: earlier(position.sub(measure.start), measure.length).div(measure.scale) };
  }
  return { measure: before.index, offset: before.length.div(before.scale) };
}
