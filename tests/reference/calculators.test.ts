import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonEntries, divide, fibonacci, formatFraction, meetingOf, proportionName, proportionOf, roundParts, tempoChain, toFraction } from '@/engine';

const f = formatFraction;

/** Stainer and Barrett, A Dictionary of Musical Terms; Gaffurius, Practica musicae (1496), in the LilyPond music glossary. */
describe('names of proportions, both ways (Stainer and Barrett; Gaffurius, 1496; Grove III, 42)', () => {
  it.each([
    ['2:1', 'dupla', 'multiplex'], ['3:1', 'tripla', 'multiplex'], ['4:1', 'quadrupla', 'multiplex'], ['6:3', 'dupla', 'multiplex'], ['12:3', 'quadrupla', 'multiplex'],
    ['3:2', 'sesquialtera', 'superparticular'], ['4:3', 'sesquitertia', 'superparticular'], ['5:4', 'sesquiquarta', 'superparticular'],
    ['5:3', 'superbipartiens tertias', 'superpartient'], ['7:4', 'supertripartiens quartas', 'superpartient'], ['9:5', 'superquadripartiens quintas', 'superpartient'],
    ['17:5', 'tripla superbipartiens quintas', 'multiplex superpartient'], ['15:4', 'tripla supertripartiens quartas', 'multiplex superpartient'],
    ['7:2', 'tripla sesquialtera', 'multiplex superparticular'],
    // T15: the dictionary prints 27:8 among the quartas; 27/8 is 3 3/8
    ['27:8', 'tripla supertripartiens octavas', 'multiplex superpartient'],
  ])('%s is %s', (pair, name, genus) => {
    const ratio = pair.replace(':', '/');
    expect(proportionName(ratio)).toEqual({ name, genus, isInverse: false });
    expect(f(proportionOf(name)!)).toBe(f(toFraction(ratio)));
    const inverse = toFraction(ratio).inverse();
    expect(proportionName(inverse)).toEqual({ name: `sub${name}`, genus, isInverse: true });
    expect(f(proportionOf(`Sub${name}`)!)).toBe(f(inverse));
  });
  it('law: whatever has a name is found by it', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 120 }), fc.integer({ min: 1, max: 12 }), (n, d) => {
        const found = proportionName(`${n}/${d}`);
        if (found) expect(f(proportionOf(found.name)!)).toBe(f(toFraction(`${n}/${d}`)));
      }),
    );
    expect([proportionName('1'), proportionOf('no such'), proportionName('13/12')]).toEqual([null, null, null]);
  });
});

describe('tempo chains (Winold, 1975, 230-231; Benadon)', () => {
  it('Carter, Fantasy, mm. 16-17: at quarter = 84 two halves become three: 126', () => {
    const [, next] = tempoChain({ beat: '1/4', perMinute: '84' }, [{ before: '1/3', after: '1/2' }]);
    expect([f(next!.perMinute), f(next!.factor), f(next!.off)]).toEqual(['126', '3/2', '0']);
  });
  it('dotted quarter becomes quarter: 84 to 56', () => expect(f(tempoChain({ beat: '1/4', perMinute: '84' }, [{ before: '3/8', after: '1/4' }])[1]!.perMinute)).toBe('56'));
  it('a septuplet pivot is 4/7; what a metronome of whole numbers is off after a minute', () => {
    const [, next] = tempoChain({ beat: '1/4', perMinute: '60' }, [{ before: '7/16', after: '1/4' }]);
    expect([f(next!.perMinute), f(next!.metronome), f(next!.off)]).toEqual(['240/7', '34', '-2/7']);
  });
  it('there and back', () => {
    const chain = tempoChain({ beat: '1/4', perMinute: '72' }, [{ before: '3/8', after: '1/4' }, { before: '1/4', after: '3/8' }]);
    expect(chain.map(({ perMinute }) => f(perMinute))).toEqual(['72', '48', '72']);
  });
});

describe('cycles (check values 13.5; openknowledgegraph.com, polymeter)', () => {
  it.each([
    [['3', '4'], '12', ['4', '3'], '12'], [['3', '5'], '15', ['5', '3'], '15'], [['6', '9'], '18', ['3', '2'], '6'], [['8', '9'], '72', ['9', '8'], '72'],
    [['3/4', '5/8', '1'], '15', ['20', '24', '15'], '120'],
  ])('%j meet after %s', (lengths, meet, wantedTurns, wantedStates) => {
    const { at, turns, states } = meetingOf(lengths.map((length) => ({ length })));
    expect([at && f(at), turns.map(f), f(states)]).toEqual([meet, wantedTurns, wantedStates]);
  });
});

