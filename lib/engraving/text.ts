import type { Fraction } from '@/engine';
import type { VexFlow } from './notes';

export type TextStyle = {
  /** drawing units, ten a staff space */
  readonly size: number;
  readonly weight?: 'bold';
  readonly style?: 'italic';
  readonly anchor?: 'start' | 'middle' | 'end';
  /** a music symbol, by its SMuFL code point */
  readonly isMusic?: boolean;
};

const NAMESPACE = 'http://www.w3.org/2000/svg';

export function addElement<K extends keyof SVGElementTagNameMap>(parent: Element, name: K, attributes: Readonly<Record<string, string | number>>): SVGElementTagNameMap[K] {
  const element = parent.ownerDocument.createElementNS(NAMESPACE, name);
  for (const [key, value] of Object.entries(attributes)) element.setAttribute(key, String(value));
  parent.appendChild(element);
  return element;
}

const round = (x: number): number => Math.round(x * 100) / 100;

/** Writes one line of text; `y` is its baseline. */
export function addText(parent: Element, x: number, y: number, text: string, { size, weight, style, anchor = 'start', isMusic = false }: TextStyle): SVGTextElement {
  const element = addElement(parent, 'text', {
    x: round(x),
    y: round(y),
    'font-family': isMusic ? 'Bravura' : 'Academico',
    'font-size': `${size}px`,
    'font-weight': weight ?? 'normal',
    'font-style': style ?? 'normal',
    'text-anchor': anchor,
    stroke: 'none',
    fill: 'currentColor',
  });
  element.textContent = text;
  return element;
}

export function addLine(parent: Element, x1: number, y1: number, x2: number, y2: number, width = 1.2): void {
  addElement(parent, 'path', { d: `M${round(x1)} ${round(y1)}L${round(x2)} ${round(y2)}`, stroke: 'currentColor', 'stroke-width': width, fill: 'none' });
}

/** Width of a text in drawing units. */
export function textWidth(vf: VexFlow, text: string, { size, weight, style, isMusic = false }: TextStyle): number {
  const element = new vf.Element();
  element.setText(text);
  element.setFont(isMusic ? 'Bravura' : 'Academico', (size * 3) / 4, weight ?? 'normal', style ?? 'normal');
  return element.getWidth();
}

/** Dynamics as SMuFL writes them (SMuFL 1.4, “Dynamics”, U+E520 to E52F). */
const DYNAMIC_GLYPHS: Readonly<Record<string, string>> = { p: '\uE520', m: '\uE521', f: '\uE522', r: '\uE523', s: '\uE524', z: '\uE525', n: '\uE526' };
export const dynamicGlyphs = (mark: string): string => [...mark].map((letter) => DYNAMIC_GLYPHS[letter] ?? '').join('');

/** Note values inside text (SMuFL 1.4, “Metronome marks”, U+ECA0 to ECB7). */
const METRONOME: Readonly<Record<string, string>> = { '2': '\uECA0', '1': '\uECA2', '1/2': '\uECA3', '1/4': '\uECA5', '1/8': '\uECA7', '1/16': '\uECA9', '1/32': '\uECAB' };
const DOT = '\uECB7';

/** A plain or dotted value as one symbol, or two tied, for tempo marks; null where it is neither. */
export function valueGlyphs(length: Fraction): string[] | null {
  for (const [base, glyph] of Object.entries(METRONOME)) {
    const [n = '1', d = '1'] = base.split('/');
    const ratio = length.mul(Number(d)).div(Number(n));
    if (ratio.equals(1)) return [glyph];
    if (ratio.equals('3/2')) return [`${glyph}${DOT}`];
    if (ratio.equals('7/4')) return [`${glyph}${DOT}${DOT}`];
  }
  for (const [base, glyph] of Object.entries(METRONOME)) {
    const rest = length.sub(base);
    if (rest.n === 0n || rest.s < 0n) continue;
    const other = Object.entries(METRONOME).find(([one]) => rest.equals(one));
    if (other !== undefined) return [glyph, other[1]];
  }
  return null;
}
