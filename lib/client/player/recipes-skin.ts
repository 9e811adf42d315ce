import { RATIOS, modesOf } from './modes';
import type { Recipe } from './synth';

const THIRD = 2 ** (3 / 12);
const FOURTH = 2 ** (5 / 12);

const membrane = (decay: number, tilt: number) => modesOf(RATIOS.membrane, { decay, tilt, damping: 1 });

export const SKIN = {
  'bass-drum': { pitch: 52, step: FOURTH, modes: membrane(1.5, 1.6), glide: { by: 0.2, within: 0.06 }, bursts: [{ gain: 1, decay: 0.03, centre: 250 }] },
  timpani: { pitch: 110, step: FOURTH, modes: modesOf(RATIOS.kettle, { decay: 2.2, tilt: 1, damping: 0.6 }), glide: { by: 0.015, within: 0.05 }, bursts: [{ gain: 0.5, decay: 0.04, centre: 350 }] },
  'tom-toms': { pitch: 112, step: THIRD, modes: membrane(0.75, 1.3), glide: { by: 0.22, within: 0.05 }, bursts: [{ gain: 0.6, decay: 0.02, centre: 900 }] },
  congas: { pitch: 196, step: FOURTH, modes: membrane(0.42, 1.5), glide: { by: 0.06, within: 0.02 }, bursts: [{ gain: 0.9, decay: 0.015, centre: 1400 }] },
  bongos: { pitch: 335, step: FOURTH, modes: membrane(0.2, 1.1), glide: { by: 0.05, within: 0.015 }, bursts: [{ gain: 0.8, decay: 0.01, centre: 2400 }] },
  'frame-drum': { pitch: 88, step: THIRD, modes: membrane(1, 0.6), glide: { by: 0.05, within: 0.04 }, bursts: [{ gain: 1.4, decay: 0.05, centre: 600, q: 0.6 }] },
  'snare-drum': { pitch: 186, step: THIRD, modes: membrane(0.26, 0.9), glide: { by: 0.1, within: 0.02 }, bursts: [{ gain: 3.2, decay: 0.32, centre: 3600, q: 0.5 }, { gain: 1.5, decay: 0.015, centre: 2000 }] },
} satisfies Record<string, Recipe>;
