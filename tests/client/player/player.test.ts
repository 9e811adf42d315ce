import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Fraction, type Instrument, type PlayEvent } from '@/engine';
import { SoundBank, type Voice } from '@/lib/client/player/bank';
import { CEILING, ceiling } from '@/lib/client/player/mixer';
import { PLAYER } from '@/lib/client/player/settings';
import { StudyPlayer } from '@/lib/client/player/player';

const bowl: Instrument = { id: 'bowl', name: 'Bowl', family: 'metal', sounds: 2 };
const event = (more: Partial<PlayEvent> = {}): PlayEvent => ({
  instrument: 'bowl',
  seconds: new Fraction(0),
  lasts: new Fraction(1),
  position: new Fraction(0),
  statement: 's',
  value: 0,
  origin: null,
  ...more,
});

describe('the ceiling', () => {
  test('leaves what is quiet as it is, bends what is loud, and is never passed', () => {
    fc.assert(
      fc.property(fc.double({ min: -20, max: 20, noNaN: true }), (x) => {
        const y = ceiling(x);
        expect(Math.abs(y)).toBeLessThanOrEqual(CEILING);
        if (Math.abs(x) <= 0.4) expect(y).toBe(x);
        expect(ceiling(x + 0.01)).toBeGreaterThanOrEqual(y);
      }),
    );
  });
});

describe('the bank', () => {
  function bankWith(made: string[]) {
    const voice: Voice = ({ instrument, sound, accent }) => {
      made.push(`${instrument.id} ${sound} ${accent}`);
      return new Float32Array(8);
    };
    const buffer = { copyToChannel: () => undefined } as unknown as AudioBuffer;
    return new SoundBank({ sampleRate: 8000, createBuffer: () => buffer }, voice);
  }
  const instruments = new Map([['bowl', bowl]]);

  test('makes each sound once, only those that are played, a roll’s plain strokes too', async () => {
    const made: string[] = [];
    const bank = bankWith(made);
    const progress: string[] = [];
    const events = [event({ accent: 'strong' }), event({ sound: 2, accent: 'accent', roll: true }), event({ sound: 2 }), event({ instrument: 'gone' })];
    await bank.prepare(events, instruments, (done, total) => progress.push(`${done}/${total}`), () => true);
    expect(made).toEqual(['bowl 1 strong', 'bowl 2 accent', 'bowl 2 none']);
    expect(progress).toEqual(['1/3', '2/3', '3/3']);
    await bank.prepare(events, instruments, () => progress.push('again'), () => true);
    expect(made).toHaveLength(3);
    expect(progress).not.toContain('again');
  });

  test('gives up when it is no longer wanted', async () => {
    const made: string[] = [];
    await bankWith(made).prepare([event(), event({ sound: 2 })], instruments, () => undefined, () => made.length < 1);
    expect(made).toHaveLength(1);
  });
});

describe('the player before any sound', () => {
  test('can be made, loaded and set without audio, as on a server; it starts quiet', async () => {
    const player = new StudyPlayer();
    let changes = 0;
    const end = player.onStateChange(() => (changes += 1));
    await player.load([event()], [bowl], new Fraction(9, 2));
    expect(player.state).toMatchObject({ status: 'stopped', volume: PLAYER.startVolume, speed: 1, problem: null });
    player.setVolume(40);
    expect(player.state.volume).toBe(0);
    player.setVolume(-500);
    expect(player.state.volume).toBe(PLAYER.quietest);
    player.setSpeed(0);
    expect(player.state.speed).toBe(PLAYER.slowest);
    player.setSpeed(Number.NaN);
    expect(player.state.speed).toBe(PLAYER.slowest);
    player.setSolo(['bowl']);
    player.setMuted(['bowl']);
    player.seek(99);
    expect(player.position()).toBe(4.5);
    player.seek(new Fraction(7, 3));
    expect(player.position()).toBe(7 / 3);
    await player.load([event()], [bowl], 2);
    expect(player.position()).toBe(2);
    player.pause();
    expect(player.state.status).toBe('stopped');
    expect(changes).toBeGreaterThan(4);
    end();
    const before = changes;
    player.setSpeed(1);
    expect(changes).toBe(before);
    player.dispose();
  });

  test('a state is a new object only when it changes', () => {
    const player = new StudyPlayer();
    expect(player.getState()).toBe(player.getState());
    const before = player.getState();
    player.setSpeed(0.5);
    expect(player.getState()).not.toBe(before);
    expect(before.speed).toBe(1);
  });
});
