import { type Candidate, type FreeSection, LIMITS, type Rhythm, type TakenMeasures, attacks, formatRhythm, holdToNext, takeMeasures } from '@/engine';
import { type Edit, freshId, setSectionSubject, setSubject } from './study-edits';

/** A stretch of measures, by their places among a line's measures, from 0, the last included. */
export type MeasureRange = { readonly from: number; readonly to: number };

/** Measures that are taken at first of a line that is longer than a subject mostly is. */
const FIRST_MEASURES = 8;

/** All of a short line, the first measures of a long one; measures of silence at its end are not taken. */
export function firstRange({ rhythm, measures }: Candidate): MeasureRange {
  const attack = attacks(rhythm).at(-1);
  const last = Math.max(0, attack === undefined ? -1 : measures.findLastIndex(({ start }) => start.compare(attack) <= 0));
  return { from: 0, to: last < 2 * FIRST_MEASURES ? last : FIRST_MEASURES - 1 };
}

/** Finds measures by the numbers that are printed. @returns a range, or a sentence */
export function typedRange({ measures }: Candidate, from: string, to: string): MeasureRange | string {
  const [first, last] = [measures[0]!.number, measures.at(-1)!.number];
  const all = first === last ? `measure ${first} only` : `measures ${first} to ${last}`;
  const begin = measures.findIndex(({ number }) => number === from.trim());
  const end = measures.findLastIndex(({ number }) => number === to.trim());
  if (begin === -1 || end === -1) return `There is no measure “${(begin === -1 ? from : to).trim().slice(0, 20)}”: this line has ${all}.`;
  return end < begin ? `Measure ${to.trim()} comes before measure ${from.trim()}.` : { from: begin, to: end };
}

export type Taken = TakenMeasures & { readonly text: string };

/** What is taken of a line. @param isHeld - each attack held until the next */
export function taken(candidate: Candidate, { from, to }: MeasureRange, isHeld: boolean): Taken {
  const cut = takeMeasures(candidate, from, to);
  const rhythm: Rhythm = isHeld ? holdToNext(cut.rhythm) : cut.rhythm;
  return { ...cut, rhythm: [...rhythm], text: formatRhythm(rhythm) };
}

/** Whether holding each attack until the next would change anything. */
export const canBeHeld = (rhythm: Rhythm): boolean => rhythm.some(({ rest }, index) => rest && rhythm.slice(0, index).some((before) => !before.rest));

/** The first measures of a line, as text that fits a list. */
export function firstMeasures(candidate: Candidate): string {
  const { rhythm } = takeMeasures(candidate, 0, Math.min(1, candidate.measures.length - 1));
  const text = formatRhythm(rhythm.slice(0, 12));
  return rhythm.length > 12 || candidate.measures.length > 2 ? `${text} …` : text;
}

/** What a line that is brought in becomes. */
export type Destination =
  /** a subject of its own, which a section may state at once */
  | { readonly kind: 'subject'; readonly name: string; readonly statedBy: string | null }
  /** in place of a subject */
  | { readonly kind: 'replace'; readonly subject: string }
  /** a line of a new section after another */
  | { readonly kind: 'episode'; readonly name: string; readonly after: string; readonly instrument: string }
  /** a line of a free section, in place of the instrument's own if it has one there */
  | { readonly kind: 'line'; readonly section: string; readonly instrument: string };

const putLine = (lines: FreeSection['lines'], line: FreeSection['lines'][number]): FreeSection['lines'] =>
  lines.some(({ instrument }) => instrument === line.instrument) ? lines.map((one) => (one.instrument === line.instrument ? line : one)) : [...lines, line];

/** Puts a rhythm where it is wanted, in one change that one undo takes back. */
export const bringIn = (rhythm: string, destination: Destination): Edit => {
  if (destination.kind === 'replace') return setSubject(destination.subject, { rhythm });
  if (destination.kind === 'subject') {
    const name = destination.name.trim().slice(0, LIMITS.name);
    return (study) => {
      const id = freshId(name, study.subjects);
      const added = { ...study, subjects: [...study.subjects, { id, name, rhythm }] };
      return destination.statedBy === null ? added : setSectionSubject(destination.statedBy, id)(added);
    };
  }
  const line = { instrument: destination.instrument, rhythm };
  if (destination.kind === 'line') {
    return (study) => ({ ...study, sections: study.sections.map((section) => (section.id === destination.section && section.kind === 'free' ? { ...section, lines: putLine(section.lines, line) } : section)) });
  }
  return (study) => {
    const name = destination.name.trim().slice(0, LIMITS.name);
    const index = study.sections.findIndex(({ id }) => id === destination.after);
    return { ...study, sections: study.sections.toSpliced(index + 1, 0, { id: freshId(name, study.sections), name, role: 'episode', kind: 'free', lines: [line] }) };
  };
};
