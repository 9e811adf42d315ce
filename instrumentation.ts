/** Next.js calls this once when the server starts: prints that wait from before are taken up again. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { startExportWorker } = await import('./lib/server/exports/worker');
  startExportWorker();
}
