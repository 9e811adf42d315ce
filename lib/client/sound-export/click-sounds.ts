import type { ClickKind } from '@/engine';

/** Hertz, peak and decay in seconds of each click: told apart by pitch and loudness. Settings of ours, no source. */
const SOUNDS: Record<ClickKind, { readonly hertz: number; readonly peak: number; readonly decay: number }> = {
  bar: { hertz: 1760, peak: 0.42, decay: 0.03 },
  beat: { hertz: 1175, peak: 0.32, decay: 0.025 },
  part: { hertz: 880, peak: 0.18, decay: 0.02 },
  ready: { hertz: 2349, peak: 0.4, decay: 0.06 },
};

/** A short tone that begins at full height: its attack is its first samples. */
export function clickSamples(kind: ClickKind, rate: number): Float32Array<ArrayBuffer> {
  const { hertz, peak, decay } = SOUNDS[kind];
  const samples = new Float32Array(Math.ceil(decay * 5 * rate));
  for (let n = 0; n < samples.length; n += 1) samples[n] = peak * Math.cos((2 * Math.PI * hertz * n) / rate) * Math.exp(-n / (decay * rate)) * (1 - n / samples.length);
  return samples;
}
