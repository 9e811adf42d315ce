import 'server-only';

/**
 * The address that a request seems to come from. A sender who reaches the server directly can write what it likes here: it
 * serves to count, never to allow.
 */
export function addressOf(forwarded: unknown): string {
  return typeof forwarded === 'string' ? (forwarded.split(',')[0] ?? '').trim().slice(0, 64) : 'unknown';
}
