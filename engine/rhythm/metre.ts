import { EngineError } from '../errors';
import { Fraction, formatFraction } from '../exact/fraction';
import { LIMITS } from '../limits';

/** A metre as text: `4/4`, `7/8`, additive `3+2+2/8`. */
export type Metre = string;

export type MetreKind =
  /** each group is one beat of the written unit, or its half-measures */
  | 'simple'
  /** each beat is three of the written unit */
  | 'compound'
  /** unequal groups, written or by custom */
  | 'additive';

export type ParsedMetre = {
  readonly text: Metre;
  readonly kind: MetreKind;
  /** the number of written units in a measure */
  readonly count: number;
  /** the written unit: 4 is a quarter */
  readonly unit: number;
  /** written units in each beat group, in order; their sum is `count` */
  readonly groups: readonly number[];
  /** length of a measure, in whole notes */
  readonly length: Fraction;
};

const refuse = (message: string): never => {
  throw new EngineError('invalid_metre', message);
};

/**
 * How a plain number of units is grouped where no groups are written: 5 as 3+2, 7 as 2+2+3, 8 as 3+3+2, 11 as 3+3+3+2
 * (common practice, no source; written groups override). Others take threes first, then twos.
 */
function customaryGroups(count: number): number[] {
  if (count === 5) return [3, 2];
  if (count === 7) return [2, 2, 3];
  const twos = count % 3 === 0 ? 0 : count % 3 === 2 ? 1 : 2;
  const threes = (count - 2 * twos) / 3;
  return [...Array<number>(threes).fill(3), ...Array<number>(twos).fill(2)];
}

function grouping(count: number, unit: number): { kind: MetreKind; groups: number[] } {
  const ones = { kind: 'simple' as const, groups: Array<number>(count).fill(1) };
  if (count <= 2) return ones;
  if (count === 3) return unit >= 8 ? { kind: 'compound', groups: [3] } : ones;
  if (count === 4) return unit >= 8 ? { kind: 'simple', groups: [2, 2] } : ones;
  if (count % 3 === 0) return { kind: 'compound', groups: Array<number>(count / 3).fill(3) };
  return { kind: 'additive', groups: customaryGroups(count) };
}

const parsed = new Map<Metre, ParsedMetre>();

/**
 * Reads a metre.
 * @throws EngineError `invalid_metre`
 * @example parseMetre('7/8').groups //=> [2, 2, 3]
 */
export function parseMetre(input: Metre): ParsedMetre {
  const known = parsed.get(input);
  if (known) return known;
  const text = String(input).replace(/\s+/g, '');
  const match = /^(\d{1,3}(?:\+\d{1,3})*)\/(\d{1,3})$/.exec(text);
  if (!match) return refuse(`“${input}” is not a metre. Write one such as 4/4, 7/8 or 3+2+2/8.`);
  const written = match[1]!.split('+').map(Number);
  const unit = Number(match[2]);
  const count = written.reduce((a, b) => a + b, 0);
  if (written.some((n) => n === 0)) return refuse(`“${input}” is not a metre: a group of no beats cannot be counted.`);
  if (count > LIMITS.metreBeats) return refuse(`“${input}” has ${count} beats. A metre may have ${LIMITS.metreBeats} at most.`);
  if (unit === 0 || (unit & (unit - 1)) !== 0 || unit > LIMITS.metreUnit) {
    return refuse(`“${input}” is not a metre: the lower number must be 1, 2, 4, 8, 16, 32 or 64.`);
  }
  const shape = written.length > 1 ? { kind: 'additive' as const, groups: written } : grouping(count, unit);
  const metre: ParsedMetre = { text, count, unit, length: new Fraction(count, unit), ...shape };
  if (parsed.size > 1_000) parsed.clear();
  parsed.set(input, metre);
  return metre;
}

/**
 * The metre that a measure of its own length is written in, keeping the beat unit of `like` where that is fine enough.
 * @throws EngineError `invalid_metre` where no metre has that length
 * @example metreOfLength(new Fraction(1, 2), '4/4') //=> '2/4'
 */
export function metreOfLength(length: Fraction, like: Metre): Metre {
  const whole = parseMetre(like);
  if (length.equals(whole.length)) return whole.text;
  const unit = Math.max(Number(length.d), whole.unit);
  if (!Number.isInteger(Math.log2(Number(length.d))) || unit > LIMITS.metreUnit) {
    return refuse(`A measure of ${formatFraction(length)} of a whole note cannot be written: no metre has that length.`);
  }
  return `${length.mul(unit).n}/${unit}`;
}
