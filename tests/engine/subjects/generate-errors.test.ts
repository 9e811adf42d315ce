import { describe, expect, it } from 'vitest';
import { EngineError, LIMITS, type SubjectConstraints, countSubjects, formatRhythm, generateSubject } from '@/engine';

function errorOf(act: () => unknown): EngineError {
  try {
    act();
  } catch (error) {
    if (error instanceof EngineError) return error;
    throw error;
  }
  throw new Error('nothing was thrown');
}

describe('constraints that cannot be read', () => {
  it.each<[string, SubjectConstraints, string, string | undefined]>([
    ['no length', { length: '' }, 'invalid_fraction', undefined],
    ['a length of 0', { length: 0 }, 'invalid_argument', 'length'],
    ['a negative pulse', { length: 1, pulse: '-1/8' }, 'invalid_argument', 'pulse'],
    ['a length off the pulse', { length: 1, pulse: '3/8' }, 'invalid_argument', 'length'],
    ['no values', { length: 1, values: [] }, 'invalid_argument', 'values'],
    ['a value of 0', { length: 1, values: ['1/4', 0] }, 'invalid_argument', 'values'],
    ['a value off the pulse', { length: 1, pulse: '1/8', values: ['1/12'] }, 'invalid_argument', 'values'],
    ['no attacks', { length: 1, attacks: 0 }, 'invalid_argument', undefined],
    ['half an attack', { length: 1, attacks: 1.5 }, 'invalid_argument', undefined],
    ['a density of 0', { length: 1, density: 0 }, 'invalid_argument', 'density'],
    ['a density above 1', { length: 1, density: '9/8' }, 'invalid_argument', 'density'],
    ['no entries', { length: 1, entries: [] }, 'invalid_argument', 'entries'],
    ['an entry off the pulse', { length: 1, pulse: '1/8', entries: ['1/16'] }, 'invalid_argument', 'entries'],
    ['too many pulses', { length: LIMITS.pulses, pulse: '1/2' }, 'too_large', 'length'],
    ['too many values', { length: 1, values: Array<string>(LIMITS.pulses + 1).fill('1/4') }, 'too_large', 'values'],
  ])('%s', (_what, constraints, code, path) => {
    const error = errorOf(() => generateSubject(constraints, 1));
    expect([error.code, error.path]).toEqual([code, path]);
    expect(errorOf(() => countSubjects(constraints)).message).toBe(error.message);
  });

  it.each([0.5, Number.NaN, 2 ** 53])('a seed of %s', (seed) => {
    expect(errorOf(() => generateSubject({ length: 1 }, seed)).path).toBe('seed');
  });
});

describe('constraints that no rhythm meets, in words', () => {
  it.each<[SubjectConstraints, string, string]>([
    [{ length: '5/8', values: ['1/4'] }, 'values', 'No rhythm of length 5/8 on a pulse of 1/8 without rests has only values of 1/4.'],
    [{ length: 1, attacks: 9 }, 'attacks', 'No rhythm of length 1 on a pulse of 1/8 without rests has 9 attacks.'],
    [{ length: 1, values: ['1/4', '3/8'], attacks: 5 }, 'attacks', 'Of the 4 rhythms of length 1 on a pulse of 1/8 without rests with only values of 1/4 and 3/8, none has 5 attacks.'],
    [{ length: 2, density: '1/3' }, 'density', 'A density of 1/3 in 16 pulses would be 5 1/3 attacks, which is no whole number.'],
    [{ length: 2, density: '1/2', attacks: 4 }, 'density', 'A density of 1/2 in 16 pulses is 8 attacks, not 4.'],
    [
      { length: '12/8', entries: [0, '1/8', '3/8'] }, 'entries',
      'No rhythm of length 3/2 on a pulse of 1/8 without rests has attacks that cover each pulse once with entries at 0, 1/8 and 3/8.',
    ],
    [{ length: 1, entries: [0, '1/4', '5/4'] }, 'entries', 'Two entries fall on the same pulse of the cycle, so some pulse would be attacked twice.'],
    [{ length: '1/2', values: ['1/4'], differingNeighbours: true }, 'differingNeighbours', 'The only rhythm of length 1/2 on a pulse of 1/4 without rests with only values of 1/4 does not have neighbours that always differ in length.'],
    [{ length: 1, rests: true, values: ['1/2'], attacks: 3 }, 'attacks', 'No rhythm of length 1 on a pulse of 1/2 has 3 attacks.'],
  ])('%j', (constraints, constraint, message) => {
    const error = errorOf(() => generateSubject(constraints, 1));
    expect(error).toMatchObject({ name: 'NoSubjectError', code: 'invalid_argument', constraint, message });
    expect(countedOrRefused(constraints)).toBe(constraint === 'density' || message.startsWith('Two') ? message : 0n);
  });
});

function countedOrRefused(constraints: SubjectConstraints): bigint | string | null {
  try {
    return countSubjects(constraints);
  } catch (error) {
    if (error instanceof EngineError) return error.message;
    throw error;
  }
}

describe('at and beyond the limits', () => {
  it('searches that are too large say so, and do not claim that there is none', () => {
    for (const constraints of [
      { length: 128, rests: true, differingNeighbours: true },
      { length: 128, entries: [0, 64], differingNeighbours: true, palindrome: true },
      { length: 128, even: true, values: ['1/8', '9/8'], palindrome: true },
    ] satisfies SubjectConstraints[]) {
      expect(errorOf(() => generateSubject(constraints, 1)).code).toBe('too_large');
    }
  });

  it('too many tilings to go through still give one, uncounted', () => {
    const { rhythm, solutions } = generateSubject({ length: 8, entries: [0, 4] }, 1);
    expect(solutions).toBeNull();
    expect(rhythm).toHaveLength(32);
  });

  it('every pulse of the limit', () => {
    const length = `${LIMITS.pulses}/8`;
    expect(formatRhythm(generateSubject({ length, values: [length] }, 1).rhythm)).toBe('128');
    expect(countSubjects({ length })).toBe(2n ** BigInt(LIMITS.pulses - 1));
  });
});
