import 'server-only';
import type { SaveResult } from '@/db/queries/save-study';
import { AppError } from '../errors';
import { conflictResponse, studyResponse } from '../schemas/studies';
import { jsonResponse } from './json-response';

export const noStudy = () => new AppError('not_found', 'There is no such study, or it is not yours to open.');
export const readOnly = () => new AppError('forbidden', 'This is a demonstration, which nobody changes: copy it, and change the copy.');
export function badCursor(): AppError {
  const message = 'This place in the list cannot be read: begin at the top.';
  return new AppError('invalid', message, { cursor: message });
}

/**
 * The answer to a save.
 * @param status - of a success
 * @throws AppError for every refusal but a conflict, which carries what was saved meanwhile
 */
export function saveAnswer(result: SaveResult, status: 200 | 201): Response {
  switch (result.kind) {
    case 'saved':
      return jsonResponse(studyResponse, { study: result.study }, { status });
    case 'conflict': {
      const error = { code: 'version_conflict', message: `Version ${result.current.version} of this study was saved elsewhere in the meantime. Nothing was overwritten.` };
      return jsonResponse(conflictResponse, { error, current: result.current }, { status: 409 });
    }
    case 'save-id-used':
      throw new AppError('save_id_used', 'This save has been used for another document. Nothing was overwritten.');
    case 'demo':
      throw readOnly();
    case 'missing':
      throw noStudy();
  }
}
