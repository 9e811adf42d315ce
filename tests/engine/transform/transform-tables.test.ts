import { describe, expect, it } from 'vitest';
import {
  EngineError, LIMITS, type RetrogradeBy, type Rhythm, type RotateBy, type Step,
  addToEach, applySteps, attacks, augment, diminish, formatFraction, formatRhythm, parseRhythm, retrograde, rotate,
} from '@/engine';

const on = (text: string, change: (rhythm: Rhythm) => Rhythm): string => formatRhythm(change(parseRhythm(text)));

function codeOf(act: () => unknown): string {
  try {
    act();
  } catch (error) {
    if (error instanceof EngineError) {
      expect(error.message).toMatch(/^[A-Z“].*\.$/);
      return error.code;
    }
    throw error;
  }
  return 'nothing thrown';
}

describe('augment and diminish', () => {
  it.each([
    ['1/4 1/8 (1/8) 1/2>///@2', '3/2', '3/8 3/16 (3/16) 3/4>///@2'],
    ['1/4 1/8', '150%', '3/8 3/16'],
    ['1/4 1/8', '1 1/2', '3/8 3/16'],
    ['1/4 1/8', '0.5', '1/8 1/16'],
  ])('%s by %s is %s', (text, factor, expected) => {
    expect(on(text, (r) => augment(r, factor))).toBe(expected);
    expect(on(expected, (r) => diminish(r, factor))).toBe(text);
  });

  it('takes an integer and leaves nothing of nothing', () => {
    expect(on('1/4', (r) => augment(r, 3))).toBe('3/4');
    expect(augment([], 2)).toEqual([]);
  });

  it.each([
    ['0', 'invalid_factor'], ['-2', 'invalid_factor'], ['1000000000', 'invalid_factor'], ['1/0', 'invalid_fraction'],
    ['', 'invalid_fraction'], ['twice', 'invalid_fraction'], ['1/3/4', 'invalid_fraction'],
  ])('refuse the factor %j', (factor, code) => {
    const rhythm = parseRhythm('1/4');
    expect(codeOf(() => augment(rhythm, factor))).toBe(code);
    expect(codeOf(() => diminish(rhythm, factor))).toBe(code);
  });

  it('refuse a number that is no integer', () => {
    expect(codeOf(() => augment(parseRhythm('1/4'), 1.5))).toBe('invalid_fraction');
  });
});

describe('retrograde', () => {
  it.each<[string, RetrogradeBy, string]>([
    ['1/4> 1/8 (1/8) 1/2@3', 'values', '1/2@3 (1/8) 1/8 1/4>'],
    // the example of the contract
    ['(1/8) 1/4 1/8 (1/8) 1/2 1/4 (1/4)', 'attacks', '(1/8) 1/2 1/8 (1/8) 1/4 1/4 (1/4)'],
    // marks belong to attacks: the last attack's accent comes first
    ['1/4 1/8 1/2> 1/16', 'attacks', '1/2 1/8> 1/4 1/16'],
    ['1/4@1 1/8@2 1/2@3 1/16@4', 'attacks', '1/2@4 1/8@3 1/4@2 1/16@1'],
    ['1/4>///@2 (1/8) 1/8', 'attacks', '1/4 (1/8) 1/8>///@2'],
    ['1/4^', 'attacks', '1/4^'],
    ['(1/4) (1/8)', 'attacks', '(1/4) (1/8)'],
    ['(1/4) (1/8)', 'values', '(1/8) (1/4)'],
    ['(1/16) (1/8) 1/4 (1/2) (1)', 'attacks', '(1/16) (1/8) 1/4 (1/2) (1)'],
    // the rests of a group keep their order
    ['1/4 (1/8) (1/16) 1/2 1', 'attacks', '1/2 1/4 (1/8) (1/16) 1'],
  ])('of %s by %s is %s', (text, by, expected) => {
    expect(on(text, (r) => retrograde(r, by))).toBe(expected);
  });

  it('refuses another way of reading', () => {
    expect(codeOf(() => retrograde(parseRhythm('1/4'), 'pitches' as unknown as RetrogradeBy))).toBe('invalid_argument');
  });
});

