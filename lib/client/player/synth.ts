import type { Mode } from './modes';
import { seededRandom } from './random';
import { PLAYER } from './settings';

/** A burst of noise through one resonance. */
export type Burst = {
  readonly gain: number;
  /** seconds until it has fallen by 60 dB */
  readonly decay: number;
  /** middle of the band, hertz; moves with the pitch */
  readonly centre: number;
  /** narrowness of the band: centre over width */
  readonly q?: number;
};

/** How a sound is made. Pitches and times are settings of ours, chosen to tell instruments apart; no source. */
export type Recipe = {
  /** lowest mode, hertz */
  readonly pitch: number;
  /** from one sound number to the next, a frequency ratio */
  readonly step?: number;
  readonly modes: readonly Mode[];
  readonly bursts?: readonly Burst[];
  /** a membrane pulled tight by a stroke starts higher by this share and comes down within so many seconds */
  readonly glide?: { readonly by: number; readonly within: number };
  /** several contacts for one stroke: how many, within how many seconds, each so much weaker */
  readonly contacts?: { readonly count: number; readonly within: number; readonly fall: number };
  /** loudness beside others, up to 1 */
  readonly level?: number;
};

export type Accent = 'none' | 'accent' | 'strong';

/** No sound goes beyond half of full scale by itself. */
export const PEAKS: Record<Accent, number> = { none: 0.28, accent: 0.4, strong: 0.5 };
const BRIGHTER: Record<Accent, number> = { none: 0, accent: 0.2, strong: 0.4 };
/** Modes above so many times the lowest are brightened no more than those at it. */
const BRIGHTENED = 12;
const ONSET_RAMP = 0.0003;
const FALL_60 = Math.log(1000);

type Take = { samples: Float64Array; rate: number; pitch: number };

/** Adds A·e^(−at)·sin(wt) by its two-term recurrence. */
function addDecay({ samples, rate }: Take, at: number, hertz: number, gain: number, decay: number): void {
  const w = (2 * Math.PI * hertz) / rate;
  const r = Math.exp(-FALL_60 / (decay * rate));
  const c = 2 * r * Math.cos(w);
  const rr = r * r;
  const end = Math.min(samples.length, at + Math.ceil(decay * 1.3 * rate));
  let before = 0;
  let now = gain * r * Math.sin(w);
  for (let i = at + 1; i < end; i++) {
    samples[i] = samples[i]! + now;
    const next = c * now - rr * before;
    before = now;
    now = next;
  }
}

function addGliding({ samples, rate }: Take, at: number, hertz: number, mode: Mode, gain: number, glide: NonNullable<Recipe['glide']>): void {
  const end = Math.min(samples.length, at + Math.ceil(mode.decay * 1.3 * rate));
  for (let i = at; i < end; i++) {
    const t = (i - at) / rate;
    const turned = t + glide.by * glide.within * (1 - Math.exp(-t / glide.within));
    samples[i] = samples[i]! + gain * Math.exp((-FALL_60 * t) / mode.decay) * Math.sin(2 * Math.PI * hertz * turned);
  }
}

function addMode(take: Take, at: number, mode: Mode, gain: number, glide: Recipe['glide']): void {
  const hertz = take.pitch * mode.ratio;
  if (hertz > take.rate * 0.45) return;
  if (glide) return addGliding(take, at, hertz, mode, gain, glide);
  addDecay(take, at, hertz, gain, mode.decay);
  // What comes up slowly is the mode less a faster one of the same frequency.
  if (mode.bloom) addDecay(take, at, hertz, -gain, 1 / (1 / mode.decay + FALL_60 / (3 * mode.bloom)));
}

/** White noise through a band-pass biquad (constant peak), falling. */
function addBurst({ samples, rate }: Take, at: number, burst: Burst, gain: number, shift: number, random: () => number): void {
  const w = 2 * Math.PI * Math.min(0.4, (burst.centre * shift) / rate);
  const alpha = Math.sin(w) / (2 * (burst.q ?? 0.8));
  const [b, a1, a2] = [alpha / (1 + alpha), (-2 * Math.cos(w)) / (1 + alpha), (1 - alpha) / (1 + alpha)];
  const fall = Math.exp(-FALL_60 / (burst.decay * rate));
  const end = Math.min(samples.length, at + Math.ceil(burst.decay * 1.2 * rate));
  let [x1, x2, y1, y2, level] = [0, 0, 0, 0, gain];
  for (let i = at; i < end; i++) {
    const x = random() * 2 - 1;
    const y = b * (x - x2) - a1 * y1 - a2 * y2;
    [x2, x1, y2, y1] = [x1, x, y1, y];
    samples[i] = samples[i]! + y * level;
    level *= fall;
  }
}

function secondsNeeded({ modes, bursts = [], contacts }: Recipe): number {
  const longest = Math.max(...modes.map((mode) => mode.decay), ...bursts.map((burst) => burst.decay));
  return Math.min(PLAYER.longestSound, longest * 1.1 + (contacts?.within ?? 0));
}

/** Scales to the peak, softens the first 0.3 ms and fades the last fiftieth out. */
function finish(samples: Float64Array, rate: number, peak: number): Float32Array<ArrayBuffer> {
  const ramp = Math.max(1, Math.round(ONSET_RAMP * rate));
  const fade = Math.max(1, Math.round(samples.length / 50));
  for (let i = 0; i < ramp; i++) samples[i] = (samples[i]! * i) / ramp;
  for (let i = 0; i < fade; i++) samples[samples.length - 1 - i] = (samples[samples.length - 1 - i]! * i) / fade;
  let highest = 0;
  for (const sample of samples) highest = Math.max(highest, Math.abs(sample));
  const scale = highest > 0 ? peak / highest : 0;
  const scaled = new Float32Array(samples.length);
  for (let i = 0; i < scaled.length; i++) scaled[i] = samples[i]! * scale;
  return scaled;
}

export type Stroke = {
  /** to the recipe's pitch, a frequency ratio */
  readonly shift: number;
  readonly accent: Accent;
  /** samples a second */
  readonly rate: number;
  readonly seed: number;
};

/**
 * Makes one stroke, step by step: it gives way after each mode, so that the caller can share out the work.
 * @returns mono samples from the stroke on, their peak at most 0.5
 */
export function* strokeSteps(recipe: Recipe, { shift, accent, rate, seed }: Stroke): Generator<void, Float32Array<ArrayBuffer>, void> {
  const random = seededRandom(seed);
  const samples = new Float64Array(Math.ceil(secondsNeeded(recipe) * rate));
  const bright = BRIGHTER[accent];
  const { count, within, fall } = recipe.contacts ?? { count: 1, within: 0, fall: 1 };
  for (let contact = 0; contact < count; contact++) {
    const at = contact === 0 ? 0 : Math.round(((contact - 1 + random()) / (count - 1)) * within * rate) + 1;
    const scatter = contact === 0 ? 1 : 0.92 + 0.16 * random();
    const strength = fall ** contact;
    const take = { samples, rate, pitch: recipe.pitch * shift * scatter };
    for (const burst of recipe.bursts ?? []) {
      addBurst(take, at, burst, burst.gain * strength * (1 + 2.5 * bright), shift * scatter, random);
      yield;
    }
    for (const mode of recipe.modes) {
      addMode(take, at, mode, mode.gain * strength * Math.min(BRIGHTENED, mode.ratio) ** bright, recipe.glide);
      yield;
    }
  }
  return finish(samples, rate, PEAKS[accent] * (recipe.level ?? 1));
}
