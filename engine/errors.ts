/** Every code that an `EngineError` can carry. Codes are stable; messages may be reworded. */
export type EngineErrorCode =
  /** a text is no fraction, or a number is no integer */
  | 'invalid_fraction'
  /** a factor that is zero, negative, or beyond the limit */
  | 'invalid_factor'
  /** an argument outside what the function takes */
  | 'invalid_argument'
  /** rhythm text that cannot be read */
  | 'invalid_rhythm'
  /** a bar line where the measure is not full */
  | 'bar_not_full'
  /** a metre that cannot be read or written */
  | 'invalid_metre'
  | 'invalid_tempo'
  /** beyond a limit of `limits.ts` */
  | 'too_large'
  /** lengths whose common denominator is too fine to be counted exactly */
  | 'too_fine'
  /** a study document of the wrong shape */
  | 'invalid_document'
  /** a study document with a field that this version does not know */
  | 'unknown_field'
  /** the same id twice */
  | 'duplicate_id'
  | 'unknown_subject'
  | 'unknown_instrument'
  | 'unknown_section'
  | 'unknown_player'
  | 'unknown_process'
  /** a section that mirrors itself, directly or by way of others */
  | 'mirror_ring'
  /** two statements at once on one instrument */
  | 'overlap'
  /** a way of writing that a section does not allow */
  | 'cannot_write'
  /** a value that cannot be written in the metre */
  | 'unspellable'
  /** a file of music that is damaged, cut off, or of another kind */
  | 'unreadable_music'
  /** a file made to do harm, or that cannot be told from one */
  | 'hostile_file'
  /** reading was given up, because the time allowed was over */
  | 'out_of_time';

/**
 * What the engine says when it refuses. `message` is a sentence for a musician; `code` is for programs; the rest says where.
 */
export class EngineError extends Error {
  readonly code: EngineErrorCode;
  /** the section at fault, by id */
  readonly section?: string;
  /** the field at fault, as a path into the study document, e.g. `sections.0.process.factors.2` */
  readonly path?: string;

  constructor(code: EngineErrorCode, message: string, where: { section?: string; path?: string } = {}) {
    super(message);
    this.name = 'EngineError';
    this.code = code;
    if (where.section !== undefined) this.section = where.section;
    if (where.path !== undefined) this.path = where.path;
  }
}

/** Rhythm text that cannot be read: `offset` and `length` mark the offending piece, in UTF-16 units of the text. */
export class RhythmTextError extends EngineError {
  readonly offset: number;
  readonly length: number;

  constructor(code: EngineErrorCode, message: string, offset: number, length: number) {
    super(code, message);
    this.name = 'RhythmTextError';
    this.offset = offset;
    this.length = length;
  }
}