describe('rotate', () => {
  it.each<[string, number, RotateBy, string]>([
    ['1/4 1/8 (1/16) 1/2', 1, 'values', '1/8 (1/16) 1/2 1/4'],
    ['1/4 1/8 (1/16) 1/2', -1, 'values', '1/2 1/4 1/8 (1/16)'],
    ['1/4 1/8 (1/16) 1/2', 6, 'values', '(1/16) 1/2 1/4 1/8'],
    ['1/4> 1/8@2', 1, 'values', '1/8@2 1/4>'],
    ['(1/32) 1/4 1/8 (1/16) 1/2', 1, 'attacks', '(1/32) 1/8 (1/16) 1/2 1/4'],
    ['(1/32) 1/4 1/8 (1/16) 1/2', 2, 'attacks', '(1/32) 1/2 1/4 1/8 (1/16)'],
    ['(1/32) 1/4 1/8 (1/16) 1/2', -4, 'attacks', '(1/32) 1/2 1/4 1/8 (1/16)'],
    ['(1/4) (1/8)', 3, 'attacks', '(1/4) (1/8)'],
    // the entry falls on a value's beginning: nothing is cut
    ['1/4 1/8 1/8', 1, { pulse: '1/4' }, '1/8 1/8 1/4'],
    // the entry cuts the quarter: its attack, shortened, at the end, its remainder a rest at the start
    ['1/4> 1/8 1/8', 1, { pulse: '1/8' }, '(1/8) 1/8 1/8 1/8>'],
    ['1/4///@2 1/8', 1, { pulse: '1/12' }, '(1/6) 1/8 1/12///@2'],
    ['(1/4) 1/8', 1, { pulse: '1/8' }, '(1/8) 1/8 (1/8)'],
    ['1/4 1/8 1/8', -1, { pulse: '1/8' }, '1/8 1/4 1/8'],
    ['1/4 1/8 1/8', 4, { pulse: '1/8' }, '1/4 1/8 1/8'],
    ['1/4 1/8 1/8', 9, { pulse: '1/4' }, '1/8 1/8 1/4'],
    // a pulse longer than the cycle counts modulo the total
    ['1/4 1/8 1/8', 1, { pulse: '3/4' }, '1/8 1/8 1/4'],
    ['1/4', 1, { pulse: '1/8' }, '(1/8) 1/8'],
  ])('%s by %d %j is %s', (text, steps, by, expected) => {
    expect(on(text, (r) => rotate(r, steps, by))).toBe(expected);
  });

  it('of nothing is nothing', () => {
    for (const by of ['values', 'attacks', { pulse: '1/8' }] as const) expect(rotate([], 3, by)).toEqual([]);
  });

  it.each<[unknown, unknown, string]>([
    [0.5, 'values', 'invalid_argument'],
    [Number.NaN, 'values', 'invalid_argument'],
    ['1', 'values', 'invalid_argument'],
    [1, 'beats', 'invalid_argument'],
    [1, null, 'invalid_argument'],
    [1, undefined, 'invalid_argument'],
    [1, { pulse: '0' }, 'invalid_argument'],
    [1, { pulse: '-1/8' }, 'invalid_argument'],
    [1, { pulse: '1/0' }, 'invalid_fraction'],
    [1, {}, 'invalid_fraction'],
  ])('refuses %j steps by %j', (steps, by, code) => {
    expect(codeOf(() => rotate(parseRhythm('1/4 1/8'), steps as number, by as RotateBy))).toBe(code);
  });
});

describe('addToEach', () => {
  it.each([
    ['1/4 (1/8) 1/8>', '1/16', '5/16 (1/8) 3/16>'],
    ['1/4 (1/32) 1/8', '-1/16', '3/16 (1/32) 1/16'],
    ['1/4 1/8', '0', '1/4 1/8'],
    ['(1/4)', '-1', '(1/4)'],
  ])('%s plus %s is %s', (text, amount, expected) => {
    expect(on(text, (r) => addToEach(r, amount))).toBe(expected);
  });

  it.each(['-1/8', '-1/4'])('refuses to take %s away where nothing would be left, and names the attack', (amount) => {
    const rhythm = parseRhythm('1/2 (1/16) 1/8');
    expect(codeOf(() => addToEach(rhythm, amount))).toBe('invalid_argument');
    expect(() => addToEach(rhythm, amount)).toThrow(/Attack 2/);
  });
});

describe('applySteps', () => {
  it('goes from first to last', () => {
    const steps: Step[] = [
      { kind: 'augment', factor: '2' },
      { kind: 'add', amount: '1/8' },
      { kind: 'rotate', steps: 1, by: 'values' },
      { kind: 'retrograde', by: 'values' },
      { kind: 'diminish', factor: '5/8' },
    ];
    // 1/4 1/8 1/2 -> 1/2 1/4 1 -> 5/8 3/8 9/8 -> 3/8 9/8 5/8 -> 5/8 9/8 3/8 -> 1 9/5 3/5
    expect(on('1/4 1/8 1/2', (r) => applySteps(r, steps))).toBe('1 9/5 3/5');
    expect(on('1/4 1/8 1/2', (r) => applySteps(r, []))).toBe('1/4 1/8 1/2');
  });

  it('refuses an unknown step and a chain that is too long', () => {
    const rhythm = parseRhythm('1/4');
    expect(codeOf(() => applySteps(rhythm, [{ kind: 'invert' } as unknown as Step]))).toBe('invalid_argument');
    const long = Array.from({ length: LIMITS.steps + 1 }, (): Step => ({ kind: 'retrograde', by: 'values' }));
    expect(codeOf(() => applySteps(rhythm, long))).toBe('too_large');
  });
});

describe('a subject of rests alone', () => {
  it('has no attacks, whatever is done to it', () => {
    const rests = parseRhythm('(1/4) (1/8)');
    for (const changed of [augment(rests, 2), retrograde(rests, 'attacks'), rotate(rests, 1, { pulse: '1/16' }), addToEach(rests, '1/8')]) {
      expect(attacks(changed).map(formatFraction)).toEqual([]);
    }
  });
});
