import { describe, expect, test } from 'vitest';
import type { Family, Instrument } from '@/engine';
import { NAMED_SOUNDS, renderSound, resolveSound, soundKey, soundSteps } from '@/lib/client/player/sounds';
import { type Accent, PEAKS } from '@/lib/client/player/synth';
import { type Measured, measureSound } from './measure-sound';

const RATE = 44_100;
const ACCENTS: Accent[] = ['none', 'accent', 'strong'];
const FAMILIES: Family[] = ['metal', 'wood', 'skin', 'found'];

const instrument = (family: Family, sound: string | undefined, sounds = 1, id = 'one'): Instrument => ({ id, name: 'Any', family, sound, sounds });
const measure = (of: Instrument, sound = 1, accent: Accent = 'none'): Measured =>
  measureSound(renderSound({ instrument: of, sound, accent, rate: RATE }), RATE);

const named = FAMILIES.flatMap((family) => Object.keys(NAMED_SOUNDS[family]).map((sound) => ({ family, sound, measured: measure(instrument(family, sound)) })));

const median = (values: number[]): number => {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = (sorted.length - 1) / 2;
  return (sorted[Math.floor(middle)]! + sorted[Math.ceil(middle)]!) / 2;
};
const medianOf = (family: Family, what: keyof Measured): number => median(named.filter((n) => n.family === family).map((n) => n.measured[what]));

describe('every named sound', () => {
  test('the table, for the eye', () => {
    console.table(
      Object.fromEntries(
        named.map(({ family, sound, measured: m }) => [
          `${family} ${sound}`,
          { 'onset ms': (m.onset * 1e3).toFixed(2), 'rise ms': (m.rise * 1e3).toFixed(2), peak: m.peak.toFixed(2), 'decay ms': Math.round(m.decay * 1e3), 'centroid Hz': Math.round(m.centroid), flatness: m.flatness.toFixed(3) },
        ]),
      ),
    );
    expect(named.length).toBeGreaterThan(30);
  });

  const grid = FAMILIES.flatMap((family) => [...Object.keys(NAMED_SOUNDS[family]), undefined].map((sound) => [family, sound] as const));

  test.each(grid)('%s %s: begins within 10 ms, stays finite and below half of full scale, ends in silence', (family, sound) => {
    for (const accent of ACCENTS) {
      for (const number of accent === 'none' ? [1, 2, 3, 4, 5] : [1, 5]) {
        const samples = renderSound({ instrument: instrument(family, sound, 5), sound: number, accent, rate: RATE });
        const m = measureSound(samples, RATE);
        const where = `${family} ${sound} ${number} ${accent}`;
        expect(samples.every(Number.isFinite), where).toBe(true);
        expect(m.peak, where).toBeGreaterThan(0.1);
        expect(m.peak, where).toBeLessThanOrEqual(PEAKS[accent] + 1e-6);
        expect(m.onset, where).toBeLessThan(0.01);
        expect(m.rise, where).toBeLessThan(0.01);
        expect(Math.abs(samples.at(-1)!), where).toBe(0);
      }
    }
  });

  test('twelve sounds on one instrument, the most there may be, still begin within 10 ms', () => {
    for (const { family, sound } of named) {
      for (const number of [1, 12]) {
        const m = measure(instrument(family, sound, 12), number);
        expect(m.rise, `${sound} ${number}`).toBeLessThan(0.01);
        expect(m.peak, `${sound} ${number}`).toBeGreaterThan(0.1);
      }
    }
  });
});

