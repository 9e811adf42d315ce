import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Fraction, type PlayEvent, secondsOf } from '@/engine';
import { type Passage, STROKES_PER_SECOND, Timeline, strokesOf } from '@/lib/client/player/schedule';

const event = (seconds: Fraction, more: Partial<PlayEvent> = {}): PlayEvent => ({
  instrument: 'a',
  seconds,
  lasts: new Fraction(1, 4),
  position: seconds,
  statement: 's',
  value: 0,
  origin: null,
  ...more,
});

/** An attack every seventh of a beat at 83 beats a minute: no multiple of it is a binary fraction. */
const seventh = secondsOf('1/28', { beat: '1/4', perMinute: '83' });
const hour = Array.from({ length: 34_860 }, (_, i) => event(seventh.mul(i)));
const once = (to: number): Passage => ({ from: 0, to, loop: false });
const at0 = { time: 0, score: 0 };

/** Everything up to the end, asked for in windows as the player's ticks do. */
function drain(timeline: Timeline, end: number, window = 0.5): { time: number; seconds: number }[] {
  const all: { time: number; seconds: number }[] = [];
  for (let until = window; until < end + window; until += window) {
    all.push(...timeline.take(Math.min(until, end)).map(({ time, plan }) => ({ time, seconds: plan.seconds })));
  }
  return all;
}

describe('an hour of sevenths at 83', () => {
  test('nothing drifts: every time is its fraction’s, to a nanosecond', () => {
    const timed = drain(new Timeline(strokesOf(hour), once(3601), { time: 5, score: 0 }, 1), 3700);
    expect(timed).toHaveLength(hour.length);
    timed.forEach(({ time }, i) => {
      // 60/83 × i/7 seconds as integers of a nanosecond, without floating point.
      const nanoseconds = (60n * BigInt(i) * 1_000_000_000n) / (83n * 7n);
      expect(Math.abs(time - 5 - Number(nanoseconds) / 1e9)).toBeLessThan(3e-9);
    });
    expect(timed.at(-1)!.time).toBeGreaterThan(3599);
  });

  test('a slower practice speed stretches times by exactly as much', () => {
    const timed = drain(new Timeline(strokesOf(hour, 0.75), once(3601), at0, 0.75), 4900);
    timed.forEach(({ time, seconds }) => expect(Math.abs(time * 0.75 - seconds)).toBeLessThan(1e-9));
    expect(timed).toHaveLength(hour.length);
  });

  test('a loop is exact in its thousandth round', () => {
    const [from, to] = [seventh.mul(3).valueOf(), seventh.mul(10).valueOf()];
    const timeline = new Timeline(strokesOf(hour), { from, to, loop: true }, { time: 1, score: from }, 1);
    const timed = drain(timeline, 1 + 1000 * (to - from), 7);
    expect(timed).toHaveLength(7 * 1000);
    timed.forEach(({ time }, i) => expect(Math.abs(time - 1 - seventh.mul(i).valueOf())).toBeLessThan(1e-9));
  });
});

describe('order and completeness', () => {
  const rhythm = fc.array(fc.record({ n: fc.integer({ min: 0, max: 900 }), d: fc.constantFrom(1, 3, 5, 7, 11, 83) }), { maxLength: 60 });

  test('each stroke of the passage comes once, in order, however the windows fall', () => {
    fc.assert(
      fc.property(rhythm, fc.double({ min: 0.05, max: 3, noNaN: true }), fc.double({ min: 0.25, max: 2, noNaN: true }), (fractions, window, speed) => {
        const events = fractions.map(({ n, d }) => event(new Fraction(n, d * 30)));
        const timeline = new Timeline(strokesOf(events, speed), { from: 2, to: 11, loop: false }, { time: 3, score: 2 }, speed);
        const timed = drain(timeline, 60, window);
        const wanted = events.map((e) => e.seconds.valueOf()).filter((s) => s >= 2 && s < 11).sort((a, b) => a - b);
        expect(timed.map((t) => t.seconds)).toEqual(wanted);
        timed.forEach((t, i) => {
          expect(t.time).toBeGreaterThanOrEqual(i === 0 ? 3 : timed[i - 1]!.time);
          expect(t.time).toBe(3 + (t.seconds - 2) / speed);
        });
      }),
    );
  });

  test('events need not be in order, and equal times keep theirs', () => {
    const strokes = strokesOf([event(new Fraction(2), { value: 1 }), event(new Fraction(1), { value: 2 }), event(new Fraction(2), { value: 3 })]);
    expect(strokes.map((s) => s.event.value)).toEqual([2, 1, 3]);
  });

  test('an attack on the passage’s first moment sounds, one on its last does not', () => {
    const third = new Fraction(1, 3);
    const events = [0, 1, 2, 3].map((i) => event(third.mul(i)));
    const timeline = new Timeline(strokesOf(events), { from: 1 / 3, to: 1, loop: false }, { time: 0, score: 1 / 3 }, 1);
    expect(timeline.take(10).map((t) => t.plan.seconds)).toEqual([1 / 3, 2 / 3]);
  });

  test('a loop without an attack, and one without length, give nothing and come back', () => {
    expect(new Timeline(strokesOf(hour), { from: 0.01, to: 0.02, loop: true }, { time: 0, score: 0.01 }, 1).take(100)).toEqual([]);
    const point = new Timeline(strokesOf(hour), { from: 1, to: 1, loop: true }, { time: 0, score: 1 }, 1);
    expect(point.take(100)).toEqual([]);
    expect(point.endsAt).toBe(0);
  });

  test('a loop joined in the middle plays its rest first, then the whole', () => {
    const events = [0, 1, 2, 3].map((i) => event(new Fraction(i)));
    const timeline = new Timeline(strokesOf(events), { from: 0, to: 4, loop: true }, { time: 10, score: 2.5 }, 1);
    expect(timeline.take(17).map((t) => [t.time, t.plan.seconds])).toEqual([[10.5, 3], [11.5, 0], [12.5, 1], [13.5, 2], [14.5, 3], [15.5, 0], [16.5, 1]]);
  });
});

