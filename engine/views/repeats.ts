import { type Fraction, toFraction } from '../exact/fraction';
import { alignment } from '../proportion/alignment';
import { parseMetre } from '../rhythm/metre';
import type { BuiltStudy } from '../study/types';
import type { PlannedMeasure } from './measures';
import type { Staff } from './score';

/** Measures that come again and again, alike in every staff: printed once, with the number of times. */
export type Repeat = {
  /** index of the first measure */
  readonly first: number;
  /** measures of the figure */
  readonly length: number;
  /** how often it is played, twice at least */
  readonly times: number;
};

/** What a reader sees in a measure of a staff, as text. */
function looks({ measures, values }: Staff, index: number): string {
  const measure = measures[index];
  if (measure === undefined) return '';
  return measure.symbols
    .map(({ base, dots, rest, tuplets, tiedFromBefore, tiedOn, value }) => {
      const own = value === null ? undefined : values[value];
      const marks = tiedFromBefore ? '' : [own?.accent ?? '', own?.roll ?? '', own?.ends ?? ''].join();
      return [base, dots, rest, tuplets.map(({ actual, normal, starts, stops }) => `${actual}:${normal}${starts ?? ''}${stops ?? ''}`).join(' '), tiedFromBefore, tiedOn, rest ? '' : (own?.sound ?? 1), marks].join();
    })
    .join(';');
}

/** How many whole measures hold the figure a whole number of times. */
function figureMeasures(figure: Fraction, measure: Fraction): number {
  return Number(alignment([figure, measure]).div(measure));
}

/**
 * The repeats of a score: a statement that goes through its figure several times, from a bar line on, in measures that are
 * alike in every staff. Where a tie, a change of metre or another line makes them differ, nothing is folded.
 */
export function repeatsOf(measures: readonly PlannedMeasure[], staves: readonly Staff[], built: Pick<BuiltStudy, 'statements'>): Repeat[] {
  const byStart = new Map(measures.map((measure) => [toFraction(measure.start).toFraction(), measure.index]));
  const texts = new Map<string, string>();
  const look = (staff: Staff, index: number): string => {
    const key = `${staff.instrument.id} ${index}`;
    let text = texts.get(key);
    if (text === undefined) texts.set(key, (text = looks(staff, index)));
    return text;
  };
  const isAlike = (a: number, b: number): boolean =>
    measures[a]!.metre === measures[b]!.metre && measures[b]!.signature === null && staves.every((staff) => look(staff, a) === look(staff, b));

  const found: Repeat[] = [];
  const statements = built.statements.filter(({ repeats }) => repeats !== undefined).toSorted((a, b) => a.start.compare(b.start));
  let free = 0;
  for (const { start, length, repeats } of statements) {
    const first = byStart.get(start.toFraction());
    if (first === undefined || first < free) continue;
    const measure = parseMetre(measures[first]!.metre).length;
    const size = figureMeasures(length.div(repeats!), measure);
    const most = Math.min(Number(length.div(measure.mul(size)).floor()), Math.floor((measures.length - first) / size));
    let times = 1;
    while (times < most && Array.from({ length: size }, (_, n) => first + n).every((index) => isAlike(index, index + times * size))) times += 1;
    if (times < 2) continue;
    found.push({ first, length: size, times });
    free = first + size * times;
  }
  return found;
}
