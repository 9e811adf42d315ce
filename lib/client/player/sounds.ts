import type { Family, Instrument } from '@/engine';
import { RATIOS, modesOf } from './modes';
import { hashText } from './random';
import { FOUND } from './recipes-found';
import { METAL } from './recipes-metal';
import { SKIN } from './recipes-skin';
import { WOOD } from './recipes-wood';
import { type Accent, type Recipe, strokeSteps } from './synth';

/** The sounds that have a name, by family. A study names one in an instrument's `sound`. */
export const NAMED_SOUNDS: Record<Family, Readonly<Record<string, Recipe>>> = { metal: METAL, wood: WOOD, skin: SKIN, found: FOUND };

/** What an instrument of a family sounds like where nothing better is known. */
const GENERIC: Record<Family, Recipe> = {
  metal: { pitch: 920, step: 1.2, modes: modesOf(RATIOS.plate, { decay: 2, tilt: 0.5, damping: 0.6 }), bursts: [{ gain: 0.8, decay: 0.02, centre: 5000 }] },
  wood: { pitch: 620, step: 1.2, modes: modesOf([1, 2.4, 4.1], { decay: 0.13, tilt: 1 }), bursts: [{ gain: 0.8, decay: 0.01, centre: 2500 }] },
  skin: { pitch: 150, step: 1.2, modes: modesOf(RATIOS.membrane, { decay: 0.5, tilt: 1.2, damping: 1 }), glide: { by: 0.12, within: 0.04 }, bursts: [{ gain: 0.7, decay: 0.02, centre: 1000 }] },
  found: { pitch: 720, step: 1.2, modes: modesOf([1, 1.83, 3.1, 4.7], { decay: 0.22, tilt: 0.5 }), bursts: [{ gain: 2.6, decay: 0.06, centre: 3000, q: 0.5 }] },
};

/** The most that lies between an instrument's lowest and highest sound: two octaves. */
const WIDEST = 4;

/** One sound of one instrument, struck in one way. */
export type SoundRequest = {
  readonly instrument: Instrument;
  /** 1 the lowest */
  readonly sound: number;
  readonly accent: Accent;
  /** samples a second */
  readonly rate: number;
};

const plain = (name: string): string => name.trim().toLowerCase().replace(/[\s_]+/g, '-').replace(/s$/, '');

const BY_NAME = new Map(Object.values(NAMED_SOUNDS).flatMap((sounds) => Object.entries(sounds).map(([name, recipe]) => [plain(name), { name, recipe }] as const)));

type Resolved = { readonly name: string; readonly recipe: Recipe; readonly tuning: number };

/**
 * The sound of an instrument: the one it names, else the one its id or name says, else its family's, tuned a little by its id
 * so that two of a family are told apart.
 */
export function resolveSound({ id, name, sound, family }: Instrument): Resolved {
  for (const candidate of [sound, id, name]) {
    const found = candidate === undefined ? undefined : BY_NAME.get(plain(candidate));
    if (found) return { ...found, tuning: 1 };
  }
  const quarterTones = (hashText(id) % 17) - 8;
  return { name: `${family}/${quarterTones}`, recipe: GENERIC[family], tuning: 2 ** (quarterTones / 24) };
}

/** Equal keys sound the same: the cache of rendered sounds goes by it. */
export const soundKey = ({ instrument, sound, accent, rate }: SoundRequest): string =>
  `${resolveSound(instrument).name} ${sound}/${instrument.sounds ?? 1} ${accent} ${rate}`;

/**
 * Makes one sound step by step. Several sounds of one instrument lie about its pitch, 1 the lowest.
 * @returns mono samples, the stroke at the first, their peak at most 0.5; the same for the same request
 */
export function soundSteps(request: SoundRequest): Generator<void, Float32Array<ArrayBuffer>, void> {
  const { recipe, tuning, name } = resolveSound(request.instrument);
  const sounds = Math.max(request.instrument.sounds ?? 1, request.sound);
  const step = Math.min(recipe.step ?? 1.2, WIDEST ** (1 / Math.max(1, sounds - 1)));
  const shift = tuning * step ** (request.sound - (sounds + 1) / 2);
  return strokeSteps(recipe, { shift, accent: request.accent, rate: request.rate, seed: hashText(`${name} ${request.sound}`) });
}

/** `soundSteps` at one go. */
export function renderSound(request: SoundRequest): Float32Array<ArrayBuffer> {
  const steps = soundSteps(request);
  for (;;) {
    const { done, value } = steps.next();
    if (done) return value;
  }
}
