/** Every code that an answer of the API can carry besides the engine's own, and the HTTP status it travels with. */
export const ERROR_STATUS = {
  /** the request is no JSON */
  unreadable: 400,
  /** nobody is signed in */
  unauthorized: 401,
  /** signed in, but not allowed; or the request comes from another site */
  forbidden: 403,
  /** not there, or not for this reader: the two are not told apart */
  not_found: 404,
  /** somebody saved another version first; `current` beside the error is that one */
  version_conflict: 409,
  /** the id of this save has been used for another document */
  save_id_used: 409,
  /** nobody would be left to grant roles */
  last_administrator: 409,
  too_large: 413,
  /** the body is of another kind than the route takes */
  wrong_type: 415,
  /** read, but not accepted; `fields` says where */
  invalid: 422,
  too_many: 429,
  /** a fault of ours, logged */
  internal: 500,
  /** the database does not answer */
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof ERROR_STATUS;

/** A refusal with a stable code and a sentence for the reader. */
export class AppError extends Error {
  readonly code: ErrorCode;
  /** what is wrong where, by field name */
  readonly fields?: Record<string, string>;

  constructor(code: ErrorCode, message: string, fields?: Record<string, string>) {
    super(message);
    this.name = 'AppError';
    this.code = code;
    if (fields) this.fields = fields;
  }
}
