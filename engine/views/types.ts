import type { Fraction } from '../exact/fraction';

/** One attack to be sounded. */
export type PlayEvent = {
  readonly instrument: string;
  /** from the start of the piece, exact seconds at the written tempo */
  readonly seconds: Fraction;
  /** sounding length, exact seconds */
  readonly lasts: Fraction;
  /** from the study's start, in whole notes */
  readonly position: Fraction;
  readonly accent?: 'accent' | 'strong';
  readonly roll?: true;
  readonly sound?: number;
  /** rings on after its length, or is stopped at its end */
  readonly ends?: 'let-ring' | 'choke';
  /** id of its statement */
  readonly statement: string;
  /** index of its value in the statement's rhythm */
  readonly value: number;
  /** the subject's attack number, or null */
  readonly origin: number | null;
};
