import type { Family, Study } from '@/engine';

/** The light theme of `app/globals.css`: a picture leaves the page and takes its colours along. */
export const PAPER = '#fcfbf7';
export const INK = '#191a1c';
export const SOFT = '#5e6064';
export const HAIR = '#dad6cb';
const FAMILIES: Record<Family, string> = { metal: '#1f5f8b', wood: '#a4580e', skin: '#8e2f5c', found: '#3f6b4a' };
const BLACK = '#000000';

type Triple = readonly [number, number, number];

const toLinear = (one: number): number => (one <= 0.04045 ? one / 12.92 : ((one + 0.055) / 1.055) ** 2.4);
const fromLinear = (one: number): number => (one <= 0.0031308 ? one * 12.92 : 1.055 * one ** (1 / 2.4) - 0.055);

/** CSS Color 4, “Sample code for color conversions”: sRGB to Oklab and back. */
function toOklab(hex: string): Triple {
  const [r, g, b] = [1, 3, 5].map((at) => toLinear(Number.parseInt(hex.slice(at, at + 2), 16) / 255)) as [number, number, number];
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b);
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b);
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b);
  return [
    0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s,
  ];
}

function fromOklab([L, a, b]: Triple): string {
  const l = (L + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const m = (L - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const s = (L - 0.0894841775 * a - 1.291485548 * b) ** 3;
  const linear = [
    4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s,
    -1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s,
    -0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s,
  ];
  return `#${linear.map((one) => Math.round(255 * Math.min(1, Math.max(0, fromLinear(one)))).toString(16).padStart(2, '0')).join('')}`;
}

/** `color-mix(in oklab, a share%, b)` of two opaque colours. @param share - of `a`, 0 to 1 */
export function mix(a: string, share: number, b: string): string {
  const [from, to] = [toOklab(a), toOklab(b)];
  return fromOklab(from.map((one, n) => one * share + to[n]! * (1 - share)) as unknown as Triple);
}

/** An instrument's colour, as `tint` gives it on the page. */
export function tintHex(study: Study, id: string | null): string {
  const instrument = study.instruments.find((one) => one.id === id);
  if (!instrument) return SOFT;
  const members = study.instruments.filter((one) => one.family === instrument.family);
  const depth = Math.min(members.indexOf(instrument), 3) * 0.14;
  return depth === 0 ? FAMILIES[instrument.family] : mix(FAMILIES[instrument.family], 1 - depth, BLACK);
}
