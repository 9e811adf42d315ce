import { connect } from './connect';
import { demoAccounts } from './demo/accounts';
import { migrateDatabase } from './migrate';
import { purgeStudies } from './queries/own-studies';
import { fillFigures, seedDemoAccounts, seedDemoStudies } from './seed';

/** Any number that nothing else locks by: two starts at once take turns. */
const LOCK = 7_310_532;

/**
 * Runs the named tasks (`migrate`, `studies`, `purge`, `accounts`) in order on `DATABASE_URL`; `accounts` prints them as JSON.
 * Migrations are read from ./db, so it runs from the clone's top folder.
 */
async function run(tasks: readonly string[]): Promise<void> {
  const { database, pool } = connect(process.env.DATABASE_URL ?? '', 3);
  const lock = await pool.connect();
  try {
    await lock.query('select pg_advisory_lock($1)', [LOCK]);
    for (const task of tasks) {
      if (task === 'migrate') await migrateDatabase(database, 'db/migrations');
      else if (task === 'studies') {
        await seedDemoStudies(database);
        await fillFigures(database);
      } else if (task === 'purge') await purgeStudies(database);
      else if (task === 'accounts') {
        await seedDemoAccounts(database);
        process.stdout.write(JSON.stringify(demoAccounts));
      } else throw new Error(`There is no task “${task}”.`);
    }
  } finally {
    lock.release(true);
    await pool.end();
  }
}

run(process.argv.slice(2)).catch((error: unknown) => {
  const cause = error instanceof Error && error.cause instanceof Error ? error.cause : error;
  process.stderr.write(`${cause instanceof Error ? cause.message || cause.name : String(cause)}\n`);
  process.exitCode = 1;
});
