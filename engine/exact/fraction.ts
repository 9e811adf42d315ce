import Fraction from 'fraction.js';
import { EngineError } from '../errors';
import { LIMITS } from '../limits';

export { Fraction };

/**
 * What a function takes where it needs a fraction: a `Fraction`, text such as `3/2`, `2`, `1 1/2`, `150%`, `1.5`,
 * or an integer.
 */
export type Exact = Fraction | string | number;

export const ZERO = new Fraction(0);
export const ONE = new Fraction(1);

const INTEGER = String.raw`\d+`;
const DECIMAL = String.raw`\d+(?:\.\d+)?|\.\d+`;
const MIXED = new RegExp(String.raw`^([+-]?)(${INTEGER})\s+(${INTEGER})\s*/\s*(${INTEGER})$`);
const QUOTIENT = new RegExp(String.raw`^([+-]?)(${DECIMAL})\s*/\s*(${DECIMAL})$`);
const PLAIN = new RegExp(String.raw`^([+-]?)(${DECIMAL})\s*(%?)$`);

const refuse = (message: string): never => {
  throw new EngineError('invalid_fraction', message);
};

/** A decimal text as integer numerator over a power of ten. */
function decimal(text: string): [bigint, bigint] {
  const [whole = '', part = ''] = text.split('.');
  return [BigInt(`${whole}${part}` || '0'), 10n ** BigInt(part.length)];
}

function build(sign: string, n: bigint, d: bigint, text: string): Fraction {
  if (d === 0n) return refuse(`“${text}” divides by zero. Write a number other than 0 below the line.`);
  const value = new Fraction(sign === '-' ? -n : n, d);
  if (value.n > BigInt(LIMITS.fractionTerm) || value.d > BigInt(LIMITS.fractionTerm)) {
    return refuse(`“${text}” is too large or too fine. The parts of a fraction may go up to ${LIMITS.fractionTerm}.`);
  }
  return value;
}

/**
 * Reads an exact fraction.
 * @param input - a `Fraction` (returned as it is), text, or an integer
 * @returns the fraction in lowest terms
 * @throws EngineError `invalid_fraction`
 * @example toFraction('1 1/2') //=> 3/2
 */
export function toFraction(input: Exact): Fraction {
  if (input instanceof Fraction) return input;
  if (typeof input === 'number') {
    if (!Number.isSafeInteger(input)) {
      return refuse(`The number ${input} is not exact. Write it as text, for example "3/2" or "1.5".`);
    }
    return new Fraction(input);
  }
  if (typeof input !== 'string') return refuse('A fraction is missing. Write one such as 3/2, 1.5 or 150%.');
  const text = input.trim().replace(/\u2212/g, '-');
  if (text === '') return refuse('Nothing is written here. Write a fraction such as 3/2, 1.5 or 150%.');
  if (text.length > LIMITS.fractionText) return refuse(`A fraction may have ${LIMITS.fractionText} characters at most.`);

  const mixed = MIXED.exec(text);
  if (mixed) {
    const [, sign = '', whole = '0', n = '0', d = '1'] = mixed;
    return build(sign, BigInt(whole) * BigInt(d) + BigInt(n), BigInt(d), text);
  }
  const quotient = QUOTIENT.exec(text);
  if (quotient) {
    const [, sign = '', over = '0', under = '1'] = quotient;
    const [n, nScale] = decimal(over);
    const [d, dScale] = decimal(under);
    return build(sign, n * dScale, d * nScale, text);
  }
  const plain = PLAIN.exec(text);
  if (plain) {
    const [, sign = '', number = '0', percent = ''] = plain;
    const [n, d] = decimal(number);
    return build(sign, n, percent ? d * 100n : d, text);
  }
  return refuse(`“${text}” is not a fraction. Write one such as 3/2, 1 1/2, 1.5 or 150%.`);
}

/** Factors read before: the same few stand in a piece over and over. */
const factors = new Map<string, Fraction>();

/**
 * The factor of an augmentation or diminution.
 * @throws EngineError `invalid_factor` unless above 0 and within the limit, `invalid_fraction` where it cannot be read
 */
export function toFactor(input: Exact): Fraction {
  if (typeof input !== 'string') return checkFactor(input);
  let factor = factors.get(input);
  if (factor === undefined) {
    factor = checkFactor(input);
    if (factors.size > 1_000) factors.clear();
    factors.set(input, factor);
  }
  return factor;
}

function checkFactor(input: Exact): Fraction {
  const factor = toFraction(input);
  if (factor.compare(ZERO) <= 0) {
    throw new EngineError('invalid_factor', `The factor ${formatFraction(factor)} stretches to nothing. A factor must be above 0.`);
  }
  if (factor.compare(LIMITS.factor) > 0 || factor.inverse().compare(LIMITS.factor) > 0) {
    throw new EngineError(
      'invalid_factor',
      `The factor ${formatFraction(factor)} is out of reach. Factors go from 1/${LIMITS.factor} to ${LIMITS.factor}.`,
    );
  }
  return factor;
}

/** Whether a fraction that was worked out could be typed as a factor. */
export function isFactor(value: Fraction): boolean {
  const { factor, fractionTerm } = LIMITS;
  return value.s > 0n && value.n <= BigInt(fractionTerm) && value.d <= BigInt(fractionTerm) && value.compare(factor) <= 0 && value.mul(factor).compare(1) >= 0;
}

/** Canonical text: lowest terms, `n/d`, or `n` where whole. */
export const formatFraction = (value: Fraction): string =>
  value.d === 1n ? String(value.s * value.n) : `${value.s * value.n}/${value.d}`;

export const isZero = (value: Fraction): boolean => value.n === 0n;

export function gcd(a: bigint, b: bigint): bigint {
  while (b !== 0n) [a, b] = [b, a % b];
  return a < 0n ? -a : a;
}

export const lcm = (a: bigint, b: bigint): bigint => (a / gcd(a, b)) * b;

/** Beyond it, sums would cost time without end. */
const GREATEST_SUM = 10n ** BigInt(LIMITS.sumDigits);

/**
 * Sum of fractions, 0 for none.
 * @throws EngineError `too_fine` where their common denominator has more digits than the limit
 */
export function sum(values: Iterable<Fraction>): Fraction {
  // One running numerator for each denominator, so that a long sum of few denominators stays cheap.
  const byDenominator = new Map<bigint, bigint>();
  for (const v of values) byDenominator.set(v.d, (byDenominator.get(v.d) ?? 0n) + v.s * v.n);
  let common = 1n;
  for (const d of byDenominator.keys()) {
    common = lcm(common, d);
    if (common > GREATEST_SUM) {
      throw new EngineError('too_fine', 'These lengths have too little in common to be added exactly. Use simpler lengths or factors.');
    }
  }
  let total = 0n;
  for (const [d, n] of byDenominator) total += n * (common / d);
  return new Fraction(total, common);
}
