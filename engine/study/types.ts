import type { Fraction } from '../exact/fraction';
import type { Reading, Rhythm } from '../rhythm/types';
import type { RotateBy } from '../transform/rotate';

export type BuiltSection = {
  readonly id: string;
  /** from the study's start, in whole notes */
  readonly start: Fraction;
  readonly length: Fraction;
};

/** One statement of a subject, or one free line (`subject` is then null). */
export type Statement = {
  readonly id: string;
  /** id of its section */
  readonly section: string;
  /** its number within the section, in order of time */
  readonly index: number;
  /** from the study's start, in whole notes */
  readonly start: Fraction;
  readonly length: Fraction;
  /** null where its attacks are shared out: see `assigned` */
  readonly instrument: string | null;
  /** an instrument for each attack, where they differ */
  readonly assigned?: readonly string[];
  readonly subject: string | null;
  readonly factor: Fraction;
  readonly reading: Reading;
  /** by values, unless `rotationBy` says otherwise */
  readonly rotation: number;
  readonly rotationBy?: RotateBy;
  /** how often it goes through its figure, where more than once */
  readonly repeats?: number;
  /** whether it is turned about by a mirror; twice turned is not */
  readonly mirrored: boolean;
  readonly rhythm: Rhythm;
  /** for each value of the rhythm, the subject's attack number, or null */
  readonly origins: readonly (number | null)[];
};

export type Line = { readonly instrument: string; readonly rhythm: Rhythm };

export type PalindromeSense = {
  readonly holds: boolean;
  /** the first place where it fails, in words */
  readonly failure?: string;
};

export type Palindrome = {
  /** the sections pair up from outside in as mirrors, the middle one left free */
  readonly form: PalindromeSense;
  /** every line read backwards is itself */
  readonly values: PalindromeSense;
  /** every instrument's attack times are symmetrical about the middle between the piece's first and last attack */
  readonly attacks: PalindromeSense;
};

export type BuiltStudy = {
  readonly sections: readonly BuiltSection[];
  readonly statements: readonly Statement[];
  /** the whole piece of each instrument, in the order of the document */
  readonly lines: readonly Line[];
  readonly totalLength: Fraction;
  readonly palindrome: Palindrome;
};
