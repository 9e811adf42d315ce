import type { z } from 'zod';
import type { SentencePart } from '../describe/sentence-parts';
import type { Fraction } from '../exact/fraction';
import type { Reading, Value } from '../rhythm/types';
import type { RotateBy } from '../transform/rotate';
import type { ProcessSection, Study } from '../study/schema';

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
  /** what the rotation counts; values where nothing is said */
  readonly rotationBy?: RotateBy;
  /** how often the statement goes through its figure; once where nothing is said */
  readonly repeats?: number;
  readonly mirrored: boolean;
  readonly values: readonly TracedValue[];
};

/** What a process is given. `P` is its part of the document. */
export type ProcessContext<P> = {
  readonly section: Pick<ProcessSection, 'id' | 'subject' | 'instruments'>;
  readonly process: P;
  /** path of the process in the document, for errors */
  readonly path: string;
  /** the subject after the section's `before`; empty where the process takes none */
  readonly subject: readonly TracedValue[];
  /** the section's instruments, all declared, at least one unless the process names its own */
  readonly instruments: readonly string[];
};

/** What a process sentence is made from. */
export type SentenceContext<P> = { readonly study: Study; readonly section: ProcessSection; readonly process: P };

/** The rules of one process: its part of the document, what it states and when, and its sentence. */
export type ProcessRules<S extends z.ZodObject> = {
  readonly schema: S;
  /** what the process does, where one is chosen, e.g. “stretched or shrunk by factors” */
  readonly label: string;
  /** a document to begin with, for a subject of so many values and these instruments */
  begin(subject: readonly Value[], instruments: readonly string[]): z.input<S>;
  /** whether it states a subject */
  readonly takesSubject: boolean;
  /** how many instruments play, where it must be so many */
  readonly players?: number;
  /** the instruments that the process names itself; without it, those of the section play */
  ownInstruments?(process: z.output<S>): readonly string[];
  /** how many values the statements will have in all, found without stating them */
  size(context: ProcessContext<z.output<S>>): number;
  /** statements in order of number */
  statements(context: ProcessContext<z.output<S>>): Placed[];
  /** what a composer would want to be told of its proportions, in whole sentences */
  remarks?(context: { readonly process: z.output<S>; readonly subject: readonly Value[] }): string[];
  /** the process sentence, its words the controls */
  sentence(context: SentenceContext<z.output<S>>): SentencePart[];
};
