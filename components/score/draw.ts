import { CLOSING, REPEAT_SIGN, makeColumn, openingOf } from '@/lib/engraving/made-column';
import { drawSystem } from '@/lib/engraving/draw-system';
import type { VexFlow } from '@/lib/engraving/notes';
import type { DrawnScore, SystemSpec } from './spec';

let loading: Promise<VexFlow> | null = null;

/** VexFlow and its fonts, loaded once, before the first staff is drawn. */
export function loadVexFlow(): Promise<VexFlow> {
  loading ??= import('vexflow/bravura').then(async (vexflow) => {
    await Promise.all([document.fonts.load('30px Bravura'), document.fonts.load('30px Academico'), document.fonts.load('bold 30px Academico')]);
    return vexflow;
  });
  return loading;
}

export type SystemDrawing = {
  /** [position in whole notes, x in CSS pixels], in order, for the moving place */
  readonly places: readonly (readonly [number, number])[];
  /** left edge of each measure, in CSS pixels */
  readonly measureLefts: readonly number[];
  /** right edge, in CSS pixels */
  readonly width: number;
};

/**
 * Draws one system into `host`, which is emptied first. VexFlow asks for the least width of each measure before it is
 * placed; a system that needs more than the page has is drawn wider and scaled down, so that nothing collides.
 */
export function drawOnScreen(vf: VexFlow, host: HTMLDivElement, score: DrawnScore, { columns, widths: given, rows }: SystemSpec): SystemDrawing {
  host.replaceChildren();
  const made = columns.map((column) => makeColumn(vf, score, column));
  const widths = given.map((width, index) => {
    const column = columns[index]!;
    const sign = score.measures[column.measure]!.times === undefined ? 0 : REPEAT_SIGN;
    return Math.max(width, made[index]!.least * 1.08 + openingOf(vf, score, column, index === 0) + CLOSING + sign);
  });
  const room = given.reduce((a, b) => a + b, 0);
  const asked = widths.reduce((a, b) => a + b, 0);
  const scale = Math.min(1, room / asked);
  const renderer = new vf.Renderer(host, vf.Renderer.Backends.SVG);
  renderer.resize(room + 1, rows.height);
  const context = renderer.getContext();
  if (scale < 1) context.scale(scale, scale);
  context.setFillStyle('currentColor');
  context.setStrokeStyle('currentColor');
  const svg = host.querySelector('svg')!;
  svg.setAttribute('aria-hidden', 'true');
  // Rows keep the heights that the page has planned for them, whatever the width is scaled by.
  const placed = { ...rows, rows: rows.rows.map((row) => ({ ...row, middle: row.middle / scale })) };
  const drawn = drawSystem(vf, context, svg, score, { columns, made, widths, rows: placed, x: 0, y: 0 }, { says: false });
  for (const { made: { note, from } } of drawn.notes) {
    const element = note.getSVGElement();
    if (!element || from.statement === null || from.symbol.rest) continue;
    element.dataset.statement = from.statement;
    if (from.origin !== null) element.dataset.origin = String(from.origin);
  }
  return { places: drawn.places.map(([at, x]) => [at, x * scale] as const), measureLefts: drawn.lefts.map((left) => left * scale), width: drawn.right * scale };
}
