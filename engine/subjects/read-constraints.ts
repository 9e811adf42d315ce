import { EngineError } from '../errors';
import { type Exact, Fraction, ZERO, formatFraction, gcd, lcm, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { readPulses } from '../proportion/resultant';
import { NoSubjectError, type Plan, type SubjectConstraint, type SubjectConstraints } from './types';

/** The pulse of constraints that name neither pulse nor values: an eighth, a setting of ours. */
const EIGHTH = new Fraction(1, 8);

const refuse = (path: SubjectConstraint, message: string): never => {
  throw new EngineError('invalid_argument', message, { path });
};

/** The longest length of which all are whole multiples: in lowest terms, gcd of the numerators over lcm of the denominators. */
const commonMeasure = (lengths: readonly Fraction[]): Fraction =>
  new Fraction(
    lengths.reduce((n, length) => gcd(n, length.n), 0n),
    lengths.reduce((d, length) => lcm(d, length.d), 1n),
  );

function readLength(path: SubjectConstraint, input: Exact, name: string): Fraction {
  const length = toFraction(input);
  return length.compare(ZERO) > 0 ? length : refuse(path, `${name} must be above 0.`);
}

function readList(path: SubjectConstraint, list: readonly Exact[] | undefined, name: string): readonly Exact[] | null {
  if (list === undefined) return null;
  if (list.length === 0) return refuse(path, `At least one ${name} is needed.`);
  if (list.length > LIMITS.pulses) throw new EngineError('too_large', `${LIMITS.pulses} are the limit of what may be listed.`, { path });
  return list;
}

/** How many pulses a length has. */
function pulsesOf(path: SubjectConstraint, length: Fraction, pulse: Fraction, name: string): number {
  const pulses = length.div(pulse);
  if (pulses.d !== 1n) return refuse(path, `${name} ${formatFraction(length)} is no whole number of pulses of ${formatFraction(pulse)}.`);
  return Number(pulses.s * pulses.n);
}

function readAttacks(constraints: SubjectConstraints, pulses: number): number | null {
  const { attacks, density } = constraints;
  if (attacks !== undefined) readPulses(attacks, 'The number of attacks');
  if (density === undefined) return attacks ?? null;
  const share = readLength('density', density, 'A density');
  if (share.compare(1) > 0) return refuse('density', 'A density is 1 at most: an attack on every pulse.');
  const wanted = share.mul(pulses);
  if (wanted.d !== 1n) {
    throw new NoSubjectError('density', `A density of ${formatFraction(share)} in ${pulses} pulses would be ${wanted.toFraction(true)} attacks, which is no whole number.`);
  }
  if (attacks !== undefined && !wanted.equals(attacks)) {
    throw new NoSubjectError('density', `A density of ${formatFraction(share)} in ${pulses} pulses is ${formatFraction(wanted)} attacks, not ${attacks}.`);
  }
  return Number(wanted.n);
}

function readEntries(places: readonly Fraction[], pulse: Fraction, pulses: number): number[] {
  const entries = places.map((place) => (((pulsesOf('entries', place, pulse, 'The entry at') % pulses) + pulses) % pulses));
  if (new Set(entries).size < entries.length) {
    throw new NoSubjectError('entries', 'Two entries fall on the same pulse of the cycle, so some pulse would be attacked twice.');
  }
  return entries.sort((a, b) => a - b);
}

/**
 * Constraints counted in pulses.
 * @throws EngineError `invalid_fraction`, `invalid_argument`, `too_large`
 */
export function readConstraints(constraints: SubjectConstraints): Plan {
  const length = readLength('length', constraints.length, 'The length');
  const lengths = readList('values', constraints.values, 'value')?.map((value) => readLength('values', value, 'Every value')) ?? null;
  const places = readList('entries', constraints.entries, 'entry')?.map(toFraction) ?? null;
  const pulse =
    constraints.pulse === undefined
      ? commonMeasure([length, ...(lengths ?? [EIGHTH]), ...(places ?? [])])
      : readLength('pulse', constraints.pulse, 'The pulse');
  const pulses = pulsesOf('length', length, pulse, 'The length');
  if (pulses > LIMITS.pulses) {
    throw new EngineError('too_large', `${pulses} pulses of ${formatFraction(pulse)} are too many: ${LIMITS.pulses} are the limit. Take a coarser pulse or a shorter length.`, { path: 'length' });
  }
  const values = lengths?.map((value) => pulsesOf('values', value, pulse, 'The value')).sort((a, b) => a - b);
  return {
    length,
    pulse,
    pulses,
    values: values ? [...new Set(values)] : null,
    attacks: readAttacks(constraints, pulses),
    byDensity: constraints.density !== undefined,
    rests: constraints.rests ?? false,
    differingNeighbours: constraints.differingNeighbours ?? false,
    palindrome: constraints.palindrome ?? false,
    entries: places && readEntries(places, pulse, pulses),
    even: constraints.even ?? false,
  };
}
