import { EngineError } from '../errors';
import { type Fraction, formatFraction } from '../exact/fraction';
import { type Grid, gridFor } from '../exact/grid';
import type { RetrogradeBy, Rhythm, Value } from '../rhythm/types';
import { type Written, type PlannedMeasure, placeWords, planMeasures } from '../views/measures';
import type { Section, Study } from './schema';
import type { BuiltStudy, Line, Palindrome, PalindromeSense } from './types';

const HOLDS: PalindromeSense = { holds: true };
const fails = (failure: string): PalindromeSense => ({ holds: false, failure });

/** A section as the retrogrades that lead to it from one that mirrors nothing; two equal ones in a row undo each other. */
function descent(sections: ReadonlyMap<string, Section>, section: Section): { root: string; turns: RetrogradeBy[] } {
  const turns: RetrogradeBy[] = [];
  let one = section;
  while (one.kind === 'mirror') {
    const by = one.by ?? 'values';
    if (turns.at(-1) === by) turns.pop();
    else turns.push(by);
    one = sections.get(one.of)!;
  }
  return { root: one.id, turns: turns.reverse() };
}

function isMirrorPair(sections: ReadonlyMap<string, Section>, a: Section, b: Section): boolean {
  const from = descent(sections, a);
  const to = descent(sections, b);
  if (from.root !== to.root) return false;
  let shared = 0;
  while (shared < from.turns.length && from.turns[shared] === to.turns[shared] && to.turns[shared] !== undefined) shared += 1;
  // What is left of both ways, joined, is the way from one to the other: a mirror is one turn.
  return from.turns.length - shared + to.turns.length - shared === 1;
}

function formSense(study: Study): PalindromeSense {
  const byId = new Map(study.sections.map((section) => [section.id, section]));
  const { sections } = study;
  for (let first = 0; first < Math.floor(sections.length / 2); first += 1) {
    const a = sections[first]!;
    const b = sections[sections.length - 1 - first]!;
    if (!isMirrorPair(byId, a, b)) return fails(`“${a.name}” and “${b.name}” do not mirror each other.`);
  }
  return HOLDS;
}

type Run = { readonly at: number; readonly ticks: number; readonly value: Value };

/** A line read from one end, adjacent rests taken together; positions are ticks from the line's start. */
class Reader {
  private index: number;
  private at: number;

  constructor(private readonly rhythm: Rhythm, private readonly grid: Grid, private readonly step: 1 | -1, total: number) {
    this.index = step === 1 ? 0 : rhythm.length - 1;
    this.at = step === 1 ? 0 : total;
  }

  /** The next run, null after the last. */
  next(): Run | null {
    const value = this.rhythm[this.index];
    if (value === undefined) return null;
    let ticks = this.grid.ticks(value.length);
    this.index += this.step;
    for (let other = this.rhythm[this.index]; value.rest && other?.rest; other = this.rhythm[this.index]) {
      ticks += this.grid.ticks(other.length);
      this.index += this.step;
    }
    const from = this.at;
    this.at += this.step * ticks;
    return { at: this.step === 1 ? from : this.at, ticks, value };
  }
}

const isSame = (a: Run, b: Run): boolean =>
  a.ticks === b.ticks &&
  a.value.rest === b.value.rest &&
  a.value.accent === b.value.accent &&
  a.value.roll === b.value.roll &&
  a.value.sound === b.value.sound &&
  a.value.ends === b.value.ends;

type Place = (position: Fraction) => string;
type Named = { readonly line: Line; readonly name: string };

function valuesSense(lines: readonly Named[], grid: Grid, place: Place): PalindromeSense {
  for (const { line, name } of lines) {
    // From both ends towards the middle; the first that differ are found where a reader would meet them.
    const total = line.rhythm.reduce((ticks, value) => ticks + grid.ticks(value.length), 0);
    const front = new Reader(line.rhythm, grid, 1, total);
    const back = new Reader(line.rhythm, grid, -1, total);
    for (let a = front.next(), b = back.next(); a && b && a.at < b.at; a = front.next(), b = back.next()) {
      if (isSame(a, b)) continue;
      return fails(`${name}: the value at ${place(grid.fraction(a.at))} differs from the one at ${place(grid.fraction(b.at))}.`);
    }
  }
  return HOLDS;
}

/** The first of these times, in order, whose mirror image about half of `sum` is none of them. */
function withoutPartner(times: readonly number[], sum: number): number | undefined {
  let partner = times.length - 1;
  return times.find((at) => {
    while (partner >= 0 && times[partner]! > sum - at) partner -= 1;
    return times[partner] !== sum - at;
  });
}

function attacksSense(lines: readonly Named[], grid: Grid, place: Place): PalindromeSense {
  const times = lines.map(({ line }) => {
    const own: number[] = [];
    let at = 0;
    for (const value of line.rhythm) {
      if (!value.rest) own.push(at);
      at += grid.ticks(value.length);
    }
    return own;
  });
  const first = times.reduce((least, own) => Math.min(least, own[0] ?? Infinity), Infinity);
  const last = times.reduce((most, own) => Math.max(most, own.at(-1) ?? -Infinity), -Infinity);
  for (const [index, own] of times.entries()) {
    // In order of time the first attack's partner is the last, and so on inwards.
    if (own.every((at, n) => at + own[own.length - 1 - n]! === first + last)) continue;
    const odd = withoutPartner(own, first + last);
    if (odd !== undefined) {
      return fails(`${lines[index]!.name}: the attack at ${place(grid.fraction(odd))} has no partner at ${place(grid.fraction(first + last - odd))}.`);
    }
  }
  return HOLDS;
}

/** Places in words; measures are only counted once a place is asked for. */
function placeIn(study: Study, built: Written): Place {
  let measures: PlannedMeasure[] | undefined;
  return (position) => {
    try {
      measures ??= planMeasures(study, built);
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      return `${formatFraction(position)} whole notes from the start`;
    }
    return placeWords(measures, position);
  };
}

/** Every length that stands in a line: those of the statements, each rhythm looked at once, and the places between them. */
function lengthsOf({ statements, totalLength }: Omit<BuiltStudy, 'palindrome'>): Fraction[] {
  const lengths = [totalLength];
  const seen = new Set<Rhythm>();
  for (const { start, length, rhythm } of statements) {
    lengths.push(start, length);
    if (seen.has(rhythm)) continue;
    seen.add(rhythm);
    for (const value of rhythm) lengths.push(value.length);
  }
  return lengths;
}

/** Whether a study is a palindrome, in each of the three senses; a failure names the first place. */
export function findPalindrome(study: Study, built: Omit<BuiltStudy, 'palindrome'>): Palindrome {
  const grid = gridFor(lengthsOf(built), built.totalLength.mul(2));
  const place = placeIn(study, built);
  const named = built.lines.map((line, index) => ({ line, name: study.instruments[index]!.name }));
  return {
    form: formSense(study),
    values: valuesSense(named, grid, place),
    attacks: attacksSense(named, grid, place),
  };
}
