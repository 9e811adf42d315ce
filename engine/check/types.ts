import type { Rhythm, Value } from '../rhythm/types';
import type { Metre } from '../rhythm/metre';
import type { Step } from '../transform/steps';
import type { SpellingRemark } from './spelling-remarks';

export type Verdict = 'right' | 'wrong-length' | 'wrong-kind' | 'missing' | 'extra';

/** A value of the key beside the one that stands for it in the answer; side by side rests are one. */
export type CheckedValue = { readonly expected?: Value; readonly given?: Value; readonly verdict: Verdict };

/** Every mistake that is recognised, in order of precedence: of two that explain an answer, the one that stands first does. */
export const MISTAKES = [
  'nothing-done',
  'factor-inverted',
  'rests-not-stretched',
  'only-rests-stretched',
  'not-stretched',
  'not-reversed',
  'reversed-by-attacks',
  'reversed-by-values',
  'rotated-the-wrong-way',
  'rotated-too-far',
  'rotated-too-little',
  'not-rotated',
  'rotated-by-attacks',
  'rotated-by-values',
  'taken-away-instead',
  'added-to-rests',
  'not-added',
  'steps-in-another-order',
  'wrong-factor',
  'other-unit',
  'measure-does-not-add-up',
  'struck-again',
  'held-on',
  'kind-wrong',
  'value-wrong',
  'value-missing',
  'value-added',
] as const;
export type Mistake = (typeof MISTAKES)[number];

/** Where a mistake is; counting is from 0 here and from 1 in words. */
export type MistakeAt = {
  /** the value of the key, side by side rests taken together */
  readonly value: number;
  /** where a metre is given */
  readonly measure?: number;
  /** in beats of the metre's written unit, from 0, as text */
  readonly beat?: string;
};

export type Diagnosis = { readonly code: Mistake; readonly message: string; readonly at: MistakeAt };

export type CheckInput = {
  readonly subject: Rhythm | string;
  readonly steps: readonly Step[];
  readonly answer: Rhythm | string;
  readonly metre?: Metre;
};

export type CheckedAnswer = {
  readonly correct: boolean;
  readonly expected: Rhythm;
  readonly marks: { readonly got: number; readonly of: number };
  readonly values: readonly CheckedValue[];
  readonly diagnoses: readonly Diagnosis[];
  /** how the answer is spelled, apart from the marks; for an answer in text where a metre is given */
  readonly spelling: readonly SpellingRemark[];
};
