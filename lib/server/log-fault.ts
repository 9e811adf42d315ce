import 'server-only';

/** A failed query carries its parameters along, which may be a whole study. */
const LONGEST = 4_000;

/** Writes a fault of ours to the server's log, which is its standard error stream. */
export function logFault(error: unknown): void {
  const detail = error instanceof Error ? (error.stack ?? error.message) : String(error);
  process.stderr.write(`${new Date().toISOString()} ${detail.slice(0, LONGEST)}\n`);
}
