import { EngineError } from '../errors';
import { plural } from '../describe/words';
import type { NotationMeasure } from '../notation/types';
import type { Section, Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { type PlannedMeasure, planMeasures } from './measures';
import { scoreOf } from './score';
import { tempoMarks } from './tempo-marks';
import { type Writing, sectionSpans } from './writing';

/** What a reader has to take in, counted. */
export type Legibility = {
  readonly symbols: number;
  readonly ties: number;
  readonly dots: number;
  readonly tuplets: number;
  /** brackets within brackets */
  readonly nested: number;
  readonly metreChanges: number;
  readonly tempoChanges: number;
  /** the counts weighed and added; small is legible */
  readonly cost: number;
};

/**
 * What each thing costs a reader. The weights are a setting of ours (common practice, no source): a tie or a dot is read in
 * passing, a bracket must be counted, a bracket within one worked out, a change of metre or tempo prepared.
 */
const WEIGHT = { symbols: 1, ties: 2, dots: 1, tuplets: 4, nested: 12, metreChanges: 4, tempoChanges: 6 } as const;

const KINDS = Object.keys(WEIGHT) as (keyof typeof WEIGHT)[];

/** Counts what stands in some measures of one staff. */
export function legibilityOf(measures: readonly NotationMeasure[], changes: { metreChanges?: number; tempoChanges?: number } = {}): Legibility {
  const symbols = measures.flatMap((measure) => measure.symbols);
  const starts = symbols.flatMap(({ tuplets }) => tuplets.map(({ starts: opens }, depth) => (opens ? depth : null))).filter((depth) => depth !== null);
  const counts = {
    symbols: symbols.length,
    ties: symbols.filter(({ tiedOn }) => tiedOn).length,
    dots: symbols.reduce((n, { dots }) => n + dots, 0),
    tuplets: starts.filter((depth) => depth === 0).length,
    nested: starts.filter((depth) => depth > 0).length,
    metreChanges: changes.metreChanges ?? 0,
    tempoChanges: changes.tempoChanges ?? 0,
  };
  return { ...counts, cost: KINDS.reduce((sum, kind) => sum + WEIGHT[kind] * counts[kind], 0) };
}

const NAMES: Readonly<Record<keyof typeof WEIGHT, string>> = {
  symbols: 'symbol', ties: 'tie', dots: 'dot', tuplets: 'tuplet', nested: 'nested tuplet', metreChanges: 'change of metre', tempoChanges: 'change of tempo',
};
const PLURALS: Partial<Record<keyof typeof WEIGHT, string>> = { metreChanges: 'changes of metre', tempoChanges: 'changes of tempo' };

/** What there is to read, in words: “12 ties, 3 dots, 2 changes of tempo”. */
export function legibilityWords(legibility: Legibility): string {
  const words = KINDS.filter((kind) => kind === 'symbols' || legibility[kind] > 0).map((kind) => {
    const many = PLURALS[kind];
    return many !== undefined && legibility[kind] > 1 ? `${legibility[kind]} ${many}` : plural(legibility[kind], NAMES[kind]);
  });
  return words.join(', ');
}

/** A way to write a section: what it costs, or why it is impossible. */
export type WritingChoice =
  | { readonly writing: Writing; readonly legibility: Legibility; readonly isEasiest: boolean }
  | { readonly writing: Writing; readonly refused: string };

type Tried = { readonly writing: Writing; readonly legibility: Legibility } | { readonly writing: Writing; readonly refused: string };

const WRITINGS: readonly Writing[] = ['values', 'tempo', 'metre'];

function costOf(study: Study, built: BuiltStudy, section: Section): Legibility {
  const score = scoreOf(study, built);
  const failed = score.staves.find(({ error }) => error?.section === section.id)?.error;
  if (failed) throw failed;
  const { start, length } = built.sections.find(({ id }) => id === section.id)!;
  const end = start.add(length);
  const isInside = (measure: PlannedMeasure): boolean => measure.start.compare(start) >= 0 && measure.start.compare(end) < 0;
  const inside = planMeasures(study, built).filter(isInside);
  const numbers = new Set(inside.map(({ index }) => index));
  const marks = tempoMarks(study, built, score.measures).filter(({ measure }) => numbers.has(measure) && measure > 0);
  // Only what the section's own instruments play is weighed: silent staves are alike in every way of writing.
  const heard = score.staves.filter(({ sources }) => sources.some((source) => source?.statement.section === section.id));
  const changes = { metreChanges: inside.filter(({ signature, index }) => signature !== null && index > 0).length, tempoChanges: marks.length };
  return legibilityOf(heard.flatMap(({ measures }) => measures.filter((_, index) => numbers.has(index)).filter(({ symbols }) => symbols.some(({ rest }) => !rest))), changes);
}

/**
 * The three ways to write a section side by side: longer values, new tempos, new metres. All sound the same; the one that
 * costs a reader least is the easiest.
 */
export function compareWritings(study: Study, built: BuiltStudy, id: string): WritingChoice[] {
  const tried = WRITINGS.map((writing): Tried => {
    const other: Study = { ...study, sections: study.sections.map((section) => (section.id === id ? { ...section, writing } : section)) };
    const section = other.sections.find((one) => one.id === id)!;
    try {
      sectionSpans(other, built, section, writing);
      return { writing, legibility: costOf(other, built, section) };
    } catch (error) {
      if (error instanceof EngineError) return { writing, refused: error.message };
      throw error;
    }
  });
  const least = Math.min(...tried.map((one) => ('legibility' in one ? one.legibility.cost : Infinity)));
  return tried.map((one) => ('legibility' in one ? { ...one, isEasiest: one.legibility.cost === least } : one));
}