describe('telling them apart', () => {
  test('metal rings longest, wood is shortest, skin is lowest, found objects are noisiest', () => {
    for (const other of FAMILIES.filter((family) => family !== 'metal')) {
      expect(medianOf('metal', 'decay')).toBeGreaterThan(2 * medianOf(other, 'decay'));
    }
    for (const other of FAMILIES.filter((family) => family !== 'skin')) {
      expect(medianOf('skin', 'centroid')).toBeLessThan(medianOf(other, 'centroid') / 2);
    }
    for (const other of FAMILIES.filter((family) => family !== 'wood')) {
      expect(medianOf('wood', 'decay')).toBeLessThan(medianOf(other, 'decay') / 1.25);
    }
    for (const other of FAMILIES.filter((family) => family !== 'found')) {
      expect(medianOf('found', 'flatness')).toBeGreaterThan(2 * medianOf(other, 'flatness'));
    }
  });

  test('no two named sounds measure alike', () => {
    for (const [i, a] of named.entries()) {
      for (const b of named.slice(i + 1)) {
        const apart = Math.hypot(
          Math.log2(a.measured.centroid / b.measured.centroid),
          Math.log2(a.measured.decay / b.measured.decay),
          Math.log10(a.measured.flatness / b.measured.flatness),
        );
        expect(apart, `${a.sound}, ${b.sound}`).toBeGreaterThan(0.15);
      }
    }
  });

  test('sound 1 is the lowest of an instrument', () => {
    for (const { family, sound } of named) {
      const [low, high] = [measure(instrument(family, sound, 5), 1), measure(instrument(family, sound, 5), 5)];
      expect(high.centroid, sound).toBeGreaterThan(low.centroid);
    }
  });

  test('an accent is louder and brighter, a strong accent more so', () => {
    for (const { family, sound } of named) {
      const [plain, accent, strong] = ACCENTS.map((a) => measure(instrument(family, sound), 1, a));
      expect(accent!.peak).toBeGreaterThan(plain!.peak * 1.2);
      expect(strong!.peak).toBeGreaterThan(accent!.peak * 1.1);
      // A sound with hardly any modes is noise already: it may only not get duller.
      expect(strong!.centroid, sound).toBeGreaterThan(plain!.centroid * 0.995);
    }
    const brighter = named.filter(({ family, sound, measured }) => measure(instrument(family, sound), 1, 'strong').centroid > measured.centroid * 1.01);
    expect(brighter.length).toBeGreaterThan(named.length * 0.75);
  });

  test('an unknown sound takes its family’s, tuned by the instrument’s id', () => {
    const [a, b] = ['north', 'south'].map((id) => instrument('metal', 'moon-harp', 1, id));
    expect(resolveSound(a!).name).not.toBe(resolveSound(b!).name);
    expect(renderSound({ instrument: a!, sound: 1, accent: 'none', rate: RATE })).not.toEqual(renderSound({ instrument: b!, sound: 1, accent: 'none', rate: RATE }));
    expect(measure(a!).centroid).toBeGreaterThan(2 * measure(instrument('skin', 'moon-harp', 1, 'north')).centroid);
  });

  test('a sound is found by spelling variants, and by the instrument’s id where none is named', () => {
    expect(resolveSound(instrument('wood', 'Temple Block')).name).toBe('temple-blocks');
    expect(resolveSound(instrument('metal', undefined, 1, 'crotales')).name).toBe('crotales');
  });
});

describe('rendering', () => {
  const request = { instrument: instrument('metal', 'tam-tam'), sound: 1, accent: 'none', rate: 8_000 } as const;

  test('the same request gives the same samples', () => {
    expect(renderSound(request)).toEqual(renderSound(request));
  });

  test('it comes in many small steps', () => {
    const steps = soundSteps(request);
    let count = 0;
    while (!steps.next().done) count += 1;
    expect(count).toBeGreaterThan(100);
  });

  test('a low sample rate leaves out what it cannot hold', () => {
    const samples = renderSound({ ...request, instrument: instrument('metal', 'finger-cymbals') });
    expect(samples.every(Number.isFinite)).toBe(true);
  });

  test('keys tell apart what sounds different', () => {
    const keys = [request, { ...request, sound: 2 }, { ...request, accent: 'strong' as const }, { ...request, rate: 48_000 }].map(soundKey);
    expect(new Set(keys).size).toBe(4);
  });
});
