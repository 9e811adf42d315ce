import type * as Vex from 'vexflow/bravura';
import type { PrintScore } from '@/engine';
import type { DrawnSystem } from '@/lib/engraving/draw-system';

export type Box = { readonly left: number; readonly right: number; readonly top: number; readonly bottom: number; readonly what: string };

const boxOf = (box: Vex.BoundingBox, what: string): Box => ({ left: box.getX(), right: box.getX() + box.getW(), top: box.getY(), bottom: box.getY() + box.getH(), what });

/** A head and its stem: VexFlow's own box of a note with slashes reaches to the corner of the page. */
function noteBox(note: Vex.StaveNote, what: string): Box {
  if (note.isRest()) return boxOf(note.getBoundingBox(), what);
  const [y = 0] = note.getYs();
  const left = note.getAbsoluteX();
  const { topY } = note.hasStem() ? note.getStemExtents() : { topY: y - 5 };
  return { left, right: left + note.getGlyphWidth() + note.getModifiers().filter((modifier) => modifier.getCategory() === 'Dot').length * 6, top: Math.min(topY, y - 5), bottom: y + 5, what };
}

/** The ink of every note, bracket and beam of a row, where VexFlow has put it. */
export function rowInk({ notes, beams, tuplets }: DrawnSystem, staff: number): Box[] {
  const own = notes.filter((one) => one.staff === staff);
  const set = new Set(own.map(({ made }) => made.note));
  const boxes = own.flatMap(({ made: { note, from } }) => [
    noteBox(note, `${from.symbol.rest ? 'rest' : 'note'} ${from.symbol.base}`),
    ...note.getModifiers().filter((modifier) => modifier.getCategory() === 'Articulation').map((modifier) => boxOf(modifier.getBoundingBox()!, 'articulation')),
  ]);
  for (const beam of beams) {
    const [first] = beam.getNotes();
    if (!set.has(first as Vex.StaveNote)) continue;
    const tops = beam.getNotes().map((note) => note.getStemExtents().topY);
    boxes.push({ left: first!.getAbsoluteX(), right: beam.getNotes().at(-1)!.getAbsoluteX(), top: Math.min(...tops), bottom: Math.max(...tops), what: 'beam' });
  }
  for (const tuplet of tuplets) {
    const [first] = tuplet.getNotes();
    if (!set.has(first as Vex.StaveNote)) continue;
    const y = tuplet.getYPosition();
    boxes.push({ left: first!.getAbsoluteX(), right: tuplet.getNotes().at(-1)!.getAbsoluteX() + 12, top: y - 10, bottom: y + 6, what: 'tuplet' });
  }
  return boxes;
}

/** The words of a page, by their anchors and widths. */
export function words(svg: SVGSVGElement, width: (text: string, size: number, isBold: boolean) => number): Box[] {
  return [...svg.querySelectorAll('text')]
    .filter((element) => element.getAttribute('font-family') === 'Academico')
    .map((element) => {
      const text = element.textContent ?? '';
      const size = Number.parseFloat(element.getAttribute('font-size')!);
      const wide = width(text, size, element.getAttribute('font-weight') === 'bold');
      const x = Number(element.getAttribute('x'));
      const anchor = element.getAttribute('text-anchor');
      const left = anchor === 'middle' ? x - wide / 2 : anchor === 'end' ? x - wide : x;
      const y = Number(element.getAttribute('y'));
      return { left, right: left + wide, top: y - size * 0.72, bottom: y + size * 0.2, what: text };
    });
}

export const overlaps = (a: Box, b: Box, by = 0.5): boolean => a.left < b.right - by && b.left < a.right - by && a.top < b.bottom - by && b.top < a.bottom - by;

export const measuresOn = (score: PrintScore, systems: readonly { columns: readonly { measure: number; length: number }[] }[]): number[] =>
  systems.flatMap(({ columns }) => columns.flatMap(({ measure, length }) => score.printed.slice(score.printed.indexOf(measure), score.printed.indexOf(measure) + length)));
