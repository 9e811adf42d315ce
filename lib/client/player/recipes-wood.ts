import { RATIOS, modesOf } from './modes';
import type { Recipe } from './synth';

const SECOND = 2 ** (2 / 12);
const THIRD = 2 ** (3 / 12);

export const WOOD = {
  'temple-blocks': { pitch: 430, step: THIRD, modes: modesOf([1, 2.21, 3.62, 5.1], { decay: 0.2, tilt: 1.5 }), bursts: [{ gain: 0.7, decay: 0.01, centre: 1800 }] },
  'wood-block': { pitch: 860, step: THIRD, modes: modesOf([1, 1.62, 2.6, 3.9, 5.2], { decay: 0.09, tilt: 0.8, damping: 0.5 }), bursts: [{ gain: 0.8, decay: 0.008, centre: 3500 }] },
  claves: { pitch: 2450, step: 1.15, modes: modesOf(RATIOS.bar, { decay: 0.14, tilt: 1.8 }), bursts: [{ gain: 0.2, decay: 0.006, centre: 5000 }], level: 0.85 },
  'log-drum': { pitch: 156, step: THIRD, modes: modesOf([1, 2.72, 4.1, 6.25], { decay: 0.55, tilt: 1.3, damping: 0.8 }), bursts: [{ gain: 0.9, decay: 0.02, centre: 700 }] },
  marimba: { pitch: 262, step: SECOND, modes: modesOf(RATIOS.marimba, { decay: 0.8, tilt: 1, damping: 0.8 }), bursts: [{ gain: 0.3, decay: 0.012, centre: 1200 }] },
  xylophone: { pitch: 784, step: SECOND, modes: modesOf(RATIOS.xylophone, { decay: 0.32, tilt: 0.7, damping: 0.6 }), bursts: [{ gain: 0.4, decay: 0.008, centre: 4000 }] },
  plank: { pitch: 310, step: THIRD, modes: modesOf(RATIOS.bar, { decay: 0.24, tilt: 0.4, damping: 0.6 }), bursts: [{ gain: 1.2, decay: 0.025, centre: 1500 }] },
  castanets: { pitch: 1500, step: 1.2, modes: modesOf([1, 1.58, 2.35, 3.4], { decay: 0.035, tilt: 0.3, damping: 0.3 }), bursts: [{ gain: 1, decay: 0.012, centre: 4500 }], contacts: { count: 3, within: 0.03, fall: 0.5 } },
} satisfies Record<string, Recipe>;
