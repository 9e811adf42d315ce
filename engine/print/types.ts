import type { EngineError } from '../errors';
import type { Fraction } from '../exact/fraction';
import type { NotationSymbol } from '../notation/types';
import type { Instrument } from '../study/schema';
import type { PlannedMeasure } from '../views/measures';
import type { Repeat } from '../views/repeats';
import type { TempoMark } from '../views/tempo-marks';

/** A place on a staff. */
export type StaffPlace = {
  /** index among the measures of the print */
  readonly measure: number;
  /** from the measure's start, in whole notes as written */
  readonly offset: Fraction;
};

/** A written symbol with all that stands about it. */
export type PrintNote = {
  readonly symbol: NotationSymbol;
  /** from the measure's start, in whole notes as written */
  readonly at: Fraction;
  /** 1 the lowest */
  readonly sound: number;
  readonly accent?: 'accent' | 'strong';
  readonly roll?: true;
  readonly ends?: 'let-ring' | 'choke';
  readonly fermata?: true;
  /** id of the statement it belongs to, null for rests between statements */
  readonly statement: string | null;
  /** the subject's attack number, or null */
  readonly origin: number | null;
};

/** One measure of one staff. */
export type PrintCell = {
  /** id of the instrument that plays, or is made ready, here */
  readonly instrument: string;
  readonly notes: readonly PrintNote[];
  /** whether nothing sounds */
  readonly silent: boolean;
};

export type StaffDynamic =
  | { readonly kind: 'level'; readonly place: StaffPlace; readonly text: string; /** a mark such as mf, not words */ readonly isMark: boolean }
  | { readonly kind: 'hairpin'; readonly from: StaffPlace; readonly to: StaffPlace; readonly direction: 'louder' | 'softer' };

/** Another instrument on the same staff, announced in the rests before. */
export type InstrumentChange = {
  readonly instrument: string;
  /** the measure over whose rest it is announced; that of the entry where there is no rest */
  readonly said: number;
  /** the measure where it first sounds */
  readonly entry: number;
};

/** What somebody else plays, in small notes, at the end of a long rest. */
export type Cue = { readonly first: number; readonly length: number; readonly instrument: string; readonly name: string; readonly cells: readonly PrintCell[] };

export type PrintStaff = {
  readonly id: string;
  /** the instruments it is for, in the study's order, each with the number of its sounds */
  readonly instruments: readonly Instrument[];
  /** one of its measures, by index; worked out when it is asked for */
  readonly cell: (measure: number) => PrintCell;
  /** whether nothing sounds in a measure */
  readonly isSilent: (measure: number) => boolean;
  readonly dynamics: readonly StaffDynamic[];
  readonly changes: readonly InstrumentChange[];
  readonly cues: readonly Cue[];
};

export type PrintMeasure = PlannedMeasure & {
  /** the sections that begin here, by id */
  readonly sections: readonly { readonly id: string; readonly name: string }[];
  /** rehearsal letter */
  readonly letter: string | null;
  readonly tempo: TempoMark | null;
  /** exact seconds from the start of the piece */
  readonly seconds: Fraction;
  /** whether a repeat begins here */
  readonly begins?: true;
  /** how often what ends here is played */
  readonly times?: number;
};

/** Staves of one player, side by side in the score. */
export type PrintGroup = { readonly player: string; readonly name: string; readonly first: number; readonly length: number };

/** Everything that is printed, whoever prints it. */
export type PrintScore = {
  readonly title: string;
  readonly composer: string | null;
  readonly rights: string | null;
  /** everybody, and what they play */
  readonly players: readonly { readonly id: string; readonly name: string; readonly instruments: readonly string[] }[];
  /** the player whose part it is; null for the score */
  readonly part: { readonly id: string; readonly name: string } | null;
  /** every measure of the piece, those that a repeat leaves out too */
  readonly measures: readonly PrintMeasure[];
  /** the measures that are printed, by index: of a repeat, its figure once */
  readonly printed: readonly number[];
  readonly staves: readonly PrintStaff[];
  readonly groups: readonly PrintGroup[];
  /** what is printed once and played several times, by index of the measures of the piece */
  readonly repeats: readonly Repeat[];
  /** exact seconds */
  readonly duration: Fraction;
  /** instruments whose line cannot be written, and why */
  readonly failures: readonly { readonly instrument: Instrument; readonly error: EngineError }[];
  /** sections that cannot be written as they ask, and why */
  readonly refusals: readonly EngineError[];
};
