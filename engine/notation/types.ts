import type { Fraction } from '../exact/fraction';
import type { Metre } from '../rhythm/metre';

/** Written note values, as text, from the breve down. */
export type Base = '2' | '1' | '1/2' | '1/4' | '1/8' | '1/16' | '1/32' | '1/64' | '1/128' | '1/256';

/** `actual` in the time of `normal`, e.g. 3 in the time of 2. */
export type TupletMark = {
  readonly actual: number;
  readonly normal: number;
  readonly starts?: true;
  readonly stops?: true;
};

/** One level of a beam, the first level first; the words are MusicXML's. */
export type BeamMark = 'begin' | 'continue' | 'end' | 'forward hook' | 'backward hook';

/** One written note or rest. */
export type NotationSymbol = {
  readonly base: Base;
  readonly dots: number;
  readonly rest: boolean;
  /** brackets the symbol stands in, from outside in */
  readonly tuplets: readonly TupletMark[];
  readonly tiedFromBefore: boolean;
  readonly tiedOn: boolean;
  /** one entry a beam level; empty where the symbol is not beamed */
  readonly beams: readonly BeamMark[];
  /** index of the value of the rhythm that it spells; null where it fills the last measure */
  readonly value: number | null;
};

export type NotationMeasure = {
  /** position from the start of the line, in whole notes */
  readonly start: Fraction;
  readonly metre: Metre;
  readonly symbols: readonly NotationSymbol[];
};

/** A metre for a whole line, or changes of metre: each begins a new measure at `at`. The first is at 0. */
export type MetrePlan = Metre | readonly { readonly at: Fraction | string | number; readonly metre: Metre }[];
