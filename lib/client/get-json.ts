import { errorResponse } from '../schemas/error';

/** A refusal of the API: its code, its sentence, and what is wrong where. */
export class ApiError extends Error {
  readonly code: string;
  /** HTTP status; 0 where no answer came */
  readonly status: number;
  readonly fields?: Record<string, string>;

  constructor(code: string, message: string, status: number, fields?: Record<string, string>) {
    super(message);
    this.name = 'ApiError';
    this.code = code;
    this.status = status;
    if (fields) this.fields = fields;
  }
}

/**
 * Asks the API and gives the body of a success as it came.
 * @throws ApiError with the answer's code and sentence; `offline` where no answer came, `unreadable` where it is no JSON
 */
export async function getJson(path: string, init?: RequestInit): Promise<unknown> {
  let response: Response;
  try {
    response = await fetch(path, { ...init, headers: { accept: 'application/json', ...init?.headers } });
  } catch (error) {
    if (init?.signal?.aborted) throw error;
    throw new ApiError('offline', 'Sesqui cannot be reached. Check the connection and try again.', 0);
  }
  const body: unknown = await response.json().catch(() => undefined);
  if (response.ok && body !== undefined) return body;
  const refusal = errorResponse.safeParse(body);
  if (refusal.success) {
    const { code, message, fields } = refusal.data.error;
    throw new ApiError(code, message, response.status, fields);
  }
  throw new ApiError('unreadable', 'The answer could not be read. Try again in a moment.', response.status);
}

/**
 * Sends a body to the API and gives the body of a success as it came.
 * @throws ApiError as `getJson`
 */
export const sendJson = (path: string, { method, body }: { method: 'POST' | 'PUT' | 'PATCH' | 'DELETE'; body?: unknown }): Promise<unknown> =>
  getJson(path, { method, headers: { 'content-type': 'application/json' }, ...(body === undefined ? {} : { body: JSON.stringify(body) }) });
