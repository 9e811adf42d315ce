import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  EngineError, type Exact, Fraction, LIMITS, alignment, checkLadder, claimWords, euclidean, formatFraction, ladder, resultant, secondsOf, tempoFor,
} from '@/engine';
import { arbitraryFactor, arbitraryLength } from '../rhythm/arbitrary-rhythm';

function errorOf(act: () => unknown): EngineError {
  try {
    act();
  } catch (error) {
    if (error instanceof EngineError) return error;
    throw error;
  }
  throw new Error('nothing was thrown');
}

const lengths = fc.array(arbitraryLength, { minLength: 1, maxLength: 8 });

describe('ladder', () => {
  it('of one length has no steps, which are equal', () => {
    const one = ladder(['3/2']);
    expect([one.steps, one.equalSteps, formatFraction(one.total), one.toFirst.map(formatFraction)]).toEqual([[], true, '3/2', ['1']]);
  });

  it('of the demo’s factors says that the steps are not equal', () => {
    const run = ladder(['1', '5/4', '3/2', '2']);
    expect(run.steps.map(formatFraction)).toEqual(['5/4', '6/5', '4/3']);
    expect(run.equalSteps).toBe(false);
    expect(formatFraction(run.total)).toBe('23/4');
  });

  it.each<[string, unknown[], string]>([
    ['nothing', [], 'invalid_argument'],
    ['a length of 0', ['1', '0'], 'invalid_argument'],
    ['a negative length', ['-1'], 'invalid_argument'],
    ['no fraction', ['one'], 'invalid_fraction'],
    ['a division by zero', ['1/0'], 'invalid_fraction'],
    ['a number that is not exact', [1.5], 'invalid_fraction'],
    ['too many', Array(LIMITS.lengths + 1).fill('1'), 'too_large'],
  ])('and alignment refuse %s', (_what, input, code) => {
    expect(errorOf(() => ladder(input as Exact[])).code).toBe(code);
    expect(errorOf(() => alignment(input as Exact[])).code).toBe(code);
  });

  it('each length is the first times its ratio, and the one before times its step', () => {
    fc.assert(
      fc.property(lengths, (run) => {
        const { toFirst, steps, total } = ladder(run);
        run.forEach((length, i) => {
          expect(toFirst[i]!.mul(run[0]!).equals(length)).toBe(true);
          if (i > 0) expect(run[i - 1]!.mul(steps[i - 1]!).equals(length)).toBe(true);
        });
        expect(total.equals(run.reduce((a, b) => a.add(b)))).toBe(true);
      }),
    );
  });

  it('powers of one ratio have equal steps', () => {
    fc.assert(
      fc.property(arbitraryFactor, fc.integer({ min: 1, max: 12 }), (ratio, count) => {
        let power = new Fraction(1);
        const run = Array.from({ length: count }, () => {
          const now = power;
          power = power.mul(ratio);
          return now;
        });
        expect(ladder(run).equalSteps).toBe(true);
      }),
    );
  });
});

describe('alignment', () => {
  const whole = (value: Fraction) => value.d === 1n;

  it('is a whole number of every cycle, and no smaller length is', () => {
    fc.assert(
      fc.property(fc.array(arbitraryLength, { minLength: 1, maxLength: 4 }), (cycles) => {
        const after = alignment(cycles);
        const turns = cycles.map((cycle) => after.div(cycle));
        expect(turns.every(whole)).toBe(true);
        // The numbers of turns have no common divisor: any earlier meeting would be one.
        const divisor = turns.map((t) => t.n).reduce((a, b) => { while (b) [a, b] = [b, a % b]; return a; });
        expect(divisor).toBe(1n);
      }),
    );
  });

  it('does not depend on order or doubles, and scales with the cycles', () => {
    fc.assert(
      fc.property(lengths, arbitraryFactor, (cycles, factor) => {
        expect(alignment([...cycles].reverse().concat(cycles)).equals(alignment(cycles))).toBe(true);
        expect(alignment(cycles.map((c) => c.mul(factor))).equals(alignment(cycles).mul(factor))).toBe(true);
      }),
    );
  });

  it('of a thousand cycles comes to an end', () => {
    expect(alignment(Array.from({ length: 1_000 }, (_, k) => k + 1)).d).toBe(1n);
  });
});

