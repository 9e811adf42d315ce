import { clockOf, type DescribeContext, describeStudy, formatClock, measureAt, measureNumber, metreOf, type Statement } from '@/engine';
import { instrumentsOf } from '../family';
import { bracketsOf, lanesOf } from '../form-layout';
import { INK, PAPER, SOFT } from './colours';
import { element, fills, fitted, type Measure, picture, type Picture, words } from './svg';

const WIDTH = 1_400;
const MARGIN = 24;
const LEVEL = 16;
const NAME = 32;
const CLOCK = 24;

type Box = { readonly left: number; readonly top: number; readonly width: number; readonly height: number };

/** One statement: a band for each instrument that takes part in it, and how many measures it lasts where there is room. */
function statementBox({ left, top, width, height }: Box, statement: Statement, fillOf: (id: string | null) => string, length: string | null, measure: Measure): string {
  const parts = instrumentsOf(statement);
  const bands = parts.map((instrument, n) => element('rect', { x: left, y: top + (height * n) / parts.length, width, height: height / parts.length, fill: fillOf(instrument) }));
  if (length === null || width < 34) return bands.join('');
  const label = measure(length, 12.5, 650) + 10;
  if (label > width - 8) return bands.join('');
  const y = top + height / 2;
  return [...bands, element('rect', { x: left + 6, y: y - 8, width: label, height: 16, rx: 1, fill: PAPER }), words(left + 11, y + 4.4, length, { 'font-size': 12.5, 'font-weight': 650, fill: INK })].join('');
}

/**
 * The whole form to scale in time, as the strip on the page draws it.
 * @param context - of the study that is drawn
 */
export function formPicture(context: DescribeContext, measure: Measure): Picture {
  const { study, built, measures } = context;
  const clock = clockOf(study, built);
  const total = Math.max(built.totalLength.valueOf(), 1e-9);
  const x = (position: number) => MARGIN + ((WIDTH - 2 * MARGIN) * position) / total;
  const { brackets, levels } = bracketsOf(study);
  const { defs, fillOf } = fills(study);
  const heading = words(MARGIN, MARGIN + 22, study.title, { 'font-size': 26, 'font-weight': 560, fill: INK });
  const top = MARGIN + 36;
  const base = top + levels * LEVEL + 10;
  const middle = (id: string) => {
    const section = built.sections.find((one) => one.id === id)!;
    return x(section.start.valueOf() + section.length.valueOf() / 2);
  };
  const arches = brackets.flatMap(({ from, to, level }) => {
    const [a, b] = [middle(from), middle(to)].sort((one, other) => one - other) as [number, number];
    const y = base - (level + 1) * LEVEL - 2;
    return [
      element('path', { d: `M${a.toFixed(1)} ${base}V${y}H${b.toFixed(1)}V${base}`, fill: 'none', stroke: SOFT }),
      ...[a, b].map((at) => element('rect', { x: at - 1.5, y: base - 8, width: 3, height: 8, fill: SOFT })),
    ];
  });
  const axis =
    built.palindrome.form.holds && study.sections.length > 1
      ? [element('rect', { x: WIDTH / 2 - 0.75, y: top, width: 1.5, height: base - 6 - top, fill: INK }), element('rect', { x: WIDTH / 2 + 3, y: base - levels * LEVEL + 2, width: measure('axis', 12.5, 400) + 12, height: 13, fill: PAPER }), words(WIDTH / 2 + 9, base - levels * LEVEL + 12, 'axis', { 'font-size': 12.5, fill: SOFT })]
      : [];
  let bottom = base;
  const sections = study.sections.map((section, index) => {
    const placed = built.sections[index]!;
    const own = built.statements.filter((one) => one.section === section.id);
    const { lane, count } = lanesOf(study, own);
    const laneHeight = count === 1 ? 28 : Math.max(9, Math.floor(42 / count));
    const [left, width] = [x(placed.start.valueOf()), x(placed.length.valueOf()) - MARGIN];
    const lanes = base + NAME;
    const foot = lanes + count * laneHeight + CLOCK;
    bottom = Math.max(bottom, foot);
    const name = fitted(section.name, width - 10, 14.5, 600, measure);
    const number = String(measureAt(measures, placed.start)?.number ?? '');
    const time = formatClock(clock.secondsAt(placed.start));
    const hasTime = width >= 74;
    return [
      element('rect', { x: left, y: base, width: 1, height: foot - base, fill: INK }),
      ...(name === '' ? [] : [words(left + 7, base + 21, name, { 'font-size': 14.5, 'font-weight': 600, fill: INK })]),
      ...own.map((statement) => {
        const box = {
          left: x(statement.start.valueOf()) + 2,
          width: Math.max(x(statement.length.valueOf()) - MARGIN - 3, 0.5),
          top: lanes + lane.get(statement.id)! * laneHeight,
          height: laneHeight - (count === 1 ? 0 : 2),
        };
        return statementBox(box, statement, fillOf, count === 1 ? measureNumber(statement.length, metreOf(study, section)) : null, measure);
      }),
      ...(measure(number, 12.5, 400) > width - 8 ? [] : [words(left + 7, foot - 5, number, { 'font-size': 12.5, fill: SOFT })]),
      ...(hasTime ? [words(left + 7 + measure(number, 12.5, 400) + 16, foot - 5, time, { 'font-size': 12.5, fill: SOFT })] : []),
    ].join('');
  });
  const end = element('rect', { x: WIDTH - MARGIN - 1, y: base, width: 1, height: bottom - base, fill: INK });
  const title = `The form of ${study.title}`;
  return picture({ width: WIDTH, height: bottom + MARGIN, title, description: describeStudy(study) }, defs, heading, ...arches, ...axis, ...sections, end);
}
