import 'server-only';

/** What one print may use; all are settings of ours. */
export const PRINT_LIMITS = {
  /** memory of the process that prints */
  megabytes: 1_536,
  /** 30 instruments for 1,000 measures, 201 pages, took four and a half on two shared processors (measured 2026-12-01) */
  minutes: 10,
  /** of a finished file */
  bytes: 48 * 1024 * 1024,
  /** how long the process is kept after a print, so that the next one begins at once */
  idleSeconds: 60,
  /** how long GET …/score.pdf waits before it answers that the print goes on */
  waitSeconds: 8,
  /** prints that may wait at once: of one reader, of the demo studies together, and in all */
  waiting: { own: 6, shared: 40, all: 200 },
} as const;
