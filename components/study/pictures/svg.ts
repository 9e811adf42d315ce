import type { Family, Study } from '@/engine';
import { mix, PAPER, tintHex } from './colours';

export const FONTS = "'Archivo Variable', Archivo, 'Helvetica Neue', Arial, sans-serif";

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
/** Characters that XML 1.0 has no place for are left out. */
export const escape = (text: string): string => text.replaceAll(/[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu, '').replaceAll(/[&<>"']/g, (one) => ENTITIES[one]!);

type Attributes = Readonly<Record<string, string | number | undefined>>;
const shown = (value: string | number): string => (typeof value === 'number' ? String(Math.round(value * 100) / 100) : escape(value));

/** An element as text; numbers are rounded to hundredths. */
export function element(name: string, attributes: Attributes, ...inner: readonly string[]): string {
  const own = Object.entries(attributes).map(([key, value]) => (value === undefined ? '' : ` ${key}="${shown(value)}"`)).join('');
  return inner.length === 0 ? `<${name}${own}/>` : `<${name}${own}>${inner.join('')}</${name}>`;
}

export const words = (x: number, y: number, text: string, attributes: Attributes = {}): string => element('text', { x, y, ...attributes }, escape(text));

/** Width of a text in the fonts of a picture, in CSS pixels. */
export type Measure = (text: string, size: number, weight: number) => number;

/** As much of a text as has room, with an ellipsis where that is not all; nothing where not even that fits. */
export function fitted(text: string, room: number, size: number, weight: number, measure: Measure): string {
  if (measure(text, size, weight) <= room) return text;
  const characters = [...text];
  while (characters.length > 0 && measure(`${characters.join('').trimEnd()}…`, size, weight) > room) characters.pop();
  return characters.length === 0 ? '' : `${characters.join('').trimEnd()}…`;
}

/** What each family's texture is on the page, as a pattern: stripes, dots, lines; metal is plain. */
const TEXTURES: Record<Exclude<Family, 'metal'>, (id: string, colour: string) => string> = {
  wood: (id, colour) =>
    element(
      'pattern',
      { id, patternUnits: 'userSpaceOnUse', width: 5.8, height: 5.8, patternTransform: 'rotate(45)' },
      element('rect', { width: 5.8, height: 5.8, fill: colour }),
      element('rect', { x: 4.2, width: 1.6, height: 5.8, fill: mix(colour, 0.3, PAPER) }),
    ),
  skin: (id, colour) =>
    element(
      'pattern',
      { id, patternUnits: 'userSpaceOnUse', width: 6, height: 6 },
      element('rect', { width: 6, height: 6, fill: colour }),
      element('circle', { cx: 3, cy: 3, r: 1.4, fill: mix(colour, 0.18, PAPER) }),
    ),
  found: (id, colour) =>
    element(
      'pattern',
      { id, patternUnits: 'userSpaceOnUse', width: 5, height: 5 },
      element('rect', { width: 5, height: 5, fill: colour }),
      element('rect', { width: 5, height: 1.4, fill: mix(colour, 0.3, PAPER) }),
    ),
};

/** How the instruments of a study are filled: the patterns to define, and the fill of each by its id. */
export function fills(study: Study): { readonly defs: string; readonly fillOf: (id: string | null) => string } {
  const made = study.instruments.flatMap(({ id, family }, n) => (family === 'metal' ? [] : [{ id, name: `texture-${n}`, family }]));
  const defs = element('defs', {}, ...made.map(({ id, name, family }) => TEXTURES[family](name, tintHex(study, id))));
  const names = new Map(made.map(({ id, name }) => [id, name]));
  return { defs, fillOf: (id) => (id !== null && names.has(id) ? `url(#${names.get(id)})` : tintHex(study, id)) };
}

export type Picture = { readonly svg: string; readonly width: number; readonly height: number };

/** A whole picture that stands alone: its title and description inside, on paper, with its colours and fonts written in. */
export function picture({ width, height, title, description }: { width: number; height: number; title: string; description: string }, ...inner: readonly string[]): Picture {
  const svg = element(
    'svg',
    { xmlns: 'http://www.w3.org/2000/svg', width, height, viewBox: `0 0 ${Math.round(width * 100) / 100} ${Math.round(height * 100) / 100}`, role: 'img', 'aria-labelledby': 'title', 'aria-describedby': 'description', 'font-family': FONTS, style: 'font-variant-numeric: tabular-nums' },
    element('title', { id: 'title' }, escape(title)),
    element('desc', { id: 'description' }, escape(description)),
    element('rect', { width, height, fill: PAPER }),
    ...inner,
  );
  return { svg: `<?xml version="1.0" encoding="UTF-8"?>\n${svg}\n`, width, height };
}
