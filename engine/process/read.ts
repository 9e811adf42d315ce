import type { Reading } from '../rhythm/types';
import { retrograde } from '../transform/retrograde';
import type { TracedValue } from './types';

/** A subject in one of its readings. */
export const read = (subject: readonly TracedValue[], reading: Reading = 'forwards'): readonly TracedValue[] =>
  reading === 'forwards' ? subject : retrograde(subject, reading === 'backwards-values' ? 'values' : 'attacks');

/** A figure so many times over. */
export const repeated = (figure: readonly TracedValue[], times: number): readonly TracedValue[] =>
  times === 1 ? figure : Array.from({ length: times }, () => figure).flat();
