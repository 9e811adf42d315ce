import { Fraction, gcd, lcm } from '../../exact/fraction';

/** Ticks of a quarter: fifteen bits, the highest of sixteen being 0 (Standard MIDI Files 1.0). */
export const MOST_TICKS = 32_767;
/** What most programs expect at least; exact divisions are brought up to it by doubling. */
const USUAL = 480;

export type MidiDivision = {
  /** ticks of a quarter */
  readonly division: number;
  /** whether every attack and end falls on a tick */
  readonly exact: boolean;
  /** the greatest distance of an attack or end from its tick, in quarters */
  readonly worst: Fraction;
};

/** The distance of a position from the nearest tick, in quarters. */
function errorOf(quarters: Fraction, division: number): Fraction {
  const scaled = quarters.n * BigInt(division);
  const rest = scaled % quarters.d;
  const far = rest * 2n > quarters.d ? quarters.d - rest : rest;
  return new Fraction(far, quarters.d * BigInt(division));
}

/** Divisions that hold as many of the denominators as they can, and the finest of all. */
function candidates(denominators: readonly bigint[]): number[] {
  const found = new Set<number>([MOST_TICKS]);
  const most = BigInt(MOST_TICKS);
  for (let first = 0; first < Math.min(denominators.length, 48); first += 1) {
    let common = denominators[first]!;
    if (common > most) continue;
    for (const other of denominators) if (lcm(common, other) <= most) common = lcm(common, other);
    found.add(Number(common * (most / common)));
  }
  return [...found];
}

/**
 * The coarsest division on which every position is whole, brought up to 480 by doubling; where there is none up to 32,767, the
 * one of those tried whose greatest error is least.
 * @param positions - in quarters
 */
export function divisionFor(positions: Iterable<Fraction>): MidiDivision {
  const byRemainder = new Map<string, Fraction>();
  for (const position of positions) {
    const part = new Fraction(position.n % position.d, position.d);
    byRemainder.set(part.toFraction(), part);
  }
  const parts = [...byRemainder.values()];
  const denominators = [...new Set(parts.map(({ d }) => d))].sort((a, b) => (a < b ? -1 : 1));
  let common = 1n;
  for (const d of denominators) {
    common = lcm(common, d);
    if (common > BigInt(MOST_TICKS)) break;
  }
  if (common <= BigInt(MOST_TICKS)) {
    let division = Number(common);
    while (division < USUAL) division *= 2;
    // What divides 480 is written with it.
    if (USUAL % Number(common) === 0) division = USUAL;
    return { division, exact: true, worst: new Fraction(0) };
  }
  let best: MidiDivision | null = null;
  for (const division of candidates(denominators)) {
    let worst = new Fraction(0);
    for (const part of parts) {
      if (BigInt(division) % (part.d / gcd(part.n, part.d)) === 0n) continue;
      const error = errorOf(part, division);
      if (error.compare(worst) > 0) worst = error;
      if (best !== null && worst.compare(best.worst) >= 0) break;
    }
    if (best === null || worst.compare(best.worst) < 0) best = { division, exact: false, worst };
  }
  return best!;
}