describe('tempoFor', () => {
  it('makes the unstretched notation last factor times as long', () => {
    fc.assert(
      fc.property(arbitraryLength, arbitraryLength, fc.integer({ min: 20, max: 400 }), arbitraryFactor, (length, beat, perMinute, factor) => {
        const tempo = { beat, perMinute };
        const other = tempoFor(tempo, factor);
        expect(secondsOf(length, other).equals(secondsOf(length, tempo).mul(factor))).toBe(true);
        expect(other.beat.equals(beat)).toBe(true);
      }),
    );
  });

  it.each([
    [{ beat: '1/4', perMinute: '84' }, '0', 'invalid_factor'],
    [{ beat: '1/4', perMinute: '84' }, '-1', 'invalid_factor'],
    [{ beat: '1/4', perMinute: '0' }, '2', 'invalid_tempo'],
    [{ beat: 'x', perMinute: '84' }, '2', 'invalid_fraction'],
  ])('refuses %j by %s', (tempo, factor, code) => {
    expect(errorOf(() => tempoFor(tempo, factor)).code).toBe(code);
  });
});

describe('resultant and euclidean refuse', () => {
  it.each([[0, 2], [2, 0], [-1, 2], [1.5, 2], [Number.NaN, 2], [LIMITS.pulses + 1, 2], ['3', 2]])('%j against %j', (a, b) => {
    expect(errorOf(() => resultant(a as number, b as number)).code).toBe('invalid_argument');
    expect(errorOf(() => euclidean(a as number, b as number)).code).toBe('invalid_argument');
  });

  it('more attacks than pulses, in words', () => {
    const error = errorOf(() => euclidean(5, 4));
    expect(error.code).toBe('invalid_argument');
    expect(error.message).toBe('5 attacks do not fit into 4 pulses.');
  });

  it('nothing at their limits', () => {
    expect(resultant(LIMITS.pulses, LIMITS.pulses - 1)).toHaveLength(2 * LIMITS.pulses - 2);
    expect(euclidean(610, 987)).toHaveLength(610);
    expect(euclidean(1, 1)).toEqual([1]);
    expect(euclidean(1, 2)).toEqual([2]);
    expect(euclidean(4, 4)).toEqual([1, 1, 1, 1]);
  });
});

describe('a claim about a run of lengths', () => {
  it('“each 50 % longer”: 4, 6, 8, 12 are steps of 3:2, 4:3, 3:2, and so fail at the second (common practice, no source)', () => {
    const claim = checkLadder(['4', '6', '8', '12'], '150%');
    expect(claim.holds).toBe(false);
    expect(claim.failure && [claim.failure.step, formatFraction(claim.failure.ratio), formatFraction(claim.failure.expected), formatFraction(claim.failure.given)]).toEqual([1, '4/3', '9', '8']);
    expect(claimWords(claim)).toBe('The claim fails at step 2: length 3 is 8, 4/3 of the one before it; it would be 9. 4, 6, 9, 13 1/2 would satisfy it.');
  });
  it('4, 6, 9, 13 1/2 satisfies it', () => {
    expect(checkLadder(['4', '6', '9', '13 1/2'], '3/2')).toMatchObject({ holds: true });
    expect(claimWords(checkLadder(['4', '6', '9', '13 1/2'], '3/2'))).toBe('The claim holds: every step is the same.');
  });
  it('a ratio of nothing or less is refused', () => {
    for (const ratio of ['0', '-3/2']) expect(errorOf(() => checkLadder(['4', '6'], ratio)).code).toBe('invalid_argument');
  });
  it('lengths that are no whole numbers are told as mixed numbers', () => {
    expect(claimWords(checkLadder(['5', '7 1/2', '10 1/2'], '3/2'))).toBe('The claim fails at step 2: length 3 is 10 1/2, 7/5 of the one before it; it would be 11 1/4. 5, 7 1/2, 11 1/4 would satisfy it.');
  });
  it('law: the run that would satisfy a claim does', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 99 }), { minLength: 1, maxLength: 8 }), fc.integer({ min: 1, max: 9 }), fc.integer({ min: 1, max: 9 }), (lengths, n, d) => {
        const { run } = checkLadder(lengths, `${n}/${d}`);
        expect(checkLadder(run, `${n}/${d}`).holds).toBe(true);
      }),
    );
  });
});
