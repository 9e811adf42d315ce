import { seededRandom } from './random';

/** One way in which a body vibrates. */
export type Mode = {
  /** frequency, to the body's lowest */
  readonly ratio: number;
  readonly gain: number;
  /** seconds until it has fallen by 60 dB */
  readonly decay: number;
  /** seconds in which it comes up after the stroke; none where it sounds at once */
  readonly bloom?: number;
};

/**
 * Frequencies of the modes of simple bodies, to the lowest. Values from memory of Fletcher & Rossing, The Physics of Musical
 * Instruments (bars, plates, membranes, shells), rounded as there.
 */
export const RATIOS = {
  /** a straight bar or tube, free at both ends, bending */
  bar: [1, 2.756, 5.404, 8.933, 13.344],
  /** a marimba's bar, undercut so that its second mode is two octaves up */
  marimba: [1, 4, 9.2, 16.2],
  /** a xylophone's bar, undercut so that its second mode is a twelfth up */
  xylophone: [1, 3, 6.1, 10.2],
  /** a flat round plate, free at its edge */
  plate: [1, 1.73, 2.328, 3.91, 4.11, 6.3, 6.71],
  /** a thin ring or the rim of a bell-shaped shell: n(n² − 1)/√(n² + 1) */
  ring: [1, 2.828, 5.423, 8.771, 12.866],
  /** an ideal round membrane: zeros of the Bessel functions */
  membrane: [1, 1.594, 2.136, 2.296, 2.653, 2.918, 3.156, 3.501, 3.6],
  /** a kettledrum's membrane, loaded by air: the modes that ring, 2 : 3 : 4 : 5 nearly */
  kettle: [1, 1.5, 1.98, 2.44, 2.9],
} as const;

type Shape = {
  /** seconds until the lowest mode has fallen by 60 dB */
  readonly decay: number;
  /** how much weaker higher modes are: gain = ratio^−tilt */
  readonly tilt?: number;
  /** how much faster higher modes die: decay / ratio^damping */
  readonly damping?: number;
};

/** The modes of a body from its frequencies. */
export const modesOf = (ratios: readonly number[], { decay, tilt = 0.7, damping = 0.7 }: Shape): Mode[] =>
  ratios.map((ratio) => ({ ratio, gain: ratio ** -tilt, decay: decay / ratio ** damping }));

/** Each mode twice, a little apart, as in a pair or a body not quite round: it beats. */
export const beating = (modes: readonly Mode[], apart: number): Mode[] =>
  modes.flatMap((mode) => [mode, { ...mode, ratio: mode.ratio * apart, gain: mode.gain * 0.8 }]);

/**
 * Many modes at even distances with some scatter, as a large thin plate has them: as many to each hertz low as high
 * (Fletcher & Rossing, from memory). Their signs differ, so that they do not all push at once.
 * @param bloom - seconds in which the highest come up; lower ones sooner
 */
export function denseModes(
  count: number,
  [low, high]: readonly [number, number],
  seed: number,
  { decay, tilt = 0.5, damping = 0.5, bloom = 0 }: Shape & { readonly bloom?: number },
): Mode[] {
  const random = seededRandom(seed);
  return Array.from({ length: count }, (_, i) => {
    const ratio = low + ((high - low) * (i + random())) / count;
    const sign = random() < 0.5 ? -1 : 1;
    const mode = { ratio, gain: (sign * (0.5 + random())) / (ratio / low) ** tilt, decay: decay / (ratio / low) ** damping };
    const rise = bloom * Math.sqrt((ratio - low) / (high - low));
    return rise > 0.02 ? { ...mode, bloom: rise } : mode;
  });
}
