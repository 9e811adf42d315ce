import 'server-only';
import { type z, ZodError } from 'zod';
import { EngineError } from '@/engine';
import { AppError, ERROR_STATUS } from '../errors';
import type { ErrorResponse } from '../schemas/error';
import { logFault } from './log-fault';

/** Codes of Node and of PostgreSQL that say: no connection, or a server that is starting or stopping. */
const NO_DATABASE = new Set(['ECONNREFUSED', 'ECONNRESET', 'ENOTFOUND', 'ETIMEDOUT', 'EPIPE', '57P01', '57P02', '57P03', '53300', '08006']);

/** What the driver says without a code where a connection has gone, the last of them when it is asked to undo what it had begun. */
const GONE = /^timeout exceeded when trying to connect$|^Connection terminated|is not queryable$/;

function isDatabaseAway(error: unknown): boolean {
  for (let at: unknown = error, depth = 0; at instanceof Error && depth < 5; at = at.cause, depth += 1) {
    if ('code' in at && typeof at.code === 'string' && NO_DATABASE.has(at.code)) return true;
    if (GONE.test(at.message)) return true;
  }
  return false;
}

function answer(status: number, error: ErrorResponse['error']): Response {
  return Response.json({ error } satisfies ErrorResponse, { status, headers: { 'cache-control': 'no-store' } });
}

const SENTENCE = /^[\p{Lu}“].*[.?]$/su;
const where = (path: readonly PropertyKey[]): string => (path.length === 0 ? 'The body' : `“${path.map(String).join('.')}”`);

/** What a schema refuses, in a sentence: its own where it has one. */
function sentenceOf(issue: z.core.$ZodIssue): string {
  if (SENTENCE.test(issue.message)) return issue.message;
  switch (issue.code) {
    case 'unrecognized_keys':
      return `${issue.keys.map((key) => `“${key.slice(0, 60)}”`).join(', ')} is not known here.`;
    case 'too_big':
      return `There is too much in ${where(issue.path)}: ${String(issue.maximum)} is the limit.`;
    case 'too_small':
      return `${where(issue.path)} is too short or too small: ${String(issue.minimum)} is the least.`;
    default:
      return `${where(issue.path)} is missing, or is not what is expected there.`;
  }
}

/** The answer for anything that a handler throws. What is not a refusal is logged and told as a fault of ours. */
export function errorResponse(error: unknown): Response {
  if (error instanceof AppError) {
    const { code, message, fields } = error;
    return answer(ERROR_STATUS[code], { code, message, ...(fields && { fields }) });
  }
  if (error instanceof EngineError) {
    const { code, message, path } = error;
    return answer(422, { code, message, ...(path && { fields: { [path]: message } }) });
  }
  if (error instanceof ZodError) {
    const fields = Object.fromEntries(error.issues.map((issue) => [issue.path.map(String).join('.'), sentenceOf(issue)]));
    return answer(422, { code: 'invalid', message: error.issues[0] ? sentenceOf(error.issues[0]) : 'This cannot be accepted as it is.', fields });
  }
  if (error instanceof SyntaxError) {
    return answer(400, { code: 'unreadable', message: 'The request could not be read: it is not JSON.' });
  }
  logFault(error);
  if (isDatabaseAway(error)) {
    return answer(503, { code: 'unavailable', message: 'The database does not answer. Try again in a moment; nothing is lost.' });
  }
  return answer(500, { code: 'internal', message: 'Something went wrong on our side. Try again in a moment.' });
}
