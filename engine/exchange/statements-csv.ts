import { type Fraction, formatFraction } from '../exact/fraction';
import { readingWords, rotationWords } from '../describe/sentence-parts';
import { measuresOf } from '../rhythm/measure';
import type { Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { clockOf } from '../views/clock';
import { metreOf, placeWords, planMeasures } from '../views/measures';

/** A cell that a spreadsheet would run as a formula is led by an apostrophe (CVE-2021-41270, symfony.com). */
const safe = (text: string): string => (/^[=+\-@\t\r]/.test(text) ? `'${text}` : text);

/** RFC 4180: quotes about what holds a comma, a quote or a line's end; quotes within are doubled. */
const cell = (text: string): string => (/[",\r\n]/.test(safe(text)) ? `"${safe(text).replaceAll('"', '""')}"` : safe(text));

/** A fraction as a spreadsheet reads it: `5/4` alone would become a date, `1 1/4` and `0 3/4` are numbers. */
const number = (value: Fraction): string => (value.d === 1n ? formatFraction(value) : value.compare(1) < 0 ? `0 ${formatFraction(value)}` : value.toFraction(true));

/** Minutes, seconds and thousandths, rounded: `1:02.500`. */
function clockText(seconds: Fraction): string {
  const thousandths = seconds.mul(1000).round().n;
  const minutes = thousandths / 60_000n;
  const rest = thousandths % 60_000n;
  return `${minutes}:${String(rest / 1000n).padStart(2, '0')}.${String(rest % 1000n).padStart(3, '0')}`;
}

const HEAD = ['Section', 'Statement', 'Instrument', 'Player', 'Subject', 'Begins at', 'Length in whole notes', 'Length in measures', 'Starts', 'Ends', 'Starts, exact seconds', 'Ends, exact seconds', 'Factor', 'Reading', 'Rotation', 'Mirrored', 'Attacks'];

/**
 * Every statement and line of a study as comma-separated values (RFC 4180), one a line, with a head; fractions as mixed numbers, which spreadsheets read as
 * numbers and never as dates, and clock times rounded to a thousandth of a second. It begins with a byte order mark, without which spreadsheets misread what is not
 * ASCII.
 * @param built - what `buildStudy` gives for the same study
 */
export function statementsCsv(study: Study, built: BuiltStudy): string {
  const clock = clockOf(study, built);
  const measures = planMeasures(study, built);
  const nameOf = (id: string): string => study.instruments.find((one) => one.id === id)?.name ?? id;
  const rows = built.statements.map((statement): string[] => {
    const section = study.sections.find(({ id }) => id === statement.section)!;
    const spanIndex = built.sections.findIndex(({ id }) => id === statement.section);
    const span = clock.spans[spanIndex]!;
    const secondsAt = (position: Fraction): Fraction => span.seconds.add(position.sub(span.start).mul(span.secondsOfWhole));
    const [start, end] = [secondsAt(statement.start), secondsAt(statement.start.add(statement.length))];
    const instruments = statement.instrument === null ? [...new Set(statement.assigned ?? [])] : [statement.instrument];
    const players = study.players.filter((player) => instruments.some((id) => player.instruments.includes(id))).map(({ name }) => name);
    return [
      section.name,
      String(statement.index + 1),
      instruments.map(nameOf).join('; '),
      players.join('; '),
      study.subjects.find(({ id }) => id === statement.subject)?.name ?? '',
      placeWords(measures, statement.start),
      number(statement.length),
      number(measuresOf(statement.length, metreOf(study, section))),
      clockText(start),
      clockText(end),
      number(start),
      number(end),
      statement.subject === null ? '' : number(statement.factor),
      statement.subject === null ? '' : readingWords(statement.reading),
      statement.rotation === 0 ? '' : rotationWords(statement.rotation, statement.rotationBy ?? 'values'),
      statement.mirrored ? 'yes' : 'no',
      String(statement.rhythm.filter(({ rest }) => !rest).length),
    ];
  });
  return `\uFEFF${[HEAD, ...rows].map((row) => `${row.map(cell).join(',')}\r\n`).join('')}`;
}
