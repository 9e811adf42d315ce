import { EngineError } from '../errors';
import type { Exact, Fraction } from '../exact/fraction';
import type { Rhythm } from '../rhythm/types';

/** What a generated subject must satisfy. All but the length may be left out. */
export type SubjectConstraints = {
  /** total length, in whole notes */
  readonly length: Exact;
  /**
   * The grid on which notes and rests begin. Where it is left out: the coarsest that holds the length, the values and the
   * entries; without values an eighth, or what is needed finer than that.
   */
  readonly pulse?: Exact;
  /** the lengths that a note or a rest may have; every whole number of pulses where none are named */
  readonly values?: readonly Exact[];
  /** number of attacks */
  readonly attacks?: number;
  /** the share of pulses on which an attack falls: above 0, 1 at most */
  readonly density?: Exact;
  /** whether there may be rests; none where it is left out. Two rests never stand side by side: they are one */
  readonly rests?: boolean;
  /** no value, note or rest, is as long as the one before */
  readonly differingNeighbours?: boolean;
  /** the order of values, rests too, is the same both ways */
  readonly palindrome?: boolean;
  /** where copies of the subject enter, in whole notes: together they attack every pulse of the cycle exactly once */
  readonly entries?: readonly Exact[];
  /** the attacks are spread over the cycle as evenly as can be, from any starting point */
  readonly even?: boolean;
};

export type SubjectConstraint = keyof SubjectConstraints;

export type GeneratedSubject = {
  readonly rhythm: Rhythm;
  /** how many rhythms meet the constraints, each as likely as any other; null where they are too many to count */
  readonly solutions: bigint | null;
};

/** Constraints that no rhythm meets. */
export class NoSubjectError extends EngineError {
  /** the constraint that leaves nothing: by itself, or together with those that the message names */
  readonly constraint: SubjectConstraint;

  constructor(constraint: SubjectConstraint, message: string) {
    super('invalid_argument', message, { path: constraint });
    this.name = 'NoSubjectError';
    this.constraint = constraint;
  }
}

/** Constraints in whole pulses. */
export type Plan = {
  readonly length: Fraction;
  readonly pulse: Fraction;
  /** pulses of the whole */
  readonly pulses: number;
  /** allowed lengths in pulses, ascending; null where any is */
  readonly values: readonly number[] | null;
  readonly attacks: number | null;
  /** whether the number of attacks was given as a density */
  readonly byDensity: boolean;
  readonly rests: boolean;
  readonly differingNeighbours: boolean;
  readonly palindrome: boolean;
  readonly entries: readonly number[] | null;
  readonly even: boolean;
};

/** A note or rest in pulses. */
export type Item = { readonly length: number; readonly rest: boolean };