describe('cycles that enter at moments of their own', () => {
  const meet = (cycles: Parameters<typeof meetingOf>[0]) => {
    const { at, turns, ended } = meetingOf(cycles);
    return [at && f(at), turns.map(f), ended];
  };
  it('begun together they meet as ever (13.5: 3 and 4 after 12)', () => expect(meet([{ length: '3' }, { length: '4' }])).toEqual(['12', ['4', '3'], null]));
  it('Sun Zi’s question (Sunzi suanjing, III, 26, from memory): 2 over by threes, 3 by fives, 2 by sevens is 23', () => {
    expect(meet([{ length: 3, entry: 2 }, { length: 5, entry: 3 }, { length: 7, entry: 2 }])).toEqual(['23', ['7', '4', '3'], null]);
  });
  it('never, where their entries have nothing in common', () => expect(meet([{ length: 4 }, { length: 6, entry: 1 }])).toEqual([null, [], null]));
  it('not before the last has entered; and one that turns too seldom has ended by then', () => {
    expect(meet([{ length: '1/2' }, { length: '3/4', entry: '5/4' }])).toEqual(['2', ['4', '1'], null]);
    expect(meet([{ length: '1/2', repeats: 3 }, { length: '3/4', entry: '5/4' }])).toEqual(['2', ['4', '1'], 0]);
  });
  it('law: at the meeting every cycle has turned a whole number of times, and at no pulse before', () => {
    fc.assert(
      fc.property(fc.array(fc.record({ length: fc.integer({ min: 1, max: 12 }), entry: fc.integer({ min: 0, max: 15 }) }), { minLength: 1, maxLength: 4 }), (cycles) => {
        const { at } = meetingOf(cycles);
        const latest = Math.max(...cycles.map(({ entry }) => entry));
        const isMeeting = (time: number) => cycles.every(({ length, entry }) => (time - entry) % length === 0);
        const first = latest === 0 ? 1 : latest;
        const brute = Array.from({ length: 30_000 }, (_, n) => first + n).find(isMeeting);
        expect(at === null ? undefined : Number(at.n)).toBe(brute);
      }),
    );
  });
});

describe('division (Lendvai’s tradition; Kramer, JMT 17(1), 1973)', () => {
  it('89 = 55 + 34, 55 = 34 + 21 by Fibonacci numbers (Lendvai, from memory)', () => {
    expect(divide('89', ['55', '34']).map(f)).toEqual(['55', '34']);
    expect(fibonacci(12).map(f)).toEqual(['1', '1', '2', '3', '5', '8', '13', '21', '34', '55', '89', '144']);
    expect(fibonacci(12).reduce((a, b) => a.add(b)).toFraction()).toBe('376');
  });
  it('Dufay, Nuper rosarum flores: 6:4:2:3 of 15 parts (Turner, Music Analysis 10, 1991)', () => expect(divide('15', ['6', '4', '2', '3']).map(f)).toEqual(['6', '4', '2', '3']));
  it('rounded so that the sum stays: the units that are left go to the parts that lost most', () => {
    const parts = roundParts(divide('10', ['1', '1', '1']), '1');
    expect(parts.map(({ rounded }) => f(rounded))).toEqual(['4', '3', '3']);
    expect(parts.map(({ error }) => f(error))).toEqual(['2/3', '-1/3', '-1/3']);
  });
  it('law: parts add up, rounded too, and none is a unit off', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 500 }), fc.array(fc.integer({ min: 1, max: 30 }), { minLength: 1, maxLength: 12 }), (whole, ratios) => {
        const parts = divide(whole, ratios);
        expect(parts.reduce((a, b) => a.add(b)).toFraction()).toBe(String(whole));
        const rounded = roundParts(parts, '1');
        expect(rounded.reduce((a, b) => a.add(b.rounded), toFraction(0)).toFraction()).toBe(String(whole));
        for (const { error } of rounded) expect(error.abs().compare(1)).toBeLessThan(0);
      }),
    );
  });
});

describe('canons whose voices end together (Polansky, Four Voice Canons; check values 4.13)', () => {
  it('2:3, 2:5, 2:8: entries at 1/3, 3/5, 3/4 of the whole', () => {
    const [slow, ...others] = canonEntries('1', ['1', '3/2', '5/2', '4']);
    expect([f(slow!.delay), ...others.map(({ delay }) => f(delay))]).toEqual(['0', '1/3', '3/5', '3/4']);
  });
  it.each([
    [['4', '5'], '20', ['5', '4'], ['0', '1']], [['3', '4', '5'], '60', ['20', '15', '12'], ['0', '5', '8']], [['12', '15', '20'], '60', ['5', '4', '3'], ['0', '1', '2']],
  ])('tempi %j', (speeds, beats, lengths, delays) => {
    const voices = canonEntries(beats, speeds);
    expect(voices.map(({ length }) => f(length))).toEqual(lengths);
    expect(voices.map(({ delay }) => f(delay))).toEqual(delays);
    expect(new Set(voices.map(({ end }) => f(end))).size).toBe(1);
    // meeting in the middle: every delay halved
    expect(canonEntries(beats, speeds, '1/2').map(({ delay }) => f(delay))).toEqual(delays.map((delay) => f(toFraction(delay).div(2))));
  });
});
