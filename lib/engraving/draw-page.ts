import type { PrintScore } from '@/engine';
import { type DrawnSystem, drawSystem } from './draw-system';
import type { VexFlow } from './notes';
import type { PageOptions } from './page-options';
import { BODY_TEXT, FOOT_TEXT, NAME_TEXT } from './page-text';
import type { Layout, Page } from './pages';
import { addText, textWidth } from './text';
import { wrap } from './front-matter';

/** A title cut to a width, with an ellipsis where it is. */
function shortened(vf: VexFlow, text: string, width: number): string {
  if (textWidth(vf, text, FOOT_TEXT) <= width) return text;
  let end = text.length;
  while (end > 1 && textWidth(vf, `${text.slice(0, end)}…`, FOOT_TEXT) > width) end -= 1;
  return `${text.slice(0, end).trimEnd()}…`;
}

/** Names of instruments beside their staves, on one line or two. */
function drawNames(vf: VexFlow, group: Element, score: PrintScore, { system, x, y }: Page['systems'][number], names: number): void {
  if (names === 0) return;
  const hasBrackets = score.groups.some(({ length }) => length > 1);
  for (const { staff, middle } of system.rows.rows) {
    const text = score.staves[staff]!.instruments.map(({ name }) => name).join(', ');
    const room = names - (hasBrackets ? 20 : 10);
    const lines = wrap(vf, text, NAME_TEXT, room).slice(0, 2);
    lines.forEach((line, index) => addText(group, x - names, y + middle + 5 + (index - (lines.length - 1) / 2) * 16, line, NAME_TEXT));
  }
}

/**
 * Draws a page into an element of the document, which is given an svg of the paper's size.
 * @returns where everything is, for tests and for the screen
 */
export function drawPage(vf: VexFlow, host: HTMLDivElement, score: PrintScore, layout: Layout, page: Page, options: PageOptions): { svg: SVGSVGElement; systems: DrawnSystem[] } {
  const { geometry, names, pages } = layout;
  const renderer = new vf.Renderer(host, vf.Renderer.Backends.SVG);
  renderer.resize(geometry.width, geometry.height);
  const context = renderer.getContext();
  context.setFillStyle('currentColor');
  context.setStrokeStyle('currentColor');
  const svg = host.querySelector('svg')!;
  svg.setAttribute('viewBox', `0 0 ${geometry.width} ${geometry.height}`);
  svg.setAttribute('width', `${geometry.paper.width}pt`);
  svg.setAttribute('height', `${geometry.paper.height}pt`);
  svg.removeAttribute('style');
  for (const { block, y } of page.front) block.draw(svg, context, y);
  const systems = page.systems.map((placed) => {
    drawNames(vf, svg, score, placed, names);
    return drawSystem(vf, context, svg, score, { ...placed.system, x: placed.x, y: placed.y });
  });
  const { left, right, bottom } = geometry;
  const foot = bottom + 26;
  const isMusic = page.systems.length > 0;
  const beside = score.part === null ? '' : `, ${score.part.name}`;
  const running = `${shortened(vf, score.title, (right - left) * 0.34 - textWidth(vf, beside, FOOT_TEXT))}${beside}`;
  if (score.rights !== null && (page.number === 1 || (isMusic && pages[page.number - 2]?.systems.length === 0))) addText(svg, (left + right) / 2, foot - 15, score.rights, { ...FOOT_TEXT, anchor: 'middle' });
  addText(svg, left, foot, running, FOOT_TEXT);
  if (options.stamp !== undefined) addText(svg, (left + right) / 2, foot, options.stamp, { ...FOOT_TEXT, anchor: 'middle' });
  addText(svg, right, foot, String(page.number), { ...FOOT_TEXT, anchor: 'end' });
  if (page.hurries) addText(svg, right, bottom + 4, 'turn quickly', { ...BODY_TEXT, style: 'italic', anchor: 'end' });
  return { svg, systems };
}

