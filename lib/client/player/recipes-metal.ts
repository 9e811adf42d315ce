import { RATIOS, beating, denseModes, modesOf } from './modes';
import type { Recipe } from './synth';

const SECOND = 2 ** (2 / 12);

export const METAL = {
  crotales: { pitch: 1976, step: SECOND, modes: modesOf(RATIOS.plate, { decay: 4, tilt: 1.1, damping: 0.8 }), bursts: [{ gain: 0.3, decay: 0.02, centre: 7000 }] },
  glockenspiel: { pitch: 1175, step: SECOND, modes: modesOf(RATIOS.bar, { decay: 2.4, tilt: 1, damping: 1 }), bursts: [{ gain: 0.25, decay: 0.015, centre: 6000 }] },
  triangle: { pitch: 1350, step: 1.2, modes: denseModes(26, [1, 9], 31, { decay: 4.5, tilt: 0.1, damping: 0.4 }), bursts: [{ gain: 0.8, decay: 0.02, centre: 9000 }], level: 0.8 },
  'finger-cymbals': { pitch: 2750, step: SECOND, modes: beating(modesOf([1, 1.73, 2.33], { decay: 2.6, tilt: 0.9 }), 1.007), bursts: [{ gain: 0.4, decay: 0.015, centre: 9000 }], level: 0.8 },
  cymbal: { pitch: 190, step: 1.25, modes: denseModes(110, [1, 55], 47, { decay: 3.4, tilt: 0, damping: 0.2 }), bursts: [{ gain: 9, decay: 1.1, centre: 7500, q: 0.6 }, { gain: 8, decay: 0.03, centre: 3500 }] },
  'tam-tam': { pitch: 68, step: 1.25, modes: denseModes(120, [1, 52], 59, { decay: 9, tilt: 0.55, damping: 0.25, bloom: 0.35 }), bursts: [{ gain: 8, decay: 0.1, centre: 320, q: 0.5 }, { gain: 9, decay: 0.04, centre: 1400, q: 0.5 }] },
  gong: { pitch: 131, step: SECOND, modes: beating(modesOf([1, 1.52, 2.02, 2.74, 3.4, 4.3, 5.2], { decay: 4.5, tilt: 1, damping: 0.6 }), 1.009), bursts: [{ gain: 1, decay: 0.06, centre: 400 }] },
  cowbell: { pitch: 540, step: 1.22, modes: modesOf([1, 1.49, 2.55, 3.31, 4.62, 6.1], { decay: 0.5, tilt: 0.35, damping: 0.4 }), bursts: [{ gain: 1, decay: 0.02, centre: 4000 }] },
  'brake-drum': { pitch: 610, step: 1.2, modes: modesOf([...RATIOS.ring, 1.93, 4.1, 7.2], { decay: 1.5, tilt: 0.3, damping: 0.4 }), bursts: [{ gain: 1.4, decay: 0.03, centre: 4500 }] },
  anvil: { pitch: 1240, step: 1.2, modes: modesOf([1, 1.34, 2.04, 2.756, 3.9, 5.404, 6.8], { decay: 1.9, tilt: 0.1, damping: 0.5 }), bursts: [{ gain: 1.6, decay: 0.02, centre: 7000 }] },
  'sleigh-bells': { pitch: 3100, step: 1.15, modes: denseModes(10, [1, 2.6], 71, { decay: 0.35, tilt: 0.2 }), contacts: { count: 7, within: 0.09, fall: 0.8 }, level: 0.7 },
} satisfies Record<string, Recipe>;
