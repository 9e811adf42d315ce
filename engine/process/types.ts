import type { Fraction } from '../exact/fraction';
import type { Reading, Value } from '../rhythm/types';
import type { Process, ProcessSection } from '../study/schema';

/** A value that remembers which attack of the subject it comes from; null for rests. */
export type TracedValue = Value & { readonly origin: number | null };

/** A statement placed within its section. */
export type Placed = {
  /** from the section's start, in whole notes */
  readonly start: Fraction;
  /** where it ends, from the section's start: its start and length added */
  readonly end: Fraction;
  readonly length: Fraction;
  readonly instrument: string | null;
  readonly assigned?: readonly string[];
  readonly subject: string | null;
  readonly factor: Fraction;
  readonly reading: Reading;
  readonly rotation: number;
  readonly mirrored: boolean;
  readonly values: readonly TracedValue[];
};

/** What a process is given. */
export type ProcessContext<P extends Process = Process> = {
  readonly section: ProcessSection;
  readonly process: P;
  /** path of the process in the document, for errors */
  readonly path: string;
  /** the subject after the section's `before` */
  readonly subject: readonly TracedValue[];
  /** the section's instruments, all declared, at least one */
  readonly instruments: readonly string[];
};

/** The rules of one process: what it states, and when. */
export type ProcessRules<P extends Process = Process> = {
  readonly kind: P['kind'];
  /** how many values the statements will have in all, found without stating them */
  size(context: ProcessContext<P>): number;
  /** statements in order of number */
  statements(context: ProcessContext<P>): Placed[];
};
