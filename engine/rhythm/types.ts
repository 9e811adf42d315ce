import type { Fraction } from '../exact/fraction';

/** One note or rest. */
export type Value = {
  /** exact length, in whole notes, above 0 */
  readonly length: Fraction;
  readonly rest: boolean;
  readonly accent?: 'accent' | 'strong';
  readonly roll?: true;
  /** number of the sound on an instrument that has several, 1 the lowest */
  readonly sound?: number;
  /** how the attack ends where it does not just end; a study says so, rhythm text does not */
  readonly ends?: 'let-ring' | 'choke';
};

/** Values one after another. */
export type Rhythm = readonly Value[];

/** `subject` read forwards, its values reversed, or its attacks reversed. */
export type RetrogradeBy = 'values' | 'attacks';
export type Reading = 'forwards' | 'backwards-values' | 'backwards-attacks';
