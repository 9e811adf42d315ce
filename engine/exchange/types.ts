import type { Fraction } from '../exact/fraction';
import type { Metre } from '../rhythm/metre';
import type { Tempo } from '../rhythm/tempo';
import type { Rhythm } from '../rhythm/types';

/** A measure of what was read, from the line's start. */
export type ReadMeasure = {
  /** as it is printed */
  readonly number: string;
  readonly start: Fraction;
  /** what it holds, which may be less or more than its metre */
  readonly length: Fraction;
  readonly metre: Metre;
};

/** A rhythm that a file holds: one voice of a part, or one channel of a track. */
export type Candidate = {
  /** of the part and voice, or track and channel; no two of a file are called alike */
  readonly name: string;
  /** at the line's start */
  readonly metre: Metre;
  /** at the line's start */
  readonly tempo: Tempo;
  /** exact, from the file's start to its end; rests side by side are one */
  readonly rhythm: Rhythm;
  /** what was left out, supposed or found odd, in sentences */
  readonly warnings: readonly string[];
  readonly measures: readonly ReadMeasure[];
};

/** How reading takes turns with other work. The engine has no clock: both are the caller's. */
export type ReadOptions = {
  /** awaited between steps */
  readonly pause?: () => Promise<void> | void;
  /** asked between steps: true gives up */
  readonly isExpired?: () => boolean;
  /** most bytes of a compressed score, unpacked, where less than the engine's own limit is wanted */
  readonly unpackedBytes?: number;
};
