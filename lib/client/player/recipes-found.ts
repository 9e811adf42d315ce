import { RATIOS, beating, denseModes, modesOf } from './modes';
import type { Recipe } from './synth';

const SECOND = 2 ** (2 / 12);

export const FOUND = {
  'flower-pots': { pitch: 830, step: SECOND, modes: beating(modesOf(RATIOS.ring, { decay: 0.42, tilt: 0.8, damping: 0.5 }), 1.013), bursts: [{ gain: 1.2, decay: 0.025, centre: 3000 }] },
  bottles: { pitch: 1120, step: SECOND, modes: [...modesOf([1, 2.35, 4.2, 6.6], { decay: 0.55, tilt: 0.9, damping: 0.6 }), { ratio: 0.16, gain: 0.35, decay: 0.16 }], bursts: [{ gain: 0.7, decay: 0.03, centre: 5200 }] },
  pipes: { pitch: 440, step: SECOND, modes: modesOf(RATIOS.bar, { decay: 1.1, tilt: 0.25, damping: 0.5 }), bursts: [{ gain: 2, decay: 0.05, centre: 5000 }] },
  'tin-cans': { pitch: 350, step: 1.2, modes: modesOf([...RATIOS.ring, 1.6, 3.7, 4.4, 6.9], { decay: 0.17, tilt: 0.1, damping: 0.3 }), bursts: [{ gain: 3.5, decay: 0.13, centre: 2600, q: 0.5 }] },
  chains: { pitch: 2300, step: 1.15, modes: denseModes(8, [1, 3.4], 83, { decay: 0.09, tilt: 0 }), bursts: [{ gain: 3, decay: 0.05, centre: 6500, q: 0.5 }], contacts: { count: 11, within: 0.24, fall: 0.86 }, level: 0.7 },
  stones: { pitch: 1750, step: 1.18, modes: modesOf([1, 1.37, 2.11, 2.9], { decay: 0.05, tilt: 0.2, damping: 0.3 }), bursts: [{ gain: 3, decay: 0.03, centre: 3800, q: 0.5 }], contacts: { count: 2, within: 0.02, fall: 0.4 } },
  crate: { pitch: 136, step: 1.2, modes: modesOf([1, 1.72, 2.43, 3.3, 4.9, 6.1], { decay: 0.22, tilt: 0.4, damping: 0.6 }), bursts: [{ gain: 5, decay: 0.11, centre: 800, q: 0.5 }] },
  paper: { pitch: 900, step: 1.2, modes: modesOf([1, 2.3], { decay: 0.03, tilt: 0.5 }), bursts: [{ gain: 12, decay: 0.28, centre: 4200, q: 0.4 }], contacts: { count: 4, within: 0.12, fall: 0.7 } },
  gravel: { pitch: 1200, step: 1.2, modes: denseModes(4, [1, 4], 97, { decay: 0.02, tilt: 0 }), bursts: [{ gain: 6, decay: 0.03, centre: 2600, q: 0.5 }], contacts: { count: 16, within: 0.22, fall: 0.9 }, level: 0.8 },
} satisfies Record<string, Recipe>;
