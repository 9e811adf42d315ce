import { EngineError } from '../errors';
import { Fraction, ZERO, formatFraction, lcm } from '../exact/fraction';
import { LIMITS } from '../limits';
import type { Rhythm, Value } from '../rhythm/types';

/** Something struck, as a file has it. */
export type Struck = {
  readonly start: Fraction;
  readonly end: Fraction;
  readonly accent?: Value['accent'];
  readonly roll?: boolean;
  /** number of the sound, where there are several */
  readonly sound?: number;
};

/** Keeps the denominators of a file's lengths small enough to be counted exactly. */
export class Fineness {
  private readonly seen = new Set<bigint>([1n]);
  private common = 1n;

  /** @throws EngineError `too_fine` */
  add({ d }: Fraction, where: string): void {
    if (this.seen.has(d)) return;
    this.seen.add(d);
    this.common = lcm(this.common, d);
    if (this.common > BigInt(LIMITS.commonDenominator)) {
      throw new EngineError('too_fine', `${where}: the lengths of this file have too little in common to be counted exactly.`);
    }
  }
}

function checked(length: Fraction): Fraction {
  const most = BigInt(LIMITS.fractionTerm);
  if (length.n > most || length.d > most) throw new EngineError('too_fine', `A length of ${formatFraction(length)} of a whole note is too long or too fine to be kept.`);
  return length;
}

/**
 * A rhythm of what is struck: what is between is silence, and silence is one rest.
 * @param struck - in order of their starts, none twice; each lasts until the next at most
 * @param total - where the line ends
 * @throws EngineError `too_large`, `too_fine`
 */
export function assembleRhythm(struck: readonly Struck[], total: Fraction): Value[] {
  if (struck.length > LIMITS.rhythmValues / 2) throw new EngineError('too_large', `A line of this file has ${struck.length} attacks; ${LIMITS.rhythmValues / 2} are the limit. Save the part that is needed as a file of its own.`);
  const values: Value[] = [];
  let at = ZERO;
  const restUntil = (position: Fraction) => {
    if (position.compare(at) > 0) values.push({ length: checked(position.sub(at)), rest: true });
  };
  for (const { start, end, accent, roll, sound } of struck) {
    restUntil(start);
    values.push({ length: checked(end.sub(start)), rest: false, ...(accent && { accent }), ...(roll && { roll: true as const }), ...(sound !== undefined && { sound }) });
    at = end;
  }
  restUntil(total);
  return values;
}

/**
 * Each attack held until the next, the last one until the end: what counts in files of percussion, whose notes are mostly
 * written short. Rests before the first attack stay.
 * @example holdToNext(parseRhythm('(1/4) 1/32 (7/32) 1/32 (7/32)')) //=> (1/4) 1/4 1/4
 */
export function holdToNext(rhythm: Rhythm): Value[] {
  const values: Value[] = [];
  for (const value of rhythm) {
    const last = values.at(-1);
    if (value.rest && last && !last.rest) values[values.length - 1] = { ...last, length: last.length.add(value.length) };
    else values.push(value);
  }
  return values;
}
