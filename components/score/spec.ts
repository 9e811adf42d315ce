import type { NotationMeasure, PlannedMeasure, Rhythm } from '@/engine';

/** One line of music as the score draws it. */
export type DrawnStaff = {
  readonly id: string;
  readonly name: string;
  /** how many sounds the instrument has */
  readonly sounds: number;
  /** one for each planned measure; empty where the line cannot be written */
  readonly measures: readonly NotationMeasure[];
  readonly values: Rhythm;
  /** for each value, the statement and the subject's attack number that it belongs to */
  readonly sources: readonly ({ readonly statement: string; readonly origin: number | null } | null)[];
};

/** What stands about a printed measure. */
export type MeasureSigns = {
  /** whether a repeat begins here */
  readonly begins?: boolean;
  /** how often what ends here is played */
  readonly times?: number;
  /** CSS pixels that the words over it take */
  readonly room?: number;
};

/** What is printed: measures that are repeated stand once, so that their `index` may jump. */
export type DrawnScore = {
  readonly measures: readonly PlannedMeasure[];
  readonly staves: readonly DrawnStaff[];
  /** one for each printed measure; without it, nothing stands there */
  readonly signs?: readonly MeasureSigns[];
};

/** One line of the page: so many measures of so many staves. */
export type SystemSpec = {
  readonly first: number;
  /** one past the last */
  readonly end: number;
  /** CSS pixels, one for each measure, the opening of the system included in the first */
  readonly widths: readonly number[];
  readonly staves: readonly DrawnStaff[];
  /** from one staff to the next */
  readonly pitch: number;
  readonly height: number;
};
