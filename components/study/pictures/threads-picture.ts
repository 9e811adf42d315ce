import { type DescribeContext, describeSection, metreOf, parseMetre, type ThreadReading, threadsOf, type ValueNames } from '@/engine';
import { playersOf } from '../family';
import { rowWords, rowY, type ThreadGeometry, threadsPath, TICK, ticksPaths, tickX } from '../thread-geometry';
import { HAIR, INK, SOFT, tintHex } from './colours';
import { element, fitted, type Measure, picture, type Picture, words } from './svg';

const WIDTH = 1_000;
const MARGIN = 24;
const ROOM = 150;

export const READING_WORDS: Record<ThreadReading, string> = { 'in-time': 'in time', 'from-one-start': 'from one start', 'to-one-end': 'to one end' };

/** The threads of a section, as the page draws them. */
export function threadsPicture({ study, built }: DescribeContext, sectionId: string, reading: ThreadReading, measure: Measure, valueNames: ValueNames): Picture {
  const section = study.sections.find(({ id }) => id === sectionId) ?? study.sections[0]!;
  const threads = threadsOf(built.statements.filter((one) => one.section === section.id), reading);
  const extent = Math.max(threads.extent.valueOf(), 1e-9);
  const rows = threads.rows.length;
  const pitch = rows > 8 ? 64 : rows > 5 ? 78 : 104;
  const left = MARGIN + ROOM;
  const geometry: ThreadGeometry = { left, scale: (WIDTH - left - MARGIN) / extent, top: MARGIN + 112, pitch };
  const bottom = rowY(geometry, Math.max(rows - 1, 0)) + TICK + 16;
  const length = parseMetre(metreOf(study, section)).length.valueOf();
  const count = Math.ceil(extent / length - 1e-9);
  let step = 1;
  while (step * length * geometry.scale < 26) step *= 2;
  const ruler = Array.from({ length: Math.floor(count / step) + 1 }, (_, n) => n * step).flatMap((n) => {
    const at = tickX(geometry, n * length);
    if (at > WIDTH - MARGIN + 1) return [];
    return [
      element('rect', { x: at - 0.5, y: geometry.top - 34, width: 1, height: bottom - geometry.top + 28, fill: HAIR }),
      ...(n < count && at + 20 < WIDTH ? [words(at + 4, geometry.top - 38, String(n + 1), { 'font-size': 11.5, fill: SOFT })] : []),
    ];
  });
  const lines = threads.rows.map((row, index) => {
    const { statement } = row;
    const y = rowY(geometry, index);
    const x = tickX(geometry, row.start.valueOf());
    const end = x + statement.length.valueOf() * geometry.scale;
    const colour = tintHex(study, statement.instrument);
    return [
      words(MARGIN, y + 1, fitted(playersOf(study, statement).toLowerCase(), ROOM - 12, 14.5, 600, measure), { 'font-size': 14.5, 'font-weight': 600, fill: colour }),
      words(MARGIN, y + 19, rowWords(statement), { 'font-size': 14, fill: SOFT }),
      element('rect', { x, y: y - 1.5, width: Math.max(end - x, 0), height: 3, fill: colour }),
      element('rect', { x: end - 0.5, y: y - TICK, width: 1, height: 2 * TICK, fill: colour }),
      ...ticksPaths(row, geometry, index).map(([instrument, d]) => element('path', { d, fill: 'none', stroke: instrument === null ? colour : tintHex(study, instrument), 'stroke-width': 3.2 })),
    ].join('');
  });
  const title = `The threads of “${section.name}” in ${study.title}, ${READING_WORDS[reading]}`;
  return picture(
    { width: WIDTH, height: bottom + MARGIN, title, description: describeSection(study, section.id, { valueNames }) },
    words(MARGIN, MARGIN + 22, fitted(section.name, WIDTH - 2 * MARGIN, 26, 560, measure), { 'font-size': 26, 'font-weight': 560, fill: INK }),
    words(MARGIN, MARGIN + 42, `${study.title}, threads ${READING_WORDS[reading]}`, { 'font-size': 13, fill: SOFT }),
    ...ruler,
    element('path', { d: threadsPath(threads, geometry, null), fill: 'none', stroke: INK, 'stroke-width': 0.7, opacity: 0.5 }),
    ...lines,
  );
}
