import 'server-only';
import { z } from 'zod';

/**
 * Sends a value through its schema, so that only what the schema names leaves the server.
 * @throws Error where the value does not fit: a fault of ours, not the reader's
 */
export function jsonResponse<T extends z.ZodType>(schema: T, value: z.output<T>, init?: ResponseInit): Response {
  const encoded = z.safeEncode(schema, value);
  if (!encoded.success) throw new Error('An answer does not fit its schema.', { cause: encoded.error });
  return Response.json(encoded.data, { ...init, headers: { 'cache-control': 'no-store', ...init?.headers } });
}
