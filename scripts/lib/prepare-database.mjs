import { runTs } from './run-ts.mjs';
import { Stop } from './stop.mjs';

/**
 * Runs the named tasks of `db/cli.ts` on a database.
 * @returns their standard output
 */
export async function prepareDatabase(url, tasks) {
  const { code, output, stdout } = await runTs('db/cli.ts', tasks, { env: { ...process.env, DATABASE_URL: url }, quiet: true });
  if (code !== 0) {
    throw new Stop(`The database could not be brought up to this release (${output.trim().split('\n').at(-1)}): update Sesqui if the database is newer, or see DEVELOPERS.md, “When the database is broken”.`);
  }
  return stdout;
}
