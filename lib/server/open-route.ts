import 'server-only';
import type { z } from 'zod';
import { OPEN_ROUTES, type OpenBody, type OpenRoute } from '../schemas/open';
import { jsonResponse } from './json-response';
import { OPEN_ANSWERS } from './open-answers';

/** Reads the body of a question of the open API, and answers it. @throws ZodError, EngineError */
export function answerOpen<K extends OpenRoute>(route: K, body: unknown): Response {
  const read = OPEN_ROUTES[route].body.parse(body) as OpenBody<K>;
  return jsonResponse(OPEN_ROUTES[route].response as z.ZodType, OPEN_ANSWERS[route](read));
}