describe('the place', () => {
  test('it is the passage’s start before, its end after, and turns in a loop', () => {
    const plain = new Timeline([], { from: 2, to: 6, loop: false }, { time: 10, score: 2 }, 2);
    expect([9, 10, 11, 12, 99].map((t) => plain.scoreAt(t))).toEqual([2, 2, 4, 6, 6]);
    expect(plain.endsAt).toBe(12);
    const loop = new Timeline([], { from: 2, to: 6, loop: true }, { time: 10, score: 3 }, 1);
    expect([10, 12.5, 13, 17.25].map((t) => loop.scoreAt(t))).toEqual([3, 5.5, 2, 2.25]);
  });

  test('a change of speed goes on from the same place, and later strokes fall where the new speed puts them', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 300, noNaN: true }), fc.double({ min: 0.25, max: 2, noNaN: true }), fc.double({ min: 0.25, max: 2, noNaN: true }), (when, before, after) => {
        const passage = once(3601);
        const old = new Timeline(strokesOf(hour, before), passage, { time: 1, score: 0 }, before);
        const anchor = old.anchorAt(1 + when);
        const changed = new Timeline(strokesOf(hour, after), passage, anchor, after);
        expect(Math.abs(changed.scoreAt(1 + when) - old.scoreAt(1 + when))).toBeLessThan(1e-9);
        const [first] = changed.take(Infinity);
        expect(first!.time).toBeGreaterThanOrEqual(1 + when - 1e-9);
        expect(first!.plan.seconds).toBeGreaterThanOrEqual(anchor.score - 1e-9);
        expect(first!.plan.seconds - anchor.score).toBeLessThan(seventh.valueOf() + 1e-9);
      }),
      { numRuns: 30 },
    );
  });

  test('many changes of speed lose nothing', () => {
    let timeline = new Timeline([], once(1e6), at0, 1);
    let expected = new Fraction(0);
    for (let i = 1; i <= 1000; i++) {
      expected = expected.add(new Fraction(timeline.speed).mul(new Fraction(1, 8)));
      timeline = new Timeline([], once(1e6), timeline.anchorAt(i / 8), [1, 0.5, 1.25, 0.75][i % 4]!);
    }
    expect(Math.abs(timeline.anchor.score - expected.valueOf())).toBeLessThan(1e-9);
  });
});

describe('rolls', () => {
  const roll = event(new Fraction(1, 3), { roll: true, lasts: new Fraction(1) });

  test('13 strokes a second, the first at the attack', () => {
    const strokes = strokesOf([roll]);
    expect(strokes).toHaveLength(STROKES_PER_SECOND);
    strokes.forEach((s, i) => expect(Math.abs(s.seconds - (1 / 3 + i / 13))).toBeLessThan(1e-12));
    expect([strokes[0]!.gain, strokes[0]!.stroke]).toEqual([1, 0]);
    expect(strokes.slice(1).every((s) => s.gain < 1)).toBe(true);
  });

  test('they stay as fast at half speed, so there are twice as many', () => {
    const times = new Timeline(strokesOf([roll], 0.5), once(10), at0, 0.5).take(Infinity).map((t) => t.time);
    expect(times).toHaveLength(26);
    times.forEach((time, i) => expect(Math.abs(time - (2 / 3 + i / 13))).toBeLessThan(1e-12));
  });

  test('a roll shorter than a stroke is one stroke, and none comes close to what follows', () => {
    expect(strokesOf([{ ...roll, lasts: new Fraction(1, 20) }])).toHaveLength(1);
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 400 }), (n) => {
        const lasts = new Fraction(n, 97);
        const strokes = strokesOf([{ ...roll, lasts }]);
        const left = 1 / 3 + lasts.valueOf() - strokes.at(-1)!.seconds;
        if (strokes.length > 1) expect(left).toBeGreaterThan(0.5 / 13 - 1e-8);
        expect(left).toBeLessThan(1.5 / 13 + 1e-8);
      }),
    );
  });
});
